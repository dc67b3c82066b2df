import { formatCount } from '@/lib/format/figures'
import { formatDuration, formatMoment } from '@/lib/format/times'
import type { Carry } from './carry'
import type { CarryCheckAnswer, PieceCheck } from './carry-check'

export type Worst = Carry['worst']

const order: readonly Worst[] = ['leave', 'unknown', 'keep-short', 'words', 'fine']

export const gradeOf = (check: PieceCheck): Worst => (check.kind === 'verdict' ? check.verdict : check.kind)

export function worstOf(checks: readonly PieceCheck[]): Worst {
  const grades = new Set(checks.map(gradeOf))
  return order.find((grade) => grades.has(grade)) ?? 'fine'
}

export interface NumberedCheck {
  number: string
  check: PieceCheck
  bagged?: CarryCheckAnswer['pieces'][number]['bagged']
}

/** The most pressing first: the worst verdict, and within it the earliest edge. */
export function byPress<T extends { check: PieceCheck }>(pieces: readonly T[]): T[] {
  const edge = (check: PieceCheck): number =>
    check.kind === 'verdict' && check.earlyAt !== null ? new Date(check.earlyAt).getTime() : Infinity
  const rank = (check: PieceCheck): number => order.indexOf(gradeOf(check))
  // Two without an edge subtract to NaN, which counts as equal.
  return pieces.toSorted((a, b) => rank(a.check) - rank(b.check) || edge(a.check) - edge(b.check) || 0)
}

/** The answer to "may I take these there?" in one sentence. */
export function checkHeadline(
  pieces: readonly NumberedCheck[],
  roomName: string,
  stayMinutes: number,
  clock: { timeZone: string; now: Date },
): string {
  const first = byPress(pieces)[0]
  if (first === undefined) return 'Choose a piece.'
  const { check, number } = first
  const moment = (at: string) => formatMoment(at, clock.timeZone, clock.now)
  if (check.kind === 'unknown') return unknownWords(check, roomName, moment)
  if (check.kind === 'words') return `${number}: ${check.words}`
  if (check.verdict === 'leave') return `Leave ${number} where it is: ${whyLeave(first, moment)}`
  if (check.verdict === 'keep-short')
    return check.earlyAt === null
      ? `Keep it short with ${number}.`
      : `Keep it short: ${number} back by ${moment(check.earlyAt)}.`
  const stay = formatDuration(stayMinutes)
  return pieces.length === 1
    ? `Fine: ${number} keeps its fit there for ${stay}.`
    : `Fine: all ${String(pieces.length)} keep their fit there for ${stay}.`
}

function whyLeave(piece: NumberedCheck, moment: (at: string) => string): string {
  const { check, bagged } = piece
  if (check.kind !== 'verdict') return ''
  if (check.usedAtStart >= 1) return 'its joint has already moved past what it may lose.'
  const edge =
    check.earlyAt === null
      ? 'the air there is too far from what it was cut at.'
      : `it may have used up its allowance by ${moment(check.earlyAt)}.`
  if (bagged === null || bagged === undefined || bagged.verdict === 'leave') return edge
  const until = bagged.earlyAt === null ? '' : ` until ${moment(bagged.earlyAt)}`
  return `${edge} Bagged, it may go${until}.`
}

function unknownWords(
  check: Extract<PieceCheck, { kind: 'unknown' }>,
  roomName: string,
  moment: (at: string) => string,
): string {
  if (check.reason === 'never-read') return `No verdict: ${roomName} has never been read.`
  if (check.reason === 'no-history') return 'No verdict: nothing is known of the air that it comes from.'
  return check.since === null
    ? `No verdict: no fresh reading from ${roomName}.`
    : `No verdict: no reading from ${roomName} since ${moment(check.since)}.`
}

export interface CarryForHeadline {
  state: Carry['state']
  roomName: string
  plannedAt: string
  stayMinutes: number
  pieces: readonly { number: string; check: PieceCheck | null; isOut: boolean; isOverdue: boolean }[]
  /** What is said of a plan for whatever is taken; absent for any other. */
  whatever?: string | undefined
}

/** The most pressing thing about a carry, verb first. */
export function carryHeadline(carry: CarryForHeadline, clock: { timeZone: string; now: Date }): string {
  const moment = (at: string) => formatMoment(at, clock.timeZone, clock.now)
  const judged = carry.pieces.flatMap((piece) =>
    piece.check === null ? [] : [{ ...piece, check: piece.check }],
  )
  if (carry.state === 'back') return `${namesOf(carry.pieces)} back from ${carry.roomName}.`
  if (carry.state === 'called-off')
    return carry.pieces.length === 0 ? 'Called off.' : `Called off: ${namesOf(carry.pieces)} stayed.`
  if (carry.state === 'planned') {
    if (carry.whatever !== undefined) return `Planned for ${moment(carry.plannedAt)}. ${carry.whatever}`
    if (judged.length === 0) {
      const what = carry.pieces.length === 0 ? 'Whatever you take' : namesOf(carry.pieces)
      return `Planned for ${moment(carry.plannedAt)}. ${what} will be judged from two days before.`
    }
    const check = checkHeadline(judged, carry.roomName, carry.stayMinutes, clock)
    return `Planned for ${moment(carry.plannedAt)}. ${check}`
  }
  const overdue = carry.pieces.filter((piece) => piece.isOut && piece.isOverdue)
  if (overdue.length > 0) return `Bring in ${namesOf(overdue)} now: the time out there is used up.`
  const [first] = byPress(judged.filter((piece) => piece.isOut)).toSorted(
    (a, b) => edgeOf(a.check) - edgeOf(b.check) || 0,
  )
  if (first === undefined) return `${namesOf(carry.pieces)} in ${carry.roomName}.`
  if (first.check.kind === 'verdict' && first.check.earlyAt !== null)
    return `Bring ${first.number} in by ${moment(first.check.earlyAt)}.`
  if (first.check.kind === 'verdict') return `${first.number} keeps its fit in ${carry.roomName} for now.`
  if (first.check.kind === 'words') return `${first.number} is out in ${carry.roomName}. ${first.check.words}`
  return `${first.number} is out: ${unknownWords(first.check, carry.roomName, moment)}`
}

const edgeOf = (check: PieceCheck): number =>
  check.kind === 'verdict' && check.earlyAt !== null ? new Date(check.earlyAt).getTime() : Infinity

/** "207", "207 and 211", or "207, 211 and 3 more". */
export function namesOf(pieces: readonly { number: string }[]): string {
  const numbers = pieces.map((piece) => piece.number)
  if (numbers.length <= 1) return numbers[0] ?? 'nothing'
  if (numbers.length <= 3) return `${numbers.slice(0, -1).join(', ')} and ${numbers.at(-1) ?? ''}`
  return `${numbers.slice(0, 2).join(', ')} and ${formatCount(numbers.length - 2, 'more', 'more')}`
}
