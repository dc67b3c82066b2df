import type { Kysely } from 'kysely'
import { z } from 'zod'
import { dayOfInstant } from '@/lib/climate/days'
import { eventDataSchema, type EventData, type EventKind, eventKindSchema } from '@/lib/pieces/event'
import { type FitEntry, type FitFacts, fitFactsSchema } from '@/lib/pieces/fit-record'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** An entry as the server knows it. */
export interface PieceEventRecord {
  id: number
  code: string
  kind: EventKind
  at: Date
  room: { code: string; name: string; mark: number } | null
  data: EventData
  note: string
  userId: string | null
  by: string | null
  isUndone: boolean
}

const eventQuery = (db: Kysely<Database>, siteId: number, pieceId: number) =>
  db
    .selectFrom('piece_event as event')
    .leftJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'event.site_id').onRef('room.id', '=', 'event.room_id'),
    )
    .leftJoin('user', 'user.id', 'event.user_id')
    .where('event.site_id', '=', siteId)
    .where('event.piece_id', '=', pieceId)
    .select([
      'event.id',
      'event.code',
      'event.kind',
      'event.at',
      'event.data',
      'event.note',
      'event.user_id',
      'event.undone_at',
      'room.code as room_code',
      'room.name as room_name',
      'room.mark as room_mark',
      'user.name as by',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof eventQuery>['executeTakeFirstOrThrow']>>

const recordOf = (row: Row): PieceEventRecord => ({
  id: row.id,
  code: row.code,
  kind: eventKindSchema.parse(row.kind),
  at: row.at,
  room:
    row.room_code === null || row.room_name === null
      ? null
      : { code: row.room_code, name: row.room_name, mark: row.room_mark ?? 0 },
  data: eventDataSchema.parse(row.data),
  note: row.note,
  userId: row.user_id,
  by: row.by,
  isUndone: row.undone_at !== null,
})

/** More would not be looked through on a page. */
const eventsMax = 200

/** What happened to a piece, newest first, entries that were undone among them. */
export async function listPieceEvents(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<PieceEventRecord[]> {
  const rows = await eventQuery(db, siteId, pieceId)
    .orderBy('event.at', 'desc')
    .orderBy('event.id', 'desc')
    .limit(eventsMax)
    .execute()
  return rows.map(recordOf)
}

export async function findPieceEvent(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  code: string,
): Promise<PieceEventRecord | undefined> {
  const row = await eventQuery(db, siteId, pieceId).where('event.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : recordOf(row)
}

export interface EventToInsert {
  pieceId: number
  kind: EventKind
  at: Date
  roomId: number | null
  data: EventData
  /** For a fit: the record before it. */
  before?: FitFacts
  note: string
  userId: string
}

export async function insertPieceEvent(
  db: Kysely<Database>,
  siteId: number,
  event: EventToInsert,
  now: Date,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(db, siteId, 'event')
  const { before, data } = event
  return db
    .insertInto('piece_event')
    .values({
      site_id: siteId,
      id,
      code: newCode(),
      piece_id: event.pieceId,
      kind: event.kind,
      at: event.at,
      room_id: event.roomId,
      data: JSON.stringify(before === undefined ? data : { ...data, before }),
      note: event.note,
      user_id: event.userId,
      created_at: now,
      undone_at: null,
    })
    .returning(['id', 'code'])
    .executeTakeFirstOrThrow()
}

/** Marks an entry as undone, or, with null, as standing again. */
export async function updateEventUndone(
  db: Kysely<Database>,
  siteId: number,
  eventId: number,
  undoneAt: Date | null,
): Promise<void> {
  await db
    .updateTable('piece_event')
    .set({ undone_at: undoneAt })
    .where('site_id', '=', siteId)
    .where('id', '=', eventId)
    .execute()
}

const withBeforeSchema = z.object({ before: fitFactsSchema })

/** The final fits and re-trues of a piece, in the order in which they were entered. */
export async function listFitEntries(
  db: Kysely<Database>,
  site: { siteId: number; timeZone: string },
  pieceId: number,
): Promise<FitEntry[]> {
  const rows = await db
    .selectFrom('piece_event')
    .where('site_id', '=', site.siteId)
    .where('piece_id', '=', pieceId)
    .where('kind', 'in', ['final-fit', 're-true'])
    .select(['id', 'at', 'room_id', 'data', 'undone_at'])
    .orderBy('id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    at: row.at.toISOString(),
    on: dayOfInstant(row.at, site.timeZone),
    roomId: row.room_id,
    data: eventDataSchema.parse(row.data),
    before: withBeforeSchema.parse(row.data).before,
    isUndone: row.undone_at !== null,
  }))
}

/** Writes what a final fit says of a piece. Call it with the piece's row locked. */
export async function updateFit(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  fit: FitFacts,
): Promise<void> {
  await db
    .updateTable('piece')
    .set((eb) => ({
      stage: fit.stage,
      fitted_at: fit.fittedAt,
      fitted_on: fit.fittedOn,
      fitted_room_id: fit.fittedRoomId,
      fit_mc_pct: fit.fitMcPct,
      fit_lid_mc_pct: fit.fitLidMcPct,
      fit_grade: fit.fitGrade,
      clearance_mm: fit.clearanceMm,
      allowance_mm: fit.allowanceMm,
      joint_diameter_mm: fit.jointDiameterMm,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', pieceId)
    .execute()
}
