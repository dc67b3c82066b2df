import type { Kysely } from 'kysely'
import type { Database } from '@/db/schema'

/** Says that a part is alive, for the health page, which reaches into no other process. */
export async function beat(
  db: Kysely<Database>,
  part: string,
  now: Date,
  detail: Record<string, unknown> = {},
): Promise<void> {
  const row = { part, at: now, detail: JSON.stringify(detail) }
  await db
    .insertInto('heartbeat')
    .values(row)
    .onConflict((clash) => clash.column('part').doUpdateSet({ at: row.at, detail: row.detail }))
    .execute()
}
