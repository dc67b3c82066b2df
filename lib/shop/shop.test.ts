import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { emcPct } from '@/lib/wood/emc'
import { referenceJson } from '@/tests/support/reference'
import { aboutMass, aboutPower, twoFigures } from './about'
import { shopCautions } from './cautions'
import { holdingHeat, latentHeatKwh } from './heat'
import { heatedHumidityPct, heaterWaterKgPerKwh } from './heater'
import { airing } from './outdoor-air'
import { shopAnswer, type ShopQuestion } from './shop'
import { assumedSurface, surfaceAnswer } from './surface'
import { humidityRatioOf, waterByAirChangesKgPerH, waterInAirKg, waterInWoodKg } from './water'
import { shopWords } from './words'

const { surface, ventilation_heat_w } = z
  .object({
    surface: z
      .array(
        z.object({
          room_c: z.number(),
          room_rh: z.number(),
          surface_c: z.number(),
          surface_rh_pct: z.number(),
          dew_point_c: z.number(),
        }),
      )
      .min(2),
    ventilation_heat_w: z
      .array(z.object({ volume_m3: z.number(), ach: z.number(), delta_t_k: z.number(), watt: z.number() }))
      .min(1),
  })
  .parse(referenceJson('worked_examples.json'))

describe('against worked_examples.json', () => {
  it.each(surface)('a surface at $surface_c °C in $room_c °C and $room_rh % RH', (row) => {
    const air = { temperatureC: row.room_c, humidityPct: row.room_rh }
    const answer = surfaceAnswer(air, { temperatureC: row.surface_c, from: 'measured' })
    expect(Math.abs(answer.surfaceHumidityPct - row.surface_rh_pct)).toBeLessThan(0.02)
    expect(Math.abs((answer.dewPointC ?? NaN) - row.dew_point_c)).toBeLessThan(0.02)
  })

  it.each(ventilation_heat_w)('air of $volume_m3 m³ warmed by $delta_t_k K', (row) => {
    const { airW } = holdingHeat(row.volume_m3, row.ach, row.delta_t_k, undefined)
    // The file takes 0.33 W h/(m³ K), rounded from 0.335.
    expect(Math.abs(airW / row.watt - 0.3353 / 0.33)).toBeLessThan(0.001)
    expect(aboutPower(airW)).toBe('about 130\u00a0W')
  })
})

describe('water', () => {
  it('in the air is dwarfed by that in the wood: 200 kg from 18 to 9 % MC give 18 kg', () => {
    expect(waterInWoodKg(200, 18, 9)).toBeCloseTo(18, 9)
    expect(waterInWoodKg(200, 9, 18)).toBeCloseTo(-18, 9)
  })

  it('in the air is added and taken in equal parts', () => {
    expect(waterInAirKg(40, 8, 85, 47)).toBeCloseTo(-waterInAirKg(40, 8, 47, 85), 12)
  })

  it('comes with the air by its humidity ratio, and 1.2 kg of air to the m³', () => {
    expect(waterByAirChangesKgPerH(40, 0.5, 0.006, 0.004)).toBeCloseTo(0.5 * 40 * 1.2 * 0.002, 9)
    expect(waterByAirChangesKgPerH(40, 0.5, 0.003, 0.004)).toBeLessThan(0)
  })

  it('from a kilogram takes 0.68 kWh to evaporate', () => {
    expect(latentHeatKwh(1)).toBeCloseTo(0.68, 2)
  })
})

describe('outdoor air', () => {
  it('helps by the water in it, not by its RH: cold air at 95 % dries a shop at 60 %', () => {
    const found = airing({ temperatureC: 15, humidityPct: 60 }, { temperatureC: 2, humidityPct: 95 })
    expect(found.effect).toBe('dries')
    expect(found.outdoorDewPointC).toBeLessThan(found.roomDewPointC ?? NaN)
    expect(found.humidityAfterPct).toBeLessThan(60)
    expect(found.emcAfterPct).toBeCloseTo(emcPct(15, found.humidityAfterPct), 9)
    expect(found.emcOutdoorsPct).toBeGreaterThan(20)
  })

  it('wets a cool shop on a warm day at a lower RH, and may condense there', () => {
    const warmDay = airing({ temperatureC: 10, humidityPct: 70 }, { temperatureC: 25, humidityPct: 60 })
    expect(warmDay.effect).toBe('wets')
    expect(warmDay.humidityAfterPct).toBeGreaterThan(100)
    expect(warmDay.emcAfterPct).toBeUndefined()
  })

  it('makes no telling difference within what two sensors leave open', () => {
    const air = { temperatureC: 12, humidityPct: 70 }
    expect(airing(air, air).effect).toBe('no-telling-difference')
    expect(airing(air, { ...air, humidityPct: 73 }).effect).toBe('no-telling-difference')
    expect(airing(air, { ...air, humidityPct: 76 }).effect).toBe('wets')
    expect(airing(air, { ...air, humidityPct: 64 }).effect).toBe('dries')
  })

  it('says the same by dew point as by humidity ratio, and the other way round from outside', () => {
    const air = fc.record({
      temperatureC: fc.double({ min: -10, max: 35, noNaN: true }),
      humidityPct: fc.double({ min: 5, max: 100, noNaN: true }),
    })
    const opposite = { dries: 'wets', wets: 'dries', 'no-telling-difference': 'no-telling-difference' }
    fc.assert(
      fc.property(air, air, (room, outdoor) => {
        const found = airing(room, outdoor)
        expect(airing(outdoor, room).effect).toBe(opposite[found.effect])
        const higher = (found.outdoorDewPointC ?? NaN) > (found.roomDewPointC ?? NaN)
        if (found.effect === 'wets') expect(higher).toBe(true)
        if (found.effect === 'dries') expect(higher).toBe(false)
      }),
    )
  })
})

describe('heaters', () => {
  it('add water where they burn into the room: 1.64 kg for a kilogram of propane of 12.9 kWh', () => {
    expect(heaterWaterKgPerKwh('unflued')).toBeCloseTo(0.127, 3)
    expect(heaterWaterKgPerKwh('flued')).toBe(0)
    expect(heaterWaterKgPerKwh('electric')).toBe(0)
  })

  it('without water leave the air with what comes in; with water it rises as the air changes carry it off', () => {
    const room = { volumeM3: 40, airChangesPerH: 1, temperatureC: 17 }
    const incoming = humidityRatioOf({ temperatureC: 8, humidityPct: 85 })
    const dry = heatedHumidityPct(room, incoming, 0)
    // 8 °C and 85 % RH warmed to 17 °C.
    expect(dry).toBeCloseTo(47.08, 1)
    const wet = heatedHumidityPct(room, incoming, 0.1)
    expect(wet).toBeGreaterThan(dry)
    expect(heatedHumidityPct({ ...room, airChangesPerH: 2 }, incoming, 0.1)).toBeLessThan(wet)
    expect(() => heatedHumidityPct({ ...room, airChangesPerH: 0 }, incoming, 0)).toThrow(/airChangesPerH/)
  })

  it('have no shell loss unless it is told', () => {
    expect(holdingHeat(40, 1, 10, undefined).shellW).toBeUndefined()
    expect(holdingHeat(40, 1, 10, 60).shellW).toBeCloseTo(600, 9)
  })
})

describe('a surface', () => {
  const air = { temperatureC: 15, humidityPct: 65 }
  const stateAt = (temperatureC: number) => surfaceAnswer(air, { temperatureC, from: 'measured' }).state

  it('is wet at the dew point of 8.5 °C, may be within a degree, and grows mould over 80 % RH', () => {
    expect(stateAt(8.4)).toBe('wet')
    expect(stateAt(9.4)).toBe('near-wet')
    expect(stateAt(10)).toBe('mould-likely')
    expect(stateAt(12)).toBe('dry')
  })

  it('is taken to lie three quarters of the way in where none is measured', () => {
    expect(assumedSurface(16, 4)).toEqual({ temperatureC: 13, from: 'assumed' })
  })
})

describe('a shop', () => {
  const shop: ShopQuestion = {
    volumeM3: 40,
    air: { temperatureC: 8, humidityPct: 85 },
    targetEmcPct: 9,
  }
  const told: ShopQuestion = {
    ...shop,
    outdoorC: 4,
    outdoorHumidityPct: 90,
    airChangesPerH: 1,
    woodKg: 200,
    shellWPerK: 60,
    heater: 'electric',
  }

  it('gets what is known, and no guess at the rest', () => {
    const answer = shopAnswer(shop)
    expect(answer.isDryEnough).toBe(false)
    expect(answer.warmTo?.temperatureC).toBeCloseTo(16.74, 2)
    expect(answer.airing).toBeUndefined()
    expect(answer.heating).toBeUndefined()
    expect(answer.surface).toBeUndefined()
    expect(answer.waterInWoodKg).toBeUndefined()
    expect(shopWords(shop, answer)).toEqual([
      'Wood left there ends at about 18.4\u00a0%\u00a0MC. For 9.0\u00a0%\u00a0MC, warm it to about 16.7\u00a0°C, which makes it 48\u00a0%\u00a0RH; or dry it to about 47\u00a0%\u00a0RH at 8.0\u00a0°C.',
      'Drying takes about 0.13\u00a0kg of water out of the air; the wood and walls hold far more, so expect weeks.',
    ])
  })

  it('gets water, heat, airing and a cold wall where it is told enough', () => {
    const answer = shopAnswer(told)
    expect(answer.waterInWoodKg).toBeCloseTo(18.8, 1)
    expect(answer.heating?.warmerByK).toBeCloseTo(12.74, 2)
    expect(answer.heating?.airW).toBeCloseTo(0.3353 * 40 * 12.74, 0)
    expect(answer.heating?.shellW).toBeCloseTo(60 * 12.74, 0)
    expect(answer.heating?.heaterWaterKgPerH).toBe(0)
    expect(answer.airing?.effect).toBe('dries')
    expect(answer.surface).toMatchObject({ surfaceC: 7, from: 'assumed' })
    // A wall warms along with the room: three quarters of the way from 4 to 16.74 °C.
    expect(answer.surfaceWhenHeated?.surfaceC).toBeCloseTo(13.56, 2)
    const words = shopWords(told, answer).join(' ')
    expect(words).toMatch(/about 170.W for the air/)
    expect(words).toMatch(/Walls and roof take about 760.W/)
    expect(words).toContain('That heater adds no water.')
    expect(words).toContain('Airing helps')
    expect(words).toMatch(/Held that dry, it takes in about 68.g of water an hour with the air from outside/)
  })

  it('is told what an unflued heater undoes', () => {
    const electric = shopAnswer(told)
    const unflued = shopAnswer({ ...told, heater: 'unflued' })
    // 0.935 kW of air and shell give 0.119 kg an hour.
    expect(unflued.heating?.heaterWaterKgPerH).toBeCloseTo(0.119, 2)
    expect(unflued.heating?.emcWithHeaterPct).toBeGreaterThan(9)
    expect(electric.heating?.emcWithHeaterPct).toBeLessThan(9)
    const words = shopWords({ ...told, heater: 'unflued' }, unflued).join(' ')
    expect(words).toMatch(
      /An unflued heater adds about 0\.12.kg of water an hour\. With it the air heads for/,
    )
  })

  it('is warned of iron that lags: dry now, wet once an unflued heater has warmed the air', () => {
    const iron = { ...told, surfaceC: 8 }
    expect(shopAnswer(iron).surfaceWhenHeated?.state).not.toBe('wet')
    const unflued: ShopQuestion = { ...iron, heater: 'unflued' }
    const answer = shopAnswer(unflued)
    expect(answer.surface?.state).not.toBe('wet')
    expect(answer.surfaceWhenHeated?.state).toBe('wet')
    expect(shopWords(unflued, answer).at(-1)).toContain('water condenses on it until it is warm too')
  })

  it('leaves out the humidity where air never changes, or where it would be over 100 %', () => {
    const shut = shopAnswer({ ...told, heater: 'unflued', airChangesPerH: 0 })
    expect(shut.heating?.heaterWaterKgPerH).toBeGreaterThan(0)
    expect(shut.heating?.humidityWithHeaterPct).toBeUndefined()
    expect(shut.heating?.condenses).toBe(false)
    const tight = shopAnswer({ ...told, heater: 'unflued', airChangesPerH: 0.1 })
    expect(tight.heating).toMatchObject({ condenses: true, humidityWithHeaterPct: undefined })
  })

  it('needs nothing where it is dry enough', () => {
    const dry: ShopQuestion = { ...told, air: { temperatureC: 15, humidityPct: 40 } }
    const answer = shopAnswer(dry)
    expect(answer).toMatchObject({
      isDryEnough: true,
      warmTo: undefined,
      dryToHumidityPct: undefined,
      waterInAirKg: undefined,
      heating: undefined,
    })
    expect(shopWords(dry, answer)[0]).toContain('neither warming nor drying is needed')
    expect(answer.cautions).toEqual([])
  })

  it('is not told to be warmed beyond 35 °C', () => {
    const hot: ShopQuestion = { ...shop, air: { temperatureC: 30, humidityPct: 95 }, targetEmcPct: 6 }
    const answer = shopAnswer(hot)
    expect(answer.warmTo).toBeUndefined()
    expect(answer.dryToHumidityPct).toBeGreaterThan(0)
    expect(shopWords(hot, answer)[0]).toMatch(/Warming alone would take more than 35\.0.°C/)
  })

  it.each([
    ['volumeM3', { volumeM3: 0 }],
    ['temperatureC', { air: { temperatureC: NaN, humidityPct: 85 } }],
    ['targetEmcPct', { targetEmcPct: NaN }],
    ['airChangesPerH', { airChangesPerH: -1 }],
    ['shellWPerK', { shellWPerK: NaN }],
    ['woodKg', { woodKg: -1 }],
    ['surfaceC', { surfaceC: NaN }],
    ['outdoorC', { outdoorC: 70, outdoorHumidityPct: undefined }],
  ] as [string, Partial<ShopQuestion>][])('names %s when it is no number or out of range', (name, change) => {
    expect(() => shopAnswer({ ...told, ...change })).toThrow(new RegExp(name))
  })
})

describe('cautions', () => {
  const circumstances = {
    isToBeChanged: true,
    heater: undefined,
    temperatureC: 8,
    driestHumidityPct: 47,
    humidityPct: 70,
    surfaceState: undefined,
  } as const
  const ids = (change: Partial<Parameters<typeof shopCautions>[0]>) =>
    shopCautions({ ...circumstances, ...change }).map(({ id }) => id)

  it('name who publishes guidance and put local codes first, on fire, wiring, monoxide, ventilation and mould', () => {
    const cautions = shopCautions({ ...circumstances, humidityPct: 85 })
    for (const id of ['heater-fire', 'wiring', 'carbon-monoxide', 'ventilation', 'mould']) {
      const caution = cautions.find((one) => one.id === id)
      expect(caution?.bodies.length, id).toBeGreaterThan(0)
      expect(caution?.words, id).toContain('local codes come first')
    }
  })

  it('warn of carbon monoxide unless the heater is known to give none, and of leads where one may be electric', () => {
    expect(ids({ heater: 'unflued' })).toContain('carbon-monoxide')
    expect(ids({ heater: undefined })).toContain('carbon-monoxide')
    expect(ids({ heater: 'electric' })).not.toContain('carbon-monoxide')
    expect(ids({ heater: 'electric' })).toContain('wiring')
    expect(ids({ heater: 'unflued' })).not.toContain('wiring')
  })

  it('come as they apply', () => {
    expect(ids({ temperatureC: 14 })).not.toContain('cold-dehumidifier')
    expect(ids({})).toContain('cold-dehumidifier')
    expect(ids({ driestHumidityPct: 30 })).toContain('too-dry')
    expect(ids({})).not.toContain('too-dry')
    expect(ids({ surfaceState: 'wet', isToBeChanged: false })).toEqual(['condensation'])
    expect(ids({ surfaceState: 'mould-likely', isToBeChanged: false })).toEqual(['mould'])
    expect(ids({ isToBeChanged: false })).toEqual([])
  })
})

describe('figures told as "about"', () => {
  it.each([
    [134.1, '130'],
    [0.1256, '0.13'],
    [18.04, '18'],
    [1, '1.0'],
    [9.96, '10'],
    [0.0996, '0.10'],
    [1234, '1200'],
    [-0.126, '−0.13'],
    [0, '0'],
  ])('%d is %s', (value, text) => {
    expect(twoFigures(value)).toBe(text)
  })

  it('choose a unit that keeps them short', () => {
    expect(aboutMass(0.0042)).toBe('about 4.2\u00a0g')
    expect(aboutMass(0.068)).toBe('about 68\u00a0g')
    expect(aboutMass(18)).toBe('about 18\u00a0kg')
    expect(aboutPower(1340)).toBe('about 1.3\u00a0kW')
  })
})
