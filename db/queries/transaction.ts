import { type Kysely, sql, type Transaction } from 'kysely'
import type { Database } from '../schema'

/** Runs `work` in the transaction that is open already, or else in one of its own. */
export function inTransaction<T>(
  db: Kysely<Database>,
  work: (trx: Transaction<Database>) => Promise<T>,
): Promise<T> {
  return db.isTransaction ? work(db as Transaction<Database>) : db.transaction().execute(work)
}

/** For the rest of the transaction: years of readings take longer than a page may usually wait. */
export async function allowLongStatements(trx: Transaction<Database>): Promise<void> {
  await sql`set local statement_timeout = '5min'`.execute(trx)
}
