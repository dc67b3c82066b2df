import { assertFinite, assertFiniteAbove } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import { curveDraws, type CurveDraw } from './curve-draws'
import { bestTau, lineAt, tausBetween } from './fit-line'
import { LONGEST_TAU_OVER_RECORD, type NoCurve } from './three-weighings'
import { weightedQuantile } from './weighted-quantile'
import type { Direction, Weight, WeightCurve } from './weighing'

/** The curve that fits a series of weights best, and the curves that fit it nearly as well. */
export type WeighingFit = WeightCurve & {
  readonly toAt: number
  readonly count: number
  readonly direction: Direction
  /** Scatter of a weight about the curve, g, one standard deviation. */
  readonly scatterG: number
  /** Middle 8 in 10. */
  readonly finalLowG: number
  readonly finalHighG: number
  readonly tauLowMs: number
  readonly tauHighMs: number
  readonly draws: readonly CurveDraw[]
}

/** Time constants tried, from a tenth of the shortest gap on. Finely enough that a cell holds one minimum. */
const TAUS = 160
const TOLERANCE = 1e-9
const SHORTEST_TAU_OVER_GAP = 0.1
/** A rounded weight that is also not put down twice alike: half a step, one standard deviation. A guess. */
const SCATTER_OVER_STEP = 0.5
/** No piece is a slab nor an exponential: this share of the change counts as scatter besides. A guess. */
const SHAPE_ERROR_SHARE = 0.005
/** Three weights fit any curve, so nothing shows how far the wood is from this one. A guess. */
const SHAPE_ERROR_SHARE_OF_THREE = 0.01
/** A fitted change smaller than so many scatters is no change one way. A guess, as "three sigma" is common practice. */
const LEAST_CHANGE_IN_SCATTERS = 3
/**
 * Least squares of W = finalG + amplitudeG exp(-t / tau) over three weights or more, in any spacing.
 * @param weights in order of time, at least three, instants in ms and grams above 0
 * @param stepG step of the scale, g, above 0
 * @returns the curve with its doubt; or `too-few-weights`, `no-change` (all the same within a step), `not-one-way`
 *   (the weights scatter more than they change) or `not-slowing` (no end in sight)
 * @throws RangeError for weights out of order, or an input out of range or NaN
 *
 * For a given tau the other two are a straight regression, so only tau is searched: on a logarithmic grid, then by
 * golden section. The doubt comes from curves that fit nearly as well (`curveDraws`), those of a slab among them, for
 * wood starts faster than an exponential. The scatter is the larger of half a step and what the residuals show, and a
 * little of the change for what no curve gets right.
 * Source: derived; regression as in any textbook.
 */
export function weighingFit(
  weights: readonly Weight[],
  stepG: number,
): Result<WeighingFit, { readonly code: NoCurve | 'too-few-weights' }> {
  assertFiniteAbove('stepG', stepG, 0)
  assertSeries(weights)
  const first = weights[0]
  const last = weights.at(-1)
  if (first === undefined || last === undefined || weights.length < 3) return err({ code: 'too-few-weights' })
  const grams = weights.map((weight) => weight.grams)
  if (Math.max(...grams) - Math.min(...grams) <= stepG * (1 + 1e-9)) return err({ code: 'no-change' })

  const times = weights.map((weight) => weight.at - first.at)
  const record = last.at - first.at
  const shortest = SHORTEST_TAU_OVER_GAP * shortestGap(times)
  const series = { times, grams }
  const found = bestTau(
    series,
    undefined,
    tausBetween(shortest, LONGEST_TAU_OVER_RECORD * record, TAUS),
    TOLERANCE,
  )
  if (found.isLongest) return err({ code: 'not-slowing' })
  const { tauMs } = found
  const best = lineAt(series, tauMs, undefined)

  const change = Math.abs(best.amplitudeG) * (1 - Math.exp(-record / tauMs))
  const left = weights.length - 3
  const residualG = left === 0 ? 0 : Math.sqrt(best.squaresG2 / left)
  const shapeG = (left === 0 ? SHAPE_ERROR_SHARE_OF_THREE : SHAPE_ERROR_SHARE) * change
  const scatterG = Math.hypot(Math.max(SCATTER_OVER_STEP * stepG, residualG), shapeG)
  if (change < LEAST_CHANGE_IN_SCATTERS * scatterG) return err({ code: 'not-one-way' })
  if (best.finalG <= 0) return err({ code: 'not-slowing' })

  const draws = curveDraws(series, first.at, shortest, scatterG)
  if (draws.length === 0) return err({ code: 'not-slowing' })
  const finals = draws.map((draw) => ({ value: draw.finalG, weight: draw.weight }))
  const constants = draws.map((draw) => ({ value: draw.tauMs, weight: draw.weight }))
  return ok({
    fromAt: first.at,
    toAt: last.at,
    count: weights.length,
    direction: best.amplitudeG > 0 ? 'drying' : 'gaining',
    finalG: best.finalG,
    amplitudeG: best.amplitudeG,
    tauMs,
    scatterG,
    finalLowG: Math.min(best.finalG, weightedQuantile(finals, 0.1)),
    finalHighG: Math.max(best.finalG, weightedQuantile(finals, 0.9)),
    tauLowMs: Math.min(tauMs, weightedQuantile(constants, 0.1)),
    tauHighMs: Math.max(tauMs, weightedQuantile(constants, 0.9)),
    draws,
  })
}

function assertSeries(weights: readonly Weight[]): void {
  weights.forEach((weight, n) => {
    assertFinite('at', weight.at)
    assertFiniteAbove('grams', weight.grams, 0)
    const before = weights[n - 1]
    if (before !== undefined && before.at >= weight.at) {
      throw new RangeError(`weights must be in order of time, but the one at ${String(weight.at)} is not`)
    }
  })
}

const shortestGap = (times: readonly number[]): number =>
  Math.min(...times.slice(1).map((time, n) => time - (times[n] ?? 0)))
