import type { Carry, CarryPiece } from '@/lib/carry/carry'
import { formatMoment } from '@/lib/format/times'
import { warnBeforeEarlyEdgeMs } from '@/lib/notices/policy'
import { coverWords } from '@/lib/pieces/piece'
import type { DoorPiece } from './door'

const MINUTE_MS = 60_000

type DoorCarryPiece = Pick<CarryPiece, 'number' | 'outline' | 'cover' | 'outAt' | 'backAt' | 'check'>
/** What of a carry is looked at. */
export type DoorCarry = Pick<Carry, 'state' | 'plannedAt' | 'stayMinutes'> & {
  pieces: readonly DoorCarryPiece[]
}

interface Clock {
  timeZone: string
  now: Date
}

/** What is out, the most pressing first, in the few words that are read from three metres. */
export function doorPieces(carries: readonly DoorCarry[], clock: Clock): DoorPiece[] {
  const out = carries
    .filter((carry) => carry.state === 'out')
    .flatMap((carry) =>
      carry.pieces
        .filter((piece) => piece.outAt !== null && piece.backAt === null)
        .map((piece) => ({ piece: doorPiece(carry, piece, clock), dueAt: dueAt(carry, piece) })),
    )
  const rank = (state: DoorPiece['state']) => (state === 'overdue' ? 0 : state === 'words' ? 2 : 1)
  return out
    .toSorted((a, b) => rank(a.piece.state) - rank(b.piece.state) || a.dueAt - b.dueAt || 0)
    .map(({ piece }) => piece)
}

/** By when it has to be in: its early edge, or else the end of its planned stay; Infinity where nothing presses. */
function dueAt(carry: DoorCarry, { check, outAt }: DoorCarryPiece): number {
  if (check?.kind === 'verdict') return check.earlyAt === null ? Infinity : new Date(check.earlyAt).getTime()
  if (check?.kind === 'words' && check.reason === 'blank') return Infinity
  return outAt === null ? Infinity : new Date(outAt).getTime() + carry.stayMinutes * MINUTE_MS
}

function doorPiece(carry: DoorCarry, piece: DoorCarryPiece, { timeZone, now }: Clock): DoorPiece {
  const due = dueAt(carry, piece)
  const outAt = new Date(piece.outAt ?? carry.plannedAt)
  const moment = (at: Date) => formatMoment(at, timeZone, now)
  const own = {
    number: piece.number,
    outline: piece.outline,
    since: `${coverWords[piece.cover]} since ${moment(outAt)}`,
    minutesLeft: Number.isFinite(due) ? Math.max(0, Math.floor((due - now.getTime()) / MINUTE_MS)) : null,
  }
  if (!Number.isFinite(due)) {
    return piece.check?.kind === 'words'
      ? { ...own, state: 'words', words: 'is out', clock: '' }
      : { ...own, state: 'fine', words: 'keeps its fit for now', clock: '' }
  }
  const clock = moment(new Date(due))
  if (now.getTime() >= due) return { ...own, state: 'overdue', words: 'bring in now, due', clock }
  if (piece.check?.kind === 'unknown')
    return { ...own, state: 'unknown', words: 'air not known: bring in by', clock }
  if (piece.check?.kind !== 'verdict') return { ...own, state: 'words', words: 'planned back by', clock }
  const isSoon = now.getTime() >= due - warnBeforeEarlyEdgeMs(due - outAt.getTime())
  return isSoon
    ? { ...own, state: 'soon', words: 'bring in by', clock }
    : { ...own, state: 'fine', words: 'keeps its fit until', clock }
}

/** The next thing that is planned, in one sentence; empty when nothing is. */
export function nextPlanSentence(carries: readonly DoorCarry[], { timeZone, now }: Clock): string {
  const [next] = carries
    .filter((carry) => carry.state === 'planned' && carry.pieces.length > 0)
    .filter((carry) => new Date(carry.plannedAt).getTime() > now.getTime() - 60 * MINUTE_MS)
    .toSorted((a, b) => a.plannedAt.localeCompare(b.plannedAt))
  if (next === undefined) return ''
  const at = formatMoment(next.plannedAt, timeZone, now)
  const numbers = (verdicts: readonly string[]) =>
    next.pieces
      .filter(({ check }) => check?.kind === 'verdict' && verdicts.includes(check.verdict))
      .map((piece) => piece.number)
  const [leave, short] = [numbers(['leave']), numbers(['keep-short'])]
  if (leave.length > 0)
    return `At ${at}, leave ${few(leave)} where ${leave.length === 1 ? 'it is' : 'they are'}`
  if (short.length > 0) return `At ${at}, keep it short with ${few(short)}`
  return `At ${at}: ${few(next.pieces.map((piece) => piece.number))}`
}

const few = (numbers: readonly string[]): string =>
  numbers.length <= 2
    ? numbers.join(' and ')
    : `${numbers[0] ?? ''}, ${numbers[1] ?? ''} and ${String(numbers.length - 2)} more`
