import { formatMass } from '@/lib/format/figures'
import { formatDay } from '@/lib/format/times'
import { dayMs, weekMs } from '@/lib/seasoning/policy'
import type { UnitSystem } from '@/lib/sites/site'
import { gramsFromOunces, ouncesFromGrams } from '@/lib/units'
import type { BenchReady } from './ready-model'

export type Frame = { fromAt: number; toAt: number; lowG: number; highG: number }

/** Everything that is drawn lies within it, with a little room above and below. */
export function frameOf({ curve, target, answer }: BenchReady): Frame {
  const instants = [...curve.weighings.at, ...(curve.forecast?.at ?? []), answer.span?.toAt ?? -Infinity]
  const grams = [
    ...curve.weighings.grams,
    ...(curve.fit?.grams ?? []),
    ...(curve.forecast?.lowG ?? []),
    ...(target === undefined ? [] : [target.lowG, target.highG]),
  ]
  const low = Math.min(...grams)
  const high = Math.max(...grams)
  const room = Math.max(0.08 * (high - low), 0.005 * high)
  const fromAt = Math.min(...instants.filter(Number.isFinite))
  return { fromAt, toAt: Math.max(fromAt + weekMs, ...instants), lowG: low - room, highG: high + room }
}

const STEPS = [
  0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 50_000,
]

/** Round weights of either unit. */
export function weightTicks({ lowG, highG }: Frame, units: UnitSystem): { grams: number; text: string }[] {
  const [low, high] = units === 'metric' ? [lowG, highG] : [ouncesFromGrams(lowG), ouncesFromGrams(highG)]
  const step = STEPS.find((candidate) => (high - low) / candidate <= 6) ?? high - low
  const first = Math.ceil(low / step)
  return Array.from({ length: Math.max(0, Math.floor(high / step) - first + 1) }, (_, index) => {
    const value = (first + index) * step
    return {
      grams: units === 'metric' ? value : gramsFromOunces(value),
      text: String(Math.round(value * 100) / 100),
    }
  })
}

const DAY_STEPS = [1, 2, 7, 14, 28, 56, 91, 182, 364, 728]

/** Ticks of the time axis: days of the calendar, or weeks from the first weighing. */
export function timeMarks(
  { fromAt, toAt }: Frame,
  isByDate: boolean,
  most: number,
): { at: number; text: string }[] {
  const days = (toAt - fromAt) / dayMs
  const step = DAY_STEPS.find((candidate) => days / candidate <= most) ?? 3640
  return Array.from({ length: Math.floor(days / step) + 1 }, (_, index) => {
    const at = fromAt + index * step * dayMs
    return { at, text: isByDate ? dayText(at, fromAt) : weeksText(index * step) }
  })
}

const dayText = (at: number, fromAt: number): string =>
  formatDay(new Date(at), 'UTC', new Date(fromAt)).replace(/^[A-Z][a-z]{2} /, '')

const weeksText = (days: number): string => (days % 7 === 0 ? `${String(days / 7)} wk` : `${String(days)} d`)

/** The weighings in words, for the figure's name. */
export function curveSentence(
  { weights }: BenchReady,
  spanText: string | undefined,
  units: UnitSystem,
): string {
  const first = weights[0]
  const last = weights.at(-1)
  if (first === undefined || last === undefined) return 'No weighings.'
  const ready = spanText === undefined ? 'no ready range can be told' : `ready ${spanText}`
  return `Resting curve: from ${formatMass(first.grams, units)} to ${formatMass(last.grams, units)} over ${String(weights.length)} weighings; ${ready}.`
}
