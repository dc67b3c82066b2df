import { spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { chmod, mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { databaseAnswers, prepareCluster } from '@/workers/supervisor/cluster'
import { freePort } from '@/workers/supervisor/ports'
import { waitUntil } from '@/workers/supervisor/wait'

export interface TestCluster {
  /** The address of the database `postgres`, as a superuser. */
  adminUrl: string
  port: number
  /** The server's process id, for tests that end it. */
  pid: number
  stop(): Promise<void>
}

/** A PostgreSQL of its own in a temporary folder, on a free port of this machine. It ends with the process that started it. */
export async function startTestCluster(): Promise<TestCluster> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-test-'))
  await chmod(folder, 0o711)
  const port = await freePort()
  const prepared = await prepareCluster({
    wantedDir: path.join(folder, 'pg'),
    port,
    password: randomBytes(16).toString('hex'),
    // Tests end processes, not the machine, so nothing needs to reach the disk.
    settings: { fsync: 'off', full_page_writes: 'off', max_connections: '200' },
  })
  const server = spawn(prepared.command, prepared.args, { cwd: '/', stdio: ['ignore', 'ignore', 'pipe'] })
  let log = ''
  server.stderr.on('data', (chunk: Buffer) => (log = `${log}${chunk.toString()}`.slice(-4_000)))
  const ended = new Promise<void>((resolve) => server.once('exit', () => resolve()))
  const stop = async () => {
    if (server.exitCode === null && server.signalCode === null) server.kill(prepared.stopSignal)
    await ended
    await rm(folder, { recursive: true, force: true })
    await rm(path.dirname(prepared.dataDir), { recursive: true, force: true })
  }
  const up = await waitUntil(() => databaseAnswers(prepared.adminUrl), { deadlineMs: 30_000 })
  if (!up || server.pid === undefined) {
    await stop()
    throw new Error(`The test's PostgreSQL did not start: ${log}`)
  }
  return { adminUrl: prepared.adminUrl, port, pid: server.pid, stop }
}
