import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { shopAnswer, shopQuerySchema } from './shop'

const damp = { volumeM3: '40', temperatureC: '8', humidityPct: '85', targetEmcPct: '9' }
const answerTo = (query: Record<string, string>) => shopAnswer(shopQuerySchema.parse(query))
const refusedPaths = (query: Record<string, string>) => {
  const parsed = shopQuerySchema.safeParse(query)
  return parsed.success ? [] : parsed.error.issues.map((issue) => issue.path.join('.'))
}

describe('/bench/shop', () => {
  it('warms 8 °C and 85 % RH to 16.74 °C for 9 % MC, or dries it to 47 % RH', () => {
    expect(answerTo(damp)).toMatchObject({
      emcPct: expect.closeTo(18.413, 2),
      isDryEnough: false,
      isReachedByWarming: true,
      warmToC: expect.closeTo(16.74, 2),
      humidityAfterWarmingPct: expect.closeTo(47.83, 2),
      dryToHumidityPct: expect.closeTo(47.01, 2),
      waterInAirKg: expect.closeTo(0.1256, 3),
      flags: [],
      words: expect.stringContaining('warm it to about'),
    })
    expect(answerTo(damp).cautions.map(({ id }) => id)).toContain('carbon-monoxide')
  })

  it('says so where nothing is needed, and where warming does not do, with the fields left out', () => {
    const sent = (query: Record<string, string>) =>
      Object.keys(JSON.parse(JSON.stringify(answerTo(query))) as object)
    const dry = { ...damp, temperatureC: '20', humidityPct: '30' }
    expect(answerTo(dry)).toMatchObject({ isDryEnough: true, isReachedByWarming: false })
    expect(sent(dry)).not.toContain('warmToC')
    expect(sent(dry)).not.toContain('dryToHumidityPct')
    expect(sent(dry)).not.toContain('waterInAirKg')
    const hot = { ...damp, temperatureC: '34', humidityPct: '90' }
    expect(answerTo(hot)).toMatchObject({ isDryEnough: false, isReachedByWarming: false })
    expect(sent(hot)).not.toContain('warmToC')
    expect(sent(hot)).toContain('dryToHumidityPct')
  })

  it('answers more where it is told more', () => {
    const answer = answerTo({
      ...damp,
      outdoorC: '4',
      outdoorHumidityPct: '90',
      airChangesPerH: '1',
      woodKg: '200',
      shellWPerK: '60',
      heater: 'unflued',
      surfaceC: '6.5',
    })
    expect(answer.waterInWoodKg).toBeCloseTo(18.8, 1)
    expect(answer.airing?.effect).toBe('dries')
    expect(answer.heating?.heaterWaterKgPerH).toBeGreaterThan(0.1)
    expect(answer.surface).toMatchObject({ from: 'measured', state: 'near-wet' })
  })

  it('flags air that the EMC is extrapolated for', () => {
    expect(answerTo({ ...damp, temperatureC: '-3', humidityPct: '97' }).flags).toEqual([
      'below-zero',
      'above-95-rh',
    ])
  })

  it.each([
    ['outdoorC', { outdoorHumidityPct: '80' }],
    ['outdoorC', { outdoorC: '60' }],
    ['heater', { heater: 'gas' }],
    ['airChangesPerH', { airChangesPerH: '-1' }],
    ['woodKg', { woodKg: 'NaN' }],
    ['shellWPerK', { shellWPerK: '' }],
    ['surfaceC', { surfaceC: '61' }],
    ['volumeM3', { volumeM3: '0' }],
  ])('refuses %s that is wrong, naming it', (path, change) => {
    expect(refusedPaths({ ...damp, ...change } as Record<string, string>)).toEqual([path])
  })

  it('answers every shop within the ranges, without a figure that is none', () => {
    const within = (min: number, max: number) =>
      fc
        .oneof(fc.constantFrom(min, max), fc.double({ min, max, noNaN: true }))
        .map((value) => value.toFixed(6))
    const shops = fc.record(
      {
        volumeM3: within(0.001, 100_000),
        temperatureC: within(-10, 50),
        humidityPct: within(0, 100),
        targetEmcPct: within(0, 30),
        outdoorC: within(-10, 50),
        outdoorHumidityPct: within(0, 100),
        airChangesPerH: within(0, 50),
        woodKg: within(0, 100_000),
        shellWPerK: within(0, 10_000),
        heater: fc.constantFrom('electric', 'flued', 'unflued'),
        surfaceC: within(-40, 60),
      },
      { requiredKeys: ['volumeM3', 'temperatureC', 'humidityPct', 'targetEmcPct', 'outdoorC'] },
    )
    fc.assert(
      fc.property(shops, (shop) => {
        const answer = answerTo(shop as Record<string, string>)
        const sent = JSON.stringify(answer)
        expect(sent).not.toMatch(/null|NaN|Infinity|undefined/)
        expect(answer.isDryEnough).toBe(answer.dryToHumidityPct === undefined)
        if (answer.isReachedByWarming) expect(answer.warmToC).toBeLessThanOrEqual(35)
      }),
      { numRuns: 300 },
    )
  })
})
