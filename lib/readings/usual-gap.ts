/** How much one gap moves the usual gap. Status: guess; ten readings forget nine tenths of an old habit. */
const WEIGHT = 0.2
/** A longer pause counts as this many usual gaps at most, so that a night without power is no new habit. */
const LONGEST_IN_GAPS = 2

/**
 * How often a sensor usually measures, s, after readings that it sent now.
 * @param usualGapS what was usual before, s, or `null` while nothing is known
 * @param lastAt the newest reading before these, or `null` for the first
 * @param measuredAt when these were measured, in any order; those that are not newer than `lastAt` tell nothing
 * @returns the usual gap, s, or `null` as long as there was only one reading
 */
export function usualGapAfter(
  usualGapS: number | null,
  lastAt: Date | null,
  measuredAt: readonly Date[],
): number | null {
  const newer = measuredAt
    .map((at) => at.getTime())
    .filter((at) => lastAt === null || at > lastAt.getTime())
    .sort((a, b) => a - b)
  let before = lastAt?.getTime()
  let usual = usualGapS
  for (const at of newer) {
    if (before !== undefined && at > before) {
      const gapS = (at - before) / 1000
      usual = usual === null ? gapS : usual + WEIGHT * (Math.min(gapS, LONGEST_IN_GAPS * usual) - usual)
    }
    before = at
  }
  return usual
}
