import { describe, expect, it } from 'vitest'
import { shopAnswer, shopQuerySchema } from '@/lib/bench/shop'
import { plainText } from '@/lib/format/sentence'
import {
  benchShop,
  heaters,
  outdoorRefusal,
  shopFacts,
  type ShopField,
  shopFields,
  shopQuery,
  shopRemarks,
  shopSentence,
  shopTwin,
} from './shop-model'

const values = Object.fromEntries(
  Object.entries(shopFields).map(([key, field]) => [
    key,
    field.start === '' ? Number.NaN : Number(field.start),
  ]),
) as Record<ShopField, number>
const asText = (query: Record<string, string | number>) =>
  Object.fromEntries(Object.entries(query).map(([key, value]) => [key, String(value)]))
const bare = (text: unknown) => String(text).replaceAll('\u00a0', ' ')
const sentence = (change: Partial<typeof values>) =>
  bare(plainText(shopSentence(benchShop(shopQuery({ ...values, ...change }, 'electric')), 'metric')))

describe('the shop bench', () => {
  it('says how warm, or how dry', () => {
    expect(sentence({})).toBe(
      'Warm the shop to about 16.7 °C, or dry it to about 47 % RH, and wood in it ends at 9.0 % MC.',
    )
    expect(sentence({ humidityPct: 40 })).toMatch(/^It is dry enough as it is/)
    expect(sentence({ temperatureC: 30, humidityPct: 95, targetEmcPct: 6 })).toContain(
      'warming alone would take more than 35.0 °C',
    )
  })

  it('gives both ways their doubt', () => {
    const facts = shopFacts(benchShop(shopQuery(values, 'electric')), 'metric')
    expect(facts.map(({ name }) => name)).toEqual(['As it is', 'Warm it to', 'Or dry it to'])
    for (const { words } of facts) expect(bare(words)).toMatch(/±|Give or take \d\.\d °C/)
  })

  it('tells of water, airing and heat, and leaves out what was not told', () => {
    const all = shopRemarks(benchShop(shopQuery(values, 'unflued')), 'metric').join(' ')
    for (const word of ['out of the air', 'out of the wood', 'Airing helps', 'unflued heater adds'])
      expect(all).toContain(word)
    const bareShop = {
      ...values,
      outdoorC: Number.NaN,
      outdoorHumidityPct: Number.NaN,
      airChangesPerH: Number.NaN,
    }
    const some = shopRemarks(benchShop(shopQuery(bareShop, 'untold')), 'metric').join(' ')
    expect(some).not.toMatch(/Airing|heater/)
  })

  it('asks for the temperature outside where only the humidity is told', () => {
    expect(outdoorRefusal({ ...values, outdoorC: Number.NaN })).toContain('Temperature outside')
    expect(outdoorRefusal({ ...values, outdoorHumidityPct: Number.NaN })).toBeUndefined()
  })

  it('names queries that the API takes, with the same answer', () => {
    for (const heater of heaters) {
      const query = shopQuery(values, heater)
      const asked = shopQuerySchema.parse(asText(shopTwin(query).query))
      expect(shopAnswer(asked)).toEqual(shopAnswer(query))
      expect(shopAnswer(asked).warmToC).toBeCloseTo(benchShop(query).answer.warmTo?.temperatureC ?? 0, 9)
    }
  })

  it.each(Object.keys(shopFields) as ShopField[])('asks %s in the range of the API', (key) => {
    const query = asText(shopTwin(shopQuery({ ...values, shellWPerK: 100, surfaceC: 5 }, 'electric')).query)
    const { min, max } = shopFields[key]
    for (const [value, isGood] of [
      [min, true],
      [max, true],
      [min - 0.001, false],
      [max + 1, false],
    ] as const)
      expect(shopQuerySchema.safeParse({ ...query, [key]: String(value) }).success).toBe(isGood)
  })
})
