import { fineMarginMs, leastUsefulStayMs } from '@/lib/notices/policy'
import type { Verdict } from './carry-check'

/**
 * What is said of a carry.
 * @param usedAtStart allowance used when it goes, as a fraction: at 1 or more it is past it already
 * @param earlyMs time from the start to the early edge; undefined where it never comes
 * @param stayMs the planned stay
 *
 * Fine with half an hour to spare, worth going for half an hour at least; both from the policy's table.
 */
export function verdictOf(usedAtStart: number, earlyMs: number | undefined, stayMs: number): Verdict {
  if (usedAtStart >= 1) return 'leave'
  if (earlyMs === undefined || earlyMs >= stayMs + fineMarginMs) return 'fine'
  return earlyMs >= leastUsefulStayMs ? 'keep-short' : 'leave'
}
