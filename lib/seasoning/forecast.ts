import { formatCount, formatMass } from '@/lib/format/figures'
import { err, type Result } from '@/lib/result'
import type { UnitSystem } from '@/lib/sites/site'
import { forecastBelowRateShare, forecastDoubtShareMax, readyWeights, weekMs } from './policy'
import type { NoCurve } from './three-weighings'
import { curveG, type Weight } from './weighing'
import { weighingFit, type WeighingFit } from './weighing-fit'

export type NoForecastCode = NoCurve | 'too-few-weights' | 'not-half-yet' | 'too-uncertain'
export type NoForecast = { readonly code: NoForecastCode; readonly words: string }

/** How fast the weight changes at the start of a series and at its end, g a week, as amounts without a sign. */
export type WeeklyRates = { readonly firstG: number; readonly nowG: number }

/**
 * The rates over the first and over the last interval between weights, read off the fitted curve, so that one bad
 * weight does not decide. Through three weights the curve passes exactly, and these are the rates as weighed.
 */
export function weeklyRates(fit: WeighingFit, weights: readonly Weight[]): WeeklyRates {
  const overG = (from: Weight | undefined, to: Weight | undefined): number =>
    from === undefined || to === undefined
      ? 0
      : (Math.abs(curveG(fit, to.at) - curveG(fit, from.at)) * weekMs) / (to.at - from.at)
  return { firstG: overG(weights[0], weights[1]), nowG: overG(weights.at(-2), weights.at(-1)) }
}

/** Whether the change has slowed to half its first rate. */
export const hasSlowedToHalf = (rates: WeeklyRates): boolean =>
  rates.nowG <= forecastBelowRateShare * rates.firstG * (1 + 1e-9)

/**
 * The fitted curve, if a forecast may be shown from it at all; else why not, as a code and in words.
 * @param weights the current series in order of time, corrected for drift where that is known
 * @param stepG step of the scale, g, above 0
 * @throws RangeError as `weighingFit`
 */
export const weighingForecast = (
  weights: readonly Weight[],
  stepG: number,
  units: UnitSystem = 'metric',
): Result<WeighingFit, NoForecast> => forecastFrom(weighingFit(weights, stepG), weights, units)

/** The same from a fit that is made already. */
export function forecastFrom(
  fit: ReturnType<typeof weighingFit>,
  weights: readonly Weight[],
  units: UnitSystem = 'metric',
): Result<WeighingFit, NoForecast> {
  if (!fit.ok) return err({ code: fit.error.code, words: noCurveWords(fit.error.code, weights.length) })
  const rates = weeklyRates(fit.value, weights)
  if (!hasSlowedToHalf(rates))
    return err({ code: 'not-half-yet', words: notHalfYetWords(fit.value, rates, units) })
  if (!isEndKnown(fit.value))
    return err({ code: 'too-uncertain', words: tooUncertainWords(fit.value, units) })
  return fit
}

/** Whether the middle 8 in 10 of the end is narrow beside the change that the curve makes. */
export const isEndKnown = ({ finalLowG, finalHighG, amplitudeG }: WeighingFit): boolean =>
  finalHighG - finalLowG <= forecastDoubtShareMax * Math.abs(amplitudeG)

function tooUncertainWords({ finalLowG, finalHighG }: WeighingFit, units: UnitSystem): string {
  const range = `${formatMass(finalLowG, units)} to ${formatMass(finalHighG, units)}`
  return `It could end anywhere from ${range}. More weights will narrow that.`
}

/** Why weights make no curve, in words. */
export function noCurveWords(code: NoCurve | 'too-few-weights', count: number): string {
  switch (code) {
    case 'too-few-weights':
      return count === 0
        ? 'It has not been weighed yet.'
        : `${formatCount(count, 'weight')} so far: a curve takes ${String(readyWeights)}.`
    case 'no-change':
      return 'The weight holds, as far as the scale can tell.'
    case 'not-one-way':
      return 'The weights go up and down: they neither fall nor rise steadily.'
    case 'not-slowing':
      return 'The weight changes as fast as before, or faster, so its end is not in sight.'
  }
}

/** The reason for holding a forecast back until the change has halved. */
export function notHalfYetWords(fit: WeighingFit, rates: WeeklyRates, units: UnitSystem = 'metric'): string {
  const [does, did] = fit.direction === 'drying' ? ['loses', 'lost'] : ['gains', 'gained']
  const now = formatMass(rates.nowG, units)
  const first = formatMass(rates.firstG, units)
  return `It ${does} about ${now} a week now and ${did} ${first} at first. Until that has halved, it looks closer to done than it is.`
}
