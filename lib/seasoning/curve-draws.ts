import { START_SHAPES, type DryingShape } from './drying-shape'
import { bestTau, lineAt, tausBetween, type Line, type Series } from './fit-line'
import type { WeightCurve } from './weighing'

/** One curve that the weights allow, and how much it counts. All weights of a fit add up to 1. */
export type CurveDraw = WeightCurve & { readonly weight: number }

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

/**
 * The curves that fit nearly as well as the best, of every shape: each tau by its squares, each with five equal shares
 * of the end.
 * @param series times since `fromAt` in ms, and grams
 * @param shortestMs shortest time constant that the spacing of the weights can show
 * @param scatterG scatter of a weight, g, one standard deviation
 * @returns none where every curve would end at less than nothing
 *
 * Source: derived; the profile of the squares by the likelihood of normal errors, flat over log tau and over the shapes,
 * with the normal spread of the end for each tau.
 */
export function curveDraws(
  series: Series,
  fromAt: number,
  shortestMs: number,
  scatterG: number,
): CurveDraw[] {
  const record = series.times.at(-1) ?? shortestMs
  const taus = tausBetween(shortestMs, LONGEST_DRAWN_OVER_RECORD * record, SHAPE_TAUS)
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
          : endsOf(line, { fromAt, tauMs, shape }, scatterG, likely * Math.max(high - low, SHAPE_TOLERANCE))
      }).flat()
    })
  // No wood ends at less than nothing.
  const possible = draws.filter((draw) => draw.finalG > 0)
  const sum = possible.reduce((total, draw) => total + draw.weight, 0)
  return possible.map((draw) => ({ ...draw, weight: draw.weight / sum }))
}

function endsOf(
  { finalG, amplitudeG, leverage, meanShape }: Line,
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
