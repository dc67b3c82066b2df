import type { Kysely } from 'kysely'
import type { Database } from '../schema'

/**
 * Uses a link up, in the transaction that does what it stands for.
 * @returns false when it was used before. Two at once: the second waits for the first, and then is false.
 */
export async function takeLink(db: Kysely<Database>, linkId: string, expiresAt: Date): Promise<boolean> {
  const row = await db
    .insertInto('used_link')
    .values({ link_id: linkId, expires_at: expiresAt })
    .onConflict((clash) => clash.doNothing())
    .returning('link_id')
    .executeTakeFirst()
  return row !== undefined
}

export async function isLinkUsed(db: Kysely<Database>, linkId: string): Promise<boolean> {
  const row = await db
    .selectFrom('used_link')
    .where('link_id', '=', linkId)
    .select('link_id')
    .executeTakeFirst()
  return row !== undefined
}

/** A link that has run out is refused for that alone, and need not be remembered. */
export async function deleteExpiredLinks(db: Kysely<Database>, now: Date): Promise<void> {
  await db.deleteFrom('used_link').where('expires_at', '<', now).execute()
}
