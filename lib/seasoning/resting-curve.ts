import type { UnitSystem } from '@/lib/sites/site'
import { forecastFrom, type NoForecast } from './forecast'
import { dayMs } from './policy'
import type { ReadySpan } from './ready-span'
import { weightedQuantile } from './weighted-quantile'
import { curveG } from './weighing'
import { weighingFit, type WeighingFit } from './weighing-fit'

/** What the resting curve draws, as columns. Instants in epoch ms, weights in g. */
export type RestingCurve = {
  readonly weighings: {
    readonly at: number[]
    readonly grams: number[]
    /** Without the room's drift; undefined where that is not known. */
    readonly correctedG: (number | undefined)[]
  }
  /** Through the weights as far as they go. */
  readonly fit?: { readonly at: number[]; readonly grams: number[] }
  /** From the last weight on: the middle of all curves that the weights allow, and the middle 8 in 10 of them. Never there beside `noForecast`. */
  readonly forecast?: {
    readonly at: number[]
    readonly grams: number[]
    readonly lowG: number[]
    readonly highG: number[]
  }
  readonly noForecast?: NoForecast
}

const MOST_WEIGHINGS = 48
const FIT_POINTS = 36
const FORECAST_POINTS = 36
/** The forecast is drawn until all but a twentieth is over, a month at least and a year at most. A guess. */
const DRAWN_TAUS = 3
const LEAST_DRAWN_MS = 30 * dayMs
const MOST_DRAWN_MS = 365 * dayMs

export type RestingWeight = {
  readonly at: number
  readonly grams: number
  readonly correctedG?: number | undefined
}

/**
 * A blank's weighings, the curve through them and where it leads: 120 points at most.
 * @param weights the current series, in order of time, corrected for drift where that is known
 * @param stepG step of the scale, g
 * @param span the ready range, so that the forecast reaches to its end
 * @throws RangeError as `weighingFit`
 */
export function restingCurve(
  weights: readonly RestingWeight[],
  stepG: number,
  span?: ReadySpan,
  units: UnitSystem = 'metric',
): RestingCurve {
  const shown = thinned(weights, MOST_WEIGHINGS)
  const weighings = {
    at: shown.map((weight) => weight.at),
    grams: shown.map((weight) => weight.grams),
    correctedG: shown.map((weight) => weight.correctedG),
  }
  const fitted = curveWeights(weights)
  const fit = weighingFit(fitted, stepG)
  const forecast = forecastFrom(fit, fitted, units)
  return {
    weighings,
    ...(fit.ok ? { fit: fitColumns(fit.value) } : {}),
    ...(forecast.ok ? { forecast: forecastColumns(forecast.value, span) } : { noForecast: forecast.error }),
  }
}

/**
 * The weights that a curve goes through: corrected ones, if there are enough of them for a curve; else all as weighed,
 * since the two kinds do not mix.
 */
export function curveWeights(weights: readonly RestingWeight[]): { at: number; grams: number }[] {
  const corrected = weights.flatMap(({ at, correctedG }) =>
    correctedG === undefined ? [] : [{ at, grams: correctedG }],
  )
  return corrected.length >= 3 ? corrected : weights.map(({ at, grams }) => ({ at, grams }))
}

function fitColumns(fit: WeighingFit) {
  const at = evenly(fit.fromAt, fit.toAt, FIT_POINTS)
  return { at, grams: at.map((instant) => curveG(fit, instant)) }
}

function forecastColumns(fit: WeighingFit, span: ReadySpan | undefined) {
  const drawnMs = Math.min(MOST_DRAWN_MS, Math.max(LEAST_DRAWN_MS, DRAWN_TAUS * fit.tauMs))
  const at = evenly(fit.toAt, Math.max(fit.toAt + drawnMs, span?.toAt ?? 0), FORECAST_POINTS)
  const quantileG = (instant: number, share: number): number =>
    weightedQuantile(
      fit.draws.map((draw) => ({ value: curveG(draw, instant), weight: draw.weight })),
      share,
    )
  return {
    at,
    grams: at.map((instant) => quantileG(instant, 0.5)),
    lowG: at.map((instant) => quantileG(instant, 0.1)),
    highG: at.map((instant) => quantileG(instant, 0.9)),
  }
}

const evenly = (from: number, to: number, points: number): number[] =>
  Array.from({ length: points }, (_, n) => Math.round(from + ((to - from) * n) / (points - 1)))

/** Every so many, the first and the last always among them. */
function thinned<T>(items: readonly T[], most: number): T[] {
  if (items.length <= most) return [...items]
  const kept = new Set(
    Array.from({ length: most }, (_, n) => Math.round((n * (items.length - 1)) / (most - 1))),
  )
  return items.filter((_, n) => kept.has(n))
}
