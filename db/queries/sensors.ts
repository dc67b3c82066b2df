import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** A sensor as the server knows it, with where it hangs and what it last said. */
export interface SensorRecord {
  id: number
  code: string
  name: string
  kind: 'device' | 'typed'
  version: number
  createdAt: Date
  archivedAt: Date | null
  room: { roomId: number; code: string; name: string; mark: number } | null
  spot: string
  last: { at: Date; temperatureC: number; humidityPct: number; emcPct: number } | null
  heardAt: Date | null
  usualGapS: number | null
  batteryPct: number | null
  clockNotSetAt: Date | null
  clockAheadAt: Date | null
}

const sensorQuery = (db: Kysely<Database>, siteId: number) =>
  db
    .selectFrom('sensor')
    .leftJoin('placement', (join) =>
      join
        .onRef('placement.site_id', '=', 'sensor.site_id')
        .onRef('placement.sensor_id', '=', 'sensor.id')
        .on('placement.to_at', 'is', null),
    )
    .leftJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'sensor.site_id').onRef('room.id', '=', 'placement.room_id'),
    )
    .leftJoin('sensor_state as state', (join) =>
      join.onRef('state.site_id', '=', 'sensor.site_id').onRef('state.sensor_id', '=', 'sensor.id'),
    )
    .where('sensor.site_id', '=', siteId)
    .select([
      'sensor.id',
      'sensor.code',
      'sensor.name',
      'sensor.kind',
      'sensor.version',
      'sensor.created_at',
      'sensor.archived_at',
      'placement.room_id',
      'placement.spot',
      'room.code as room_code',
      'room.name as room_name',
      'room.mark as room_mark',
      'state.at',
      'state.temperature_c',
      'state.humidity_pct',
      'state.emc_pct',
      'state.heard_at',
      'state.usual_gap_s',
      'state.battery_pct',
      'state.clock_not_set_at',
      'state.clock_ahead_at',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof sensorQuery>['executeTakeFirstOrThrow']>>

const sensorOf = (row: Row): SensorRecord => ({
  id: row.id,
  code: row.code,
  name: row.name,
  kind: row.kind === 'typed' ? 'typed' : 'device',
  version: row.version,
  createdAt: row.created_at,
  archivedAt: row.archived_at,
  room:
    row.room_id === null || row.room_code === null || row.room_name === null
      ? null
      : { roomId: row.room_id, code: row.room_code, name: row.room_name, mark: row.room_mark ?? 0 },
  spot: row.spot ?? '',
  last:
    row.at === null || row.temperature_c === null || row.humidity_pct === null || row.emc_pct === null
      ? null
      : {
          at: row.at,
          temperatureC: row.temperature_c,
          humidityPct: row.humidity_pct,
          emcPct: row.emc_pct,
        },
  heardAt: row.heard_at,
  usualGapS: row.usual_gap_s,
  batteryPct: row.battery_pct,
  clockNotSetAt: row.clock_not_set_at,
  clockAheadAt: row.clock_ahead_at,
})

/** Sensors in use, by name; retired ones too when asked for, behind the others. */
export async function listSensorRecords(
  db: Kysely<Database>,
  siteId: number,
  options: { withArchived?: boolean } = {},
): Promise<SensorRecord[]> {
  const rows = await sensorQuery(db, siteId)
    .$if(options.withArchived !== true, (query) => query.where('sensor.archived_at', 'is', null))
    .orderBy(sql`sensor.archived_at is not null`)
    .orderBy(sql`lower(sensor.name)`)
    .execute()
  return rows.map(sensorOf)
}

/** A sensor by its code, retired or not: its readings stay to be looked at. */
export async function findSensor(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<SensorRecord | undefined> {
  const row = await sensorQuery(db, siteId).where('sensor.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : sensorOf(row)
}

/** Locks a sensor for the rest of the transaction, then reads it. */
export async function lockSensor(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<SensorRecord | undefined> {
  await db
    .selectFrom('sensor')
    .where('site_id', '=', siteId)
    .where('code', '=', code)
    .select('id')
    .forUpdate()
    .execute()
  return findSensor(db, siteId, code)
}

export async function isSensorNameTaken(
  db: Kysely<Database>,
  siteId: number,
  name: string,
  butFor = 0,
): Promise<boolean> {
  const row = await db
    .selectFrom('sensor')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .where(sql<boolean>`lower(name) = lower(${name})`)
    .where('id', '<>', butFor)
    .select('id')
    .executeTakeFirst()
  return row !== undefined
}

/** A sensor, hung in its room from now on. The hash is of a secret that is shown once and kept nowhere. */
export async function insertSensor(
  db: Kysely<Database>,
  siteId: number,
  sensor: {
    name: string
    kind: 'device' | 'typed'
    secretHash: string | null
    roomId: number
    spot: string
    fromAt: Date
  },
  now: Date,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(db, siteId, 'sensor')
  const row = await db
    .insertInto('sensor')
    .values({
      site_id: siteId,
      id,
      code: newCode(),
      name: sensor.name,
      kind: sensor.kind,
      secret_hash: sensor.secretHash,
      secret_set_at: sensor.secretHash === null ? null : now,
      created_at: now,
      archived_at: null,
    })
    .returning(['id', 'code'])
    .executeTakeFirstOrThrow()
  await db
    .insertInto('placement')
    .values({
      site_id: siteId,
      sensor_id: id,
      from_at: sensor.fromAt,
      to_at: null,
      room_id: sensor.roomId,
      spot: sensor.spot,
    })
    .execute()
  return row
}

/** Call it with the sensor's row locked. */
export async function updateSensor(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
  change: { name?: string; secretHash?: string; secretSetAt?: Date; archivedAt?: Date },
): Promise<void> {
  await db
    .updateTable('sensor')
    .set((eb) => ({
      name: change.name,
      secret_hash: change.secretHash,
      secret_set_at: change.secretSetAt,
      archived_at: change.archivedAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', sensorId)
    .execute()
}

/** The row that a room's typed readings belong to, if any were ever typed in. */
export async function findTypedSensor(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
): Promise<{ id: number; code: string } | undefined> {
  return db
    .selectFrom('sensor')
    .innerJoin('placement', (join) =>
      join
        .onRef('placement.site_id', '=', 'sensor.site_id')
        .onRef('placement.sensor_id', '=', 'sensor.id')
        .on('placement.to_at', 'is', null),
    )
    .where('sensor.site_id', '=', siteId)
    .where('sensor.kind', '=', 'typed')
    .where('sensor.archived_at', 'is', null)
    .where('placement.room_id', '=', roomId)
    .select(['sensor.id', 'sensor.code'])
    .executeTakeFirst()
}
