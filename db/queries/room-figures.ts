import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'

/**
 * A room's figures over days. A room's day is the mean over its sensors, each counted once, so that a chatty sensor does
 * not outvote another.
 */

export interface RoomYear {
  emcPctLow: number
  emcPctMiddle: number
  emcPctHigh: number
  emcPctMean: number
  days: number
}

/** Nineteen in twenty, the middle and one in twenty of the daily EMC from one day up to, but without, another. */
export async function findRoomYears(
  db: Kysely<Database>,
  siteId: number,
  fromOn: string,
  beforeOn: string,
): Promise<Map<number, RoomYear>> {
  const { rows } = await sql<{
    room_id: number
    quantiles: number[]
    mean: number
    days: number
  }>`
    select room_id,
      percentile_cont(array[0.05, 0.5, 0.95]) within group (order by emc_pct) as quantiles,
      avg(emc_pct) as mean,
      count(*)::int as days
    from (
      select room_id, day_on, avg(emc_milli_sum::float8 / n / 1000) as emc_pct
      from room_day
      where site_id = ${siteId} and day_on >= ${fromOn} and day_on < ${beforeOn}
      group by room_id, day_on
    ) as daily
    group by room_id`.execute(db)
  return new Map(
    rows.map(({ room_id, quantiles: [low, middle, high], mean, days }) => [
      room_id,
      {
        emcPctLow: low ?? mean,
        emcPctMiddle: middle ?? mean,
        emcPctHigh: high ?? mean,
        emcPctMean: mean,
        days,
      },
    ]),
  )
}

export interface RoomSpan {
  emcPctMin: number
  emcPctMax: number
  emcPctMean: number
  humidityPctMax: number
  n: number
  days: number
}

/** Least, greatest and mean EMC of a room over days, both ends included; `undefined` without a reading. */
export async function findRoomSpan(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  fromOn: string,
  toOn: string,
): Promise<RoomSpan | undefined> {
  const { rows } = await sql<{
    low: number | null
    high: number | null
    mean: number | null
    humidity_high: number | null
    n: number
    days: number
  }>`
    select min(low) as low, max(high) as high, avg(emc_pct) as mean, max(humidity_high) as humidity_high,
      coalesce(sum(n), 0)::int as n, count(*)::int as days
    from (
      select day_on, avg(emc_milli_sum::float8 / n / 1000) as emc_pct, min(emc_pct_min) as low,
        max(emc_pct_max) as high, max(humidity_pct_max) as humidity_high, sum(n) as n
      from room_day
      where site_id = ${siteId} and room_id = ${roomId} and day_on >= ${fromOn} and day_on <= ${toOn}
      group by day_on
    ) as daily`.execute(db)
  const [row] = rows
  if (row === undefined || row.low === null || row.high === null || row.mean === null) return undefined
  return {
    emcPctMin: row.low,
    emcPctMax: row.high,
    emcPctMean: row.mean,
    humidityPctMax: row.humidity_high ?? 0,
    n: row.n,
    days: row.days,
  }
}

export interface RoomDayFigure {
  roomId: number
  dayOn: string
  temperatureC: number
  humidityPct: number
  emcPct: number
}

/** The newest whole day of each room: one that has ended before `todayOn`. */
export async function findLatestDays(
  db: Kysely<Database>,
  siteId: number,
  todayOn: string,
): Promise<Map<number, RoomDayFigure>> {
  const { rows } = await sql<{
    room_id: number
    day_on: string
    temperature_c: number
    humidity_pct: number
    emc_pct: number
  }>`
    select distinct on (room_id) room_id, day_on,
      avg(temperature_milli_sum::float8 / n / 1000) as temperature_c,
      avg(humidity_milli_sum::float8 / n / 1000) as humidity_pct,
      avg(emc_milli_sum::float8 / n / 1000) as emc_pct
    from room_day
    where site_id = ${siteId} and day_on < ${todayOn}
    group by room_id, day_on
    order by room_id, day_on desc`.execute(db)
  return new Map(
    rows.map((row) => [
      row.room_id,
      {
        roomId: row.room_id,
        dayOn: row.day_on,
        temperatureC: row.temperature_c,
        humidityPct: row.humidity_pct,
        emcPct: row.emc_pct,
      },
    ]),
  )
}

/** Mean daily EMC of rooms in given months; rooms without a reading then are left out. Key: `room month-first-day`. */
export async function findMonthMeans(
  db: Kysely<Database>,
  siteId: number,
  asked: readonly { roomId: number; firstOn: string; nextFirstOn: string }[],
): Promise<Map<string, number>> {
  if (asked.length === 0) return new Map()
  const { rows } = await sql<{ room_id: number; first_on: string; mean: number }>`
    select asked.room_id, asked.first_on, avg(daily.emc_pct) as mean
    from unnest(
      ${asked.map((one) => one.roomId)}::int[],
      ${asked.map((one) => one.firstOn)}::date[],
      ${asked.map((one) => one.nextFirstOn)}::date[]
    ) as asked (room_id, first_on, next_first_on)
    cross join lateral (
      select avg(emc_milli_sum::float8 / n / 1000) as emc_pct
      from room_day
      where site_id = ${siteId} and room_id = asked.room_id
        and day_on >= asked.first_on and day_on < asked.next_first_on
      group by day_on
    ) as daily
    group by asked.room_id, asked.first_on`.execute(db)
  return new Map(rows.map((row) => [monthKey(row.room_id, row.first_on), row.mean]))
}

export const monthKey = (roomId: number, firstOn: string): string => `${roomId} ${firstOn}`
