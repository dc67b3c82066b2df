import { assertFinite, assertFiniteAbove } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import { LONGEST_TAU_OVER_RECORD, type NoCurve } from './three-weighings'
import { weightedQuantile } from './weighted-quantile'
import type { Direction, Weight, WeightCurve } from './weighing'

/** One curve that the weights allow, and how much it counts. All weights of a fit add up to 1. */
export type CurveDraw = WeightCurve & { readonly weight: number }

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
const SHORTEST_TAU_OVER_GAP = 0.1
const GOLDEN = (Math.sqrt(5) - 1) / 2
/** A rounded weight that is also not put down twice alike: half a step, one standard deviation. A guess. */
const SCATTER_OVER_STEP = 0.5
/** A fitted change smaller than so many scatters is no change one way. A guess, as "three sigma" is common practice. */
const LEAST_CHANGE_IN_SCATTERS = 3
/** Curves that count less than this beside the best are left out. */
const LEAST_WEIGHT = 1e-4
/** Time constants among those curves. */
const DRAWN_TAUS = 48
/** Middles of nine equal shares of the normal distribution, in standard deviations. */
const NORMAL_NINTHS = [-1.5932, -0.9674, -0.5895, -0.2822, 0, 0.2822, 0.5895, 0.9674, 1.5932] as const

type Linear = { finalG: number; amplitudeG: number; squaresG2: number; leverage: number; meanShape: number }

/**
 * Least squares of W = finalG + amplitudeG exp(-t / tau) over three weights or more, in any spacing.
 * @param weights in order of time, at least three, instants in ms and grams above 0
 * @param stepG step of the scale, g, above 0
 * @returns the curve with its doubt; or `too-few-weights`, `no-change` (all the same within a step), `not-one-way`
 *   (the weights scatter more than they change) or `not-slowing` (no end in sight)
 * @throws RangeError for weights out of order, or an input out of range or NaN
 *
 * For a given tau the other two are a straight regression, so only tau is searched: on a logarithmic grid, then by
 * golden section. The doubt comes from the profile of the squares over that grid, with the scatter taken as the larger
 * of half a step and what the residuals show, and for each tau the normal spread of the final weight.
 * Source: derived; regression as in any textbook, the profile by the likelihood of normal errors.
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
  const taus = tausBetween(SHORTEST_TAU_OVER_GAP * shortestGap(times), LONGEST_TAU_OVER_RECORD * record)
  const lines = taus.map((tauMs) => ({ tauMs, ...lineAt(times, grams, tauMs) }))
  const least = Math.min(...lines.map((line) => line.squaresG2))
  const at = lines.findIndex((line) => line.squaresG2 === least)
  if (at === lines.length - 1) return err({ code: 'not-slowing' })
  const tauMs = refined(times, grams, taus[at - 1] ?? taus[at] ?? record, taus[at + 1] ?? record)
  const best = lineAt(times, grams, tauMs)

  const left = weights.length - 3
  const scatterG = Math.max(SCATTER_OVER_STEP * stepG, left === 0 ? 0 : Math.sqrt(best.squaresG2 / left))
  const change = Math.abs(best.amplitudeG) * (1 - Math.exp(-record / tauMs))
  if (change < LEAST_CHANGE_IN_SCATTERS * scatterG) return err({ code: 'not-one-way' })
  if (best.finalG <= 0) return err({ code: 'not-slowing' })

  const draws = drawsOf(
    first.at,
    { times, grams },
    { tauMs, squaresG2: best.squaresG2, scatterG },
    { fromMs: SHORTEST_TAU_OVER_GAP * shortestGap(times), toMs: LONGEST_TAU_OVER_RECORD * record },
  )
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

const tausBetween = (from: number, to: number): number[] =>
  Array.from({ length: TAUS }, (_, n) => from * (to / from) ** (n / (TAUS - 1)))

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

/** The straight regression of the weights on exp(-t / tau). */
function lineAt(times: readonly number[], grams: readonly number[], tauMs: number): Linear {
  const shapes = times.map((time) => Math.exp(-time / tauMs))
  const meanShape = mean(shapes)
  const meanG = mean(grams)
  const leverage = shapes.reduce((sum, shape) => sum + (shape - meanShape) ** 2, 0)
  const together = shapes.reduce((sum, shape, n) => sum + (shape - meanShape) * ((grams[n] ?? 0) - meanG), 0)
  const amplitudeG = together / leverage
  const finalG = meanG - amplitudeG * meanShape
  const squaresG2 = shapes.reduce(
    (sum, shape, n) => sum + ((grams[n] ?? 0) - finalG - amplitudeG * shape) ** 2,
    0,
  )
  return { finalG, amplitudeG, squaresG2, leverage, meanShape }
}

/** Golden section on the logarithm of tau, which is where the squares look like a bowl. */
function refined(times: readonly number[], grams: readonly number[], from: number, to: number): number {
  const squares = (log: number): number => lineAt(times, grams, Math.exp(log)).squaresG2
  let low = Math.log(from)
  let high = Math.log(to)
  while (high - low > 1e-9) {
    const width = GOLDEN * (high - low)
    if (squares(high - width) < squares(low + width)) high = low + width
    else low = high - width
  }
  return Math.exp((low + high) / 2)
}

/** How far from the best, in log tau, curves still count: halved towards it, for the squares rise on either side. */
function edgeOf(squares: (log: number) => number, best: number, limit: number, mostG2: number): number {
  if (squares(limit) <= mostG2) return limit
  let inside = best
  let outside = limit
  while (Math.abs(outside - inside) > 1e-6) {
    const middle = (inside + outside) / 2
    if (squares(middle) <= mostG2) inside = middle
    else outside = middle
  }
  return inside
}

/** Curves that fit nearly as well: each tau by its squares, each with nine final weights of equal share. */
function drawsOf(
  fromAt: number,
  series: { times: readonly number[]; grams: readonly number[] },
  best: { tauMs: number; squaresG2: number; scatterG: number },
  limits: { fromMs: number; toMs: number },
): CurveDraw[] {
  const { scatterG } = best
  const squares = (log: number): number => lineAt(series.times, series.grams, Math.exp(log)).squaresG2
  const mostG2 = best.squaresG2 - 2 * scatterG ** 2 * Math.log(LEAST_WEIGHT)
  const low = edgeOf(squares, Math.log(best.tauMs), Math.log(limits.fromMs), mostG2)
  const high = edgeOf(squares, Math.log(best.tauMs), Math.log(limits.toMs), mostG2)
  const draws = Array.from({ length: DRAWN_TAUS }, (_, n) => {
    const tauMs = Math.exp(low + ((high - low) * (n + 0.5)) / DRAWN_TAUS)
    const line = lineAt(series.times, series.grams, tauMs)
    const weight = Math.exp((best.squaresG2 - line.squaresG2) / (2 * scatterG ** 2))
    // The mean weight is well known; what is not is the slope, and with it where the line meets exp(-t / tau) = 0.
    const slopeSd = scatterG / Math.sqrt(line.leverage)
    return NORMAL_NINTHS.map((deviation) => ({
      fromAt,
      tauMs,
      finalG: line.finalG - deviation * slopeSd * line.meanShape,
      amplitudeG: line.amplitudeG + deviation * slopeSd,
      weight,
    }))
  }).flat()
  const sum = draws.reduce((total, draw) => total + draw.weight, 0)
  return draws.map((draw) => ({ ...draw, weight: draw.weight / sum }))
}
