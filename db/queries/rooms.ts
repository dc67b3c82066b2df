import { type Kysely, type Selectable, sql } from 'kysely'
import type { LastReading } from '@/lib/rooms/air'
import { type NewRoom, type RoomChange, roomKindSchema, type RoomKind } from '@/lib/rooms/room'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** A room as the server knows it; outside it goes by its code. */
export interface RoomRecord {
  id: number
  code: string
  name: string
  kind: RoomKind
  mark: number
  isShared: boolean
  keepsDryWork: boolean
  note: string
  version: number
  archivedAt: Date | null
}

const columns = [
  'id',
  'code',
  'name',
  'kind',
  'mark',
  'is_shared',
  'keeps_dry_work',
  'note',
  'version',
  'archived_at',
] as const

type Row = Pick<Selectable<Database['room']>, (typeof columns)[number]>

const roomOf = (row: Row): RoomRecord => ({
  id: row.id,
  code: row.code,
  name: row.name,
  kind: roomKindSchema.parse(row.kind),
  mark: row.mark,
  isShared: row.is_shared,
  keepsDryWork: row.keeps_dry_work,
  note: row.note,
  version: row.version,
  archivedAt: row.archived_at,
})

/** The rooms in use, in the order in which they were made; or only those that are shared with onlookers. */
export async function listRoomRecords(
  db: Kysely<Database>,
  siteId: number,
  options: { onlyShared?: boolean } = {},
): Promise<RoomRecord[]> {
  const rows = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .$if(options.onlyShared === true, (query) => query.where('is_shared', '=', true))
    .select(columns)
    .orderBy('id')
    .execute()
  return rows.map(roomOf)
}

/** A room by its code. One that is archived is not found, unless asked for. */
export async function findRoom(
  db: Kysely<Database>,
  siteId: number,
  code: string,
  options: { onlyShared?: boolean; forUpdate?: boolean; withArchived?: boolean } = {},
): Promise<RoomRecord | undefined> {
  const row = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('code', '=', code)
    .$if(options.withArchived !== true, (query) => query.where('archived_at', 'is', null))
    .$if(options.onlyShared === true, (query) => query.where('is_shared', '=', true))
    .$if(options.forUpdate === true, (query) => query.forUpdate())
    .select(columns)
    .executeTakeFirst()
  return row === undefined ? undefined : roomOf(row)
}

/** Whether a name is in use by another room. The unique key has the last word; this gives the kinder answer. */
export async function isRoomNameTaken(
  db: Kysely<Database>,
  siteId: number,
  name: string,
  butFor?: number,
): Promise<boolean> {
  const row = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .where(sql<boolean>`lower(name) = lower(${name})`)
    .$if(butFor !== undefined, (query) => query.where('id', '<>', butFor ?? 0))
    .select('id')
    .executeTakeFirst()
  return row !== undefined
}

/** The room marks, 0 to 6: the first that no room uses, so that neighbours differ. */
const marks = 7

export async function insertRoom(
  db: Kysely<Database>,
  siteId: number,
  room: NewRoom,
  now: Date,
): Promise<RoomRecord> {
  const id = await takeIds(db, siteId, 'room')
  const used = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .select((eb) => ['mark', eb.fn.countAll<number>().as('n')])
    .groupBy('mark')
    .execute()
  const usesOf = (mark: number) => used.find((row) => row.mark === mark)?.n ?? 0
  const mark = [...Array(marks).keys()].toSorted((a, b) => usesOf(a) - usesOf(b))[0] ?? 0
  const row = await db
    .insertInto('room')
    .values({
      site_id: siteId,
      id,
      code: newCode(),
      name: room.name,
      kind: room.kind,
      mark,
      is_shared: room.isShared,
      keeps_dry_work: room.keepsDryWork ?? (room.kind === 'cupboard' || room.kind === 'house'),
      note: room.note,
      created_at: now,
    })
    .returning(columns)
    .executeTakeFirstOrThrow()
  return roomOf(row)
}

/** Changes a room that is still at the version that the writer saw; `undefined` when it has moved on. */
export async function updateRoom(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  version: number,
  change: RoomChange & { archivedAt?: Date | null },
): Promise<RoomRecord | undefined> {
  const row = await db
    .updateTable('room')
    .set((eb) => ({
      name: change.name,
      kind: change.kind,
      is_shared: change.isShared,
      keeps_dry_work: change.keepsDryWork,
      note: change.note,
      archived_at: change.archivedAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', roomId)
    .where('version', '=', version)
    .returning(columns)
    .executeTakeFirst()
  return row === undefined ? undefined : roomOf(row)
}

export interface HangingSensor {
  roomId: number
  sensorId: number
  code: string
  name: string
  kind: 'device' | 'typed'
  spot: string
  heardAt: Date | null
  usualGapS: number | null
  /** The last reading that was taken in this room; a sensor that has just been moved has none yet. */
  last: LastReading | undefined
}

/** The sensors in use, each with the room that it hangs in now and its last reading there. */
export async function listHangingSensors(
  db: Kysely<Database>,
  siteId: number,
  roomId?: number,
): Promise<HangingSensor[]> {
  const rows = await db
    .selectFrom('placement')
    .innerJoin('sensor', (join) =>
      join.onRef('sensor.site_id', '=', 'placement.site_id').onRef('sensor.id', '=', 'placement.sensor_id'),
    )
    .leftJoin('sensor_state as state', (join) =>
      join
        .onRef('state.site_id', '=', 'placement.site_id')
        .onRef('state.sensor_id', '=', 'placement.sensor_id'),
    )
    .where('placement.site_id', '=', siteId)
    .where('placement.to_at', 'is', null)
    .where('sensor.archived_at', 'is', null)
    .$if(roomId !== undefined, (query) => query.where('placement.room_id', '=', roomId ?? 0))
    .select([
      'placement.room_id',
      'placement.sensor_id',
      'placement.from_at',
      'placement.spot',
      'sensor.code',
      'sensor.name',
      'sensor.kind',
      'state.at',
      'state.temperature_c',
      'state.humidity_pct',
      'state.emc_pct',
      'state.heard_at',
      'state.usual_gap_s',
    ])
    .orderBy('placement.sensor_id')
    .execute()
  return rows.map((row) => ({
    roomId: row.room_id,
    sensorId: row.sensor_id,
    code: row.code,
    name: row.name,
    kind: row.kind === 'typed' ? 'typed' : 'device',
    spot: row.spot,
    heardAt: row.heard_at,
    usualGapS: row.usual_gap_s,
    last:
      row.at !== null &&
      row.at >= row.from_at &&
      row.temperature_c !== null &&
      row.humidity_pct !== null &&
      row.emc_pct !== null
        ? {
            isTyped: row.kind === 'typed',
            at: row.at,
            temperatureC: row.temperature_c,
            humidityPct: row.humidity_pct,
            emcPct: row.emc_pct,
            usualGapS: row.usual_gap_s,
          }
        : undefined,
  }))
}

/** How many pieces are in each room now. */
export async function countPiecesByRoom(db: Kysely<Database>, siteId: number): Promise<Map<number, number>> {
  const rows = await db
    .selectFrom('piece_place')
    .innerJoin('piece', (join) =>
      join.onRef('piece.site_id', '=', 'piece_place.site_id').onRef('piece.id', '=', 'piece_place.piece_id'),
    )
    .where('piece_place.site_id', '=', siteId)
    .where('piece_place.to_at', 'is', null)
    .where('piece.archived_at', 'is', null)
    .groupBy('piece_place.room_id')
    .select((eb) => ['piece_place.room_id', eb.fn.countAll<number>().as('n')])
    .execute()
  return new Map(rows.map((row) => [row.room_id, row.n]))
}
