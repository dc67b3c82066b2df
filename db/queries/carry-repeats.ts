import type { Kysely } from 'kysely'
import type { Weekly } from '@/lib/carry/repeat'
import { type Cover, coverSchema } from '@/lib/pieces/piece'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** A plan that comes again, as the server knows it. */
export interface RepeatRecord extends Weekly {
  id: number
  code: string
  toRoom: { roomId: number; code: string; name: string; isArchived: boolean }
  cover: Cover
  stayMinutes: number
  takesWhatever: boolean
  /** Those that were not put away since. */
  pieces: { pieceId: number; roomId: number | null }[]
  note: string
  createdBy: string | null
  createdByName: string | null
  createdAt: Date
  pausedAt: Date | null
  endedAt: Date | null
  version: number
}

const repeatQuery = (db: Kysely<Database>, siteId: number) =>
  db
    .selectFrom('carry_repeat as repeat')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'repeat.site_id').onRef('room.id', '=', 'repeat.to_room_id'),
    )
    .leftJoin('user', 'user.id', 'repeat.created_by')
    .where('repeat.site_id', '=', siteId)
    .select([
      'repeat.id',
      'repeat.code',
      'repeat.to_room_id',
      'repeat.cover',
      'repeat.weekdays',
      'repeat.at_time',
      'repeat.stay_minutes',
      'repeat.takes_whatever',
      'repeat.note',
      'repeat.created_by',
      'repeat.created_at',
      'repeat.paused_at',
      'repeat.ended_at',
      'repeat.version',
      'room.code as room_code',
      'room.name as room_name',
      'room.archived_at as room_archived_at',
      'user.name as created_by_name',
    ])
    .orderBy('repeat.id')

type Row = Awaited<ReturnType<ReturnType<typeof repeatQuery>['executeTakeFirstOrThrow']>>

async function withPieces(
  db: Kysely<Database>,
  siteId: number,
  rows: readonly Row[],
): Promise<RepeatRecord[]> {
  if (rows.length === 0) return []
  const pieces = await db
    .selectFrom('carry_repeat_piece as part')
    .innerJoin('piece', (join) =>
      join.onRef('piece.site_id', '=', 'part.site_id').onRef('piece.id', '=', 'part.piece_id'),
    )
    .leftJoin('piece_place as place', (join) =>
      join
        .onRef('place.site_id', '=', 'part.site_id')
        .onRef('place.piece_id', '=', 'part.piece_id')
        .on('place.to_at', 'is', null),
    )
    .where('part.site_id', '=', siteId)
    .where(
      'part.repeat_id',
      'in',
      rows.map((row) => row.id),
    )
    .where('piece.archived_at', 'is', null)
    .select(['part.repeat_id', 'part.piece_id', 'place.room_id'])
    .orderBy('part.piece_id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    toRoom: {
      roomId: row.to_room_id,
      code: row.room_code,
      name: row.room_name,
      isArchived: row.room_archived_at !== null,
    },
    cover: coverSchema.parse(row.cover),
    weekdays: row.weekdays,
    // A time of day comes as 09:00:00.
    atTime: row.at_time.slice(0, 5),
    stayMinutes: row.stay_minutes,
    takesWhatever: row.takes_whatever,
    pieces: pieces
      .filter((piece) => piece.repeat_id === row.id)
      .map((piece) => ({ pieceId: piece.piece_id, roomId: piece.room_id })),
    note: row.note,
    createdBy: row.created_by,
    createdByName: row.created_by_name,
    createdAt: row.created_at,
    pausedAt: row.paused_at,
    endedAt: row.ended_at,
    version: row.version,
  }))
}

/** Those that still come, paused ones among them; those that ended since a moment, so that an end can be undone. */
export async function listRepeatRecords(
  db: Kysely<Database>,
  siteId: number,
  endedSince: Date,
): Promise<RepeatRecord[]> {
  const rows = await repeatQuery(db, siteId)
    .where((eb) => eb.or([eb('repeat.ended_at', 'is', null), eb('repeat.ended_at', '>=', endedSince)]))
    .execute()
  return withPieces(db, siteId, rows)
}

/** Those of which carries are made. */
export async function listRunningRepeats(db: Kysely<Database>, siteId: number): Promise<RepeatRecord[]> {
  const rows = await repeatQuery(db, siteId)
    .where('repeat.ended_at', 'is', null)
    .where('repeat.paused_at', 'is', null)
    .where('room.archived_at', 'is', null)
    .execute()
  return withPieces(db, siteId, rows)
}

export async function findRepeat(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<RepeatRecord | undefined> {
  const rows = await repeatQuery(db, siteId).where('repeat.code', '=', code).execute()
  return (await withPieces(db, siteId, rows))[0]
}

/** Locks a repeat for the rest of the transaction, then reads it: its carries are made by one hand at a time. */
export async function lockRepeat(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<RepeatRecord | undefined> {
  await db
    .selectFrom('carry_repeat')
    .where('site_id', '=', siteId)
    .where('code', '=', code)
    .select('id')
    .forUpdate()
    .execute()
  return findRepeat(db, siteId, code)
}

export interface RepeatToInsert extends Weekly {
  toRoomId: number
  cover: Cover
  stayMinutes: number
  takesWhatever: boolean
  note: string
  userId: string
  pieceIds: readonly number[]
}

export async function insertRepeat(
  db: Kysely<Database>,
  siteId: number,
  repeat: RepeatToInsert,
  now: Date,
): Promise<string> {
  const id = await takeIds(db, siteId, 'repeat')
  const code = newCode()
  await db
    .insertInto('carry_repeat')
    .values({
      site_id: siteId,
      id,
      code,
      to_room_id: repeat.toRoomId,
      cover: repeat.cover,
      weekdays: [...repeat.weekdays],
      at_time: repeat.atTime,
      stay_minutes: repeat.stayMinutes,
      takes_whatever: repeat.takesWhatever,
      note: repeat.note,
      created_by: repeat.userId,
      created_at: now,
    })
    .execute()
  await replaceRepeatPieces(db, siteId, id, repeat.pieceIds)
  return code
}

export async function replaceRepeatPieces(
  db: Kysely<Database>,
  siteId: number,
  repeatId: number,
  pieceIds: readonly number[],
): Promise<void> {
  await db
    .deleteFrom('carry_repeat_piece')
    .where('site_id', '=', siteId)
    .where('repeat_id', '=', repeatId)
    .execute()
  if (pieceIds.length === 0) return
  await db
    .insertInto('carry_repeat_piece')
    .values(pieceIds.map((pieceId) => ({ site_id: siteId, repeat_id: repeatId, piece_id: pieceId })))
    .execute()
}

export interface RepeatColumns {
  cover?: Cover | undefined
  weekdays?: readonly number[] | undefined
  atTime?: string | undefined
  stayMinutes?: number | undefined
  takesWhatever?: boolean | undefined
  note?: string | undefined
  pausedAt?: Date | null | undefined
  endedAt?: Date | null | undefined
}

/** Call it with the repeat's row locked. */
export async function updateRepeat(
  db: Kysely<Database>,
  siteId: number,
  repeatId: number,
  change: RepeatColumns,
): Promise<void> {
  await db
    .updateTable('carry_repeat')
    .set((eb) => ({
      cover: change.cover,
      weekdays: change.weekdays === undefined ? undefined : [...change.weekdays],
      at_time: change.atTime,
      stay_minutes: change.stayMinutes,
      takes_whatever: change.takesWhatever,
      note: change.note,
      paused_at: change.pausedAt,
      ended_at: change.endedAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', repeatId)
    .execute()
}
