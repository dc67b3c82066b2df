import { mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { parseConfig } from '@/lib/config'
import { needsBuild } from '@/workers/supervisor/build'
import { freePort } from '@/workers/supervisor/ports'
import { createStack, type Stack } from '@/workers/supervisor/stack'
import { cleanEnvironment } from './env'
import { isAlive } from './processes'
import { readRunningStack } from './running'

export const root = path.resolve(import.meta.dirname, '../..')

export interface TestStackOptions {
  say?: (sentence: string) => void
  /** More of the configuration, such as LIDFAST_DEMO. */
  settings?: Record<string, string>
}

export interface TestStack {
  /** Describes the running installation, as `runningStackSchema` of `running.ts` reads it. */
  runFile: string
  stack: Stack
  /** Takes everything down and removes its folder. */
  stop(): Promise<void>
}

/** A whole installation of its own, with the demo: temporary folder, free ports of this machine, nothing shared but the built pages. */
export async function startStack(options: TestStackOptions = {}): Promise<TestStack> {
  await refuseToBuildUnderRunning()
  const folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-stack-'))
  const config = parseConfig({
    PORT: String(await freePort()),
    MQTT_PORT: String(await freePort()),
    DATA_DIR: folder,
    // One account signs in many times within seconds here.
    AUTH_RATE_LIMIT: '1000',
    ...options.settings,
  })
  if (!config.ok) throw new Error(config.error.sentence)
  const stack = await createStack({
    root,
    config: config.value,
    inherited: cleanEnvironment(),
    mode: 'start',
    clusterSettings: { fsync: 'off', full_page_writes: 'off' },
    say: options.say ?? (() => undefined),
  })
  const stop = async () => {
    await stack.stop()
    await stack.removeData()
    await rm(folder, { recursive: true, force: true })
  }
  try {
    await stack.start()
  } catch (error) {
    await stop()
    throw error
  }
  return { runFile: path.join(folder, 'run.json'), stack, stop }
}

/** New pages under a server that runs would break it: it looks for files that are gone. */
async function refuseToBuildUnderRunning(): Promise<void> {
  const running = await readRunningStack(path.join(root, '.lidfast/run.json')).catch(() => undefined)
  if (running?.mode !== 'start' || !isAlive(running.pid) || !(await needsBuild(root))) return
  throw new Error(
    `Lidfast runs from this folder, at ${running.webUrl}, and its sources have changed since. ` +
      'Stop it first: the tests have to build the pages anew.',
  )
}
