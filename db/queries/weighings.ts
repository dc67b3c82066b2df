import type { Kysely, Selectable } from 'kysely'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** What a piece weighed at a moment. */
export interface WeighingRecord {
  id: number
  code: string
  at: Date
  grams: number
  /** Step of the scale, g; null where neither the weighing nor the site told it. */
  stepG: number | null
  note: string
  by: string | null
  isUndone: boolean
}

type Row = Pick<
  Selectable<Database['weighing']>,
  'id' | 'code' | 'at' | 'grams' | 'step_g' | 'note' | 'undone_at'
> & { by: string | null }

const weighingOf = (row: Row): WeighingRecord => ({
  id: row.id,
  code: row.code,
  at: row.at,
  grams: row.grams,
  stepG: row.step_g,
  note: row.note,
  by: row.by,
  isUndone: row.undone_at !== null,
})

const weighingQuery = (db: Kysely<Database>, siteId: number, pieceId: number) =>
  db
    .selectFrom('weighing')
    .leftJoin('user', 'user.id', 'weighing.user_id')
    .where('weighing.site_id', '=', siteId)
    .where('weighing.piece_id', '=', pieceId)
    .select([
      'weighing.id',
      'weighing.code',
      'weighing.at',
      'weighing.grams',
      'weighing.step_g',
      'weighing.note',
      'weighing.undone_at',
      'user.name as by',
    ])

/** The newest first, undone ones among them; one more than the limit, so that a next page shows. */
export async function listWeighings(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  page: { limit: number; after?: { at: Date; id: number } | undefined },
): Promise<WeighingRecord[]> {
  const { limit, after } = page
  const rows = await weighingQuery(db, siteId, pieceId)
    .$if(after !== undefined, (query) =>
      query.where((eb) =>
        eb.or([
          eb('weighing.at', '<', after?.at ?? new Date(0)),
          eb.and([eb('weighing.at', '=', after?.at ?? new Date(0)), eb('weighing.id', '<', after?.id ?? 0)]),
        ]),
      ),
    )
    .orderBy('weighing.at', 'desc')
    .orderBy('weighing.id', 'desc')
    .limit(limit + 1)
    .execute()
  return rows.map(weighingOf)
}

/** More than a weight a day for years; beyond them the oldest no longer say anything of where the curve leads. */
const countedMax = 2000

/** The weights that count, in order of time. */
export async function listCountedWeights(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
): Promise<{ at: number; grams: number; stepG: number | null }[]> {
  const rows = await db
    .selectFrom('weighing')
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('undone_at', 'is', null)
    .select(['at', 'grams', 'step_g'])
    .orderBy('at', 'desc')
    .limit(countedMax)
    .execute()
  return rows.map((row) => ({ at: row.at.getTime(), grams: row.grams, stepG: row.step_g })).toReversed()
}

export async function findWeighing(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  code: string,
): Promise<WeighingRecord | undefined> {
  const row = await weighingQuery(db, siteId, pieceId).where('weighing.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : weighingOf(row)
}

/** The weighing that counts at that very moment, if there is one. */
export async function findWeighingAt(
  db: Kysely<Database>,
  siteId: number,
  pieceId: number,
  at: Date,
): Promise<WeighingRecord | undefined> {
  const row = await weighingQuery(db, siteId, pieceId)
    .where('weighing.at', '=', at)
    .where('weighing.undone_at', 'is', null)
    .executeTakeFirst()
  return row === undefined ? undefined : weighingOf(row)
}

export interface WeighingValues {
  pieceId: number
  at: Date
  grams: number
  stepG: number | null
  note: string
  userId: string | null
}

/** Stores a weighing. Call it with the piece locked, after a look whether there is one at that moment. */
export async function insertWeighing(
  db: Kysely<Database>,
  siteId: number,
  { pieceId, at, grams, stepG, note, userId }: WeighingValues,
  now: Date,
): Promise<string> {
  const id = await takeIds(db, siteId, 'weighing')
  const code = newCode()
  await db
    .insertInto('weighing')
    .values({
      site_id: siteId,
      id,
      code,
      piece_id: pieceId,
      at,
      grams,
      step_g: stepG,
      note,
      user_id: userId,
      created_at: now,
      undone_at: null,
    })
    .execute()
  return code
}

/** Nothing is erased: a weighing that was a mistake is marked, and can be brought back. */
export async function updateWeighingUndone(
  db: Kysely<Database>,
  siteId: number,
  weighingId: number,
  undoneAt: Date | null,
): Promise<void> {
  await db
    .updateTable('weighing')
    .set({ undone_at: undoneAt })
    .where('site_id', '=', siteId)
    .where('id', '=', weighingId)
    .execute()
}
