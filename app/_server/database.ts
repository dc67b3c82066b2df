import 'server-only'
import type { Kysely } from 'kysely'
import type { Pool } from 'pg'
import { createPool, databaseOn } from '@/db/client'
import type { Database } from '@/db/schema'
import { serverConfig } from './env'
import { log } from './log'

interface Handles {
  pool: Pool
  db: Kysely<Database>
}

// On globalThis, as the development server loads this module anew after each change.
const kept = globalThis as typeof globalThis & { lidfastDatabase?: Handles }

/** The one pool of the web process. */
export function database(): Kysely<Database> {
  if (kept.lidfastDatabase === undefined) {
    const pool = createPool(serverConfig().databaseUrl, {
      name: 'lidfast web',
      max: 12,
      statementTimeoutMs: 15_000,
      onIdleError: (error) => log().warn({ err: error }, 'an idle database connection was lost'),
    })
    kept.lidfastDatabase = { pool, db: databaseOn(pool) }
  }
  return kept.lidfastDatabase.db
}

// Class 08 and the shutdown codes of "PostgreSQL Documentation, Appendix A"; 53300 is "too many connections",
// 57014 a statement that took too long. The others are those of node:net.
const awayCodes = new Set([
  ...['ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', 'EHOSTUNREACH'],
  ...['08000', '08001', '08003', '08004', '08006', '53300', '57014', '57P01', '57P02', '57P03'],
])
const awayMessages =
  /connection terminated|timeout exceeded when trying to connect|connection timeout|not queryable/i

/** Whether an error says that the database can't be reached just now, as opposed to a fault in a query. */
export function isDatabaseAway(error: unknown): boolean {
  if (error instanceof AggregateError) return error.errors.some(isDatabaseAway)
  if (!(error instanceof Error)) return false
  if ('code' in error && typeof error.code === 'string' && awayCodes.has(error.code)) return true
  return awayMessages.test(error.message) || isDatabaseAway(error.cause)
}
