import type { Kysely } from 'kysely'
import type { Database } from '../schema'

/** Counts one more try under a key in a window of time, and returns how many there are now. Two at once never get the same number. */
export async function countTry(db: Kysely<Database>, key: string, windowAt: Date): Promise<number> {
  const row = await db
    .insertInto('rate_count')
    .values({ key, window_at: windowAt, n: 1 })
    .onConflict((clash) =>
      clash.columns(['key', 'window_at']).doUpdateSet((eb) => ({ n: eb('rate_count.n', '+', 1) })),
    )
    .returning('n')
    .executeTakeFirstOrThrow()
  return row.n
}

/** For the upkeep: no window is longer than an hour. */
export async function deleteOldCounts(db: Kysely<Database>, now: Date): Promise<void> {
  await db
    .deleteFrom('rate_count')
    .where('window_at', '<', new Date(now.getTime() - 2 * 3_600_000))
    .execute()
}
