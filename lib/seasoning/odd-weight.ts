import { assertFiniteAbove } from '@/lib/assert'
import { GRAMS_PER_OUNCE } from '@/lib/units'
import { oddWeightShare } from './policy'

/** Slips of the hand and of the scale: a point too far left or right, grams for ounces. */
const SLIPS = [10, 0.1, 100, 0.01, GRAMS_PER_OUNCE, 1 / GRAMS_PER_OUNCE] as const

export type OddWeight = { readonly lastG: number; readonly perhapsG: number | undefined }

/**
 * Whether a weight is so far from the last one that it is worth a second look before it is kept, such as 1830 for 183.0.
 * Nothing is refused: wood may have been cut away without anybody saying so.
 * @param grams as typed, g, above 0
 * @param lastG the last weight of the current series, g, above 0
 * @returns undefined for a weight like the last; else, where a usual slip explains it, what was perhaps meant
 * @throws RangeError for an input out of range or NaN
 */
export function oddWeight(grams: number, lastG: number): OddWeight | undefined {
  assertFiniteAbove('grams', grams, 0)
  assertFiniteAbove('lastG', lastG, 0)
  if (isLike(grams, lastG)) return undefined
  const slip = SLIPS.find((factor) => isLike(grams / factor, lastG))
  return { lastG, perhapsG: slip === undefined ? undefined : Math.round((grams / slip) * 100) / 100 }
}

const isLike = (grams: number, lastG: number): boolean => Math.abs(grams / lastG - 1) <= oddWeightShare
