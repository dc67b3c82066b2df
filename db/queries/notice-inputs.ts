import { type Kysely, sql } from 'kysely'
import { dayOfInstant, daysAfter, startOfDayAt, startOfDayOf } from '@/lib/climate/days'
import { shopWasUsed, type ShopHour } from '@/lib/notices/shop-used'
import type { EveningFacts, RefusedCount, RoomDay, RoomHour } from '@/lib/notices/surroundings'
import { stageSchema } from '@/lib/pieces/piece'
import type { Database } from '../schema'

type Site = { siteId: number; timeZone: string }

/** What the rules about rooms and sensors look at, each in one statement for a whole site. */

/** Whole days of every room from a day on, without today, oldest first. */
export async function listRoomDays(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  fromOn: string,
  beforeOn: string,
): Promise<Map<number, RoomDay[]>> {
  const { rows } = await sql<{ room_id: number; day_on: string; t: number; rh: number; emc: number }>`
    select room_id, day_on,
      avg(temperature_milli_sum::float8 / n / 1000) as t,
      avg(humidity_milli_sum::float8 / n / 1000) as rh,
      avg(emc_milli_sum::float8 / n / 1000) as emc
    from room_day
    where site_id = ${siteId} and day_on >= ${fromOn} and day_on < ${beforeOn}
    group by room_id, day_on
    order by room_id, day_on`.execute(db)
  // Each day's bounds once, whatever the number of rooms.
  const starts = new Map<string, number>()
  const startOf = (dayOn: string): number => {
    const start = starts.get(dayOn) ?? startOfDayAt(dayOn, timeZone).getTime()
    starts.set(dayOn, start)
    return start
  }
  return byRoom(rows, (row) => ({
    dayOn: row.day_on,
    at: startOf(row.day_on),
    endsAt: startOf(daysAfter(row.day_on, 1)),
    temperatureC: row.t,
    humidityPct: row.rh,
    emcPct: row.emc,
  }))
}

/** Whole hours of every room, oldest first. */
export async function listRoomHourAirs(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
  before: Date,
): Promise<Map<number, RoomHour[]>> {
  const { rows } = await sql<{ room_id: number; hour_at: Date; t: number; rh: number }>`
    select room_id, hour_at,
      avg(temperature_milli_sum::float8 / n / 1000) as t,
      avg(humidity_milli_sum::float8 / n / 1000) as rh
    from room_hour
    where site_id = ${siteId} and hour_at >= ${since} and hour_at < ${before}
    group by room_id, hour_at
    order by room_id, hour_at`.execute(db)
  return byRoom(rows, (row) => ({ at: row.hour_at.getTime(), temperatureC: row.t, humidityPct: row.rh }))
}

function byRoom<R extends { room_id: number }, T>(rows: readonly R[], of: (row: R) => T): Map<number, T[]> {
  const map = new Map<number, T[]>()
  for (const row of rows) {
    const own = map.get(row.room_id)
    if (own === undefined) map.set(row.room_id, [of(row)])
    else own.push(of(row))
  }
  return map
}

/** How many messages of each sensor could not be used, today and within the last hour. */
export async function listRefusedCounts(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  now: Date,
): Promise<RefusedCount[]> {
  const today = dayOfInstant(now, timeZone)
  const { rows } = await sql<{
    code: string
    name: string
    today: number
    before: number
    last_hour: number
  }>`
    select sensor.code, sensor.name, counts.today, counts.before,
      (select count(*)::int from refused
        where refused.site_id = ${siteId} and refused.sensor_id = sensor.id
          and refused.at > ${new Date(now.getTime() - 3_600_000)} and refused.at <= ${now}) as last_hour
    from (
      select sensor_id,
        coalesce(sum(n) filter (where day_on = ${today}), 0)::int as today,
        coalesce(sum(n) filter (where day_on < ${today}), 0)::int as before
      from ingest_count
      where site_id = ${siteId} and kind = 'refused' and day_on in (${today}, ${daysAfter(today, -1)})
      group by sensor_id
    ) as counts
    join sensor on sensor.site_id = ${siteId} and sensor.id = counts.sensor_id and sensor.archived_at is null
    where counts.today > 0
    order by sensor.id`.execute(db)
  return rows.map((row) => ({
    sensorCode: row.code,
    sensorName: row.name,
    today: row.today,
    lastHour: row.last_hour,
    isOldNews: row.before > 0,
  }))
}

/** Charge last told by each sensor in use, percent of full. */
export async function findBatteries(db: Kysely<Database>, siteId: number): Promise<Map<number, number>> {
  const rows = await db
    .selectFrom('sensor_state')
    .where('site_id', '=', siteId)
    .where('battery_pct', 'is not', null)
    .select(['sensor_id', 'battery_pct'])
    .execute()
  return new Map(rows.map((row) => [row.sensor_id, row.battery_pct ?? 0]))
}

/** Whether the shops were used today, and whether somebody has said since that nothing else is out. */
export async function findEveningFacts(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  now: Date,
): Promise<EveningFacts> {
  const dayStart = startOfDayOf(now, timeZone)
  const [hours, carries, lockUp] = await Promise.all([
    sql<{ room_id: number; hour_at: Date; t: number; low: number; high: number }>`
      select hour.room_id, hour.hour_at, avg(temperature_milli_sum::float8 / n / 1000) as t,
        min(emc_pct_min) as low, max(emc_pct_max) as high
      from room_hour as hour
      join room on room.site_id = hour.site_id and room.id = hour.room_id
      where hour.site_id = ${siteId} and room.kind = 'shop' and room.archived_at is null
        and hour.hour_at >= ${dayStart} and hour.hour_at <= ${now}
      group by hour.room_id, hour.hour_at
      order by hour.room_id, hour.hour_at`.execute(db),
    sql<{ n: number }>`
      select count(*)::int as n
      from carry_piece as part
      join carry on carry.site_id = part.site_id and carry.id = part.carry_id
      join room on room.site_id = carry.site_id and room.id = carry.to_room_id
      where part.site_id = ${siteId} and room.kind = 'shop'
        and (part.out_at between ${dayStart} and ${now} or part.back_at between ${dayStart} and ${now})`.execute(
      db,
    ),
    db
      .selectFrom('lock_up')
      .where('site_id', '=', siteId)
      .where('day_on', '=', dayOfInstant(now, timeZone))
      .select(['nothing_else_at', 'closed_at'])
      .executeTakeFirst(),
  ])
  const shops = byRoom(hours.rows, (row): ShopHour => ({
    at: row.hour_at.getTime(),
    temperatureC: row.t,
    emcPctMin: row.low,
    emcPctMax: row.high,
  }))
  return {
    shopUse: shopWasUsed([...shops.values()], carries.rows[0]?.n ?? 0).why,
    isAnswered: (lockUp?.nothing_else_at ?? lockUp?.closed_at ?? null) !== null,
  }
}

/** By what each day since a moment tells that a shop was used; days on which nothing does are left out. */
export async function listShopUse(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  since: Date,
  now: Date,
): Promise<Map<string, EveningFacts['shopUse']>> {
  const [hours, carries] = await Promise.all([
    sql<{ room_id: number; hour_at: Date; t: number; low: number; high: number }>`
      select hour.room_id, hour.hour_at, avg(temperature_milli_sum::float8 / n / 1000) as t,
        min(emc_pct_min) as low, max(emc_pct_max) as high
      from room_hour as hour
      join room on room.site_id = hour.site_id and room.id = hour.room_id
      where hour.site_id = ${siteId} and room.kind = 'shop' and room.archived_at is null
        and hour.hour_at >= ${since} and hour.hour_at <= ${now}
      group by hour.room_id, hour.hour_at
      order by hour.room_id, hour.hour_at`.execute(db),
    sql<{ day_on: string; n: number }>`
      select (part.out_at at time zone ${timeZone})::date::text as day_on, count(*)::int as n
      from carry_piece as part
      join carry on carry.site_id = part.site_id and carry.id = part.carry_id
      join room on room.site_id = carry.site_id and room.id = carry.to_room_id
      where part.site_id = ${siteId} and room.kind = 'shop' and part.out_at between ${since} and ${now}
      group by 1`.execute(db),
  ])
  const carriesOn = new Map(carries.rows.map((row) => [row.day_on, row.n]))
  const days = new Map<string, Map<number, ShopHour[]>>()
  for (const row of hours.rows) {
    const dayOn = dayOfInstant(row.hour_at, timeZone)
    const day = days.get(dayOn) ?? new Map<number, ShopHour[]>()
    const hour = { at: row.hour_at.getTime(), temperatureC: row.t, emcPctMin: row.low, emcPctMax: row.high }
    day.set(row.room_id, [...(day.get(row.room_id) ?? []), hour])
    days.set(dayOn, day)
  }
  const uses = new Map<string, EveningFacts['shopUse']>()
  for (const dayOn of new Set([...days.keys(), ...carriesOn.keys()])) {
    const { why } = shopWasUsed([...(days.get(dayOn)?.values() ?? [])], carriesOn.get(dayOn) ?? 0)
    if (why !== null) uses.set(dayOn, why)
  }
  return uses
}

/** Readings of the sensors that hang in some rooms now, since a moment, oldest first. */
export async function listReadingsIn(
  db: Kysely<Database>,
  siteId: number,
  roomIds: readonly number[],
  since: Date,
  until: Date,
): Promise<Map<number, { at: number; temperatureC: number }[]>> {
  if (roomIds.length === 0) return new Map()
  const { rows } = await sql<{ room_id: number; at: Date; temperature_c: number }>`
    select placement.room_id, reading.at, reading.temperature_c
    from placement
    join reading on reading.site_id = placement.site_id and reading.sensor_id = placement.sensor_id
      and reading.at >= placement.from_at
    where placement.site_id = ${siteId} and placement.to_at is null
      and placement.room_id = any(${[...roomIds]}::int[])
      and reading.at > ${since} and reading.at <= ${until}
    order by placement.room_id, reading.at`.execute(db)
  return byRoom(rows, (row) => ({ at: row.at.getTime(), temperatureC: row.temperature_c }))
}

/** A time for which a sensor sent nothing, by its hours on record. */
export interface Silence {
  sensorCode: string
  sensorName: string
  usualGapS: number | null
  /** The end of the last hour with a reading, and the beginning of the next one; null while it lasts. */
  fromAt: Date
  untilAt: Date | null
}

/** Gaps of two hours and more in the record of each sensor since a day. */
export async function listSilences(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
  now: Date,
): Promise<Silence[]> {
  const { rows } = await sql<{
    code: string
    name: string
    gap: number | null
    from_at: Date
    until_at: Date | null
  }>`
    select sensor.code, sensor.name, state.usual_gap_s as gap,
      hours.hour_at + interval '1 hour' as from_at, hours.next_at as until_at
    from (
      select sensor_id, hour_at, lead(hour_at) over (partition by sensor_id order by hour_at) as next_at
      from room_hour where site_id = ${siteId} and hour_at >= ${since} and hour_at <= ${now}
    ) as hours
    join sensor on sensor.site_id = ${siteId} and sensor.id = hours.sensor_id
      and sensor.kind = 'device' and sensor.archived_at is null
    left join sensor_state as state on state.site_id = ${siteId} and state.sensor_id = sensor.id
    where coalesce(hours.next_at, ${now}) - hours.hour_at >= interval '2 hours'
    order by hours.hour_at`.execute(db)
  return rows.map((row) => ({
    sensorCode: row.code,
    sensorName: row.name,
    usualGapS: row.gap,
    fromAt: row.from_at,
    untilAt: row.until_at,
  }))
}

/** Every outing since a moment: what a replay of the evening question looks at. */
export async function listOutingsSince(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
): Promise<{ number: string; outAt: Date; backAt: Date | null }[]> {
  const rows = await db
    .selectFrom('carry_piece as part')
    .innerJoin('piece', (join) =>
      join.onRef('piece.site_id', '=', 'part.site_id').onRef('piece.id', '=', 'part.piece_id'),
    )
    .where('part.site_id', '=', siteId)
    .where('part.out_at', 'is not', null)
    .where((eb) => eb.or([eb('part.back_at', 'is', null), eb('part.back_at', '>', since)]))
    .select(['piece.number', 'part.out_at', 'part.back_at'])
    .orderBy('part.out_at')
    .execute()
  return rows.flatMap((row) =>
    row.out_at === null ? [] : [{ number: row.number, outAt: row.out_at, backAt: row.back_at }],
  )
}

/** A piece in use as the rules look at it. */
export interface RestingPiece {
  id: number
  code: string
  number: string
  stage: 'blank' | 'roughed' | 'box'
  woodKind: string
  keepRoomId: number | null
  roomId: number | null
  isOut: boolean
  roughedOn: string | null
  readyByWeight: boolean
  createdAt: Date
}

/** Every piece in use with the room that it is in. */
export async function listRestingPieces(db: Kysely<Database>, siteId: number): Promise<RestingPiece[]> {
  const rows = await db
    .selectFrom('piece')
    .leftJoin('piece_place as place', (join) =>
      join
        .onRef('place.site_id', '=', 'piece.site_id')
        .onRef('place.piece_id', '=', 'piece.id')
        .on('place.to_at', 'is', null),
    )
    .where('piece.site_id', '=', siteId)
    .where('piece.archived_at', 'is', null)
    .select([
      'piece.id',
      'piece.code',
      'piece.number',
      'piece.stage',
      'piece.wood_kind',
      'piece.keep_room_id',
      'piece.roughed_on',
      'piece.ready_by_weight',
      'piece.created_at',
      'place.room_id',
      'place.carry_id',
    ])
    .orderBy('piece.id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    number: row.number,
    stage: stageSchema.parse(row.stage),
    woodKind: row.wood_kind,
    keepRoomId: row.keep_room_id,
    roomId: row.room_id,
    isOut: row.carry_id !== null,
    roughedOn: row.roughed_on,
    readyByWeight: row.ready_by_weight,
    createdAt: row.created_at,
  }))
}

/** Changes whenever anything about a site's pieces or rooms does that costly facts are made from. */
export async function findYardKey(db: Kysely<Database>, siteId: number): Promise<string> {
  const { rows } = await sql<{ key: string }>`
    select concat_ws(' ',
      (select concat(count(*), ',', sum(version)) from room where site_id = ${siteId}),
      (select concat(count(*), ',', sum(version)) from piece where site_id = ${siteId}),
      (select concat(count(*), ',', max(extract(epoch from from_at))) from piece_place where site_id = ${siteId}),
      (select concat(max(id), ',', count(undone_at)) from weighing where site_id = ${siteId}),
      (select concat(max(id), ',', count(undone_at)) from piece_event where site_id = ${siteId}),
      (select concat(count(*), ',', max(at)) from piece_moisture where site_id = ${siteId})
    ) as key`.execute(db)
  return rows[0]?.key ?? ''
}
