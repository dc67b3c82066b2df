import { spawn } from 'node:child_process'
import path from 'node:path'
import { Client } from 'pg'
import { afterEach, describe, expect, inject, it } from 'vitest'
import { migrateToLatest } from '@/db/migrate'
import { createBareDatabase } from '@/tests/support/database'
import { waitUntil } from '@/workers/supervisor/wait'

const root = path.resolve(import.meta.dirname, '../..')
const open: Client[] = []

async function connect(url: string): Promise<Client> {
  const client = new Client({ connectionString: url })
  client.on('error', () => undefined)
  await client.connect()
  open.push(client)
  return client
}

async function count(client: Client, sql: string, values: unknown[] = []): Promise<number> {
  const { rows } = await client.query<{ n: number }>(sql, values)
  return rows[0]?.n ?? Number.NaN
}

/** What the migrations made, without the names of what the server makes by itself. */
const tables = (client: Client) =>
  count(
    client,
    `select count(*)::int as n from pg_tables where schemaname = 'public' and tablename !~ '^kysely_'`,
  )

afterEach(async () => {
  await Promise.all(open.splice(0).map((client) => client.end().catch(() => undefined)))
})

describe('migrations (F17)', () => {
  it('do nothing when they run a second time', async () => {
    const url = await createBareDatabase()
    const first = await migrateToLatest(url)
    expect(first.length).toBeGreaterThan(0)
    expect(await migrateToLatest(url)).toEqual([])
  })

  it('let one of two win that start at once; the other waits and finds nothing to do', async () => {
    const url = await createBareDatabase()
    const both = await Promise.all([migrateToLatest(url), migrateToLatest(url)])
    expect(both.map((ran) => ran.length > 0).sort()).toEqual([false, true])
  })

  it('leave nothing half made when their process is killed on the way, and pass on the next start', async () => {
    const url = await createBareDatabase()
    const client = await connect(url)
    // Another session holds a name that a late migration wants, so that the run stops in its middle.
    await client.query('begin')
    await client.query('create table demo_mail (id int)')
    const child = spawn(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], {
      cwd: root,
      env: { ...baseEnvironment(), DATABASE_URL: url },
      stdio: 'ignore',
    })
    const ended = new Promise<string | null>((resolve) =>
      child.once('exit', (_code, signal) => resolve(signal)),
    )
    const watcher = await connect(inject('databaseAdminUrl'))
    const name = new URL(url).pathname.slice(1)
    const waits = async () =>
      (await count(
        watcher,
        `select count(*)::int as n from pg_stat_activity
         where datname = $1 and wait_event_type = 'Lock' and query ilike '%create table demo_mail%'`,
        [name],
      )) > 0
    expect(await waitUntil(waits, { deadlineMs: 30_000 })).toBe(true)
    child.kill('SIGKILL')
    expect(await ended).toBe('SIGKILL')
    await client.query('rollback')

    // The server notices the dead client only when its statement ends.
    const alone = async () =>
      (await count(watcher, `select count(*)::int as n from pg_stat_activity where datname = $1`, [name])) ===
      1
    expect(await waitUntil(alone, { deadlineMs: 30_000 })).toBe(true)
    expect(await tables(client)).toBe(0)
    expect((await migrateToLatest(url)).length).toBeGreaterThan(0)
    expect(await tables(client)).toBeGreaterThan(10)
  })
})

function baseEnvironment(): NodeJS.ProcessEnv {
  return { NODE_ENV: 'production', PATH: '/usr/bin:/bin' }
}
