import { formatCount } from '@/lib/format/figures'
import { formatDuration, formatMoment } from '@/lib/format/times'
import type { Cover } from '@/lib/pieces/piece'
import type { Carry } from './carry'
import type { BestCover } from './carry-answer'
import type { PieceCheck } from './carry-check'

export type Worst = Carry['worst']

const order: readonly Worst[] = ['leave', 'unknown', 'keep-short', 'words', 'fine']

export const gradeOf = (check: PieceCheck): Worst => (check.kind === 'verdict' ? check.verdict : check.kind)

export function worstOf(checks: readonly PieceCheck[]): Worst {
  const grades = new Set(checks.map(gradeOf))
  return order.find((grade) => grades.has(grade)) ?? 'fine'
}

const COVERED_WORDS: Readonly<Record<Cover, string>> = {
  open: 'Open in work',
  'lid-on': 'With the lid on',
  bagged: 'Bagged',
  tub: 'In the shut tub',
}

export interface NumberedCheck {
  number: string
  check: PieceCheck
  bestCover?: BestCover | null
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
  const stay = formatDuration(stayMinutes)
  const going = goingWords(pieces, stay, moment)
  if (check.verdict === 'leave') {
    const leave = namesOf(pieces.filter((piece) => gradeOf(piece.check) === 'leave'))
    return going === '' || check.usedAtStart >= 1
      ? `Leave ${number} where it is: ${whyLeave(first, moment)}`
      : `Leave ${leave} where ${isOne(leave) ? 'it is' : 'they are'}; ${going}.`
  }
  if (check.verdict === 'keep-short')
    return check.earlyAt === null
      ? `Keep it short with ${number}.`
      : `Keep it short: ${number} back by ${moment(check.earlyAt)}${restWords(pieces, first, stay, moment)}.`
  return pieces.length === 1
    ? `Fine: ${number} keeps its fit there for ${stay}.`
    : `Fine: all ${String(pieces.length)} keep their fit there for ${stay}.`
}

const isOne = (names: string): boolean => !/[ ,]/.test(names)

type Moment = (at: string) => string

/** What may go, and for how long: "214 may go until 16:10 and 226 for the whole 3 h". Empty where nothing may. */
function goingWords(pieces: readonly NumberedCheck[], stay: string, moment: Moment): string {
  const short = byPress(pieces).filter(({ check }) => gradeOf(check) === 'keep-short')
  const fine = pieces.filter(({ check }) => gradeOf(check) === 'fine')
  const untils = short.map(({ number, check }) =>
    check.kind === 'verdict' && check.earlyAt !== null ? `${number} until ${moment(check.earlyAt)}` : number,
  )
  const parts = [...untils, ...(fine.length === 0 ? [] : [`${namesOf(fine)} for the whole ${stay}`])]
  const [first, ...rest] = parts
  if (first === undefined) return ''
  const all = [first.replace(/^(.*?) (until|for the whole) /, '$1 may go $2 '), ...rest]
  return all.length === 1 ? (all[0] ?? '') : `${all.slice(0, -1).join(', ')} and ${all.at(-1) ?? ''}`
}

/** After the piece that is told of first: the others that may go. */
function restWords(
  pieces: readonly NumberedCheck[],
  first: NumberedCheck,
  stay: string,
  moment: Moment,
): string {
  const others = goingWords(
    pieces.filter((piece) => piece !== first),
    stay,
    moment,
  )
  return others === '' ? '' : `; ${others}`
}

function whyLeave(piece: NumberedCheck, moment: (at: string) => string): string {
  const { check, bestCover } = piece
  if (check.kind !== 'verdict') return ''
  if (check.usedAtStart >= 1) return 'its joint has already moved past what it may lose.'
  const edge =
    check.earlyAt === null
      ? 'the air there is too far from what it was cut at.'
      : `it may have used up its allowance by ${moment(check.earlyAt)}.`
  if (bestCover === null || bestCover === undefined || bestCover.verdict === 'leave') return edge
  const until = bestCover.earlyAt === null ? '' : ` until ${moment(bestCover.earlyAt)}`
  return `${edge} ${COVERED_WORDS[bestCover.cover]}, it may go${until}.`
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
