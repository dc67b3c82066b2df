import { type ChildProcess, spawn } from 'node:child_process'
import { portAnswers } from '@/workers/supervisor/ports'
import { type Bundle, bundle } from './bundle'
import { cleanEnvironment } from './env'
import { eventually } from './eventually'
import { root } from './stack'

export interface BrokerChild {
  process: ChildProcess
  /** What it has said so far. */
  output: () => string
  exited: Promise<{ code: number | null; signal: NodeJS.Signals | null }>
}

function start(args: readonly string[], env: Record<string, string> = {}): BrokerChild {
  // The command becomes Node itself; the kernel ends it with this process, whatever way this one ends.
  const command = ['--pdeathsig', 'KILL', '--', process.execPath, ...args]
  const child = spawn('setpriv', command, {
    cwd: root,
    env: { NODE_ENV: 'production', ...cleanEnvironment(), ...env },
  })
  let output = ''
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (chunk: Buffer) => (output += chunk.toString()))
  child.stdin.on('error', () => undefined)
  const exited = new Promise<{ code: number | null; signal: NodeJS.Signals | null }>((resolve) =>
    child.once('exit', (code, signal) => resolve({ code, signal })),
  )
  return { process: child, output: () => output, exited }
}

/** The broker of `broker-process.ts` in one file, ready to be started often. */
export const bundleBroker = (): Promise<Bundle> => bundle('tests/support/broker-process.ts')

/** A broker that has loaded and waits to be told. */
export async function prepareBroker(
  { file }: Bundle,
  url: string,
  port: number,
  dieAtCommit = 0,
): Promise<BrokerChild> {
  const child = start([file, url, String(port), String(dieAtCommit)])
  await eventually('the broker to load', () => child.output().includes('loaded'), 60_000)
  return child
}

export async function serve(child: BrokerChild): Promise<void> {
  child.process.stdin?.write('go\n')
  await eventually(
    `the broker to serve; it said: ${child.output()}`,
    () =>
      child.output().includes('serving') ||
      child.process.exitCode !== null ||
      child.process.signalCode !== null,
    30_000,
  )
}

/** The broker as the supervisor starts it. */
export async function startBrokerMain(url: string, port: number): Promise<BrokerChild> {
  const child = start(['--import', 'tsx', 'workers/broker/main.ts'], {
    DATABASE_URL: url,
    MQTT_PORT: String(port),
    AUTH_SECRET: 'a secret of the tests, long enough for anyone',
  })
  await eventually('the broker to answer', () => portAnswers('127.0.0.1', port), 60_000)
  return child
}

export async function endBroker(child: BrokerChild, signal: NodeJS.Signals = 'SIGKILL'): Promise<void> {
  if (child.process.exitCode === null && child.process.signalCode === null) child.process.kill(signal)
  await child.exited
}
