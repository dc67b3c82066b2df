import { type Kysely, sql, type Transaction } from 'kysely'
import { readingFigures } from '@/lib/readings/figures'
import type { Database } from '../schema'
import { inTransaction } from './transaction'

/** Any fixed number: the first half of the lock on a site's figures, of which the second is the site. */
const lockSpace = 5_433

/**
 * Holds the figures of these sites until the end of the transaction, so that nobody makes them again meanwhile.
 * Any number of writers of readings may hold them together. A commit waits for the disk from here on, whatever the
 * server's default is: what is acknowledged is there after a power cut.
 */
export async function holdFiguresShared(
  trx: Transaction<Database>,
  siteIds: readonly number[],
): Promise<void> {
  await sql`
    select set_config('synchronous_commit', 'on', true), pg_advisory_xact_lock_shared(${lockSpace}, site_id)
    from (select unnest(${[...new Set(siteIds)]}::int[]) as site_id order by 1) as sites`.execute(trx)
}

/**
 * Takes the figures of a site for one writer alone until the end of the transaction: before a placement or the time
 * zone is changed, and through the rebuild that follows. Readings that arrive meanwhile wait.
 */
export async function holdFiguresAlone(trx: Transaction<Database>, siteId: number): Promise<void> {
  await sql`select pg_advisory_xact_lock(${lockSpace}, ${siteId}::int)`.execute(trx)
}

export interface FiguresSpan {
  siteId: number
  sensorId: number
  /** The figures of every hour and day that holds an instant from here on … */
  fromAt: Date
  /** … up to here are made again; `null` for no end. */
  toAt: Date | null
}

interface Span {
  /** Whole hours and days of the site's calendar. */
  hourFrom: Date
  hourTo: Date
  dayFrom: string
  dayTo: string
  timeZone: string
}

/** The least and the greatest instant that figures are made for. */
const beginning = new Date(Date.UTC(1990, 0, 1))
const end = new Date(Date.UTC(2200, 0, 1))

/**
 * Makes the figures of a sensor's readings again from the readings, the placements and the site's calendar, for a
 * changed placement, a changed zone, or to check. Call it inside the transaction that makes the change, after
 * `holdFiguresAlone`; alone it takes a transaction of its own.
 */
export async function rebuildFigures(db: Kysely<Database>, span: FiguresSpan): Promise<void> {
  await inTransaction(db, async (trx) => {
    await holdFiguresAlone(trx, span.siteId)
    const whole = await wholeSpan(trx, span)
    if (whole === undefined) return
    const { hours, days } = await gather(trx, span, whole)
    await sql`delete from room_hour where site_id = ${span.siteId} and sensor_id = ${span.sensorId}
      and hour_at >= ${whole.hourFrom} and hour_at < ${whole.hourTo}`.execute(trx)
    await sql`delete from room_day where site_id = ${span.siteId} and sensor_id = ${span.sensorId}
      and day_on >= ${whole.dayFrom} and day_on <= ${whole.dayTo}`.execute(trx)
    await write(trx, span, 'room_hour', hours)
    await write(trx, span, 'room_day', days)
  })
}

/** Makes all figures of a site again, for a changed time zone. */
export async function rebuildSiteFigures(db: Kysely<Database>, siteId: number): Promise<void> {
  await inTransaction(db, async (trx) => {
    await holdFiguresAlone(trx, siteId)
    const sensors = await trx
      .selectFrom('sensor')
      .where('site_id', '=', siteId)
      .select('id')
      .orderBy('id')
      .execute()
    for (const sensor of sensors)
      await rebuildFigures(trx, { siteId, sensorId: sensor.id, fromAt: beginning, toAt: null })
  })
}

/** Widens a span to whole days of the site's calendar, and those to whole hours of UTC, which they may cut. */
async function wholeSpan(trx: Transaction<Database>, span: FiguresSpan): Promise<Span | undefined> {
  const from = span.fromAt < beginning ? beginning : span.fromAt
  const to = span.toAt === null || span.toAt > end ? end : span.toAt
  const { rows } = await sql<{
    time_zone: string
    day_from: string
    day_to: string
    hour_from: Date
    hour_to: Date
  }>`
    select time_zone, day_from, day_to,
      date_trunc('hour', day_from::timestamp at time zone time_zone, 'UTC') as hour_from,
      date_trunc('hour', (day_to + 1)::timestamp at time zone time_zone, 'UTC') + interval '1 hour' as hour_to
    from (
      select time_zone, (${from}::timestamptz at time zone time_zone)::date as day_from,
        (${to}::timestamptz at time zone time_zone)::date as day_to
      from site where id = ${span.siteId}
    ) as days`.execute(trx)
  const [row] = rows
  if (row === undefined) return undefined
  return {
    timeZone: row.time_zone,
    dayFrom: row.day_from,
    dayTo: row.day_to,
    hourFrom: row.hour_from,
    hourTo: row.hour_to,
  }
}

interface Sums {
  roomId: number
  bucket: string
  n: number
  temperatureSum: number
  temperatureMin: number
  temperatureMax: number
  humiditySum: number
  humidityMin: number
  humidityMax: number
  emcSum: number
  emcMin: number
  emcMax: number
}
type Buckets = Map<string, Sums>

interface PlacedRow {
  at: Date
  temperature_c: number
  humidity_pct: number
  room_id: number | null
  hour_at: Date
  day_on: string
}

/** Readings that are held in memory at a time. */
const chunkRows = 20_000

async function gather(
  trx: Transaction<Database>,
  { siteId, sensorId }: FiguresSpan,
  span: Span,
): Promise<{ hours: Buckets; days: Buckets }> {
  const hours: Buckets = new Map()
  const days: Buckets = new Map()
  let after: Date | null = null
  for (;;) {
    const rows: PlacedRow[] = await listPlaced(trx, siteId, sensorId, span, after)
    for (const row of rows) {
      if (row.room_id === null) continue
      const figures = readingFigures(row.temperature_c, row.humidity_pct)
      addTo(hours, row.room_id, row.hour_at.toISOString(), figures)
      if (row.day_on >= span.dayFrom && row.day_on <= span.dayTo)
        addTo(days, row.room_id, row.day_on, figures)
    }
    if (rows.length < chunkRows) return { hours, days }
    after = rows.at(-1)?.at ?? null
  }
}

async function listPlaced(
  trx: Transaction<Database>,
  siteId: number,
  sensorId: number,
  span: Span,
  after: Date | null,
): Promise<PlacedRow[]> {
  const { rows } = await sql<PlacedRow>`
    select r.at, r.temperature_c, r.humidity_pct, placement.room_id,
      date_trunc('hour', r.at, 'UTC') as hour_at, (r.at at time zone ${span.timeZone})::date as day_on
    from reading as r
    left join placement on placement.site_id = r.site_id and placement.sensor_id = r.sensor_id
      and placement.from_at <= r.at and (placement.to_at is null or placement.to_at > r.at)
    where r.site_id = ${siteId} and r.sensor_id = ${sensorId}
      and r.at >= ${span.hourFrom} and r.at < ${span.hourTo}
      and r.at > coalesce(${after}::timestamptz, '-infinity')
    order by r.at
    limit ${chunkRows}`.execute(trx)
  return rows
}

function addTo(
  buckets: Buckets,
  roomId: number,
  bucket: string,
  { temperatureMilli: t, humidityMilli: h, emcMilli: e }: ReturnType<typeof readingFigures>,
): void {
  const key = `${roomId} ${bucket}`
  const sums = buckets.get(key)
  if (sums === undefined) {
    buckets.set(key, {
      ...{ roomId, bucket, n: 1 },
      ...{ temperatureSum: t, temperatureMin: t, temperatureMax: t },
      ...{ humiditySum: h, humidityMin: h, humidityMax: h },
      ...{ emcSum: e, emcMin: e, emcMax: e },
    })
    return
  }
  sums.n += 1
  sums.temperatureSum += t
  sums.temperatureMin = Math.min(sums.temperatureMin, t)
  sums.temperatureMax = Math.max(sums.temperatureMax, t)
  sums.humiditySum += h
  sums.humidityMin = Math.min(sums.humidityMin, h)
  sums.humidityMax = Math.max(sums.humidityMax, h)
  sums.emcSum += e
  sums.emcMin = Math.min(sums.emcMin, e)
  sums.emcMax = Math.max(sums.emcMax, e)
}

async function write(
  trx: Transaction<Database>,
  { siteId, sensorId }: FiguresSpan,
  table: 'room_hour' | 'room_day',
  buckets: Buckets,
): Promise<void> {
  const rows = [...buckets.values()]
  const column = sql.ref(table === 'room_hour' ? 'hour_at' : 'day_on')
  const bucketType = sql.raw(table === 'room_hour' ? 'timestamptz' : 'date')
  for (let from = 0; from < rows.length; from += chunkRows) {
    const part = rows.slice(from, from + chunkRows)
    await sql`
      insert into ${sql.table(table)} (
        site_id, sensor_id, room_id, ${column}, n,
        temperature_milli_sum, temperature_c_min, temperature_c_max,
        humidity_milli_sum, humidity_pct_min, humidity_pct_max, emc_milli_sum, emc_pct_min, emc_pct_max
      )
      select ${siteId}::int, ${sensorId}::int, room_id, bucket, n,
        t_sum, (t_min / 1000.0)::real, (t_max / 1000.0)::real,
        h_sum, (h_min / 1000.0)::real, (h_max / 1000.0)::real,
        e_sum, (e_min / 1000.0)::real, (e_max / 1000.0)::real
      from unnest(
        ${part.map((row) => row.roomId)}::int[], ${part.map((row) => row.bucket)}::${bucketType}[],
        ${part.map((row) => row.n)}::int[],
        ${part.map((row) => row.temperatureSum)}::bigint[],
        ${part.map((row) => row.temperatureMin)}::int[], ${part.map((row) => row.temperatureMax)}::int[],
        ${part.map((row) => row.humiditySum)}::bigint[],
        ${part.map((row) => row.humidityMin)}::int[], ${part.map((row) => row.humidityMax)}::int[],
        ${part.map((row) => row.emcSum)}::bigint[],
        ${part.map((row) => row.emcMin)}::int[], ${part.map((row) => row.emcMax)}::int[]
      ) as g (room_id, bucket, n, t_sum, t_min, t_max, h_sum, h_min, h_max, e_sum, e_min, e_max)
      order by room_id, bucket`.execute(trx)
  }
}
