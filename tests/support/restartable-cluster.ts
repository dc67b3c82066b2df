import { type ChildProcess, spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { chmod, mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { databaseAnswers, prepareCluster } from '@/workers/supervisor/cluster'
import { freePort } from '@/workers/supervisor/ports'
import { eventually } from './eventually'

export interface RestartableCluster {
  adminUrl: string
  /** SIGINT is PostgreSQL's fast shutdown, SIGKILL a crash. */
  end(signal: 'SIGINT' | 'SIGKILL'): Promise<void>
  start(): Promise<void>
  remove(): Promise<void>
}

/** A PostgreSQL that a test may shut down, crash and start again with its data. */
export async function makeRestartableCluster(): Promise<RestartableCluster> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-restart-'))
  await chmod(folder, 0o711)
  // Crash recovery is tried here, so the server writes as it does in earnest.
  const wanted = {
    ...{
      wantedDir: path.join(folder, 'pg'),
      port: await freePort(),
      password: randomBytes(16).toString('hex'),
    },
    settings: { max_connections: '60' },
  }
  let server: ChildProcess | undefined
  let ended = Promise.resolve()
  let adminUrl = ''

  const end = async (signal: 'SIGINT' | 'SIGKILL') => {
    server?.kill(signal)
    await ended
    server = undefined
  }
  const start = async () => {
    const prepared = await prepareCluster(wanted)
    adminUrl = prepared.adminUrl
    const child = spawn(prepared.command, prepared.args, { cwd: '/', stdio: 'ignore' })
    server = child
    ended = new Promise((resolve) => child.once('exit', () => resolve()))
    await eventually('PostgreSQL to answer', () => databaseAnswers(adminUrl), 60_000)
  }
  await start()
  return {
    adminUrl,
    end,
    start,
    async remove() {
      await end('SIGINT')
      await rm(folder, { recursive: true, force: true })
    },
  }
}
