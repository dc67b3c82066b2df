import { realpathSync } from 'node:fs'
import { readdir } from 'node:fs/promises'
import path from 'node:path'
import { pathToFileURL } from 'node:url'
import { runMigrations } from 'graphile-worker'
import { Migrator, type Migration, type MigrationProvider } from 'kysely'
import { Client } from 'pg'
import { createDatabase } from './client'
import { readDatabaseUrl } from './env'

const folder = path.join(import.meta.dirname, 'migrations')

/** Any fixed number: two migrations of one database must ask for the same. */
const lockKey = 5_433_278

const files: MigrationProvider = {
  async getMigrations() {
    const names = (await readdir(folder)).filter((name) => /^\d{8}_\d{4}_\w+\.ts$/.test(name))
    const loaded = await Promise.all(
      names.map(async (name): Promise<[string, Migration]> => {
        const url = pathToFileURL(path.join(folder, name)).href
        return [name.replace(/\.ts$/, ''), (await import(/* @vite-ignore */ url)) as Migration]
      }),
    )
    return Object.fromEntries(loaded)
  },
}

/**
 * Brings the database to the newest migration and returns the names of those that ran.
 * All of them are one transaction: a process that is killed half-way leaves the database as it was.
 * A second process waits for the first and then finds nothing to do.
 */
export async function migrateToLatest(url: string): Promise<string[]> {
  const lock = new Client({ connectionString: url, application_name: 'lidfast migrate' })
  await lock.connect()
  try {
    await lock.query('select pg_advisory_lock($1)', [lockKey])
    // The queue's own tables come first: ours may put a job into it.
    await runMigrations({ connectionString: url, logger: undefined })
    return await runOurs(url)
  } finally {
    // The lock ends with its connection.
    await lock.end()
  }
}

async function runOurs(url: string): Promise<string[]> {
  const db = createDatabase(url, { max: 2, name: 'lidfast migrate' })
  try {
    const { error, results } = await new Migrator({ db, provider: files }).migrateToLatest()
    if (error) throw error
    return (results ?? []).map((result) => result.migrationName)
  } finally {
    await db.destroy()
  }
}

const startedAlone = process.argv[1] !== undefined && realpathSync(process.argv[1]) === import.meta.filename

if (startedAlone) {
  const ran = await migrateToLatest(readDatabaseUrl())
  process.stdout.write(ran.length === 0 ? 'The database is up to date.\n' : `Migrated: ${ran.join(', ')}\n`)
}
