import { describe, expect, it } from 'vitest'
import { truthAir, trueRooms } from './truth-air'
import { trueEmcPct } from './truth-emc'
import { meanOfPart, type Opening, stepPart, truePart, type TrueShape } from './truth-wood'

const HOUR_MS = 3_600_000
const ACROSS = 3e-11
/** As good as no resistance at the surface, so that the published series hold. */
const stuff = { acrossM2PerS: ACROSS, alongRatio: 10, surfaceFactor: 1e6, filmMPerS: null }
/** So small a step that diffusion is the same throughout. */
const FROM = 10
const TO = 10.01

/** The fraction changed after some diffusion time in a slab of half thickness or depth `depthM`. */
function changed(shape: TrueShape, opening: Opening, seconds: number): number {
  const part = truePart(shape, FROM, 3)
  const steps = 2000
  for (let n = 0; n < steps; n += 1)
    stepPart(part, stuff, opening, { emcPct: TO, temperatureC: 20 }, seconds / 3600 / steps)
  return (meanOfPart(part) - FROM) / (TO - FROM)
}

const both = { outer: 1, inner: 1, rim: 0 }
const secondsFor = (fo: number, depthMm: number, ratio = 1): number =>
  (fo * (depthMm / 1000) ** 2) / (ACROSS * ratio)

describe('the true wood', () => {
  it.each([
    [0.05, 0.2523],
    [0.1, 0.3568],
    [0.2, 0.5041],
    [0.5, 0.764],
    [1, 0.9313],
  ])(
    'follows the series for a sheet at Fo %f (Crank, The Mathematics of Diffusion, 1975, ch. 4)',
    (fo, e) => {
      const sheet = { wallMm: 4, isWallAlongGrain: false, lengthMm: null }
      expect(changed(sheet, both, secondsFor(fo, 2))).toBeCloseTo(e, 2)
    },
  )

  it('moves along the grain by the ratio', () => {
    const disc = { wallMm: 4, isWallAlongGrain: true, lengthMm: null }
    expect(changed(disc, both, secondsFor(0.5, 2, 10))).toBeCloseTo(0.764, 2)
  })

  it('takes two ways in as the product of what is left of each', () => {
    const ring = { wallMm: 4, isWallAlongGrain: false, lengthMm: 6 }
    const seconds = secondsFor(0.2, 2)
    const wall = changed(ring, both, seconds)
    const rim = changed(ring, { outer: 0, inner: 0, rim: 1 }, seconds)
    expect(changed(ring, { ...both, rim: 1 }, seconds)).toBeCloseTo(1 - (1 - wall) * (1 - rim), 2)
    expect(rim).toBeGreaterThan(0.2)
  })

  it('stays as it is with nothing open', () => {
    const ring = { wallMm: 4, isWallAlongGrain: false, lengthMm: 6 }
    expect(changed(ring, { outer: 0, inner: 0, rim: 0 }, 1e5)).toBeCloseTo(0, 6)
  })
})

describe('the true air', () => {
  const from = Date.UTC(2026, 0, 5)
  const until = from + 20 * 24 * HOUR_MS
  const air = truthAir(1, from, until)
  const hours = Array.from({ length: 20 * 24 }, (_, n) => from + n * HOUR_MS)

  it.each(trueRooms)('stays within what air can be in the %s', (room) => {
    for (const at of hours) {
      const { temperatureC, humidityPct } = air.at(room, at)
      expect(temperatureC).toBeGreaterThan(-20)
      expect(temperatureC).toBeLessThan(40)
      expect(humidityPct).toBeGreaterThan(10)
      expect(humidityPct).toBeLessThanOrEqual(100)
    }
  })

  it('is damper in the shop than in the cupboard in winter', () => {
    const meanOf = (room: 'shop' | 'cupboard') =>
      hours.reduce((sum, at) => sum + air.at(room, at).humidityPct, 0) / hours.length
    expect(meanOf('shop')).toBeGreaterThan(meanOf('cupboard') + 10)
  })

  it('comes out the same for the same seed, and otherwise for another', () => {
    const at = from + 7.5 * 24 * HOUR_MS
    expect(truthAir(1, from, until).at('shop', at)).toEqual(air.at('shop', at))
    expect(truthAir(2, from, until).at('shop', at)).not.toEqual(air.at('shop', at))
  })
})

describe('where wood ends in an air', () => {
  it.each([
    [20, 40, 7.7224],
    [20, 50, 9.2711],
    [8, 85, 18.4128],
  ])('is the published curve at %d °C and %d %% RH, bent by the site', (c, pct, emc) => {
    expect(trueEmcPct(c, pct, 0)).toBeCloseTo(emc, 3)
    expect(trueEmcPct(c, pct, 0.05)).toBeCloseTo(1.05 * emc, 3)
  })
})
