import 'server-only'
import type { Kysely } from 'kysely'
import type { SiteMember } from '@/db/queries/members'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { findPaces, listRoomHours } from '@/db/queries/moisture'
import { findRoomYears } from '@/db/queries/room-figures'
import { findRoom, listHangingSensors } from '@/db/queries/rooms'
import { listRoomDays } from '@/db/queries/series'
import { listSiteWoods } from '@/db/queries/site-woods'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter, monthsBefore, startOfDayAt } from '@/lib/climate/days'
import { courseTimes, feltAt, feltMemoryMs, type FeltRoom, type FeltWood } from '@/lib/follow/felt'
import { HOUR_MS, type RoomHours } from '@/lib/follow/record'
import { ok } from '@/lib/result'
import { isFresh, settledTo } from '@/lib/rooms/air'
import type { FeltQuery, RoomFelt } from '@/lib/rooms/felt'
import { type FindableWood, inOrder } from '@/lib/wood/find-woods'
import { movementOfWood, UNKNOWN_WOOD_CLASS } from '@/lib/wood/movement-class'
import { resolveWood } from '@/lib/wood/site-wood'
import { SPECIES } from '@/lib/wood/species'
import { failField, notThere, type Outcome } from './problem'
import { isOnlooker } from './rooms'
import { offeredWoods } from './woods'

const dayMs = 24 * HOUR_MS

/**
 * What wood has felt of a room. Onlookers get it from whole days, up to the last that has ended, and with the table's woods
 * alone: neither the hours of a room nor the site's own woods are theirs to see.
 */
export async function getRoomFelt(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  query: FeltQuery,
  now: Date,
): Promise<Outcome<RoomFelt>> {
  const { siteId } = member
  const room = await findRoom(db, siteId, roomCode, { onlyShared: isOnlooker(member) })
  if (room === undefined) return notThere()
  const wood = await woodOf(db, member, query.wood)
  if (wood === undefined) return failField('malformed', 'wood', 'is not among the woods of this site')
  const sensors = isOnlooker(member) ? [] : await listHangingSensors(db, siteId, room.id)
  const readings = sensors.flatMap((sensor) => sensor.last ?? [])
  const settled = isOnlooker(member)
    ? { completeTo: startOfToday(member, now).toISOString(), age: null }
    : settledTo(readings, room.kind, now)
  // Up to what is settled while the room is being heard; once it is not, the time since is a gap like any other.
  const isHeard = readings.some((reading) => isFresh(reading, room.kind, now))
  const until =
    settled.completeTo !== null && (isHeard || isOnlooker(member)) ? new Date(settled.completeTo) : now
  const times = courseTimes(until.getTime() - query.days * dayMs, until.getTime())
  const woods = query.thicknessMm.map((thicknessMm): FeltWood => ({
    thicknessMm,
    densityKgM3: wood.densityKgM3,
    pace: wood.pace,
  }))
  const memoryMs = Math.max(...woods.map(feltMemoryMs))
  const air = await airOf(db, member, room.id, new Date((times[0] ?? 0) - memoryMs), until)
  return ok({ wood: wood.view, ...settled, ...feltOf(air, woods, times) })
}

/** The woods that it can be reckoned for: all that are offered at the site; for onlookers those of the table. */
export async function feltWoods(db: Kysely<Database>, member: SiteMember): Promise<FindableWood[]> {
  const woods: readonly FindableWood[] = isOnlooker(member)
    ? SPECIES.toSorted(inOrder)
    : await offeredWoods(db, member.siteId)
  return woods.map(({ slug, commonName, latinName, isOwn }) => ({
    slug,
    commonName,
    latinName,
    ...(isOwn === true && { isOwn }),
  }))
}

async function woodOf(db: Kysely<Database>, member: SiteMember, asked: string | undefined) {
  const rows = isOnlooker(member) ? [] : await listSiteWoods(db, member.siteId)
  const wood = resolveWood(asked, rows)
  if (asked !== undefined && wood === undefined) return undefined
  const { densityKgM3, assumed } = movementOfWood(wood)
  const paces = await findPaces(db, member.siteId)
  return {
    densityKgM3,
    pace: paces.get(wood?.movementClass ?? UNKNOWN_WOOD_CLASS) ?? UNLEARNED_PACE,
    view: {
      id: wood?.slug ?? null,
      commonName: wood?.commonName ?? null,
      densityKgM3,
      isDensityAssumed: assumed.includes('density'),
    },
  }
}

async function airOf(
  db: Kysely<Database>,
  member: SiteMember,
  roomId: number,
  since: Date,
  until: Date,
): Promise<FeltRoom> {
  const { siteId, timeZone } = member
  const todayOn = dayOfInstant(until, timeZone)
  const years = await findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn)
  const hours = isOnlooker(member)
    ? await hoursOfDays(db, member, roomId, since, until)
    : ((await listRoomHours(db, siteId, new Set([roomId]), since, until)).get(roomId) ??
      new Map<number, never>())
  return { hours, emcPctMean: years.get(roomId)?.emcPctMean ?? null }
}

/** Each hour of a day as the day's own mean. */
async function hoursOfDays(
  db: Kysely<Database>,
  { siteId, timeZone }: SiteMember,
  roomId: number,
  since: Date,
  until: Date,
): Promise<RoomHours> {
  const lastOn = daysAfter(dayOfInstant(until, timeZone), -1)
  const days = await listRoomDays(db, siteId, roomId, dayOfInstant(since, timeZone), lastOn)
  const hours = new Map<number, { emcPct: number; temperatureC: number }>()
  for (const { dayOn, emcPct, temperatureC } of days) {
    const end = startOfDayAt(daysAfter(dayOn, 1), timeZone).getTime()
    const start = Math.floor(startOfDayAt(dayOn, timeZone).getTime() / HOUR_MS) * HOUR_MS
    for (let at = start; at < end; at += HOUR_MS) hours.set(at, { emcPct, temperatureC })
  }
  return hours
}

function feltOf(
  air: FeltRoom,
  woods: readonly FeltWood[],
  times: readonly number[],
): Pick<RoomFelt, 'at' | 'recordFrom' | 'felt' | 'course'> {
  const [first] = air.hours.keys()
  const courses = woods.map((wood) => ({ wood, points: feltAt(air, wood, times) }))
  const last = times.at(-1)
  return {
    at: first === undefined || last === undefined ? null : new Date(last).toISOString(),
    recordFrom: first === undefined ? null : new Date(first).toISOString(),
    felt: courses.flatMap(({ wood, points }) => {
      const point = points.at(-1)
      if (!point) return []
      const { mcPct, doubtPct, unknownShare } = point
      const memoryDays = Math.round((feltMemoryMs(wood) / dayMs) * 10) / 10
      return { thicknessMm: wood.thicknessMm, mcPct, doubtPct, unknownShare, memoryDays }
    }),
    course: {
      at: times.map((at) => new Date(at).toISOString()),
      emcPct: times.map((at, n) => meanEmcPct(air.hours, times[n - 1] ?? at - HOUR_MS, at)),
      felt: courses.map(({ wood, points }) => ({
        thicknessMm: wood.thicknessMm,
        mcPct: points.map((point) => point?.mcPct ?? null),
        doubtPct: points.map((point) => point?.doubtPct ?? null),
      })),
    },
  }
}

/** The mean of a room's air between two moments; null where less than half of it was read. */
function meanEmcPct(hours: RoomHours, fromMs: number, toMs: number): number | null {
  const read: number[] = []
  let count = 0
  for (let at = Math.floor(fromMs / HOUR_MS) * HOUR_MS; at < toMs; at += HOUR_MS) {
    const hour = hours.get(at)
    if (hour !== undefined) read.push(hour.emcPct)
    count += 1
  }
  return 2 * read.length < count ? null : read.reduce((sum, value) => sum + value, 0) / read.length
}

const startOfToday = (member: SiteMember, now: Date): Date =>
  startOfDayAt(dayOfInstant(now, member.timeZone), member.timeZone)
