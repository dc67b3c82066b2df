import type { CarryCheckInput, Verdict } from './carry-check'
import { wordsReason } from './check'
import { jointOfPiece } from './joint-defaults'
import { edgeOf, reckoned } from './reckon'
import { verdictOf } from './verdict'

const HOUR_MS = 3_600_000
/** Past the stay, the half hour that "fine" asks for and a little. */
const BEYOND_STAY_HOURS = 0.6

export interface BriefCheck {
  verdict: Verdict
  /** Undefined where it does not come within the stay and half an hour more. */
  earlyHours: number | undefined
  /** Allowance used at the end of the stay, a fraction. */
  usedAtEnd: number
}

/**
 * The verdict alone, looking no further ahead than the stay: for judging many hours one after another.
 * @returns undefined where there is no verdict
 */
export function briefCheck(input: CarryCheckInput): BriefCheck | undefined {
  const joint = wordsReason(input.piece) === undefined ? jointOfPiece(input.piece) : undefined
  const { there, start } = input
  if (joint === undefined || start === null || there.kind === 'never' || there.kind === 'stale')
    return undefined
  const stayHours = input.stayMinutes / 60
  const wood = reckoned(input, joint, start, there, stayHours + BEYOND_STAY_HOURS)
  const { usedAtStart, earlyHours } = edgeOf(wood)
  const earlyMs = earlyHours === undefined ? undefined : earlyHours * HOUR_MS
  return {
    verdict: verdictOf(usedAtStart, earlyMs, stayHours * HOUR_MS),
    earlyHours,
    usedAtEnd: wood.usedAfter(stayHours),
  }
}
