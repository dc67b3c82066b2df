import { fieldValue, type Field } from '@/lib/bench/fields'
import { err, ok, type Result } from '@/lib/result'
import { dayMs } from '@/lib/seasoning/policy'
import type { Weight } from '@/lib/seasoning/weighing'
import type { UnitSystem } from '@/lib/sites/site'

export const MOST_WEIGHTS = 60

/** What a scale may show, as the API takes it. */
export const gramsField = (number: number): Field => ({
  label: `Weight ${String(number)}`,
  kind: 'mass',
  min: 0.001,
  max: 200_000,
  start: '',
})

/** How the weighings are told: an equal time apart, or each with its day. */
export type Spacing =
  | { readonly kind: 'every'; readonly days: number }
  | { readonly kind: 'dates'; readonly on: readonly string[] }

/**
 * The weighings as typed, in order of time. Days count from midnight in UTC; an equal spacing begins at 0.
 * @returns the weights, or what is wrong with each, naming it
 */
export function weighingsOf(
  grams: readonly string[],
  spacing: Spacing,
  units: UnitSystem,
): Result<Weight[], string[]> {
  const refusals: string[] = []
  const weights: Weight[] = []
  let before = -Infinity
  grams.forEach((text, index) => {
    const weight = fieldValue(gramsField(index + 1), text, units)
    if (!weight.ok) refusals.push(weight.error)
    const at = spacing.kind === 'every' ? index * spacing.days * dayMs : dayAt(spacing.on[index] ?? '')
    if (at === undefined || at <= before) {
      refusals.push(`Day ${String(index + 1)}: a day after the one before it.`)
      return
    }
    before = at
    if (weight.ok) weights.push({ at, grams: weight.value })
  })
  return refusals.length === 0 ? ok(weights) : err(refusals)
}

function dayAt(on: string): number | undefined {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(on)) return undefined
  const at = Date.parse(`${on}T00:00:00Z`)
  return Number.isNaN(at) ? undefined : at
}

/** Days that end on one and lie an equal time apart, for whoever goes on by date. */
export function datesEnding(lastAt: number, count: number, everyDays: number): string[] {
  return Array.from({ length: count }, (_, index) =>
    new Date(lastAt - (count - 1 - index) * Math.max(1, Math.round(everyDays)) * dayMs)
      .toISOString()
      .slice(0, 10),
  )
}
