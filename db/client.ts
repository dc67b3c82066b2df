import { Kysely, PostgresDialect } from 'kysely'
import { Pool, types } from 'pg'
import type { Database } from './schema'

export interface ClientOptions {
  /** Most connections at a time. */
  max?: number
  /** Shown in pg_stat_activity, so that a slow query can be traced to its process. */
  name?: string
  /** A statement that takes longer is ended by the database. Unset: no limit. */
  statementTimeoutMs?: number
  /** Told of the loss of an idle connection; the pool makes a new one by itself. */
  onIdleError?: (error: Error) => void
}

const int8Oid = 20
const dateOid = 1082

/** The figures that are stored as int8 stay far below 2^53; a calendar day stays text, as a Date would drag in a time zone. */
function parserOf(oid: number, format?: 'text' | 'binary'): (text: string) => unknown {
  if (format !== 'binary' && oid === int8Oid) return Number
  if (format !== 'binary' && oid === dateOid) return String
  return types.getTypeParser(oid, format)
}

export function createPool(url: string, options: ClientOptions = {}): Pool {
  const pool = new Pool({
    connectionString: url,
    max: options.max ?? 10,
    application_name: options.name ?? 'lidfast',
    statement_timeout: options.statementTimeoutMs,
    connectionTimeoutMillis: 10_000,
    types: { getTypeParser: parserOf },
  })
  // Without a listener, a database restart would end the process through an idle connection.
  pool.on('error', (error) => options.onIdleError?.(error))
  // The pool listens to idle connections only. One that is lost between two statements of a transaction would end the
  // process too; its next statement fails and says so.
  pool.on('connect', (client) => client.on('error', () => undefined))
  return pool
}

export const createDatabase = (url: string, options: ClientOptions = {}): Kysely<Database> =>
  databaseOn(createPool(url, options))

export const databaseOn = (pool: Pool): Kysely<Database> =>
  new Kysely<Database>({ dialect: new PostgresDialect({ pool }) })
