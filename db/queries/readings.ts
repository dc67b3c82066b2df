import { type Kysely, sql, type Transaction } from 'kysely'
import { readingFigures } from '@/lib/readings/figures'
import { toStored } from '@/lib/readings/plausible'
import type { Database } from '../schema'
import { type SensorNews, updateLastValues } from './last-values'
import { notifySite } from './live'
import { ensurePartitions, monthOf } from './partitions'
import { holdFiguresShared } from './rollups'
import { inTransaction } from './transaction'

export interface ReadingRow {
  siteId: number
  sensorId: number
  at: Date
  temperatureC: number
  humidityPct: number
}

/** What became of a reading; of a conflict also the values that stand. */
export type StoredAs =
  | { as: 'inserted' | 'duplicate' | 'no-sensor' }
  | { as: 'conflict'; keptTemperatureC: number; keptHumidityPct: number }

/**
 * Stores readings and adds those that were really new to the hourly and daily figures of the room that each was
 * taken in, by the sensor's placement at that time and the site's calendar. The months must be there
 * (`ensurePartitions`), and the figures held (`holdFiguresShared`).
 * @returns what became of each, in the order given
 */
export async function storeReadings(
  trx: Transaction<Database>,
  readings: readonly ReadingRow[],
): Promise<StoredAs[]> {
  const outcomes: StoredAs[] = readings.map(() => ({ as: 'no-sensor' }))
  const first = new Map<string, number>()
  readings.forEach((row, index) => {
    if (!first.has(keyOf(row))) first.set(keyOf(row), index)
  })
  const given = [...first.values()]
  const inserted = await insertNew(trx, readings, given)
  for (const index of inserted) outcomes[index] = { as: 'inserted' }

  // Looked up by a statement of its own: the one above can't see what another process stored meanwhile.
  const known = inserted.size === readings.length ? new Map<string, Kept>() : await findKept(trx, readings)
  readings.forEach((row, index) => {
    const kept = known.get(keyOf(row))
    if (inserted.has(index) || kept === undefined) return
    outcomes[index] =
      kept.temperatureC === toStored(row.temperatureC) && kept.humidityPct === toStored(row.humidityPct)
        ? { as: 'duplicate' }
        : { as: 'conflict', keptTemperatureC: kept.temperatureC, keptHumidityPct: kept.humidityPct }
  })
  return outcomes
}

const keyOf = (row: { siteId: number; sensorId: number; at: Date }): string =>
  `${row.siteId} ${row.sensorId} ${row.at.getTime()}`

/**
 * One statement: rows come out of `reading` only when they really went in, and only those reach the figures.
 * Everything is touched in the order of its key, so that two batches at once wait for one another and never
 * lock crosswise. A sensor that is no longer there takes nothing, instead of failing the whole batch.
 */
async function insertNew(
  trx: Transaction<Database>,
  readings: readonly ReadingRow[],
  given: readonly number[],
): Promise<Set<number>> {
  const rows = given.flatMap((index) => readings[index] ?? [])
  const figures = rows.map((row) => readingFigures(row.temperatureC, row.humidityPct))
  const result = await sql<{ index: number }>`
    with given as materialized (
      select index, site_id, sensor_id, at, t, h, e,
        (t / 1000.0)::real as temperature_c, (h / 1000.0)::real as humidity_pct, (e / 1000.0)::real as emc_pct
      from unnest(
        ${given}::int[],
        ${rows.map((row) => row.siteId)}::int[],
        ${rows.map((row) => row.sensorId)}::int[],
        ${rows.map((row) => row.at.toISOString())}::timestamptz[],
        ${figures.map((one) => one.temperatureMilli)}::int[],
        ${figures.map((one) => one.humidityMilli)}::int[],
        ${figures.map((one) => one.emcMilli)}::int[]
      ) as g (index, site_id, sensor_id, at, t, h, e)
    ), fresh as (
      insert into reading (site_id, sensor_id, at, temperature_c, humidity_pct)
      select g.site_id, g.sensor_id, g.at, g.temperature_c, g.humidity_pct
      from given as g
      join sensor on sensor.site_id = g.site_id and sensor.id = g.sensor_id
      order by g.site_id, g.sensor_id, g.at
      on conflict do nothing
      returning site_id, sensor_id, at
    ), stored as (
      select g.* from given as g join fresh using (site_id, sensor_id, at)
    ), placed as (
      select s.*, placement.room_id,
        date_trunc('hour', s.at, 'UTC') as hour_at,
        (s.at at time zone site.time_zone)::date as day_on
      from stored as s
      join site on site.id = s.site_id
      join placement on placement.site_id = s.site_id and placement.sensor_id = s.sensor_id
        and placement.from_at <= s.at and (placement.to_at is null or placement.to_at > s.at)
    ), hours as (${addTo('room_hour', 'hour_at')}), days as (${addTo('room_day', 'day_on')})
    select index from stored`.execute(trx)
  return new Set(result.rows.map((row) => row.index))
}

/** Adds the rows of `placed` to a table of figures, by its bucket. */
const addTo = (table: 'room_hour' | 'room_day', bucket: 'hour_at' | 'day_on') =>
  sql.raw(`
    insert into ${table} as f (
      site_id, room_id, sensor_id, ${bucket}, n,
      temperature_milli_sum, temperature_c_min, temperature_c_max,
      humidity_milli_sum, humidity_pct_min, humidity_pct_max,
      emc_milli_sum, emc_pct_min, emc_pct_max
    )
    select site_id, room_id, sensor_id, ${bucket}, count(*),
      sum(t), min(temperature_c), max(temperature_c),
      sum(h), min(humidity_pct), max(humidity_pct),
      sum(e), min(emc_pct), max(emc_pct)
    from placed
    group by site_id, room_id, sensor_id, ${bucket}
    order by site_id, room_id, ${bucket}, sensor_id
    on conflict (site_id, room_id, ${bucket}, sensor_id) do update set
      n = f.n + excluded.n,
      temperature_milli_sum = f.temperature_milli_sum + excluded.temperature_milli_sum,
      temperature_c_min = least(f.temperature_c_min, excluded.temperature_c_min),
      temperature_c_max = greatest(f.temperature_c_max, excluded.temperature_c_max),
      humidity_milli_sum = f.humidity_milli_sum + excluded.humidity_milli_sum,
      humidity_pct_min = least(f.humidity_pct_min, excluded.humidity_pct_min),
      humidity_pct_max = greatest(f.humidity_pct_max, excluded.humidity_pct_max),
      emc_milli_sum = f.emc_milli_sum + excluded.emc_milli_sum,
      emc_pct_min = least(f.emc_pct_min, excluded.emc_pct_min),
      emc_pct_max = greatest(f.emc_pct_max, excluded.emc_pct_max)`)

interface Kept {
  temperatureC: number
  humidityPct: number
}

async function findKept(
  trx: Transaction<Database>,
  readings: readonly ReadingRow[],
): Promise<Map<string, Kept>> {
  const { rows } = await sql<{
    site_id: number
    sensor_id: number
    at: Date
    temperature_c: number
    humidity_pct: number
  }>`
    select r.site_id, r.sensor_id, r.at, r.temperature_c, r.humidity_pct
    from unnest(
      ${readings.map((row) => row.siteId)}::int[],
      ${readings.map((row) => row.sensorId)}::int[],
      ${readings.map((row) => row.at.toISOString())}::timestamptz[]
    ) as g (site_id, sensor_id, at)
    join reading as r on r.site_id = g.site_id and r.sensor_id = g.sensor_id and r.at = g.at`.execute(trx)
  return new Map(
    rows.map((row) => [
      keyOf({ siteId: row.site_id, sensorId: row.sensor_id, at: row.at }),
      { temperatureC: row.temperature_c, humidityPct: row.humidity_pct },
    ]),
  )
}

/** Rows of one statement of the bulk way: large enough to be quick, small enough not to hold up live readings. */
const bulkRows = 5_000

/**
 * Stores many readings with their figures and last values, as if each had arrived when it was measured.
 * For the demo's history; live readings go through the ingest, which also counts and tells.
 * @returns how many were new
 */
export async function insertReadings(
  db: Kysely<Database>,
  readings: readonly (ReadingRow & { batteryPct?: number | null })[],
): Promise<number> {
  await ensurePartitions(db, new Set(readings.map((row) => monthOf(row.at))))
  let inserted = 0
  for (let from = 0; from < readings.length; from += bulkRows) {
    const part = readings.slice(from, from + bulkRows)
    inserted += await inTransaction(db, async (trx) => {
      await holdFiguresShared(
        trx,
        part.map((row) => row.siteId),
      )
      const outcomes = await storeReadings(trx, part)
      const stored = part.filter((_, index) => outcomes[index]?.as === 'inserted')
      await updateLastValues(trx, newsOf(stored))
      return stored.length
    })
  }
  return inserted
}

/** One piece of news for each sensor: its readings, the newest of which is when it was heard. */
function newsOf(rows: readonly (ReadingRow & { batteryPct?: number | null })[]): SensorNews[] {
  const bySensor = new Map<
    string,
    { siteId: number; sensorId: number; heardAt: Date; readings: ReadingRow[] }
  >()
  for (const row of rows) {
    const key = `${row.siteId} ${row.sensorId}`
    const news = bySensor.get(key)
    if (news === undefined) bySensor.set(key, { ...row, heardAt: row.at, readings: [row] })
    else {
      news.readings.push(row)
      if (row.at > news.heardAt) news.heardAt = row.at
    }
  }
  return [...bySensor.values()]
}

/** Stores a reading that somebody typed in, for the room's own row of kind `typed`. */
export async function insertTypedReading(
  db: Kysely<Database>,
  reading: ReadingRow,
  now: Date,
): Promise<StoredAs> {
  await ensurePartitions(db, [monthOf(reading.at)])
  return inTransaction(db, async (trx) => {
    await holdFiguresShared(trx, [reading.siteId])
    const [outcome = { as: 'no-sensor' } as const] = await storeReadings(trx, [reading])
    if (outcome.as === 'inserted') {
      await updateLastValues(trx, [{ ...reading, readings: [reading], heardAt: now }])
      await notifySite(trx, reading.siteId, 'reading')
    }
    return outcome
  })
}
