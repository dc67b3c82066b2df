import { assertFiniteAbove, assertInRange } from '@/lib/assert'

/** Standard deviations to the edges within which 8 in 10, and 9 in 10, lie. Source: the normal distribution. */
export const EDGE_OF_EIGHT_IN_TEN = 1.2816
export const EDGE_OF_NINE_IN_TEN = 1.6449

/**
 * The spread of a factor that lies within f and 1 / f nine times in ten, as the standard deviation of its logarithm.
 * @param factor above 1, or 1 for no doubt
 * @throws RangeError for a factor under 1 or NaN
 */
export function logSpreadNineInTen(factor: number): number {
  assertInRange('factor', factor, 1, 1000)
  return Math.log(factor) / EDGE_OF_NINE_IN_TEN
}

/**
 * The spread of a figure that lies within two bounds eight times in ten, as the standard deviation of its logarithm.
 * @throws RangeError for bounds not above 0, or NaN
 */
export function logSpreadEightInTen(low: number, high: number): number {
  assertFiniteAbove('low', low, 0)
  assertFiniteAbove('high', high, 0)
  return Math.max(0, Math.log(high / low)) / (2 * EDGE_OF_EIGHT_IN_TEN)
}

/** Independent doubts together: the root of their summed squares. Source: JCGM 100:2008, 5.1.2. */
export const together = (...spreads: readonly number[]): number => Math.hypot(...spreads)

/**
 * The value below which a share of the figures lies.
 * @param sorted rising
 * @param share 0 to 1
 */
export function quantileOfSorted(sorted: Float64Array, share: number): number {
  const place = share * (sorted.length - 1)
  const low = Math.floor(place)
  const below = sorted[low] ?? Number.NaN
  const above = sorted[Math.min(sorted.length - 1, low + 1)] ?? below
  // Two infinities, "not within what was looked at", would subtract to no number at all.
  return above === below ? below : below + (above - below) * (place - low)
}
