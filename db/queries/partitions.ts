import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'
import { inTransaction } from './transaction'

/** A month of readings, like `2026-03`, in UTC. */
export type Month = string

const monthPattern = /^(\d{4})-(0[1-9]|1[0-2])$/
/** Nothing older is taken (a clock that was never set), so no such month is ever made. */
const oldestMonth: Month = '2020-01'
const newestMonth: Month = '2199-12'

/** Any fixed number: two processes that make months must ask for the same. */
const lockKey = 5_433_279

export const monthOf = (at: Date): Month => at.toISOString().slice(0, 7)

/** The month of `now` and the two after it: made before they are needed. */
export function monthsAhead(now: Date): Month[] {
  return [0, 1, 2].map((n) => monthOf(new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth() + n, 1))))
}

/**
 * Makes the months of readings that are missing and returns those that were made.
 * A month is made as a table of its own and then attached, which holds up neither readers nor writers of the others.
 * @throws RangeError for a month that no reading can have
 */
export async function ensurePartitions(db: Kysely<Database>, months: Iterable<Month>): Promise<Month[]> {
  const wanted = [...new Set(months)].sort()
  for (const month of wanted)
    if (!monthPattern.test(month) || month < oldestMonth || month > newestMonth)
      throw new RangeError(`no readings can be of the month ${month}`)
  const missing = await listMissing(db, wanted)
  if (missing.length === 0) return []
  return inTransaction(db, async (trx) => {
    await sql`select pg_advisory_xact_lock(${lockKey})`.execute(trx)
    // Another process may have made them while this one waited for the lock.
    const stillMissing = await listMissing(trx, missing)
    for (const month of stillMissing) await createMonth(trx, month)
    return stillMissing
  })
}

const tableOf = (month: Month): string => `reading_${month.replace('-', '_')}`

async function listMissing(db: Kysely<Database>, months: readonly Month[]): Promise<Month[]> {
  const { rows } = await sql<{ name: string }>`
    select child.relname as name
    from pg_inherits
    join pg_class as child on child.oid = inhrelid
    where inhparent = 'reading'::regclass`.execute(db)
  const there = new Set(rows.map((row) => row.name))
  return months.filter((month) => !there.has(tableOf(month)))
}

async function createMonth(db: Kysely<Database>, month: Month): Promise<void> {
  const [, year, number] = monthPattern.exec(month) ?? []
  const next = monthOf(new Date(Date.UTC(Number(year), Number(number), 1)))
  const table = tableOf(month)
  await sql.raw(`create table ${table} (like reading including defaults including constraints)`).execute(db)
  await sql
    .raw(
      `alter table reading attach partition ${table}
       for values from ('${month}-01T00:00:00Z') to ('${next}-01T00:00:00Z')`,
    )
    .execute(db)
}
