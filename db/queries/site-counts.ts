import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'

/** When each sensor in use was last heard, and how far apart it usually speaks. */
export async function listSensorsHeard(
  db: Kysely<Database>,
  siteId: number,
): Promise<{ heardAt: Date | null; usualGapS: number | null; createdAt: Date }[]> {
  const rows = await db
    .selectFrom('sensor')
    .leftJoin('sensor_state as state', (join) =>
      join.onRef('state.site_id', '=', 'sensor.site_id').onRef('state.sensor_id', '=', 'sensor.id'),
    )
    .where('sensor.site_id', '=', siteId)
    .where('sensor.kind', '=', 'device')
    .where('sensor.archived_at', 'is', null)
    .select(['state.heard_at', 'state.usual_gap_s', 'sensor.created_at'])
    .execute()
  return rows.map((row) => ({
    heardAt: row.heard_at,
    usualGapS: row.usual_gap_s,
    createdAt: row.created_at,
  }))
}

export async function countRooms(db: Kysely<Database>, siteId: number, onlyShared: boolean): Promise<number> {
  const row = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .$if(onlyShared, (query) => query.where('is_shared', '=', true))
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return row.n
}

export async function countPieces(
  db: Kysely<Database>,
  siteId: number,
  onlyShared: boolean,
): Promise<number> {
  const row = await db
    .selectFrom('piece')
    .where('site_id', '=', siteId)
    .where('archived_at', 'is', null)
    .$if(onlyShared, (query) => query.where('is_shared', '=', true))
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return row.n
}

/** Notices that a person has not seen, as far as they are still worth a look. */
export async function countNewNotices(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  since: Date,
): Promise<number> {
  const row = await db
    .selectFrom('notice')
    .where('notice.site_id', '=', siteId)
    .where('notice.at', '>=', since)
    .where('notice.acknowledged_at', 'is', null)
    .where('notice.rule', '<>', 'test')
    .where((eb) =>
      eb.not(
        eb.exists(
          eb
            .selectFrom('notice_seen')
            .whereRef('notice_seen.site_id', '=', 'notice.site_id')
            .whereRef('notice_seen.notice_id', '=', 'notice.id')
            .where('notice_seen.user_id', '=', userId)
            .select(sql`1`.as('one')),
        ),
      ),
    )
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return row.n
}
