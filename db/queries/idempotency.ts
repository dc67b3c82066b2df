import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'

export interface KeptAnswer {
  requestHash: string
  /** `null` while the first request is still at work. */
  status: number | null
  sealedBody: string | null
  headers: Record<string, string>
}

/**
 * Claims a key for one request. Call it in the transaction that does the work: a second request with the same key
 * then waits here until the first has committed, and finds its answer, or has rolled back, and does the work itself.
 * @returns `undefined` when the key is ours, else what is kept under it
 */
export async function claimKey(
  db: Kysely<Database>,
  key: { userId: string; key: string; requestHash: string },
  now: Date,
): Promise<KeptAnswer | undefined> {
  await sql`set local lock_timeout = '10s'`.execute(db)
  await db
    .deleteFrom('idempotency')
    .where('user_id', '=', key.userId)
    .where('key', '=', key.key)
    .where('created_at', '<', dayBefore(now))
    .execute()
  const claimed = await db
    .insertInto('idempotency')
    .values({ user_id: key.userId, key: key.key, request_hash: key.requestHash, created_at: now })
    .onConflict((clash) => clash.columns(['user_id', 'key']).doNothing())
    .returning('key')
    .executeTakeFirst()
  if (claimed !== undefined) return undefined
  const kept = await db
    .selectFrom('idempotency')
    .where('user_id', '=', key.userId)
    .where('key', '=', key.key)
    .select(['request_hash', 'status', 'body', 'headers'])
    .executeTakeFirstOrThrow()
  return {
    requestHash: kept.request_hash,
    status: kept.status,
    sealedBody: typeof kept.body === 'string' ? kept.body : null,
    headers: kept.headers ?? {},
  }
}

export async function keepAnswer(
  db: Kysely<Database>,
  key: { userId: string; key: string },
  answer: { status: number; sealedBody: string | null; headers: Record<string, string> },
): Promise<void> {
  await db
    .updateTable('idempotency')
    .set({
      status: answer.status,
      body: answer.sealedBody === null ? null : JSON.stringify(answer.sealedBody),
      headers: JSON.stringify(answer.headers),
    })
    .where('user_id', '=', key.userId)
    .where('key', '=', key.key)
    .execute()
}

/** For the upkeep: answers are kept for a day. */
export async function deleteOldAnswers(db: Kysely<Database>, now: Date): Promise<void> {
  await db.deleteFrom('idempotency').where('created_at', '<', dayBefore(now)).execute()
}

const dayBefore = (now: Date): Date => new Date(now.getTime() - 24 * 3_600_000)
