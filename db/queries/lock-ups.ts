import type { Kysely } from 'kysely'
import type { Database } from '../schema'

export interface LockUpRecord {
  nothingElse: { at: Date; by: string | null } | null
  closed: { at: Date; by: string | null } | null
}

/** What was answered at a day's lock-up. A day of which nothing was said yet has neither. */
export async function findLockUp(db: Kysely<Database>, siteId: number, dayOn: string): Promise<LockUpRecord> {
  const row = await db
    .selectFrom('lock_up')
    .leftJoin('user as nothing', 'nothing.id', 'lock_up.nothing_else_by')
    .leftJoin('user as closer', 'closer.id', 'lock_up.closed_by')
    .where('lock_up.site_id', '=', siteId)
    .where('lock_up.day_on', '=', dayOn)
    .select([
      'lock_up.nothing_else_at',
      'lock_up.closed_at',
      'nothing.name as nothing_name',
      'closer.name as closer_name',
    ])
    .executeTakeFirst()
  const answered = (at: Date | null | undefined, by: string | null | undefined) =>
    at === null || at === undefined ? null : { at, by: by ?? null }
  return {
    nothingElse: answered(row?.nothing_else_at, row?.nothing_name),
    closed: answered(row?.closed_at, row?.closer_name),
  }
}

export interface LockUpAnswer {
  userId: string
  /** Null takes it back. */
  at: Date | null
}

/** Stores one of the two answers of a day; answered twice, the first stands. */
export async function answerLockUp(
  db: Kysely<Database>,
  siteId: number,
  dayOn: string,
  what: 'nothing-else' | 'closed',
  { userId, at }: LockUpAnswer,
): Promise<void> {
  await db
    .insertInto('lock_up')
    .values({ site_id: siteId, day_on: dayOn })
    .onConflict((clash) => clash.columns(['site_id', 'day_on']).doNothing())
    .execute()
  const by = at === null ? null : userId
  const column = what === 'closed' ? 'closed_at' : 'nothing_else_at'
  await db
    .updateTable('lock_up')
    .set(what === 'closed' ? { closed_at: at, closed_by: by } : { nothing_else_at: at, nothing_else_by: by })
    .where('site_id', '=', siteId)
    .where('day_on', '=', dayOn)
    .$if(at !== null, (query) => query.where(column, 'is', null))
    .execute()
}

/** The evening question of a day that was told last; undefined where none was. */
export async function findEveningNotice(
  db: Kysely<Database>,
  siteId: number,
  since: Date,
): Promise<string | undefined> {
  const row = await db
    .selectFrom('notice')
    .where('site_id', '=', siteId)
    .where('rule', 'in', ['lock-up', 'last-call'])
    .where('at', '>=', since)
    .select('code')
    .orderBy('at', 'desc')
    .orderBy('id', 'desc')
    .limit(1)
    .executeTakeFirst()
  return row?.code
}
