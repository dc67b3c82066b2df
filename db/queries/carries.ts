import { type Kysely, sql } from 'kysely'
import { type CarryState, carryStateSchema } from '@/lib/carry/carry'
import { type Cover, coverSchema } from '@/lib/pieces/piece'
import { type RoomKind, roomKindSchema } from '@/lib/rooms/room'
import type { Database } from '../schema'

export interface CarryPieceRecord {
  pieceId: number
  cover: Cover
  fromRoom: { roomId: number; code: string; name: string } | null
  outAt: Date | null
  backAt: Date | null
  backRoomName: string | null
  isAskSkipped: boolean
}

/** A carry as the server knows it, with its pieces in the order in which they were made. */
export interface CarryRecord {
  id: number
  code: string
  state: CarryState
  toRoom: { roomId: number; code: string; name: string; mark: number; kind: RoomKind }
  cover: Cover
  plannedAt: Date
  stayMinutes: number
  startedAt: Date | null
  endedAt: Date | null
  againstAdvice: boolean
  note: string
  createdBy: string | null
  createdByName: string | null
  version: number
  /** A plan without named pieces; once it has gone, `pieces` are those that were taken. */
  takesWhatever: boolean
  repeat: { id: number; code: string; weekdays: number[]; atTime: string } | null
  putOffFrom: Date | null
  putOffAt: Date | null
  pieces: CarryPieceRecord[]
}

const carryQuery = (db: Kysely<Database>, siteId: number) =>
  db
    .selectFrom('carry')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'carry.site_id').onRef('room.id', '=', 'carry.to_room_id'),
    )
    .leftJoin('user', 'user.id', 'carry.created_by')
    .leftJoin('carry_repeat as repeat', (join) =>
      join.onRef('repeat.site_id', '=', 'carry.site_id').onRef('repeat.id', '=', 'carry.repeat_id'),
    )
    .where('carry.site_id', '=', siteId)
    .select([
      'carry.id',
      'carry.code',
      'carry.state',
      'carry.to_room_id',
      'carry.cover',
      'carry.planned_at',
      'carry.stay_minutes',
      'carry.started_at',
      'carry.ended_at',
      'carry.against_advice',
      'carry.note',
      'carry.created_by',
      'carry.version',
      'carry.takes_whatever',
      'carry.repeat_id',
      'carry.put_off_from',
      'carry.put_off_at',
      'repeat.code as repeat_code',
      'repeat.weekdays as repeat_weekdays',
      'repeat.at_time as repeat_at_time',
      'room.code as room_code',
      'room.name as room_name',
      'room.mark as room_mark',
      'room.kind as room_kind',
      'user.name as created_by_name',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof carryQuery>['executeTakeFirstOrThrow']>>

function repeatOf(row: Row): CarryRecord['repeat'] {
  if (row.repeat_id === null || row.repeat_code === null || row.repeat_weekdays === null) return null
  const { repeat_at_time: atTime } = row
  // A time of day comes as 09:00:00.
  return {
    id: row.repeat_id,
    code: row.repeat_code,
    weekdays: row.repeat_weekdays,
    atTime: (atTime ?? '').slice(0, 5),
  }
}

async function withPieces(
  db: Kysely<Database>,
  siteId: number,
  rows: readonly Row[],
): Promise<CarryRecord[]> {
  if (rows.length === 0) return []
  const pieces = await db
    .selectFrom('carry_piece as part')
    .leftJoin('room as source', (join) =>
      join.onRef('source.site_id', '=', 'part.site_id').onRef('source.id', '=', 'part.from_room_id'),
    )
    .leftJoin('room as back', (join) =>
      join.onRef('back.site_id', '=', 'part.site_id').onRef('back.id', '=', 'part.back_room_id'),
    )
    .where('part.site_id', '=', siteId)
    .where(
      'part.carry_id',
      'in',
      rows.map((row) => row.id),
    )
    .select([
      'part.carry_id',
      'part.piece_id',
      'part.cover',
      'part.from_room_id',
      'part.out_at',
      'part.back_at',
      'part.ask_skipped_at',
      'source.code as from_code',
      'source.name as from_name',
      'back.name as back_name',
    ])
    .orderBy('part.piece_id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    state: carryStateSchema.parse(row.state),
    toRoom: {
      roomId: row.to_room_id,
      code: row.room_code,
      name: row.room_name,
      mark: row.room_mark,
      kind: roomKindSchema.parse(row.room_kind),
    },
    cover: coverSchema.parse(row.cover),
    plannedAt: row.planned_at,
    stayMinutes: row.stay_minutes,
    startedAt: row.started_at,
    endedAt: row.ended_at,
    againstAdvice: row.against_advice,
    note: row.note,
    createdBy: row.created_by,
    createdByName: row.created_by_name,
    version: row.version,
    takesWhatever: row.takes_whatever,
    repeat: repeatOf(row),
    putOffFrom: row.put_off_from,
    putOffAt: row.put_off_at,
    pieces: pieces
      .filter((piece) => piece.carry_id === row.id)
      .map((piece) => ({
        pieceId: piece.piece_id,
        cover: coverSchema.parse(piece.cover),
        fromRoom:
          piece.from_room_id === null || piece.from_code === null || piece.from_name === null
            ? null
            : { roomId: piece.from_room_id, code: piece.from_code, name: piece.from_name },
        outAt: piece.out_at,
        backAt: piece.back_at,
        backRoomName: piece.back_name,
        isAskSkipped: piece.ask_skipped_at !== null,
      })),
  }))
}

/** What is planned or out, the soonest first. Also what the notices look at. */
export async function listOpenCarries(db: Kysely<Database>, siteId: number): Promise<CarryRecord[]> {
  const rows = await carryQuery(db, siteId)
    .where('carry.state', 'in', ['planned', 'out'])
    .orderBy('carry.planned_at')
    .orderBy('carry.id')
    .execute()
  return withPieces(db, siteId, rows)
}

/** Carries of which pieces came back since a moment, for the line that takes it back. */
export async function listCarriesBackSince(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
): Promise<CarryRecord[]> {
  const rows = await carryQuery(db, siteId)
    .where((eb) =>
      eb.exists(
        eb
          .selectFrom('carry_piece')
          .whereRef('carry_piece.site_id', '=', 'carry.site_id')
          .whereRef('carry_piece.carry_id', '=', 'carry.id')
          .where('carry_piece.back_at', '>=', since)
          .select('carry_piece.piece_id'),
      ),
    )
    .orderBy('carry.id', 'desc')
    .limit(20)
    .execute()
  return withPieces(db, siteId, rows)
}

export interface CarryListQuery {
  states: readonly CarryState[]
  isDescending: boolean
  limit: number
  after?: { at: string; id: number }
}

/** One more than asked for, which says that there is a next page. */
export async function listCarryRecords(
  db: Kysely<Database>,
  siteId: number,
  asked: CarryListQuery,
): Promise<CarryRecord[]> {
  const way = asked.isDescending ? 'desc' : 'asc'
  const { after } = asked
  const rows = await carryQuery(db, siteId)
    .where('carry.state', 'in', [...asked.states])
    .$if(after !== undefined, (query) =>
      query.where(
        asked.isDescending
          ? sql<boolean>`(carry.planned_at, carry.id) < (${after?.at}::timestamptz, ${after?.id}::int)`
          : sql<boolean>`(carry.planned_at, carry.id) > (${after?.at}::timestamptz, ${after?.id}::int)`,
      ),
    )
    .orderBy('carry.planned_at', way)
    .orderBy('carry.id', way)
    .limit(asked.limit + 1)
    .execute()
  return withPieces(db, siteId, rows)
}

export async function findCarry(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<CarryRecord | undefined> {
  const row = await carryQuery(db, siteId).where('carry.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : (await withPieces(db, siteId, [row]))[0]
}

/**
 * Locks a carry for the rest of the transaction and then reads it, so that of two presses the second sees what the
 * first has done.
 */
export async function lockCarry(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<CarryRecord | undefined> {
  await db
    .selectFrom('carry')
    .where('site_id', '=', siteId)
    .where('code', '=', code)
    .select('id')
    .forUpdate()
    .execute()
  return findCarry(db, siteId, code)
}

/** The carry that a piece is out on. */
export async function findCarryOfPieceOut(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<{ carryCode: string } | undefined> {
  const row = await db
    .selectFrom('carry_piece')
    .innerJoin('carry', (join) =>
      join.onRef('carry.site_id', '=', 'carry_piece.site_id').onRef('carry.id', '=', 'carry_piece.carry_id'),
    )
    .where('carry_piece.site_id', '=', siteId)
    .where('carry_piece.piece_id', '=', pieceId)
    .where('carry_piece.out_at', 'is not', null)
    .where('carry_piece.back_at', 'is', null)
    .select('carry.code')
    .executeTakeFirst()
  return row && { carryCode: row.code }
}

/** A planned carry that a piece is in. */
export async function findPlannedCarry(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<{ carryCode: string } | undefined> {
  const row = await db
    .selectFrom('carry_piece')
    .innerJoin('carry', (join) =>
      join.onRef('carry.site_id', '=', 'carry_piece.site_id').onRef('carry.id', '=', 'carry_piece.carry_id'),
    )
    .where('carry_piece.site_id', '=', siteId)
    .where('carry_piece.piece_id', '=', pieceId)
    .where('carry.state', '=', 'planned')
    .select('carry.code')
    .executeTakeFirst()
  return row && { carryCode: row.code }
}
