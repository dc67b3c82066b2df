import { z } from 'zod'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { coverSchema } from '@/lib/pieces/piece'
import { instantOfLocalTime } from '@/lib/sites/local-time'

/** ISO 8601: 1 is Monday, 7 Sunday. */
const weekdaysSchema = z
  .array(z.int().min(1).max(7))
  .min(1, 'choose at least one day')
  .max(7)
  .transform((days) => [...new Set(days)].toSorted((a, b) => a - b))
const timeSchema = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'a time of day as HH:mm')

const shape = {
  pieceIds: z.array(z.string()).max(60),
  takesWhatever: z.boolean(),
  toRoomId: z.string(),
  cover: coverSchema,
  weekdays: weekdaysSchema,
  atTime: timeSchema,
  stayMinutes: z.int().min(1).max(43_200),
  note: z.string().trim().max(500),
}

/** A plan that comes again each week, on one day or several. */
export const newRepeatSchema = z
  .strictObject({
    ...shape,
    pieceIds: shape.pieceIds.default([]),
    takesWhatever: shape.takesWhatever.default(false),
    note: shape.note.default(''),
  })
  .refine(({ takesWhatever, pieceIds }) => takesWhatever !== pieceIds.length > 0, {
    path: ['pieceIds'],
    message: 'choose at least one piece, or say that it is whatever you take',
  })
export type NewRepeat = z.infer<typeof newRepeatSchema>

export const repeatChangeSchema = z.strictObject({
  pieceIds: shape.pieceIds.min(1).optional(),
  cover: shape.cover.optional(),
  weekdays: shape.weekdays.optional(),
  atTime: shape.atTime.optional(),
  stayMinutes: shape.stayMinutes.optional(),
  note: shape.note.optional(),
  isPaused: z.boolean().optional(),
})
export type RepeatChange = z.infer<typeof repeatChangeSchema>

const instant = z.iso.datetime()

export const repeatSchema = z.object({
  id: z.string(),
  toRoom: z.object({ id: z.string(), name: z.string() }),
  cover: coverSchema,
  weekdays: z.array(z.int()),
  atTime: z.string(),
  stayMinutes: z.int(),
  takesWhatever: z.boolean(),
  pieces: z.array(z.object({ id: z.string(), number: z.string() })),
  note: z.string(),
  by: z.string().nullable(),
  /** "every Tuesday and Friday at 09:00" */
  words: z.string(),
  /** The next one that is still to come; null while it is paused or ended. */
  nextAt: instant.nullable(),
  pausedAt: instant.nullable(),
  endedAt: instant.nullable(),
  version: z.int(),
})
export type Repeat = z.infer<typeof repeatSchema>

export interface Weekly {
  readonly weekdays: readonly number[]
  readonly atTime: string
}

export interface Occurrence {
  /** The day that it stands for, in the site's zone. */
  readonly on: string
  readonly at: Date
}

/** Carries of a repeat are made this many days ahead, today among them: a week, and the same day of the next. */
export const MADE_DAYS_AHEAD = 8

const weekdayOf = (dayOn: string): number => new Date(`${dayOn}T00:00:00Z`).getUTCDay() || 7

/**
 * The occurrences of a weekly plan over the coming days that are still to come, the soonest first.
 * @param from those at or before it are past
 * @param days calendar days that are looked at, the one that `from` falls in first; 1 and up
 *
 * The clock stands at `atTime` on each of them, whatever a change of the clocks does: a time that is left out that night
 * is taken as that much later, one that comes twice comes once (see `instantOfLocalTime`).
 */
export function comingOccurrences(
  { weekdays, atTime }: Weekly,
  timeZone: string,
  from: Date,
  days = MADE_DAYS_AHEAD,
): Occurrence[] {
  const today = dayOfInstant(from, timeZone)
  return Array.from({ length: days }, (_, n) => daysAfter(today, n))
    .filter((on) => weekdays.includes(weekdayOf(on)))
    .map((on) => ({ on, at: new Date(instantOfLocalTime(on, atTime, timeZone)) }))
    .filter(({ at }) => at > from)
}

export const nextOccurrence = (weekly: Weekly, timeZone: string, from: Date): Occurrence | undefined =>
  comingOccurrences(weekly, timeZone, from)[0]

/** When an occurrence of a repeat is to go, epoch ms as an instant. */
export const occurrenceAt = (on: string, { atTime }: Weekly, timeZone: string): Date =>
  new Date(instantOfLocalTime(on, atTime, timeZone))

export const fallsOn = (on: string, { weekdays }: Weekly): boolean => weekdays.includes(weekdayOf(on))

export const weekdayNames = [
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
  'Sunday',
] as const

/** "every Tuesday and Friday at 09:00" */
export function repeatWords({ weekdays, atTime }: Weekly): string {
  return `every ${daysWords(weekdays)} at ${atTime}`
}

function daysWords(weekdays: readonly number[]): string {
  const sorted = [...new Set(weekdays)].toSorted((a, b) => a - b)
  if (sorted.length === 7) return 'day'
  if (sorted.join('') === '12345') return 'day from Monday to Friday'
  const names = sorted.flatMap((day) => weekdayNames[day - 1] ?? [])
  if (names.length <= 1) return names[0] ?? 'day'
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`
}

/**
 * A repeat's carry is judged from this long before it goes: the forecast reaches no further, and a verdict on the air of
 * next week would be none.
 */
const JUDGED_AHEAD_MS = 48 * 3_600_000

/** Whether a planned carry of a repeat lies too far ahead to be judged, or spoken of. */
export const isTooFarAhead = (
  carry: { readonly state: string; readonly isRepeated: boolean; readonly plannedAt: Date },
  now: Date,
): boolean =>
  carry.state === 'planned' && carry.isRepeated && carry.plannedAt.getTime() - now.getTime() > JUDGED_AHEAD_MS
