import { type Kysely, sql } from 'kysely'
import type { LeadScore } from '@/lib/forecast/goodness'
import type { HourOfRoom } from '@/lib/forecast/record'
import { type RoomForecast, roomForecastSchema } from '@/lib/forecast/room-forecast'
import type { DayBefore } from '@/lib/forecast/season'
import type { Database } from '../schema'

const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS
/** A forecast that is older than this is not used: the worker has stood still, or the room was not heard. */
const USED_FOR_MS = 6 * HOUR_MS
/** Kept for the page that tells how good they have been. */
const KEPT_DAYS = 90

interface MeansRow {
  room_id: number
  emc_pct: number
  temperature_c: number
  humidity_pct: number
}

const means = sql`
  avg(emc_milli_sum::float8 / n / 1000) as emc_pct,
  avg(temperature_milli_sum::float8 / n / 1000) as temperature_c,
  avg(humidity_milli_sum::float8 / n / 1000) as humidity_pct`

function byRoom<T>(rows: readonly { room_id: number; value: T }[]): Map<number, T[]> {
  const map = new Map<number, T[]>()
  for (const { room_id, value } of rows) {
    const own = map.get(room_id)
    if (own === undefined) map.set(room_id, [value])
    else own.push(value)
  }
  return map
}

/** Whole hours of every room of a site, from one moment up to but without another. */
export async function listForecastHours(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
  until: Date,
): Promise<Map<number, HourOfRoom[]>> {
  const { rows } = await sql<MeansRow & { hour_at: Date }>`
    select room_id, hour_at, ${means}
    from room_hour
    where site_id = ${siteId} and hour_at >= ${since} and hour_at < ${until}
    group by room_id, hour_at
    order by room_id, hour_at`.execute(db)
  return byRoom(
    rows.map((row) => ({
      room_id: row.room_id,
      value: {
        at: row.hour_at.getTime(),
        emcPct: row.emc_pct,
        temperatureC: row.temperature_c,
        humidityPct: row.humidity_pct,
      },
    })),
  )
}

/** Days of every room of a site, both ends included, each told by its middle. */
export async function listForecastDays(
  db: Kysely<Database>,
  siteId: number,
  fromOn: string,
  toOn: string,
): Promise<Map<number, DayBefore[]>> {
  const { rows } = await sql<MeansRow & { day_on: string }>`
    select room_id, day_on, ${means}
    from room_day
    where site_id = ${siteId} and day_on >= ${fromOn} and day_on <= ${toOn}
    group by room_id, day_on
    order by room_id, day_on`.execute(db)
  return byRoom(
    rows.map((row) => ({
      room_id: row.room_id,
      value: {
        at: Date.parse(row.day_on) + DAY_MS / 2,
        emcPct: row.emc_pct,
        temperatureC: row.temperature_c,
        humidityPct: row.humidity_pct,
      },
    })),
  )
}

/** Rooms that have a forecast made at a moment already. */
export async function listRoomsForecast(
  db: Kysely<Database>,
  siteId: number,
  madeAt: Date,
): Promise<Set<number>> {
  const rows = await db
    .selectFrom('forecast')
    .where('site_id', '=', siteId)
    .where('made_at', '=', madeAt)
    .select('room_id')
    .execute()
  return new Set(rows.map((row) => row.room_id))
}

/** A thousandth of a point is less than anything is told to, and keeps the row short. */
const short = (_key: string, value: unknown): unknown =>
  typeof value === 'number' && !Number.isInteger(value) ? Math.round(value * 1000) / 1000 : value

/** Stores a forecast; one that is there already for the room and the hour stays. */
export async function insertForecast(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  forecast: RoomForecast,
): Promise<void> {
  await db
    .insertInto('forecast')
    .values({
      site_id: siteId,
      room_id: roomId,
      made_at: new Date(forecast.madeAt),
      data: JSON.stringify(forecast, short),
    })
    .onConflict((clash) => clash.doNothing())
    .execute()
}

/** The newest forecast of each room that was made by `now` and is not too old to be used; rooms without one are left out. */
export async function findForecasts(
  db: Kysely<Database>,
  siteId: number,
  roomIds: ReadonlySet<number>,
  now: Date,
): Promise<Map<number, RoomForecast>> {
  if (roomIds.size === 0) return new Map()
  const rows = await db
    .selectFrom('forecast')
    .distinctOn('room_id')
    .where('site_id', '=', siteId)
    .where('room_id', 'in', [...roomIds])
    .where('made_at', '<=', now)
    .where('made_at', '>', new Date(now.getTime() - USED_FOR_MS))
    .select(['room_id', 'data'])
    .orderBy('room_id')
    .orderBy('made_at', 'desc')
    .execute()
  return new Map(
    rows.flatMap((row) => {
      // One of another make is as good as none: the next hour brings a new one.
      const parsed = roomForecastSchema.safeParse(row.data)
      return parsed.success ? [[row.room_id, parsed.data]] : []
    }),
  )
}

/** Mean errors of each way by lead, for each room that has some, over forecasts made since a moment and up to another. */
export async function findLeadScores(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
  now: Date,
): Promise<Map<number, LeadScore[]>> {
  const { rows } = await sql<{
    room_id: number
    lead_h: number
    n: number
    record: number
    same: number
    yesterday: number | null
  }>`
    select room_id, lead_h, count(*)::int as n,
      avg(abs(record_pct - emc_pct)) as record,
      avg(abs(same_as_now_pct - emc_pct)) as same,
      avg(abs(yesterday_pct - emc_pct)) as yesterday
    from forecast_score
    where site_id = ${siteId} and made_at >= ${since} and made_at <= ${now}
    group by room_id, lead_h
    order by room_id, lead_h`.execute(db)
  return byRoom(
    rows.map((row) => ({
      room_id: row.room_id,
      value: {
        leadH: row.lead_h,
        n: row.n,
        recordPct: row.record,
        sameAsNowPct: row.same,
        yesterdayPct: row.yesterday,
      },
    })),
  )
}

/** Upkeep: what is too old to tell anything. */
export async function deleteOldForecasts(db: Kysely<Database>, now: Date): Promise<void> {
  const before = new Date(now.getTime() - KEPT_DAYS * DAY_MS)
  await db.deleteFrom('forecast').where('made_at', '<', before).execute()
  await db.deleteFrom('forecast_score').where('made_at', '<', before).execute()
}
