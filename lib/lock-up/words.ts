import type { Carry, CarryPiece } from '@/lib/carry/carry'
import { namesOf } from '@/lib/carry/summary'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { formatMoment } from '@/lib/format/times'
import type { LockUp } from './lock-up'

export interface OutAtLockUp {
  carry: Carry
  piece: CarryPiece
}

/** What is still out, the most pressing first. */
export function stillOut(carries: readonly Carry[]): OutAtLockUp[] {
  return carries
    .flatMap((carry) =>
      carry.pieces
        .filter((piece) => piece.outAt !== null && piece.backAt === null)
        .map((piece) => ({ carry, piece })),
    )
    .toSorted(
      (a, b) =>
        Number(b.piece.isOverdue) - Number(a.piece.isOverdue) || edgeOf(a.piece) - edgeOf(b.piece) || 0,
    )
}

const edgeOf = ({ check }: CarryPiece): number =>
  check?.kind === 'verdict' && check.earlyAt !== null ? new Date(check.earlyAt).getTime() : Infinity

/** The sentence over the page. */
export function lockUpHeadline(lockUp: LockUp): TextPart[] {
  const out = stillOut(lockUp.out)
  if (lockUp.closed !== null) {
    if (out.length === 0) return say`${strong('The day is closed')}, with nothing logged out.`
    return say`${strong('The day is closed')}, with ${namesOf(out.map(({ piece }) => piece))} still out.`
  }
  if (out.length === 0) {
    if (lockUp.used !== null && lockUp.nothingElse === null)
      return say`${strong('Nothing logged out.')} Is anything out that isn’t logged?`
    return say`${strong('Nothing logged out.')} The day can be closed.`
  }
  const rooms = [...new Set(out.map(({ carry }) => carry.toRoom.name))]
  const names = namesOf(out.map(({ piece }) => piece))
  const ask = out.length === 1 ? 'Is it in?' : 'Are they in?'
  return say`${strong(`Still in ${rooms.join(' and ')}: ${names}.`)} ${ask}`
}

/** Whether a piece may stay out until the morning: true, false, or undefined where nobody can say. */
export function lastsTheNight({ check, isOverdue }: CarryPiece, morningAt: string): boolean | undefined {
  if (isOverdue) return false
  if (check?.kind === 'words') return check.reason === 'blank' ? true : undefined
  if (check?.kind !== 'verdict') return undefined
  return check.earlyAt === null || new Date(check.earlyAt) >= new Date(morningAt)
}

/** "It was due in by 13:35." "Good until 18:10; not for the night." */
export function nightWords(
  piece: CarryPiece,
  morningAt: string,
  clock: { timeZone: string; now: Date },
): string {
  const { check } = piece
  const moment = (at: string) => formatMoment(at, clock.timeZone, clock.now)
  if (piece.isOverdue) {
    const due = check?.kind === 'verdict' && check.earlyAt !== null ? ` by ${moment(check.earlyAt)}` : ''
    return `It was due in${due}. If it is still out, bring it in before anything else.`
  }
  if (check?.kind === 'words')
    return check.reason === 'blank'
      ? 'A night out there hardly counts for a blank.'
      : `${check.words} One night can undo a year of waiting: bring it in.`
  if (check?.kind !== 'verdict') return 'The air there is not known: bring it in, and look at the lid.'
  if (check.earlyAt === null) return 'It keeps its fit there, the night through, as the air looks now.'
  return lastsTheNight(piece, morningAt) === true
    ? `Good until ${moment(check.earlyAt)}, past the night.`
    : `Good until ${moment(check.earlyAt)}; not for the night.`
}

/** Why the day can't be closed yet; undefined when it can. */
export function notYetClosable(lockUp: LockUp, stayOutIds: ReadonlySet<string>): string | undefined {
  const open = stillOut(lockUp.out).filter(({ piece }) => !stayOutIds.has(piece.id))
  const [first] = open
  if (first !== undefined) return `${first.piece.number} first: is it in?`
  if (lockUp.used !== null && lockUp.nothingElse === null) return 'Say first whether anything else is out.'
  return undefined
}
