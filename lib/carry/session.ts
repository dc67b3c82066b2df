import { formatClock, formatMoment } from '@/lib/format/times'
import { instantOfLocalField } from '@/lib/format/local-time'
import { dayOfInstant } from '@/lib/climate/days'
import { leastUsefulStayMs } from '@/lib/notices/policy'
import type { Session } from './carry-answer'
import type { PieceCheck } from './carry-check'
import { namesOf } from './summary'

export interface SessionPiece {
  id: string
  number: string
  check: PieceCheck
}

export interface SessionClock {
  startsAt: Date
  stayMinutes: number
  /** "18:00", in the site's zone. */
  lockUpAt: string
  timeZone: string
  now: Date
}

/** Lock-up of the day on which a session begins; undefined for one that begins after it. */
function lockUpOf({ startsAt, lockUpAt, timeZone }: SessionClock): Date | undefined {
  const at = instantOfLocalField(`${dayOfInstant(startsAt, timeZone)}T${lockUpAt}`, timeZone)
  return at !== undefined && at > startsAt ? at : undefined
}

/**
 * In which order pieces are worked, and when the session ends.
 * @returns null where fewer than two of them may go
 *
 * The rule: the least forgiving first. The piece with the earliest edge is worked first and taken back first: where each
 * takes as long as another, no other order keeps as many within their time. Half an hour each is the least that is of any
 * use; what that leaves no time for is named. Pieces that are to stay are left out; those that get words alone (blanks)
 * hang on no hour and set none. Lock-up ends a session at the latest.
 * Source: earliest due date first (Jackson, Scheduling a Production Line to Minimize Maximum Tardiness, 1955) and what is
 * late left out (Moore, Management Science, 1968); both from memory.
 */
export function sessionOf(pieces: readonly SessionPiece[], clock: SessionClock): Session | null {
  const startMs = clock.startsAt.getTime()
  const stayEnd = startMs + clock.stayMinutes * 60_000
  const lockUp = lockUpOf(clock)?.getTime() ?? Infinity
  const last = Math.min(stayEnd, lockUp)
  const going = pieces
    .flatMap(({ id, number, check }) =>
      check.kind === 'verdict' && check.verdict !== 'leave'
        ? [
            {
              id,
              number,
              by: Math.min(last, check.earlyAt === null ? last : new Date(check.earlyAt).getTime()),
            },
          ]
        : [],
    )
    .toSorted((a, b) => a.by - b.by)
  if (going.length < 2) return null
  const kept: typeof going = []
  const leftOver: string[] = []
  for (const piece of going) {
    const worked = (kept.length + 1) * leastUsefulStayMs
    if (startMs + worked <= piece.by || kept.length === 0) kept.push(piece)
    else leftOver.push(piece.number)
  }
  const stopMs = Math.min(...kept.map(({ by }) => by))
  const endMs = Math.max(...kept.map(({ by }) => by))
  const session = {
    order: kept.map(({ id, number, by }) => ({ id, number, backBy: new Date(by).toISOString() })),
    leftOver,
    stopAt: new Date(stopMs).toISOString(),
    endsAt: new Date(endMs).toISOString(),
    isByLockUp: endMs === lockUp,
  }
  return { ...session, words: sessionWords(session, clock) }
}

function sessionWords(session: Omit<Session, 'words'>, { timeZone, now }: SessionClock): string {
  const { order, leftOver, stopAt, endsAt, isByLockUp } = session
  const [first] = order
  if (first === undefined) return ''
  const end = `${formatMoment(endsAt, timeZone, now)}${isByLockUp ? ', at lock-up,' : ''}`
  const left =
    leftOver.length === 0
      ? ''
      : ` At half an hour each there is no time for ${namesOf(leftOver.map((number) => ({ number })))}.`
  if (stopAt === endsAt)
    return `Work ${first.number} first, the least forgiving. Stop at ${end} at the latest.${left}`
  return `Work ${first.number} first, the least forgiving, and take it back by ${formatClock(stopAt, timeZone)}. Stop at ${end} at the latest; at ${formatClock(stopAt, timeZone)} if they all stay out together.${left}`
}
