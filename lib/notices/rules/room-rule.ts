import type { Sample } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import type { Rule } from '../notice'
import { makers, recipients } from '../people'
import { isRuleOn } from '../rule-settings'
import type { NoticeRoom, RoomDay } from '../surroundings'
import { type SpanRule, type SpanWords, tellSpans } from '../tell-spans'

/** How far back a condition is looked for in the record: long enough for what began while nobody looked. A guess. */
export const lookBackDays = 30

/** One day's look at a room, as a sample of its record. */
export interface DaySample extends Sample {
  day: RoomDay
  /** Why, in figures, for the words. */
  figure: number
}

/**
 * A room's last days, each judged by `judge`; a day that can't be judged is left out, which is a gap.
 * @param lookBack how many of its days are judged; those before them are there for means and middles
 */
export function daySamples(
  room: NoticeRoom,
  lookBack: number,
  judge: (index: number) => { level: Sample['level']; figure: number } | undefined,
): DaySample[] {
  return room.days.flatMap((day, index) => {
    if (index < room.days.length - lookBack) return []
    const judged = judge(index)
    if (judged === undefined) return []
    return [{ ...judged, day, at: day.at, endsAt: day.endsAt }]
  })
}

/**
 * Whole days change once a day and a site is looked at every few seconds, so what is made of the very same record is made
 * once. Nothing but time is saved: `make` must depend on the room's days, on `values` and on `beside` alone. Days that are
 * loaded anew are another record.
 */
export function oncePerRecord<T>() {
  const known = new WeakMap<readonly RoomDay[], { key: string; beside: unknown; made: T }>()
  /** @param beside another record that counts, such as the days outdoors */
  return (room: NoticeRoom, values: object, make: () => T, beside: unknown = null): T => {
    const key = JSON.stringify(values)
    const before = known.get(room.days)
    if (before?.key === key && before.beside === beside) return before.made
    const made = make()
    known.set(room.days, { key, beside, made })
    return made
  }
}

/** Over, clear or in between, for a limit that must not be passed upwards. */
export const levelAbove = (value: number, limit: number, hysteresis: number): Sample['level'] =>
  value > limit ? 'over' : value <= limit - hysteresis ? 'clear' : 'between'

/** The same for a limit that must not be passed downwards. */
export const levelBelow = (value: number, limit: number, hysteresis: number): Sample['level'] =>
  levelAbove(-value, -limit, hysteresis)

export type RoomWords = Pick<SpanWords, 'mark' | 'title' | 'body'> & Partial<Pick<SpanWords, 'urgency'>>

/** A rule about one room: what is said of it goes to the makers, and can wait. */
export function roomPart(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  asked: {
    rule: Rule
    room: NoticeRoom
    spans: SpanRule['spans']
    atMostEveryMs?: number
    told: (span: SpanRule['spans'][number]) => RoomWords
    over: RoomWords
  },
): RulePart {
  const { rule, room } = asked
  const whole = (words: RoomWords): SpanWords => ({
    urgency: 'whenever',
    link: `/rooms/${room.code}`,
    roomCode: room.code,
    to: recipients(makers(inputs.people)),
    ...words,
  })
  return tellSpans(now, state, {
    rule,
    subject: `room ${room.code}`,
    spans: asked.spans,
    ...(asked.atMostEveryMs === undefined ? {} : { atMostEveryMs: asked.atMostEveryMs }),
    told: (span) => whole(asked.told(span)),
    over: () => whole(asked.over),
  })
}

/** Joins what a rule says of each room; nothing where the rule is off. */
export function eachRoom(
  inputs: NoticeInputs,
  rule: Rule,
  isMeant: (room: NoticeRoom) => boolean,
  part: (room: NoticeRoom) => RulePart,
): RulePart {
  if (!isRuleOn(inputs.rules, rule)) return { episodes: [], notices: [] }
  const parts = (inputs.surroundings?.rooms ?? []).filter(isMeant).map(part)
  return { episodes: parts.flatMap((one) => one.episodes), notices: parts.flatMap((one) => one.notices) }
}

/** The words of a back-to-normal notice. */
export const backToNormal = (room: NoticeRoom, how: string): RoomWords => ({
  mark: 'fine',
  title: `${room.name} is back to normal: ${how}.`,
  body: '',
})

export const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

/** The value below which a share of them lie, between the two nearest. */
export function quantileOf(values: readonly number[], share: number): number {
  const sorted = values.toSorted((a, b) => a - b)
  const place = (sorted.length - 1) * share
  const low = sorted[Math.floor(place)] ?? NaN
  return low + ((sorted[Math.ceil(place)] ?? low) - low) * (place - Math.floor(place))
}

/** Whole days from one day to another. */
export const daysBetween = (first: RoomDay, last: RoomDay): number =>
  Math.round((last.at - first.at) / (24 * 3_600_000))
