import type { Kysely } from 'kysely'
import type { CarryState } from '@/lib/carry/carry'
import type { Cover } from '@/lib/pieces/piece'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

export interface CarryToInsert {
  toRoomId: number
  cover: Cover
  plannedAt: Date
  stayMinutes: number
  note: string
  /** Null for what was planned by somebody who has left. */
  userId: string | null
  takesWhatever?: boolean
  /** The plan that comes again which it is one of, and the day that it stands for. */
  repeat?: { id: number; on: string }
  pieces: readonly { pieceId: number; fromRoomId: number | null }[]
}

/** A planned carry with its pieces. Starting it is a step of its own. */
export async function insertCarry(
  db: Kysely<Database>,
  siteId: number,
  carry: CarryToInsert,
  now: Date,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(db, siteId, 'carry')
  const row = await db
    .insertInto('carry')
    .values({
      site_id: siteId,
      id,
      code: newCode(),
      state: 'planned',
      to_room_id: carry.toRoomId,
      cover: carry.cover,
      planned_at: carry.plannedAt,
      stay_minutes: carry.stayMinutes,
      started_at: null,
      ended_at: null,
      note: carry.note,
      created_by: carry.userId,
      created_at: now,
      takes_whatever: carry.takesWhatever ?? false,
      repeat_id: carry.repeat?.id ?? null,
      repeat_on: carry.repeat?.on ?? null,
    })
    .returning(['id', 'code'])
    .executeTakeFirstOrThrow()
  await insertCarryPieces(db, siteId, id, carry.cover, carry.pieces)
  return row
}

async function insertCarryPieces(
  db: Kysely<Database>,
  siteId: number,
  carryId: number,
  cover: Cover,
  pieces: CarryToInsert['pieces'],
): Promise<void> {
  // A plan for whatever is taken names nothing.
  if (pieces.length === 0) return
  await db
    .insertInto('carry_piece')
    .values(
      pieces.map((piece) => ({
        site_id: siteId,
        carry_id: carryId,
        piece_id: piece.pieceId,
        from_room_id: piece.fromRoomId,
        cover,
        out_at: null,
        back_at: null,
        back_room_id: null,
      })),
    )
    .execute()
}

/** For a carry that has not started: these pieces and no others. */
export async function replaceCarryPieces(
  db: Kysely<Database>,
  siteId: number,
  carryId: number,
  cover: Cover,
  pieces: CarryToInsert['pieces'],
): Promise<void> {
  await db
    .deleteFrom('carry_piece')
    .where('site_id', '=', siteId)
    .where('carry_id', '=', carryId)
    .where('out_at', 'is', null)
    .execute()
  await insertCarryPieces(db, siteId, carryId, cover, pieces)
}

export interface CarryColumns {
  state?: CarryState
  cover?: Cover
  plannedAt?: Date
  stayMinutes?: number
  note?: string
  startedAt?: Date
  endedAt?: Date | null
  againstAdvice?: boolean
  takesWhatever?: boolean
  putOffFrom?: Date | null
  putOffAt?: Date | null
}

/** Call it with the carry's row locked. */
export async function updateCarry(
  db: Kysely<Database>,
  siteId: number,
  carryId: number,
  change: CarryColumns,
): Promise<void> {
  await db
    .updateTable('carry')
    .set((eb) => ({
      state: change.state,
      cover: change.cover,
      planned_at: change.plannedAt,
      stay_minutes: change.stayMinutes,
      note: change.note,
      started_at: change.startedAt,
      ended_at: change.endedAt,
      against_advice: change.againstAdvice,
      takes_whatever: change.takesWhatever,
      put_off_from: change.putOffFrom,
      put_off_at: change.putOffAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', carryId)
    .execute()
}

export interface CarryPieceColumns {
  cover?: Cover
  fromRoomId?: number | null
  outAt?: Date
  backAt?: Date | null
  backRoomId?: number | null
  askSkippedAt?: Date | null
}

/** Call it with the carry's row locked. */
export async function updateCarryPiece(
  db: Kysely<Database>,
  siteId: number,
  carryId: number,
  pieceId: number,
  change: CarryPieceColumns,
): Promise<void> {
  await db
    .updateTable('carry_piece')
    .set({
      cover: change.cover,
      from_room_id: change.fromRoomId,
      out_at: change.outAt,
      back_at: change.backAt,
      back_room_id: change.backRoomId,
      ask_skipped_at: change.askSkippedAt,
    })
    .where('site_id', '=', siteId)
    .where('carry_id', '=', carryId)
    .where('piece_id', '=', pieceId)
    .execute()
}
