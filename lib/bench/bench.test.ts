import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { airAnswer, airQuerySchema, warmingAnswer, warmingQuerySchema } from './air'
import { emcAnswer, emcQuerySchema, humidityAnswer, humidityQuerySchema } from './emc'
import { fitAnswer, fitQuerySchema } from './fit'
import {
  diffusionAnswer,
  diffusionQuerySchema,
  followAnswer,
  followQuerySchema,
  jointAnswer,
  jointQuerySchema,
} from './joint'
import { saltsAnswer, saltsQuerySchema } from './salts'
import { shopQuerySchema } from './shop'
import { timeOutAnswer, timeOutQuerySchema } from './time-out'
import { weighingQuerySchema } from './weighing'

type Query = Record<string, string>

const bench: Record<string, { schema: z.ZodType; good: Query }> = {
  emc: { schema: emcQuerySchema, good: { temperatureC: '20', humidityPct: '50' } },
  humidity: { schema: humidityQuerySchema, good: { temperatureC: '20', emcPct: '9' } },
  air: { schema: airQuerySchema, good: { temperatureC: '20', humidityPct: '50' } },
  warming: { schema: warmingQuerySchema, good: { fromC: '8', fromHumidityPct: '85', toC: '15' } },
  fit: {
    schema: fitQuerySchema,
    good: {
      diameterMm: '60',
      clearanceMm: '0.2',
      angleDeg: '90',
      mcChangePct: '4',
      species: 'acer-saccharum',
    },
  },
  joint: {
    schema: jointQuerySchema,
    good: {
      densityKgM3: '700',
      temperatureC: '10',
      mcPct: '11',
      wallMm: '4',
      faces: '2',
      spigotMm: '6',
      lidMm: '8',
      hours: '3',
    },
  },
  'time-out': {
    schema: timeOutQuerySchema,
    good: {
      species: 'fraxinus-excelsior',
      diameterMm: '62',
      wallMm: '4',
      spigotMm: '6',
      cover: 'open',
      allowanceMm: '0.15',
      fromMcPct: '8.5',
      toEmcPct: '13.6',
      temperatureC: '10',
    },
  },
  follow: { schema: followQuerySchema, good: { shape: 'slab', biot: 'inf', fourier: '0.2' } },
  diffusion: { schema: diffusionQuerySchema, good: { temperatureC: '20', mcPct: '10', densityKgM3: '640' } },
  salts: { schema: saltsQuerySchema, good: { temperatureC: '20' } },
  weighing: { schema: weighingQuerySchema, good: { grams: '182.0,167.9,160.0', everyDays: '7' } },
  shop: {
    schema: shopQuerySchema,
    good: { volumeM3: '40', temperatureC: '8', humidityPct: '85', targetEmcPct: '9' },
  },
}

const goodOf = (name: string): Query => ({ ...bench[name]?.good })

/** Paths and messages of a refusal. */
function refusals(schema: z.ZodType, query: unknown): [string, string][] {
  const parsed = schema.safeParse(query)
  if (parsed.success) throw new Error('it was not refused')
  return parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message])
}

describe.each(Object.entries(bench))('query of /bench/%s', (_name, { schema, good }) => {
  const numbers = Object.keys(good).filter((key) => Number.isFinite(Number(good[key])))

  it('takes a good one', () => {
    expect(schema.safeParse(good).success).toBe(true)
  })

  it('refuses a key that it does not know', () => {
    expect(schema.safeParse({ ...good, temperature: '20' }).success).toBe(false)
  })

  it.each(numbers)(
    'refuses %s when it is empty, no plain number, out of range or given twice, naming it',
    (key) => {
      for (const bad of [
        '',
        ' ',
        'NaN',
        'Infinity',
        '1e999',
        '0x10',
        '1_000',
        '21,5',
        'twenty',
        '-99999',
        '9999999',
        '5 5',
      ]) {
        const found = refusals(schema, { ...good, [key]: bad })
        expect(found.map(([path]) => path)).toContain(key)
        expect(found.find(([path]) => path === key)?.[1]).toMatch(/\d/)
      }
      expect(refusals(schema, { ...good, [key]: ['1', '2'] }).map(([path]) => path)).toContain(key)
    },
  )

  it.each(Object.keys(good))('refuses to do without %s', (key) => {
    const without = Object.fromEntries(Object.entries(good).filter(([other]) => other !== key))
    expect(refusals(schema, without).length).toBeGreaterThan(0)
  })
})

describe('refusals say the range and the unit', () => {
  it.each([
    ['emc', 'temperatureC', '51', 'a number from −10 to 50 °C'],
    ['emc', 'humidityPct', '101', 'a number from 0 to 100 % RH'],
    ['humidity', 'emcPct', '31', 'a number from 0 to 30 % MC'],
    ['joint', 'densityKgM3', '100', 'a number from 200 to 1400 kg/m³'],
    ['fit', 'diameterMm', '0', 'a number from 1 to 1000 mm'],
    ['salts', 'temperatureC', '2', 'a number from 5 to 35 °C'],
    ['follow', 'biot', 'NaN', 'inf, or a number from 0.001 to 1000000'],
  ])('%s, %s=%s', (name, key, value, message) => {
    const schema = bench[name]?.schema
    if (schema === undefined) throw new Error(name)
    expect(refusals(schema, { ...goodOf(name), [key]: value })).toContainEqual([key, message])
  })
})

describe('answers', () => {
  it('emc: 20 °C and 50 % RH give 9.27 % MC', () => {
    const answer = emcAnswer(emcQuerySchema.parse(goodOf('emc')))
    expect(answer.emcPct).toBeCloseTo(9.2711, 4)
    expect(answer.slope).toBeCloseTo(0.1609, 4)
    expect(answer.doubtPct).toBeCloseTo(0.483, 2)
    expect(answer.flags).toEqual([])
    const cold = emcAnswer(emcQuerySchema.parse({ temperatureC: '-5', humidityPct: '97' }))
    expect(cold.flags).toEqual(['below-zero', 'above-95-rh'])
  })

  it('humidity: 9 % MC at 20 °C is held at 48.3 % RH; 29.5 % MC at no humidity', () => {
    const found = humidityAnswer(humidityQuerySchema.parse(goodOf('humidity')))
    expect(found).toMatchObject({ ok: true, value: { humidityPct: expect.closeTo(48.3, 2) } })
    expect(humidityAnswer(humidityQuerySchema.parse({ temperatureC: '20', emcPct: '29.5' }))).toMatchObject({
      ok: false,
      error: { code: 'not-possible', path: 'emcPct' },
    })
  })

  it('air: every figure of 20 °C and 50 % RH', () => {
    expect(airAnswer(airQuerySchema.parse(goodOf('air')))).toMatchObject({
      saturationPressurePa: expect.closeTo(2338.8, 1),
      vapourPressurePa: expect.closeTo(1169.4, 1),
      hasDewPoint: true,
      dewPointC: expect.closeTo(9.272, 2),
      humidityRatio: expect.closeTo(0.007262, 6),
      absoluteHumidityGM3: expect.closeTo(8.643, 2),
      wetBulbC: expect.closeTo(13.784, 2),
      enthalpyKjKg: expect.closeTo(38.552, 2),
      saturatedOver: 'water',
    })
  })

  it('air: without any water there is no dew point, and the field is not there', () => {
    const dry = airAnswer(airQuerySchema.parse({ temperatureC: '20', humidityPct: '0' }))
    expect(dry.hasDewPoint).toBe(false)
    expect(dry).not.toHaveProperty('dewPointC')
    expect(airAnswer(airQuerySchema.parse({ temperatureC: '-5', humidityPct: '80' })).saturatedOver).toBe(
      'ice',
    )
  })

  it('warming: 8 °C 85 % to 15 °C gives 53.47 % RH and 9.96 % MC; cooling past the dew point condenses', () => {
    expect(warmingAnswer(warmingQuerySchema.parse(goodOf('warming')))).toEqual({
      humidityPct: expect.closeTo(53.471, 2),
      condenses: false,
      emcPct: expect.closeTo(9.963, 2),
      flags: [],
    })
    const wet = warmingAnswer(warmingQuerySchema.parse({ fromC: '20', fromHumidityPct: '80', toC: '5' }))
    expect(wet.condenses).toBe(true)
    expect(wet.humidityPct).toBeGreaterThan(100)
    expect(wet).not.toHaveProperty('emcPct')
    const same = warmingAnswer(warmingQuerySchema.parse({ fromC: '20', fromHumidityPct: '100', toC: '20' }))
    expect(same.condenses).toBe(false)
  })

  it('fit: the maple box binds a quarter turn on, and has no limit with the grain lined up', () => {
    const quarter = fitAnswer(fitQuerySchema.parse(goodOf('fit')))
    expect(quarter).toMatchObject({
      clearanceMm: expect.closeTo(-0.2499, 3),
      clearanceFirstOrderMm: expect.closeTo(-0.2512, 4),
      tangentialDiameterMm: expect.closeTo(60.8472, 4),
      radialDiameterMm: expect.closeTo(60.396, 4),
      outOfRoundMm: expect.closeTo(0.4512, 4),
      limited: true,
      allowedMcChangePct: expect.closeTo(1.773, 3),
    })
    expect(quarter.words).toContain('may bind')
    const linedUp = fitAnswer(fitQuerySchema.parse({ ...goodOf('fit'), angleDeg: '180' }))
    expect(linedUp.limited).toBe(false)
    expect(linedUp).not.toHaveProperty('allowedMcChangePct')
    expect(linedUp.words).toContain('should still turn')
  })

  it('fit: a lid of another wood, or one that lags', () => {
    const { species: _species, ...sizes } = goodOf('fit')
    const figures = { ...sizes, angleDeg: '0', tangentialPerPct: '0.00353', radialPerPct: '0.00165' }
    const cherryLid = { lidTangentialPerPct: '0.00248', lidRadialPerPct: '0.00126' }
    const other = fitAnswer(fitQuerySchema.parse({ ...figures, ...cherryLid }))
    expect(other.clearanceFirstOrderMm).toBeCloseTo(-0.052, 3)
    const lags = fitAnswer(fitQuerySchema.parse({ ...figures, lidMcChangePct: '1' }))
    expect(lags.clearanceFirstOrderMm).toBeCloseTo(-0.4354, 4)
    // It lost 0.6354 mm over 4 points of the base, so 0.2 mm are gone after 1.259.
    expect(lags.allowedMcChangePct).toBeCloseTo(1.259, 3)
  })

  it('fit: either a species or both figures', () => {
    const { species: _species, ...sizes } = goodOf('fit')
    expect(refusals(fitQuerySchema, sizes).map(([path]) => path)).toEqual([
      'tangentialPerPct',
      'radialPerPct',
    ])
    expect(refusals(fitQuerySchema, { ...sizes, tangentialPerPct: '0.003' })).toHaveLength(1)
    expect(refusals(fitQuerySchema, { ...goodOf('fit'), radialPerPct: '0.001' })).toHaveLength(1)
    expect(refusals(fitQuerySchema, { ...goodOf('fit'), species: 'quercus-imaginaria' })[0]?.[0]).toBe(
      'species',
    )
    expect(refusals(fitQuerySchema, { ...goodOf('fit'), lidRadialPerPct: '0.001' })[0]?.[0]).toBe(
      'lidTangentialPerPct',
    )
  })

  it('joint: ring and lid after 3 h, and slower with a shielded rim', () => {
    const open = jointAnswer(jointQuerySchema.parse(goodOf('joint')))
    expect(open).toEqual({ ring: expect.closeTo(0.3468, 4), lid: expect.closeTo(0.2637, 4) })
    const oneFace = jointAnswer(jointQuerySchema.parse({ ...goodOf('joint'), faces: '1' }))
    expect(oneFace).toEqual({ ring: expect.closeTo(0.2613, 4), lid: expect.closeTo(0.2637, 4) })
    const shielded = jointAnswer(jointQuerySchema.parse({ ...goodOf('joint'), rim: 'shielded' }))
    expect(shielded.ring).toBeLessThan(open.ring)
    expect(refusals(jointQuerySchema, { ...goodOf('joint'), faces: '3' })).toEqual([['faces', '1 or 2']])
  })

  it('time-out: the ash box is to be back at about 0.45 of the middle', () => {
    const answer = timeOutAnswer(timeOutQuerySchema.parse(goodOf('time-out')))
    if (!answer.binds) throw new Error('it does bind')
    expect(Math.abs(answer.minutes / 60 / 4.6 - 1)).toBeLessThan(0.08)
    expect(Math.abs(answer.minutesEarly / answer.minutes - 0.45)).toBeLessThan(0.04)
    expect(Math.abs((answer.minutesLate ?? NaN) / answer.minutes - 2.2)).toBeLessThan(0.5)
    expect(answer.words).toContain('be back within about')
  })

  it('time-out: where the change is too small it keeps its fit, and no minutes are given', () => {
    const answer = timeOutAnswer(timeOutQuerySchema.parse({ ...goodOf('time-out'), toEmcPct: '9' }))
    expect(answer.binds).toBe(false)
    expect(answer).not.toHaveProperty('minutes')
    expect(answer.words).toContain('no telling difference')
  })

  it('time-out: a lid that lags the ring binds sooner on the way to damp, and eases on the way to dry', () => {
    const alone = timeOutAnswer(timeOutQuerySchema.parse(goodOf('time-out')))
    const lid = { lidForm: 'plug', lidMm: '20' }
    const lags = timeOutAnswer(timeOutQuerySchema.parse({ ...goodOf('time-out'), ...lid }))
    if (!alone.binds || !lags.binds) throw new Error('both bind')
    expect(lags.minutes).toBeLessThan(alone.minutes)
    const toDry = { ...goodOf('time-out'), fromMcPct: '13.6', toEmcPct: '8.5' }
    const dryAlone = timeOutAnswer(timeOutQuerySchema.parse(toDry))
    const dryLags = timeOutAnswer(timeOutQuerySchema.parse({ ...toDry, ...lid }))
    if (!dryAlone.binds || !dryLags.binds) throw new Error('both bind')
    expect(dryLags.minutes).toBeGreaterThan(dryAlone.minutes)
    expect(refusals(timeOutQuerySchema, { ...goodOf('time-out'), lidForm: 'plug' })[0]?.[0]).toBe('lidMm')
  })

  it('time-out: a wood by its figures needs density and movement in both directions', () => {
    const { species: _species, ...sizes } = goodOf('time-out')
    const figures = { densityKgM3: '702', tangentialPerPct: '0.00282', radialPerPct: '0.00172' }
    const bySpecies = timeOutAnswer(timeOutQuerySchema.parse(goodOf('time-out')))
    const byFigures = timeOutAnswer(timeOutQuerySchema.parse({ ...sizes, ...figures }))
    if (!bySpecies.binds || !byFigures.binds) throw new Error('both bind')
    expect(byFigures.minutes).toBeCloseTo(bySpecies.minutes, 1)
    expect(refusals(timeOutQuerySchema, sizes).map(([path]) => path)).toEqual([
      'densityKgM3',
      'tangentialPerPct',
      'radialPerPct',
    ])
    const alike = { ...sizes, ...figures, radialPerPct: '0.00282' }
    expect(timeOutAnswer(timeOutQuerySchema.parse(alike)).binds).toBe(false)
  })

  it('follow, diffusion and salts', () => {
    expect(followAnswer(followQuerySchema.parse(goodOf('follow'))).fraction).toBeCloseTo(0.50409, 4)
    const cylinder = followQuerySchema.parse({ shape: 'cylinder', biot: '10', fourier: '0.1' })
    expect(followAnswer(cylinder).fraction).toBeCloseTo(0.49002, 4)
    const diffusion = diffusionAnswer(diffusionQuerySchema.parse(goodOf('diffusion')))
    expect(diffusion.transverseM2PerS / 2.8924e-11).toBeCloseTo(1, 3)
    expect(saltsAnswer(saltsQuerySchema.parse(goodOf('salts'))).items).toHaveLength(6)
  })
})
