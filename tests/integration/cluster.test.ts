import { chmod, mkdir, mkdtemp, rm, stat } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { Client } from 'pg'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { eventually } from '@/tests/support/eventually'
import { createMissingDatabase, databaseAnswers, prepareCluster } from '@/workers/supervisor/cluster'
import { freePort } from '@/workers/supervisor/ports'
import { createSupervisor, type Supervisor } from '@/workers/supervisor/supervisor'

const isRoot = process.getuid?.() === 0
const password = 'a-password-of-this-test'
let folder: string
let supervisor: Supervisor
const elsewhere: string[] = []

beforeEach(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-cluster-'))
  await chmod(folder, 0o711)
  supervisor = createSupervisor({
    logFolder: path.join(folder, 'logs'),
    say: () => undefined,
    firstDelayMs: 50,
  })
})
afterEach(async () => {
  await supervisor.stop()
  await rm(folder, { recursive: true, force: true })
  for (const each of elsewhere.splice(0)) await rm(each, { recursive: true, force: true })
})

async function serve(wantedDir: string) {
  const port = await freePort()
  const prepared = await prepareCluster({ wantedDir, port, password, settings: { fsync: 'off' } })
  await supervisor.serve({
    name: 'postgres',
    command: prepared.command,
    args: prepared.args,
    cwd: '/',
    env: { LC_ALL: 'C.UTF-8' },
    ready: () => databaseAnswers(prepared.adminUrl),
    stopSignal: prepared.stopSignal,
  })
  return prepared
}

async function ask(url: string, sql: string): Promise<unknown> {
  const client = new Client({ connectionString: url })
  await client.connect()
  try {
    const { rows } = await client.query<{ answer: unknown }>(sql)
    return rows[0]?.answer
  } finally {
    await client.end()
  }
}

describe('the private PostgreSQL', () => {
  it('speaks UTF-8 and UTC, on this machine alone, with a password', async () => {
    const { adminUrl } = await serve(path.join(folder, 'pg'))
    expect(await ask(adminUrl, `select current_setting('server_encoding') as answer`)).toBe('UTF8')
    expect(await ask(adminUrl, `select current_setting('TimeZone') as answer`)).toBe('UTC')
    expect(await ask(adminUrl, `select current_setting('listen_addresses') as answer`)).toBe('127.0.0.1')
    const wrong = new URL(adminUrl)
    wrong.password = 'a-guess'
    expect(await databaseAnswers(wrong.href)).toBe(false)
  })

  it('runs as an ordinary user, whoever starts it', async () => {
    const { dataDir } = await serve(path.join(folder, 'pg'))
    const pid = supervisor.pidOf('postgres') ?? 0
    const { uid } = await stat(`/proc/${pid}`)
    expect(uid).not.toBe(0)
    expect((await stat(dataDir)).uid).toBe(uid)
  })

  it('keeps what was committed when it is killed, and is started again', async () => {
    const { adminUrl } = await serve(path.join(folder, 'pg'))
    await createMissingDatabase(adminUrl, 'kept')
    const first = supervisor.pidOf('postgres') ?? 0
    process.kill(first, 'SIGKILL')
    await eventually(
      'a new server',
      () => supervisor.pidOf('postgres') !== first && databaseAnswers(adminUrl),
      30_000,
    )
    expect(
      await ask(adminUrl, `select count(*)::int as answer from pg_database where datname = 'kept'`),
    ).toBe(1)
  })

  it('puts the data where its user can go when the checkout is in a private folder', async () => {
    const home = path.join(folder, 'home')
    await mkdir(path.join(home, '.lidfast'), { recursive: true })
    await chmod(home, 0o700)
    const wantedDir = path.join(home, '.lidfast', 'pg')
    const { dataDir } = await serve(wantedDir)
    // The folder is private to the user who starts it: only root's server runs as somebody else.
    const isElsewhere = dataDir.startsWith('/var/tmp/lidfast-')
    if (isElsewhere) elsewhere.push(path.dirname(dataDir))
    expect(isElsewhere).toBe(isRoot)
    expect(isElsewhere || dataDir === wantedDir).toBe(true)
  })

  it('begins anew after a start that was cut off while it made the data folder', async () => {
    const wantedDir = path.join(folder, 'pg')
    await mkdir(path.join(`${wantedDir}.new`, 'base'), { recursive: true })
    const { adminUrl } = await serve(wantedDir)
    expect(await databaseAnswers(adminUrl)).toBe(true)
  })
})
