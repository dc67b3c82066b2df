import { type Kysely, sql } from 'kysely'
import { type Turned, turnedSchema } from '@/lib/pieces/outcome'
import type { Database } from '../schema'

export interface TrackRow {
  pieceId: number
  carryCode: string
  at: Date
  turned: Turned
  usedSlow: number
  usedMiddle: number
  usedFast: number
  isAgainstAdvice: boolean
}

/** Older ones say little of the figures as they are now, and more would not be looked through. */
const rowsMax = 500

/** Lids that were tried after a carry of which the model had an answer, the newest first. */
export async function listTrackRows(db: Kysely<Database>, siteId: number): Promise<TrackRow[]> {
  const rows = await db
    .selectFrom('outcome')
    .innerJoin('carry', (join) =>
      join.onRef('carry.site_id', '=', 'outcome.site_id').onRef('carry.id', '=', 'outcome.carry_id'),
    )
    .where('outcome.site_id', '=', siteId)
    .where('outcome.undone_at', 'is', null)
    .select([
      'outcome.piece_id',
      'outcome.at',
      'outcome.turned',
      'outcome.used_slow',
      'outcome.used_middle',
      'outcome.used_fast',
      'carry.code',
      'carry.against_advice',
    ])
    .orderBy('outcome.at', 'desc')
    .orderBy('outcome.id', 'desc')
    .limit(rowsMax)
    .execute()
  return rows.flatMap((row) =>
    row.used_slow === null || row.used_middle === null || row.used_fast === null
      ? []
      : {
          pieceId: row.piece_id,
          carryCode: row.code,
          at: row.at,
          turned: turnedSchema.parse(row.turned),
          usedSlow: row.used_slow,
          usedMiddle: row.used_middle,
          usedFast: row.used_fast,
          isAgainstAdvice: row.against_advice,
        },
  )
}

export async function countOutcomes(db: Kysely<Database>, siteId: number): Promise<number> {
  const { n } = await db
    .selectFrom('outcome')
    .where('site_id', '=', siteId)
    .where('undone_at', 'is', null)
    .select(sql<number>`count(*)::int`.as('n'))
    .executeTakeFirstOrThrow()
  return n
}
