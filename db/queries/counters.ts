import { randomBytes } from 'node:crypto'
import type { Kysely } from 'kysely'
import { codeFromBytes } from '@/lib/sites/code'
import type { Database } from '../schema'

type Kind = Database['site_counter']['kind']

/**
 * Takes the next `count` numbers of a site's own row of numbers and returns the first.
 * Inside a transaction the row stays locked until its end, so numbers come without gaps and never twice.
 */
export async function takeIds(db: Kysely<Database>, siteId: number, kind: Kind, count = 1): Promise<number> {
  const row = await db
    .insertInto('site_counter')
    .values({ site_id: siteId, kind, last_id: count })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'kind'])
        .doUpdateSet((eb) => ({ last_id: eb('site_counter.last_id', '+', count) })),
    )
    .returning('last_id')
    .executeTakeFirstOrThrow()
  return row.last_id - count + 1
}

/** A new public id. 30^10 of them make a clash a matter of theory; the unique keys refuse it all the same. */
export const newCode = (): string => codeFromBytes(randomBytes(40))
