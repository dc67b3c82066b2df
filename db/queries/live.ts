import { type Kysely, sql } from 'kysely'
import { liveChannel, type LiveKind, type LiveMessage } from '@/lib/sites/live'
import type { Database } from '../schema'

/**
 * Tells open pages that something of a site changed. Inside a transaction it goes out at the commit, and never when the
 * transaction is undone. It is a hint: who misses it finds the change at the next poll.
 */
export async function notifySite(
  db: Kysely<Database>,
  siteId: number,
  kind: LiveKind,
  code: string | null = null,
): Promise<void> {
  const message: LiveMessage = { site: siteId, kind, id: code }
  await sql`select pg_notify(${liveChannel}, ${JSON.stringify(message)})`.execute(db)
}
