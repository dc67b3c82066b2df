import { assertInRange } from '@/lib/assert'

export type Weighed = { readonly value: number; readonly weight: number }

/**
 * The value below which a share of the weight lies. Infinite values are allowed and count as the latest of all.
 * @param items at least one, weights 0 or more and not all 0
 * @param share 0 to 1
 * @throws RangeError for a share out of range, NaN, or nothing to choose from
 */
export function weightedQuantile(items: readonly Weighed[], share: number): number {
  assertInRange('share', share, 0, 1)
  const sorted = items.filter((item) => item.weight > 0).sort((a, b) => a.value - b.value)
  const last = sorted.at(-1)
  if (last === undefined) throw new RangeError('items must hold one with a weight')
  const wanted = share * sorted.reduce((sum, item) => sum + item.weight, 0)
  let passed = 0
  for (const item of sorted) {
    passed += item.weight
    if (passed >= wanted) return item.value
  }
  return last.value
}
