import type { Kysely } from 'kysely'
import { type Turned, turnedSchema } from '@/lib/pieces/outcome'
import type { MovementClass } from '@/lib/wood/species'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** How a lid turned, as the server knows it. */
export interface OutcomeRecord {
  id: number
  code: string
  at: Date
  turned: Turned
  carryCode: string | null
  note: string
  by: string | null
  isUndone: boolean
}

const outcomeQuery = (db: Kysely<Database>, siteId: number, pieceId: number) =>
  db
    .selectFrom('outcome')
    .leftJoin('carry', (join) =>
      join.onRef('carry.site_id', '=', 'outcome.site_id').onRef('carry.id', '=', 'outcome.carry_id'),
    )
    .leftJoin('user', 'user.id', 'outcome.user_id')
    .where('outcome.site_id', '=', siteId)
    .where('outcome.piece_id', '=', pieceId)
    .select([
      'outcome.id',
      'outcome.code',
      'outcome.at',
      'outcome.turned',
      'outcome.note',
      'outcome.undone_at',
      'carry.code as carry_code',
      'user.name as by',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof outcomeQuery>['executeTakeFirstOrThrow']>>

const recordOf = (row: Row): OutcomeRecord => ({
  id: row.id,
  code: row.code,
  at: row.at,
  turned: turnedSchema.parse(row.turned),
  carryCode: row.carry_code,
  note: row.note,
  by: row.by,
  isUndone: row.undone_at !== null,
})

/** More would not be looked through on a page. */
const outcomesMax = 200

/** How a piece's lid turned, newest first, those that were undone among them. */
export async function listOutcomes(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<OutcomeRecord[]> {
  const rows = await outcomeQuery(db, siteId, pieceId)
    .orderBy('outcome.at', 'desc')
    .orderBy('outcome.id', 'desc')
    .limit(outcomesMax)
    .execute()
  return rows.map(recordOf)
}

export async function findOutcome(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  code: string,
): Promise<OutcomeRecord | undefined> {
  const row = await outcomeQuery(db, siteId, pieceId).where('outcome.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : recordOf(row)
}

/** Whether it has been told how a piece's lid turned after a carry. */
export async function isOutcomeTold(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  carryId: number,
): Promise<boolean> {
  const row = await db
    .selectFrom('outcome')
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('carry_id', '=', carryId)
    .where('undone_at', 'is', null)
    .select('id')
    .executeTakeFirst()
  return row !== undefined
}

export interface OutcomeToInsert {
  pieceId: number
  carryId: number | null
  turned: Turned
  movementClass: MovementClass
  /** Allowance used as the model had it; null where it had no answer. */
  used: { slow: number | null; middle: number | null; fast: number | null }
  note: string
  userId: string | null
}

export async function insertOutcome(
  db: Kysely<Database>,
  siteId: number,
  outcome: OutcomeToInsert,
  now: Date,
): Promise<string> {
  const id = await takeIds(db, siteId, 'outcome')
  const code = newCode()
  await db
    .insertInto('outcome')
    .values({
      site_id: siteId,
      id,
      code,
      piece_id: outcome.pieceId,
      carry_id: outcome.carryId,
      at: now,
      turned: outcome.turned,
      movement_class: outcome.movementClass,
      used_slow: outcome.used.slow,
      used_middle: outcome.used.middle,
      used_fast: outcome.used.fast,
      note: outcome.note,
      user_id: outcome.userId,
      created_at: now,
      undone_at: null,
    })
    .execute()
  return code
}

/** Marks an outcome as entered by mistake, or, with null, as standing again. */
export async function updateOutcomeUndone(
  db: Kysely<Database>,
  siteId: number,
  outcomeId: number,
  undoneAt: Date | null,
): Promise<void> {
  await db
    .updateTable('outcome')
    .set({ undone_at: undoneAt })
    .where('site_id', '=', siteId)
    .where('id', '=', outcomeId)
    .execute()
}
