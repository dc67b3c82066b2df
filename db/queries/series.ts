import { type Kysely, sql } from 'kysely'
import type { DayPoint, SensorReading, SeriesPoint } from '@/lib/rooms/series'
import type { Database } from '../schema'

/** The single readings that were taken in a room: a sensor that hung elsewhere then does not count. Oldest first. */
export async function listRoomReadings(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  from: Date,
  to: Date,
): Promise<SensorReading[]> {
  const rows = await db
    .selectFrom('placement')
    .innerJoin('reading', (join) =>
      join
        .onRef('reading.site_id', '=', 'placement.site_id')
        .onRef('reading.sensor_id', '=', 'placement.sensor_id')
        .onRef('reading.at', '>=', 'placement.from_at')
        .on((eb) =>
          eb.or([eb('placement.to_at', 'is', null), eb('reading.at', '<', eb.ref('placement.to_at'))]),
        ),
    )
    .where('placement.site_id', '=', siteId)
    .where('placement.room_id', '=', roomId)
    .where('reading.at', '>=', from)
    .where('reading.at', '<', to)
    .select(['reading.sensor_id', 'reading.at', 'reading.temperature_c', 'reading.humidity_pct'])
    .orderBy('reading.at')
    .execute()
  return rows.map((row) => ({
    sensorId: row.sensor_id,
    at: row.at,
    temperatureC: row.temperature_c,
    humidityPct: row.humidity_pct,
  }))
}

const figures = sql`
  avg(temperature_milli_sum::float8 / n / 1000) as temperature_c,
  avg(humidity_milli_sum::float8 / n / 1000) as humidity_pct,
  avg(emc_milli_sum::float8 / n / 1000) as emc_pct,
  min(emc_pct_min) as emc_pct_min,
  max(emc_pct_max) as emc_pct_max`

interface FigureRow {
  temperature_c: number
  humidity_pct: number
  emc_pct: number
  emc_pct_min: number
  emc_pct_max: number
}

const pointOf = (row: FigureRow) => ({
  temperatureC: row.temperature_c,
  humidityPct: row.humidity_pct,
  emcPct: row.emc_pct,
  emcPctMin: row.emc_pct_min,
  emcPctMax: row.emc_pct_max,
})

/** A room's hours, the mean over its sensors. Oldest first; hours without a reading are left out. */
export async function listRoomHours(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  from: Date,
  to: Date,
): Promise<SeriesPoint[]> {
  const { rows } = await sql<FigureRow & { hour_at: Date }>`
    select hour_at, ${figures} from room_hour
    where site_id = ${siteId} and room_id = ${roomId}
      and hour_at >= date_trunc('hour', ${from}::timestamptz, 'UTC') and hour_at < ${to}
    group by hour_at order by hour_at`.execute(db)
  return rows.map((row) => ({ at: row.hour_at, ...pointOf(row) }))
}

/** A room's days by the site's own calendar, both ends included. Oldest first; days without a reading are left out. */
export async function listRoomDays(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  firstOn: string,
  lastOn: string,
): Promise<DayPoint[]> {
  const { rows } = await sql<FigureRow & { day_on: string }>`
    select day_on, ${figures} from room_day
    where site_id = ${siteId} and room_id = ${roomId} and day_on >= ${firstOn} and day_on <= ${lastOn}
    group by day_on order by day_on`.execute(db)
  return rows.map((row) => ({ dayOn: row.day_on, ...pointOf(row) }))
}
