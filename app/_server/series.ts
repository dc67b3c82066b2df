import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import type { SiteMember } from '@/db/queries/members'
import { findRoom, listHangingSensors } from '@/db/queries/rooms'
import { listRoomDays, listRoomHours, listRoomReadings } from '@/db/queries/series'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter, startOfDayAt } from '@/lib/climate/days'
import { assumedGapS, freshForMs } from '@/lib/notices/policy'
import { ok } from '@/lib/result'
import { settledTo } from '@/lib/rooms/air'
import { pointsDefault, pointsMax, seriesGrain, spanMsMax } from '@/lib/rooms/grain'
import type { RoomSeries } from '@/lib/rooms/room'
import {
  columnsWithGaps,
  dayColumns,
  hourColumns,
  pointsFromReadings,
  type SeriesColumns,
} from '@/lib/rooms/series'
import { failField, notThere, type Outcome } from './problem'

const instant = z.iso.datetime({ offset: true })

/** Left out: up to now, the last 24 h, 500 points. */
export const seriesQuerySchema = z.strictObject({
  from: instant.optional(),
  to: instant.optional(),
  points: z
    .string()
    .regex(/^\d{1,4}$/, `a whole number from 2 to ${String(pointsMax)}`)
    .transform(Number)
    .refine((points) => points >= 2 && points <= pointsMax, `a whole number from 2 to ${String(pointsMax)}`)
    .optional(),
})
export type SeriesQuery = z.infer<typeof seriesQuerySchema>

const dayMs = 24 * 3_600_000

interface Range {
  from: Date
  to: Date
  points: number
}

function rangeOf(query: SeriesQuery, now: Date): Outcome<Range> {
  const to = query.to === undefined ? now : new Date(query.to)
  const from = query.from === undefined ? new Date(to.getTime() - dayMs) : new Date(query.from)
  const spanMs = to.getTime() - from.getTime()
  if (!(spanMs > 0)) return failField('malformed', 'from', 'must be before "to"')
  if (spanMs > spanMsMax) return failField('malformed', 'from', 'a range may be 100 years long at most')
  return ok({ from, to, points: query.points ?? pointsDefault })
}

/** What a room's air was over a range, as columns. Onlookers get whole days only, and none that has not ended. */
export async function getRoomSeries(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  query: SeriesQuery,
  now: Date,
): Promise<Outcome<RoomSeries>> {
  const isOnlooker = member.role === 'onlooker'
  const room = await findRoom(db, member.siteId, roomCode, { onlyShared: isOnlooker })
  if (room === undefined) return notThere()
  const range = rangeOf(query, now)
  if (!range.ok) return range
  const { from, to, points } = range.value
  const sensors = await listHangingSensors(db, member.siteId, room.id)
  const readings = sensors.flatMap((sensor) => sensor.last ?? [])
  const head = { from: from.toISOString(), to: to.toISOString() }
  if (isOnlooker) {
    const columns = await days(db, member, room.id, { ...range.value, notAfterOn: yesterday(member, now) })
    return ok({ grain: 'day', ...head, ...columns, completeTo: startOfToday(member, now), age: null })
  }
  const choice = seriesGrain(to.getTime() - from.getTime(), points)
  const settled = settledTo(readings, room.kind, now)
  if (choice.grain === 'raw') {
    const gaps = sensors.map((sensor) => sensor.usualGapS ?? assumedGapS)
    const gapMs = freshForMs({ isKeepingRoom: false, isTyped: false, usualGapS: Math.max(...gaps, 0) })
    const raw = pointsFromReadings(
      await listRoomReadings(db, member.siteId, room.id, from, to),
      choice.stepMs,
    )
    return ok({ grain: 'raw', ...head, ...columnsWithGaps(raw, gapMs), ...settled })
  }
  if (choice.grain === 'hour') {
    const hours = await listRoomHours(db, member.siteId, room.id, from, to)
    return ok({ grain: 'hour', ...head, ...hourColumns(hours, from, to), ...settled })
  }
  return ok({ grain: 'day', ...head, ...(await days(db, member, room.id, range.value)), ...settled })
}

async function days(
  db: Kysely<Database>,
  member: SiteMember,
  roomId: number,
  range: Range & { notAfterOn?: string },
): Promise<SeriesColumns> {
  const { timeZone } = member
  const firstOn = dayOfInstant(range.from, timeZone)
  const toOn = dayOfInstant(new Date(range.to.getTime() - 1), timeZone)
  const lastOn = range.notAfterOn !== undefined && range.notAfterOn < toOn ? range.notAfterOn : toOn
  const spanDays = Math.ceil((range.to.getTime() - range.from.getTime()) / dayMs) + 1
  return dayColumns(await listRoomDays(db, member.siteId, roomId, firstOn, lastOn), {
    firstOn,
    lastOn,
    timeZone,
    days: Math.max(1, Math.ceil(spanDays / range.points)),
  })
}

const yesterday = (member: SiteMember, now: Date): string => daysAfter(dayOfInstant(now, member.timeZone), -1)

const startOfToday = (member: SiteMember, now: Date): string =>
  startOfDayAt(dayOfInstant(now, member.timeZone), member.timeZone).toISOString()
