import { assertFinite, assertFiniteAbove } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import type { Direction } from './weighing'

/** Why weights make no curve that ends somewhere. */
export type NoCurve = 'no-change' | 'not-one-way' | 'not-slowing'

export type EndOfThree = { readonly finalG: number; readonly tauMs: number; readonly direction: Direction }

/** Standard deviation of rounding to a step of 1: that of a value spread evenly over the step. */
const ROUNDING_SD = 1 / Math.sqrt(12)
/** W1 + W3 - 2 W2 carries the errors of four weights, two of which are the same one. */
const CURVATURE_ERRORS = Math.sqrt(6)
/** A curve whose time constant is over this many times the record cannot be told from a straight line. A guess. */
export const LONGEST_TAU_OVER_RECORD = 20

/**
 * Where the weight is heading, from three weights an equal time apart.
 * @param grams first, second and third weight, g, each above 0
 * @param everyMs time between two weights, ms, above 0
 * @param stepG step of the scale, g, above 0
 * @returns the final weight in g and the time constant in ms; or why there is none: `no-change` where all three are
 *   the same within a step, `not-one-way` unless each is lighter than the one before (or each heavier), `not-slowing`
 *   unless the second change is smaller than the first by more than the scale's error
 * @throws RangeError for an input out of range or NaN
 *
 * Wood does not follow one exponential: it starts faster, so early on the final weight comes out too high while drying
 * and the piece looks closer to done than it is.
 * Source: derived; the exponential through three equally spaced points.
 */
export function endOfThree(
  grams: readonly [number, number, number],
  everyMs: number,
  stepG: number,
): Result<EndOfThree, { readonly code: NoCurve }> {
  for (const weight of grams) assertFiniteAbove('grams', weight, 0)
  assertFiniteAbove('everyMs', everyMs, 0)
  assertFiniteAbove('stepG', stepG, 0)
  const [first, second, third] = grams
  if (Math.max(...grams) - Math.min(...grams) <= stepG * (1 + 1e-9)) return err({ code: 'no-change' })
  const firstLoss = first - second
  const secondLoss = second - third
  if (!(firstLoss * secondLoss > 0)) return err({ code: 'not-one-way' })
  const slowing = Math.abs(firstLoss) - Math.abs(secondLoss)
  const tauMs = everyMs / Math.log(firstLoss / secondLoss)
  const tooStraight = !(tauMs > 0 && tauMs <= LONGEST_TAU_OVER_RECORD * 2 * everyMs)
  if (slowing <= CURVATURE_ERRORS * ROUNDING_SD * stepG || tooStraight) return err({ code: 'not-slowing' })
  const finalG = third - secondLoss ** 2 / (firstLoss - secondLoss)
  assertFinite('finalG', finalG)
  if (finalG <= 0) return err({ code: 'not-slowing' })
  return ok({ finalG, tauMs, direction: firstLoss > 0 ? 'drying' : 'gaining' })
}
