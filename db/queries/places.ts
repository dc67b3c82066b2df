import type { Kysely } from 'kysely'
import { placeCoverSchema, type PlaceCover } from '@/lib/pieces/piece'
import type { Database } from '../schema'

export interface Place {
  pieceId: number
  roomId: number
  fromAt: Date
  toAt: Date | null
  cover: PlaceCover
  carryId: number | null
}

export interface ShownPlace {
  room: { id: string; name: string; mark: number; isShared: boolean }
  fromAt: Date
  toAt: Date | null
  cover: PlaceCover
  by: string | null
}

/** Where a piece has been, newest first. */
export async function listPlaces(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<ShownPlace[]> {
  const rows = await db
    .selectFrom('piece_place as place')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'place.site_id').onRef('room.id', '=', 'place.room_id'),
    )
    .leftJoin('user', 'user.id', 'place.moved_by')
    .where('place.site_id', '=', siteId)
    .where('place.piece_id', '=', pieceId)
    .select([
      'room.code',
      'room.name',
      'room.mark',
      'room.is_shared',
      'place.from_at',
      'place.to_at',
      'place.cover',
      'user.name as by',
    ])
    .orderBy('place.from_at', 'desc')
    .limit(200)
    .execute()
  return rows.map((row) => ({
    room: { id: row.code, name: row.name, mark: row.mark, isShared: row.is_shared },
    fromAt: row.from_at,
    toAt: row.to_at,
    cover: placeCoverSchema.parse(row.cover),
    by: row.by,
  }))
}

/** Where a piece is now. */
export async function findCurrentPlace(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<Place | undefined> {
  const row = await db
    .selectFrom('piece_place')
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('to_at', 'is', null)
    .select(['room_id', 'from_at', 'cover', 'carry_id'])
    .executeTakeFirst()
  return (
    row && {
      pieceId,
      roomId: row.room_id,
      fromAt: row.from_at,
      toAt: null,
      cover: placeCoverSchema.parse(row.cover),
      carryId: row.carry_id,
    }
  )
}

/**
 * Ends a piece's stay where it is and begins the next. Two moves within one millisecond would be one place of no length,
 * which the history can't hold, so the later one counts from a millisecond after the earlier.
 * @returns the instant from which the new place counts
 */
export async function movePiece(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  to: { roomId: number; cover: PlaceCover; at: Date; carryId: number | null; userId: string },
): Promise<Date> {
  const current = await findCurrentPlace(db, siteId, pieceId)
  const at = current !== undefined && to.at <= current.fromAt ? new Date(current.fromAt.getTime() + 1) : to.at
  await db
    .updateTable('piece_place')
    .set({ to_at: at })
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('to_at', 'is', null)
    .execute()
  await db
    .insertInto('piece_place')
    .values({
      site_id: siteId,
      piece_id: pieceId,
      from_at: at,
      to_at: null,
      room_id: to.roomId,
      cover: to.cover,
      carry_id: to.carryId,
      moved_by: to.userId,
    })
    .execute()
  return at
}

/**
 * Takes back a piece's last move: its present place goes, and the one before goes on as if it had never ended.
 * @param since the move must have been made at this instant
 * @returns false when the piece has been moved again meanwhile
 */
export async function undoMove(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  since: Date,
): Promise<boolean> {
  const gone = await db
    .deleteFrom('piece_place')
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('to_at', 'is', null)
    .where('from_at', '=', since)
    .returning('piece_id')
    .executeTakeFirst()
  if (gone === undefined) return false
  await db
    .updateTable('piece_place')
    .set({ to_at: null })
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('to_at', '=', since)
    .execute()
  return true
}
