import { sql, type Transaction } from 'kysely'
import { readingFigures } from '@/lib/readings/figures'
import { toStored } from '@/lib/readings/plausible'
import { usualGapAfter } from '@/lib/readings/usual-gap'
import type { Database } from '../schema'

/** What one message, or several, told of a sensor. */
export interface SensorNews {
  siteId: number
  sensorId: number
  /** Readings that were really stored. */
  readings: readonly { at: Date; temperatureC: number; humidityPct: number; batteryPct?: number | null }[]
  /** When the sensor was heard, or `null` when this tells nothing about now. */
  heardAt: Date | null
  isHere?: boolean
  /** When its clock was seen to be wrong, or `null` when it was seen to be right again. */
  clockNotSetAt?: Date | null
  clockAheadAt?: Date | null
}

interface LastValue {
  site_id: number
  sensor_id: number
  at: Date | null
  temperature_c: number | null
  humidity_pct: number | null
  emc_pct: number | null
  battery_pct: number | null
  heard_at: Date | null
  is_here: boolean | null
  usual_gap_s: number | null
  clock_not_set_at: Date | null
  clock_ahead_at: Date | null
}

/**
 * Keeps the one row of each sensor: its newest reading by measured time (never going back), when it was last heard
 * by arrival, how often it usually measures, its battery, whether it is here, and what was wrong with its clock.
 * The rows are locked in the order of their key, so that two batches at once can't lock crosswise.
 */
export async function updateLastValues(
  trx: Transaction<Database>,
  news: readonly SensorNews[],
): Promise<void> {
  if (news.length === 0) return
  const bySensor = new Map<string, { siteId: number; sensorId: number; told: SensorNews[] }>()
  for (const one of news) {
    const key = `${one.siteId} ${one.sensorId}`
    const known = bySensor.get(key)
    if (known) known.told.push(one)
    else bySensor.set(key, { siteId: one.siteId, sensorId: one.sensorId, told: [one] })
  }
  const before = await lockRows(trx, [...bySensor.values()])
  const after = before.map((row) => {
    const told = bySensor.get(`${row.site_id} ${row.sensor_id}`)?.told ?? []
    return told.reduce(
      withFacts,
      withReadings(
        row,
        told.flatMap((one) => one.readings),
      ),
    )
  })
  await writeRows(trx, after)
}

type Reading = SensorNews['readings'][number]

function withReadings(row: LastValue, readings: readonly Reading[]): LastValue {
  const newest = newestOf(readings)
  const usualGapS = usualGapAfter(
    row.usual_gap_s,
    row.at,
    readings.map((one) => one.at),
  )
  if (newest === undefined || (row.at !== null && newest.at <= row.at)) return row
  const figures = readingFigures(newest.temperatureC, newest.humidityPct)
  const battery = newestOf(readings.filter((one) => typeof one.batteryPct === 'number'))?.batteryPct
  return {
    ...row,
    at: newest.at,
    temperature_c: toStored(newest.temperatureC),
    humidity_pct: toStored(newest.humidityPct),
    emc_pct: figures.emcMilli / 1000,
    battery_pct: battery ?? row.battery_pct,
    usual_gap_s: usualGapS,
  }
}

function newestOf(readings: readonly Reading[]): Reading | undefined {
  return readings.reduce<Reading | undefined>(
    (newest, one) => (newest === undefined || one.at > newest.at ? one : newest),
    undefined,
  )
}

function withFacts(row: LastValue, told: SensorNews): LastValue {
  return {
    ...row,
    heard_at: laterOf(row.heard_at, told.heardAt),
    is_here: told.isHere ?? row.is_here,
    clock_not_set_at: told.clockNotSetAt === undefined ? row.clock_not_set_at : told.clockNotSetAt,
    clock_ahead_at: told.clockAheadAt === undefined ? row.clock_ahead_at : told.clockAheadAt,
  }
}

function laterOf(one: Date | null, other: Date | null): Date | null {
  if (one === null || other === null) return one ?? other
  return one > other ? one : other
}

async function lockRows(
  trx: Transaction<Database>,
  keys: readonly { siteId: number; sensorId: number }[],
): Promise<LastValue[]> {
  const given = sql`unnest(
    ${keys.map((key) => key.siteId)}::int[],
    ${keys.map((key) => key.sensorId)}::int[]
  ) as g (site_id, sensor_id)`
  await sql`
    insert into sensor_state (site_id, sensor_id)
    select g.site_id, g.sensor_id
    from ${given}
    join sensor on sensor.site_id = g.site_id and sensor.id = g.sensor_id
    where not exists (
      select from sensor_state as s where s.site_id = g.site_id and s.sensor_id = g.sensor_id
    )
    order by g.site_id, g.sensor_id
    on conflict do nothing`.execute(trx)
  const { rows } = await sql<LastValue>`
    select s.site_id, s.sensor_id, s.at, s.temperature_c, s.humidity_pct, s.emc_pct, s.battery_pct, s.heard_at,
      s.is_here, s.usual_gap_s, s.clock_not_set_at, s.clock_ahead_at
    from sensor_state as s
    join ${given} on g.site_id = s.site_id and g.sensor_id = s.sensor_id
    order by s.site_id, s.sensor_id
    for update of s`.execute(trx)
  return rows
}

async function writeRows(trx: Transaction<Database>, rows: readonly LastValue[]): Promise<void> {
  const instants = (of: (row: LastValue) => Date | null) => rows.map((row) => of(row)?.toISOString() ?? null)
  await sql`
    update sensor_state as s set
      at = g.at, temperature_c = g.temperature_c, humidity_pct = g.humidity_pct, emc_pct = g.emc_pct,
      battery_pct = g.battery_pct, heard_at = g.heard_at, is_here = g.is_here, usual_gap_s = g.usual_gap_s,
      clock_not_set_at = g.clock_not_set_at, clock_ahead_at = g.clock_ahead_at
    from unnest(
      ${rows.map((row) => row.site_id)}::int[],
      ${rows.map((row) => row.sensor_id)}::int[],
      ${instants((row) => row.at)}::timestamptz[],
      ${rows.map((row) => row.temperature_c)}::real[],
      ${rows.map((row) => row.humidity_pct)}::real[],
      ${rows.map((row) => row.emc_pct)}::real[],
      ${rows.map((row) => row.battery_pct)}::real[],
      ${instants((row) => row.heard_at)}::timestamptz[],
      ${rows.map((row) => row.is_here)}::boolean[],
      ${rows.map((row) => row.usual_gap_s)}::real[],
      ${instants((row) => row.clock_not_set_at)}::timestamptz[],
      ${instants((row) => row.clock_ahead_at)}::timestamptz[]
    ) as g (site_id, sensor_id, at, temperature_c, humidity_pct, emc_pct, battery_pct, heard_at, is_here,
      usual_gap_s, clock_not_set_at, clock_ahead_at)
    where s.site_id = g.site_id and s.sensor_id = g.sensor_id`.execute(trx)
}
