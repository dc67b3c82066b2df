import { describe, expect, it } from 'vitest'
import { emcQuerySchema, humidityQuerySchema } from '@/lib/bench/emc'
import { airQuerySchema, warmingQuerySchema } from '@/lib/bench/air'
import { airOf, emcFields, factsOf, twinsOf, within } from './emc-model'

const values = { temperatureC: 8, humidityPct: 85, emcPct: 9, toC: 15 }
const bare = (text: unknown) => String(text).replaceAll('\u00a0', ' ')

describe('the EMC bench', () => {
  it('reads the air both ways', () => {
    expect(airOf(values, true)).toMatchObject({ ok: true, value: { emcPct: expect.closeTo(18.41, 2) } })
    expect(airOf(values, false)).toMatchObject({
      ok: true,
      value: { emcPct: 9, humidityPct: expect.closeTo(47.01, 1) },
    })
  })

  it('says how much wood such air can hold at most', () => {
    expect(airOf({ ...values, temperatureC: 20, emcPct: 29.5 }, false)).toMatchObject({
      ok: false,
      error: expect.stringContaining('28.8 % MC at most'),
    })
  })

  it('gives every figure its doubt or what it means', () => {
    const air = airOf(values, true)
    if (!air.ok) throw new Error(air.error)
    const facts = factsOf(air.value, true, 'metric').map((fact) =>
      bare(`${fact.name}: ${String(fact.figure)} ${String(fact.words)}`),
    )
    expect(facts[0]).toMatch(/^Where wood ends: 18\.4 % MC ±1\.3 % MC for a sensor within ±3 % RH/)
    expect(facts[1]).toContain('0.44 % MC more Steep')
    expect(facts[2]).toContain('At 15.0 °C, no water added: 53 % RH, 10.0 % MC')
    expect(facts[3]).toMatch(/^Dew point: 5\.6 °C .* 7\.0 g of water/)
  })

  it('has no dew point in air without water', () => {
    const dry = airOf({ ...values, humidityPct: 0 }, true)
    if (!dry.ok) throw new Error(dry.error)
    expect(factsOf(dry.value, true, 'metric').at(-1)).toMatchObject({ figure: 'none' })
  })

  it('keeps a dragged point within the range', () => {
    expect(within(emcFields.humidityPct, 104)).toBe(100)
    expect(within(emcFields.temperatureC, -30)).toBe(-10)
  })

  it.each([
    ['temperatureC', emcQuerySchema, { temperatureC: '20', humidityPct: '50' }],
    ['humidityPct', emcQuerySchema, { temperatureC: '20', humidityPct: '50' }],
    ['emcPct', humidityQuerySchema, { temperatureC: '20', emcPct: '9' }],
    ['toC', warmingQuerySchema, { fromC: '8', fromHumidityPct: '85', toC: '15' }],
  ] as const)('asks %s in the range of the API', (key, schema, query) => {
    const { min, max } = emcFields[key]
    for (const [value, isGood] of [
      [min, true],
      [max, true],
      [min - 0.01, false],
      [max + 0.01, false],
    ] as const)
      expect(schema.safeParse({ ...query, [key]: String(value) }).success).toBe(isGood)
  })

  it('names queries that the API takes', () => {
    const schemas = {
      '/bench/emc': emcQuerySchema,
      '/bench/humidity': humidityQuerySchema,
      '/bench/warming': warmingQuerySchema,
      '/bench/air': airQuerySchema,
    }
    for (const isEmc of [true, false]) {
      const air = airOf(values, isEmc)
      if (!air.ok) throw new Error(air.error)
      for (const { path, query } of twinsOf(air.value, isEmc)) {
        const asked = Object.fromEntries(Object.entries(query).map(([key, value]) => [key, String(value)]))
        expect(schemas[path as keyof typeof schemas].safeParse(asked).success).toBe(true)
      }
    }
  })
})
