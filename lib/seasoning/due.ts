import { assertFinite, assertFiniteAbove } from '@/lib/assert'
import { fineStepG, lightUnderG, weighEveryMs, weighLightEveryMs } from './policy'

/**
 * How long from one weighing to the next: a month; a week for a piece under 100 g on a scale that shows 0.1 g.
 * @param grams last weight, g, above 0
 * @param stepG step of the scale, g, above 0
 * @returns ms
 * @throws RangeError for an input out of range or NaN
 */
export function weighingGapMs(grams: number, stepG: number): number {
  assertFiniteAbove('grams', grams, 0)
  assertFiniteAbove('stepG', stepG, 0)
  return grams < lightUnderG && stepG <= fineStepG ? weighLightEveryMs : weighEveryMs
}

/**
 * When the next weighing is due, and whether that is past.
 * @param last the newest weight of the current series; without one a weighing is due since the series began
 * @param openedAt when the series began, epoch ms
 */
export function weighingDue(
  last: { readonly at: number; readonly grams: number; readonly stepG: number } | undefined,
  openedAt: number,
  now: number,
): { readonly dueAt: number; readonly isDue: boolean } {
  assertFinite('openedAt', openedAt)
  assertFinite('now', now)
  const dueAt = last === undefined ? openedAt : last.at + weighingGapMs(last.grams, last.stepG)
  return { dueAt, isDue: dueAt <= now }
}
