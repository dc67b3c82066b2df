import { describe, expect, it } from 'vitest'
import { slabResponse } from '@/lib/carry/slab-response'
import { weighingForecast } from './forecast'
import { dayMs } from './policy'
import { restingCurve } from './resting-curve'

const weekly = (grams: readonly number[]) => grams.map((weight, n) => ({ at: n * 7 * dayMs, grams: weight }))

function refused(grams: readonly number[], stepG = 0.1) {
  const forecast = weighingForecast(weekly(grams), stepG)
  if (forecast.ok) throw new Error('it was not refused')
  return forecast.error
}

/** Slows from 20 g a week to 2.5. */
const slowing = [200, 180, 170, 165, 162.5]

describe('a forecast', () => {
  it('is shown once the loss has slowed to half its first rate, and not before', () => {
    expect(weighingForecast(weekly([182, 167.9, 163]), 0.1).ok).toBe(true)
    expect(refused([182, 167.9, 160])).toEqual({
      code: 'not-half-yet',
      words: expect.stringMatching(
        /^It loses about 7\.9.g a week now and lost 14\.1.g at first\. Until that has halved/,
      ),
    })
    expect(weighingForecast(weekly(slowing), 0.1).ok).toBe(true)
  })

  it('is mirrored for wood that gains', () => {
    expect(refused([100, 114.1, 122]).words).toMatch(/^It gains about 7\.9.g a week now and gained 14\.1.g/)
    expect(weighingForecast(weekly([100, 114.1, 119]), 0.1).ok).toBe(true)
  })

  it('is not shown while the end is anybody’s guess', () => {
    expect(refused([100, 95, 92.5], 2).code).toBe('too-uncertain')
  })

  it('holds the true end of a slab, however fresh it was at the first weight and however often it is weighed', () => {
    // 400 g of wood, oven-dry, losing 12 points of MC through a surface that holds it up a little; 90 % in 120 days.
    const response = slabResponse(20)
    const trueEndG = 440
    const forecasts = [7, 14, 30].flatMap((everyDays) =>
      [0, 10, 30].flatMap((startDay) =>
        [3, 4, 5, 7, 10, 14].flatMap((count) => {
          const weights = Array.from({ length: count }, (_, n) => {
            const day = startDay + n * everyDays
            const grams = trueEndG + 48 * (1 - response((0.9 * day) / 120))
            return { at: day * dayMs, grams: Number(grams.toFixed(1)) }
          })
          const forecast = weighingForecast(weights, 0.1)
          return forecast.ok ? [forecast.value] : []
        }),
      ),
    )
    expect(forecasts.length).toBeGreaterThan(20)
    for (const { finalLowG, finalHighG } of forecasts) {
      expect(finalLowG).toBeLessThan(trueEndG + 0.1)
      expect(finalHighG).toBeGreaterThan(trueEndG - 0.1)
    }
  })

  it('says why, in words, for each reason', () => {
    expect(refused([]).words).toBe('It has not been weighed yet.')
    expect(refused([200]).words).toBe('1 weight so far: a curve takes 3.')
    expect(refused([200, 190]).words).toBe('2 weights so far: a curve takes 3.')
    expect(refused([200, 200, 200]).code).toBe('no-change')
    expect(refused([200, 203, 199, 203], 1).code).toBe('not-one-way')
    expect(refused([200, 190, 180]).code).toBe('not-slowing')
  })
})

describe('the resting curve', () => {
  it('draws weighings, the fit as far as they go and the forecast from there, with its band', () => {
    const curve = restingCurve(weekly(slowing), 0.1)
    expect(curve.weighings.grams).toEqual(slowing)
    expect(curve.fit?.at[0]).toBe(0)
    expect(curve.fit?.at.at(-1)).toBe(28 * dayMs)
    expect(curve.forecast?.at[0]).toBe(28 * dayMs)
    expect(curve.noForecast).toBeUndefined()
    expect(curve.forecast?.grams.at(-1)).toBeCloseTo(160, 0)
    curve.forecast?.grams.forEach((grams, n) => {
      expect(curve.forecast?.lowG[n]).toBeLessThanOrEqual(grams)
      expect(curve.forecast?.highG[n]).toBeGreaterThanOrEqual(grams)
    })
  })

  it('reaches to the end of the ready range', () => {
    const toAt = 300 * dayMs
    expect(restingCurve(weekly(slowing), 0.1, { fromAt: 200 * dayMs, toAt }).forecast?.at.at(-1)).toBe(toAt)
  })

  it('keeps to the weights and the fit where no forecast may be made', () => {
    const curve = restingCurve(weekly([182, 167.9, 160]), 0.1)
    expect(curve.fit?.grams[0]).toBeCloseTo(182, 1)
    expect(curve.forecast).toBeUndefined()
    expect(curve.noForecast?.code).toBe('not-half-yet')
    expect(restingCurve([], 1)).toEqual({
      weighings: { at: [], grams: [], correctedG: [] },
      noForecast: { code: 'too-few-weights', words: 'It has not been weighed yet.' },
    })
  })

  it('goes through the corrected weights, once there are enough of them', () => {
    const corrected = weekly(slowing).map((weight) => ({ ...weight, correctedG: weight.grams - 10 }))
    expect(restingCurve(corrected, 0.1).fit?.grams[0]).toBeCloseTo(190, 0)
    expect(restingCurve(corrected, 0.1).weighings.correctedG[0]).toBe(190)
  })

  it('never draws more than 120 points, the first and the last weight among them', () => {
    const many = Array.from({ length: 400 }, (_, n) => 160 + 60 * Math.exp(-n / 40))
    const curve = restingCurve(weekly(many), 0.1)
    const points = curve.weighings.at.length + (curve.fit?.at.length ?? 0) + (curve.forecast?.at.length ?? 0)
    expect(points).toBeLessThanOrEqual(120)
    expect(points).toBeGreaterThan(100)
    expect(curve.weighings.at[0]).toBe(0)
    expect(curve.weighings.at.at(-1)).toBe(399 * 7 * dayMs)
  })
})
