import type { Config } from '@/lib/config'
import { portAnswers, reachable } from './ports'
import type { Service, Task } from './supervisor'

/** What every part needs to know; made once by the supervisor. */
export interface PartContext {
  root: string
  config: Config
  /** The environment of the children: what we inherited, with what was generated filled in. */
  env: Record<string, string | undefined>
}

const node = process.execPath
const typescript = (file: string) => ['--import', 'tsx', file]
const next = 'node_modules/next/dist/bin/next'

function part(context: PartContext, name: string, args: readonly string[]) {
  return { name, command: node, args, cwd: context.root, env: context.env }
}

export const buildTask = (context: PartContext): Task => ({
  ...part(context, 'build', [next, 'build']),
  words: 'Building the pages',
})

/** Makes the demo when the database is empty; told to reset, or to show a scenario, it makes the demo anew. */
export const demoTask = (context: PartContext, asked: { reset: boolean; scenario?: string }): Task => ({
  ...part(context, 'demo', [
    ...typescript('workers/demo/main.ts'),
    ...(asked.reset ? ['--reset'] : []),
    ...(asked.scenario === undefined ? [] : ['--scenario', asked.scenario]),
  ]),
  words: asked.reset || asked.scenario !== undefined ? 'Making the demo anew' : 'Looking after the demo',
})

/** A small mail server that keeps what it gets for the demo's inbox page. */
export const mailTrap = (context: PartContext): Service => ({
  ...part(context, 'mail-trap', typescript('workers/mail-trap/main.ts')),
  ready: () => {
    const { hostname, port } = new URL(context.config.smtpUrl ?? 'smtp://127.0.0.1:25')
    return portAnswers(hostname, Number(port))
  },
})

/** A small push service that keeps what it gets for the demo's inbox page. */
export const pushTrap = (context: PartContext): Service => ({
  ...part(context, 'push-trap', typescript('workers/push-trap/main.ts')),
  ready: () => portAnswers('127.0.0.1', context.config.pushTrapPort ?? 0),
})

export const broker = (context: PartContext): Service => ({
  ...part(context, 'broker', typescript('workers/broker/main.ts')),
  ready: () => portAnswers(reachable(context.config.mqttHost), context.config.mqttPort),
})

export const notices = (context: PartContext): Service =>
  part(context, 'notices', typescript('workers/notices/main.ts'))

export const delivery = (context: PartContext): Service =>
  part(context, 'delivery', typescript('workers/delivery/main.ts'))

export const fakeSensors = (context: PartContext): Service =>
  part(context, 'fake-sensors', typescript('fake-sensors/main.ts'))

export const web = (context: PartContext, mode: 'start' | 'dev'): Service => {
  const { listenHost, port } = context.config
  const local = `http://${reachable(listenHost)}:${port}`
  return {
    ...part(context, 'web', [next, mode, '-H', listenHost, '-p', String(port)]),
    env: { ...context.env, NODE_ENV: mode === 'dev' ? 'development' : 'production' },
    ready: () => answersHttp(`${local}/api/health`),
    readyWithinMs: mode === 'dev' ? 180_000 : 60_000,
  }
}

/** Any answer will do: what the health page says about the others is not the web server's own readiness. */
const answersHttp = (url: string): Promise<boolean> =>
  fetch(url, { signal: AbortSignal.timeout(30_000) }).then(
    () => true,
    () => false,
  )
