import { type Kysely, sql } from 'kysely'
import type { NewPiece, PieceChange } from '@/lib/pieces/piece'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/**
 * Locks pieces for the rest of the transaction, always in the same order, so that two people who carry the same pieces
 * wait for one another instead of both going on, and never for ever.
 */
export async function lockPieces(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
): Promise<void> {
  if (pieceIds.length === 0) return
  await db
    .selectFrom('piece')
    .where('site_id', '=', siteId)
    .where('id', 'in', [...pieceIds])
    .select('id')
    .orderBy('id')
    .forUpdate()
    .execute()
}

/** Whether another piece in use has the number, in whatever letters. */
export async function isNumberTaken(
  db: Kysely<Database>,
  siteId: number,
  number: string,
  butFor = 0,
): Promise<boolean> {
  const row = await db
    .selectFrom('piece')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .where(sql<boolean>`lower(number) = lower(${number})`)
    .where('id', '<>', butFor)
    .select('id')
    .executeTakeFirst()
  return row !== undefined
}

/** The rooms of a request by their inner numbers; `undefined` leaves a room as it is. */
export interface PieceRooms {
  keepRoomId?: number | null
  fittedRoomId?: number | null
}

type Facts = Omit<PieceChange, 'keepRoomId' | 'fittedRoomId'>

const columnsOf = (facts: Facts, rooms: PieceRooms) => ({
  number: facts.number,
  stage: facts.stage,
  wood: facts.wood,
  wood_kind: facts.woodKind,
  grain: facts.grain,
  spigot_on: facts.spigotOn,
  lid_form: facts.lidForm,
  joint_diameter_mm: facts.jointDiameterMm,
  wall_mm: facts.wallMm,
  spigot_mm: facts.spigotMm,
  lid_mm: facts.lidMm,
  body_wall_mm: facts.bodyWallMm,
  lid_wall_mm: facts.lidWallMm,
  blank_diameter_mm: facts.blankDiameterMm,
  ends_sealed: facts.endsSealed,
  roughed_on: facts.roughedOn,
  ready_by_weight: facts.isReadyByWeight,
  fit_grade: facts.fitGrade,
  clearance_mm: facts.clearanceMm,
  allowance_mm: facts.allowanceMm,
  finish: facts.finish,
  keep_room_id: rooms.keepRoomId,
  fitted_room_id: rooms.fittedRoomId,
  fitted_on: facts.fittedOn,
  note: facts.note,
  is_private: facts.isPrivate,
  is_shared: facts.isShared,
})

export async function insertPiece(
  db: Kysely<Database>,
  siteId: number,
  piece: NewPiece,
  rooms: PieceRooms,
  ownerUserId: string,
  now: Date,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(db, siteId, 'piece')
  return db
    .insertInto('piece')
    .values({
      ...columnsOf(piece, rooms),
      number: piece.number,
      stage: piece.stage,
      site_id: siteId,
      id,
      code: newCode(),
      wood: piece.wood,
      joint_diameter_mm: piece.jointDiameterMm,
      wall_mm: piece.wallMm,
      spigot_mm: piece.spigotMm,
      lid_mm: piece.lidMm,
      body_wall_mm: piece.bodyWallMm,
      lid_wall_mm: piece.lidWallMm,
      blank_diameter_mm: piece.blankDiameterMm,
      roughed_on: piece.roughedOn,
      fit_grade: piece.fitGrade,
      clearance_mm: piece.clearanceMm,
      allowance_mm: piece.allowanceMm,
      keep_room_id: rooms.keepRoomId ?? null,
      fitted_room_id: rooms.fittedRoomId ?? null,
      fitted_at: null,
      fit_mc_pct: null,
      owner_user_id: ownerUserId,
      created_at: now,
      archived_at: null,
    })
    .returning(['id', 'code'])
    .executeTakeFirstOrThrow()
}

/** Changes a piece that is still at the version that the writer saw; false when it has moved on. */
export async function updatePiece(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  version: number,
  facts: Facts,
  rooms: PieceRooms & { archivedAt?: Date | null } = {},
): Promise<boolean> {
  const row = await db
    .updateTable('piece')
    .set((eb) => ({
      ...columnsOf(facts, rooms),
      archived_at: rooms.archivedAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', pieceId)
    .where('version', '=', version)
    .returning('id')
    .executeTakeFirst()
  return row !== undefined
}
