import { assertFinite, assertFiniteAbove } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import { START_SHAPES, wetShare, type DryingShape } from './drying-shape'
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
const TOLERANCE = 1e-9
const SHORTEST_TAU_OVER_GAP = 0.1
const GOLDEN = (Math.sqrt(5) - 1) / 2
/** A rounded weight that is also not put down twice alike: half a step, one standard deviation. A guess. */
const SCATTER_OVER_STEP = 0.5
/** No piece is a slab nor an exponential: this share of the change counts as scatter besides. A guess. */
const SHAPE_ERROR_SHARE = 0.005
/** Three weights fit any curve, so nothing shows how far the wood is from this one. A guess. */
const SHAPE_ERROR_SHARE_OF_THREE = 0.01
/** A fitted change smaller than so many scatters is no change one way. A guess, as "three sigma" is common practice. */
const LEAST_CHANGE_IN_SCATTERS = 3
/** Curves that count less than this beside the best are left out. */
const LEAST_WEIGHT = 1e-4
/** Longest time constant among those curves, in records: with it a third of the change is over. A guess. */
const LONGEST_DRAWN_OVER_RECORD = 5
/** Time constants tried to find the best curve of a shape, where that only weighs it against others. */
const SHAPE_TAUS = 40
const SHAPE_TOLERANCE = 1e-5
/** Time constants among those curves, for each shape. */
const DRAWN_TAUS = 16
/** Middles of five equal shares of the normal distribution, in standard deviations. */
const NORMAL_FIFTHS = [-1.2816, -0.5244, 0, 0.5244, 1.2816] as const

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
 * golden section. The doubt comes from the profile of the squares over tau, with the scatter taken as the larger of half
 * a step and what the residuals show, and a little of the change for what no curve gets right, and for each tau the normal spread of the final weight. It takes in that wood
 * starts faster than an exponential: curves of a slab that was so far along count beside it, each as well as it fits.
 * Source: derived; regression as in any textbook, the profile by the likelihood of normal errors, the slab by Crank,
 * The Mathematics of Diffusion (1975), ch. 4.
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

  const drawn = tausBetween(shortest, LONGEST_DRAWN_OVER_RECORD * record, SHAPE_TAUS)
  const draws = drawsOf(first.at, series, drawn, scatterG)
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

const tausBetween = (from: number, to: number, count: number): number[] =>
  Array.from({ length: count }, (_, n) => from * (to / from) ** (n / (count - 1)))

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

type Series = { readonly times: readonly number[]; readonly grams: readonly number[] }

/** The straight regression of the weights on a shape with that time constant. */
function lineAt({ times, grams }: Series, tauMs: number, shape: DryingShape | undefined): Linear {
  const shapes = times.map((time) => wetShare(time, tauMs, shape))
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

/** The time constant with the least squares, and whether it is the longest that was tried: no end in sight. */
function bestTau(series: Series, shape: DryingShape | undefined, taus: readonly number[], tolerance: number) {
  const squares = taus.map((tauMs) => lineAt(series, tauMs, shape).squaresG2)
  const at = squares.indexOf(Math.min(...squares))
  const isLongest = at === taus.length - 1
  const [low = 0, middle = 0] = [taus[at - 1] ?? taus[at], taus[at]]
  return {
    isLongest,
    tauMs: isLongest ? middle : refined(series, shape, [low, taus[at + 1] ?? middle], tolerance),
  }
}

/** Golden section on the logarithm of tau, which is where the squares look like a bowl. */
function refined(
  series: Series,
  shape: DryingShape | undefined,
  [from, to]: readonly [number, number],
  tolerance: number,
): number {
  const squares = (log: number): number => lineAt(series, Math.exp(log), shape).squaresG2
  let low = Math.log(from)
  let high = Math.log(to)
  while (high - low > tolerance) {
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
  while (Math.abs(outside - inside) > 1e-4 * Math.abs(limit - best)) {
    const middle = (inside + outside) / 2
    if (squares(middle) <= mostG2) inside = middle
    else outside = middle
  }
  return inside
}

/** Curves that fit nearly as well, of every shape: each tau by its squares, each with five equal shares of the end. */
function drawsOf(fromAt: number, series: Series, taus: readonly number[], scatterG: number): CurveDraw[] {
  const candidates = START_SHAPES.map((shape) => {
    const { tauMs } = bestTau(series, shape, taus, SHAPE_TOLERANCE)
    return { shape, bestLog: Math.log(tauMs), leastG2: lineAt(series, tauMs, shape).squaresG2 }
  })
  const leastG2 = Math.min(...candidates.map((candidate) => candidate.leastG2))
  const mostG2 = leastG2 - 2 * scatterG ** 2 * Math.log(LEAST_WEIGHT)
  const limits = [Math.log(taus[0] ?? 1), Math.log(taus.at(-1) ?? 1)] as const
  const draws = candidates
    .filter((candidate) => candidate.leastG2 <= mostG2)
    .flatMap(({ shape, bestLog }) => {
      const squares = (log: number): number => lineAt(series, Math.exp(log), shape).squaresG2
      const low = edgeOf(squares, bestLog, limits[0], mostG2)
      const high = edgeOf(squares, bestLog, limits[1], mostG2)
      return Array.from({ length: DRAWN_TAUS }, (_, n) => {
        const tauMs = Math.exp(low + ((high - low) * (n + 0.5)) / DRAWN_TAUS)
        const line = lineAt(series, tauMs, shape)
        const likely = Math.exp((leastG2 - line.squaresG2) / (2 * scatterG ** 2))
        // Each stands for a stretch of log tau, so that a shape with a sharper minimum does not count for more.
        return likely < LEAST_WEIGHT
          ? []
          : endsOf(line, { fromAt, tauMs, shape }, scatterG, likely * (high - low))
      }).flat()
    })
  const sum = draws.reduce((total, draw) => total + draw.weight, 0)
  return draws.map((draw) => ({ ...draw, weight: draw.weight / sum }))
}

function endsOf(
  { finalG, amplitudeG, leverage, meanShape }: Linear,
  curve: { fromAt: number; tauMs: number; shape: DryingShape | undefined },
  scatterG: number,
  weight: number,
): CurveDraw[] {
  // The mean weight is well known; what is not is the slope, and with it where the line meets a share of 0.
  const slopeSd = scatterG / Math.sqrt(leverage)
  return NORMAL_FIFTHS.map((deviation) => ({
    ...curve,
    finalG: finalG - deviation * slopeSd * meanShape,
    amplitudeG: amplitudeG + deviation * slopeSd,
    weight,
  }))
}
