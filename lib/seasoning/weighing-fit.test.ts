import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { slabResponse } from '@/lib/carry/slab-response'
import { referenceJson } from '@/tests/support/reference'
import { dayMs } from './policy'
import { endOfThree } from './three-weighings'
import type { Weight } from './weighing'
import { weighingFit, type WeighingFit } from './weighing-fit'

const { weighing } = z
  .object({ weighing: z.array(z.record(z.string(), z.unknown())) })
  .parse(referenceJson('worked_examples.json'))
const three = z
  .object({
    weights_g: z.tuple([z.number(), z.number(), z.number()]),
    interval_days: z.number(),
    final_weight_g: z.number(),
    tau_days: z.number(),
  })
  .parse(weighing.find((row) => 'weights_g' in row))

function fitted(weights: readonly Weight[], stepG: number): WeighingFit {
  const fit = weighingFit(weights, stepG)
  if (!fit.ok) throw new Error(fit.error.code)
  return fit.value
}

const series = (grams: readonly number[], everyDays = 7): Weight[] =>
  grams.map((weight, n) => ({ at: n * everyDays * dayMs, grams: weight }))

/** Weights on one exponential. */
const onCurve = (finalG: number, amplitudeG: number, tauDays: number, days: readonly number[]): Weight[] =>
  days.map((day) => ({ at: day * dayMs, grams: finalG + amplitudeG * Math.exp(-day / tauDays) }))

describe('three weights, against worked_examples.json', () => {
  it('ends at the final weight with the time constant', () => {
    const found = endOfThree(three.weights_g, three.interval_days * dayMs, 0.1)
    if (!found.ok) throw new Error(found.error.code)
    expect(found.value.finalG).toBeCloseTo(three.final_weight_g, 2)
    expect(found.value.tauMs / dayMs).toBeCloseTo(three.tau_days, 2)
    expect(found.value.direction).toBe('drying')
  })

  it('is the same by least squares, with a doubt about it', () => {
    const fit = fitted(series(three.weights_g, three.interval_days), 0.1)
    expect(fit.finalG).toBeCloseTo(three.final_weight_g, 2)
    expect(fit.tauMs / dayMs).toBeCloseTo(three.tau_days, 2)
    expect(fit.finalLowG).toBeLessThan(fit.finalG)
    expect(fit.finalHighG).toBeGreaterThan(fit.finalG)
    // Three weights do not say how far along the wood was, and fresh wood would end lower.
    expect(fit.finalG - fit.finalLowG).toBeGreaterThan(5)
    expect(fit.finalHighG - fit.finalG).toBeLessThan(3)
  })
})

describe('three weights', () => {
  const code = (grams: [number, number, number], stepG = 0.1) => {
    const found = endOfThree(grams, dayMs, stepG)
    return found.ok ? 'ok' : found.error.code
  }

  it('mirrors wood that takes up water', () => {
    const wetter = endOfThree([118, 132.1, 140], 7 * dayMs, 0.1)
    if (!wetter.ok) throw new Error(wetter.error.code)
    expect(wetter.value.direction).toBe('gaining')
    // 300 g less each of the worked example's weights.
    expect(wetter.value.finalG).toBeCloseTo(300 - three.final_weight_g, 2)
    expect(wetter.value.tauMs / dayMs).toBeCloseTo(three.tau_days, 2)
  })

  it('refuses weights that do not go one way, do not slow down, or hold', () => {
    expect(code([100, 101, 99])).toBe('not-one-way')
    expect(code([100, 95, 95])).toBe('not-one-way')
    expect(code([99, 101, 100])).toBe('not-one-way')
    expect(code([100, 95, 90])).toBe('not-slowing')
    expect(code([100, 98, 94])).toBe('not-slowing')
    expect(code([100, 102, 106])).toBe('not-slowing')
    expect(code([100, 100, 100])).toBe('no-change')
    expect(code([100, 99.9, 99.9])).toBe('no-change')
    expect(code([100, 90, 85])).toBe('ok')
  })

  it('refuses a bend that the scale could have made by rounding', () => {
    expect(code([100, 94, 89], 1)).toBe('ok')
    expect(code([100, 94, 89], 2)).toBe('not-slowing')
  })

  it('refuses a straight line whose end would lie below nothing', () => {
    expect(code([100, 90, 80.1])).toBe('not-slowing')
  })

  it('names the input that is no number or out of range', () => {
    expect(() => endOfThree([1, NaN, 3], dayMs, 0.1)).toThrow(/grams/)
    expect(() => endOfThree([100, 90, 85], 0, 0.1)).toThrow(/everyMs/)
    expect(() => endOfThree([100, 90, 85], dayMs, NaN)).toThrow(/stepG/)
  })
})

describe('least squares', () => {
  const days = fc.uniqueArray(fc.integer({ min: 0, max: 200 }), { minLength: 4, maxLength: 14 })
  const curve = fc.record({
    finalG: fc.double({ min: 60, max: 900, noNaN: true }),
    share: fc.double({ min: 0.05, max: 0.5, noNaN: true }),
    tauDays: fc.double({ min: 15, max: 120, noNaN: true }),
    sign: fc.constantFrom(1, -1),
    days: days.map((list) => list.sort((a, b) => a - b)),
  })

  it('finds the curve that weights lie on, in any spacing and either way', () => {
    fc.assert(
      fc.property(curve, ({ finalG, share, tauDays, sign, days: at }) => {
        const recordDays = (at.at(-1) ?? 0) - (at[0] ?? 0)
        fc.pre(recordDays > tauDays / 2)
        const amplitudeG = sign * share * finalG
        const fit = fitted(onCurve(finalG, amplitudeG, tauDays, at), 1e-4)
        expect(Math.abs(fit.finalG - finalG)).toBeLessThan(0.001 * Math.abs(amplitudeG))
        expect(fit.tauMs / dayMs / tauDays).toBeCloseTo(1, 3)
        expect(fit.direction).toBe(sign === 1 ? 'drying' : 'gaining')
        expect(fit.finalLowG).toBeLessThanOrEqual(fit.finalG)
        expect(fit.finalHighG).toBeGreaterThanOrEqual(fit.finalG)
      }),
      { numRuns: 30 },
    )
  })

  it('agrees with the closed form through three weights', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2, max: 15, noNaN: true }),
        fc.double({ min: 0.2, max: 0.9, noNaN: true }),
        fc.constantFrom(1, -1),
        (firstG, share, sign) => {
          const grams: [number, number, number] = [
            200,
            200 - sign * firstG,
            200 - sign * firstG * (1 + share),
          ]
          const closed = endOfThree(grams, 7 * dayMs, 0.001)
          if (!closed.ok) throw new Error(closed.error.code)
          const fit = fitted(series(grams), 0.001)
          expect(fit.finalG).toBeCloseTo(closed.value.finalG, 3)
          expect(fit.tauMs / closed.value.tauMs).toBeCloseTo(1, 4)
        },
      ),
      { numRuns: 25 },
    )
  })

  it('mirrors drying and gaining, doubt and all', () => {
    const grams = [182.1, 167.8, 160.2, 155.3, 153.2, 151.6]
    const drying = fitted(series(grams), 0.1)
    const gaining = fitted(series(grams.map((weight) => 300 - weight)), 0.1)
    expect(gaining.finalG).toBeCloseTo(300 - drying.finalG, 6)
    expect(gaining.finalLowG).toBeCloseTo(300 - drying.finalHighG, 6)
    expect(gaining.finalHighG).toBeCloseTo(300 - drying.finalLowG, 6)
    expect(gaining.tauMs / drying.tauMs).toBeCloseTo(1, 6)
  })

  it('doubts more on a coarser scale, and less with more weights', () => {
    const width = (fit: WeighingFit) => fit.finalHighG - fit.finalLowG
    const weekly = [0, 7, 14, 21, 28, 35, 42, 49, 56]
    const curveOf = (at: readonly number[]) => onCurve(400, 60, 30, at)
    expect(width(fitted(curveOf(weekly), 1))).toBeGreaterThan(2 * width(fitted(curveOf(weekly), 0.1)))
    expect(width(fitted(curveOf(weekly), 0.5))).toBeLessThan(width(fitted(curveOf([0, 28, 56]), 0.5)))
  })

  it('holds the true end within its middle 8 in 10 about that often', () => {
    // A fixed scatter of one standard deviation, from a linear congruential sequence through Box and Muller.
    let seed = 12_345
    const uniform = () => (seed = (seed * 1_103_515_245 + 12_345) % 2 ** 31) / 2 ** 31
    const normal = () => Math.sqrt(-2 * Math.log(uniform() + 1e-12)) * Math.cos(2 * Math.PI * uniform())
    const at = [0, 10, 20, 30, 40, 50, 60, 70, 80]
    const trials = Array.from({ length: 100 }, () => {
      const weights = onCurve(300, 40, 30, at).map((weight) => ({
        ...weight,
        grams: weight.grams + 0.5 * normal(),
      }))
      const fit = fitted(weights, 1)
      return fit.finalLowG <= 300 && 300 <= fit.finalHighG
    })
    const share = trials.filter(Boolean).length / trials.length
    expect(share).toBeGreaterThan(0.7)
    expect(share).toBeLessThan(0.9)
  })

  it('sets the end of a slab too high early on, and nearly right once half is over', () => {
    // Bias derived for a slab: 43 % of the whole change from E = 0.16 on, 0.2 % from E = 0.5 on.
    const response = slabResponse(Infinity)
    const endFrom = (fo: number, every: number) => {
      const grams = [0, 1, 2].map((n) => 100 * (1 - response(fo + n * every)) + 100)
      const [first = 0, second = 0, third = 0] = grams
      const found = endOfThree([first, second, third], dayMs, 1e-6)
      if (!found.ok) throw new Error(found.error.code)
      return found.value.finalG - 100
    }
    expect(endFrom(0.02, 0.02)).toBeGreaterThan(30)
    expect(endFrom(0.2, 0.1)).toBeLessThan(1)
  })

  it('says why there is no curve', () => {
    const code = (grams: readonly number[], stepG = 1) => {
      const fit = weighingFit(series(grams), stepG)
      return fit.ok ? 'ok' : fit.error.code
    }
    expect(code([])).toBe('too-few-weights')
    expect(code([200, 190])).toBe('too-few-weights')
    expect(code([200, 200, 201, 200])).toBe('no-change')
    expect(code([200, 203, 199, 202, 198, 203])).toBe('not-one-way')
    expect(code([200, 190, 180, 170, 160])).toBe('not-slowing')
    expect(code([200, 198, 194, 186, 170])).toBe('not-slowing')
  })

  it('names the input that is no number, and weights out of order', () => {
    expect(() => weighingFit(series([200, NaN, 180, 175]), 1)).toThrow(/grams/)
    expect(() => weighingFit(series([200, 190, 185]), 0)).toThrow(/stepG/)
    expect(() => weighingFit(series([200, 190, 185]).reverse(), 1)).toThrow(/order/)
    expect(() => weighingFit([{ at: NaN, grams: 1 }], 1)).toThrow(/at/)
  })
})
