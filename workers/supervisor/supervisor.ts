import { exitWords, spawnChild, type Child } from './child'
import { openPartLog, warningIn, type PartLog } from './part-log'
import { waitUntil } from './wait'

export interface Part {
  name: string
  command: string
  args: readonly string[]
  cwd: string
  env: Record<string, string | undefined>
}

export interface Task extends Part {
  /** What it does, for the progress line: "Building the pages". */
  words: string
}

export interface Service extends Part {
  /** Whether it can be used now. Without one it counts as ready once it has started. */
  ready?: () => Promise<boolean>
  readyWithinMs?: number
  stopSignal?: NodeJS.Signals
  graceMs?: number
}

export interface SupervisorOptions {
  logFolder: string
  /** Tells the person at the terminal. */
  say: (sentence: string) => void
  firstDelayMs?: number
  longestDelayMs?: number
}

export interface Supervisor {
  /** Runs a task to its end; fails with its last lines when it fails. */
  run(task: Task): Promise<void>
  /** Starts a service, waits until it is ready, and starts it again whenever it ends. */
  serve(service: Service): Promise<void>
  /** The process id of a service that runs now. */
  pidOf(name: string): number | undefined
  /** Ends everything in the reverse order of its start. */
  stop(): Promise<void>
}

/** Thrown by `run` and `serve` when `stop` came in between: no failure. */
export class Stopped extends Error {}

interface Running {
  service: Service
  child?: Child
  /** Until it is ready for the first time, or is given up. */
  starting: Promise<void>
  /** The loop that starts it again. */
  done: Promise<void>
}

const progressEveryMs = 10_000
const steadyAfterMs = 60_000
const startTries = 3
const taskGraceMs = 5_000

export function createSupervisor(options: SupervisorOptions): Supervisor {
  const { say, logFolder, firstDelayMs = 500, longestDelayMs = 30_000 } = options
  const stopping = new AbortController()
  const services: Running[] = []
  const tasks = new Set<Child>()

  const refuseWhenStopping = () => {
    if (stopping.signal.aborted) throw new Stopped('stopped')
  }

  async function run(task: Task): Promise<void> {
    refuseWhenStopping()
    const log = openPartLog(logFolder, task.name)
    const began = performance.now()
    const seconds = () => Math.round((performance.now() - began) / 1000)
    const child = await spawnChild({ ...task, onLine: log.write })
    if (stopping.signal.aborted) await child.stop('SIGTERM', taskGraceMs)
    tasks.add(child)
    const progress = setInterval(() => say(`${task.words} … ${seconds()} s`), progressEveryMs)
    const exit = await child.exited
    clearInterval(progress)
    tasks.delete(child)
    refuseWhenStopping()
    if (exit.code !== 0) {
      throw new Error(
        `${task.words} failed (it ended ${exitWords(exit)}). Its last lines, the rest is in ${log.file}:\n${log.tail().join('\n')}`,
      )
    }
    say(`${task.words}: done in ${seconds()} s`)
  }

  async function serve(service: Service): Promise<void> {
    refuseWhenStopping()
    const log = openPartLog(logFolder, service.name)
    const onLine = (line: string) => {
      log.write(line)
      const warning = warningIn(line)
      if (warning !== undefined) say(`${service.name}: ${warning}`)
    }
    const running: Running = { service, starting: Promise.resolve(), done: Promise.resolve() }
    services.push(running)
    running.starting = startFirst(running, onLine, log)
    await running.starting
    running.done = keepAlive(running, onLine)
  }

  async function startFirst(running: Running, onLine: (line: string) => void, log: PartLog): Promise<void> {
    const { service } = running
    for (let attempt = 1; ; attempt += 1) {
      running.child = await spawnChild({ ...service, onLine })
      if (await becomesReady(service, running.child, stopping.signal)) return
      refuseWhenStopping()
      await running.child.stop('SIGKILL', 0)
      if (attempt < startTries) continue
      const rest = `Its last lines, the rest is in ${log.file}:\n${log.tail().join('\n')}`
      throw new Error(`${service.name} did not start. ${rest}`)
    }
  }

  /** Waits for the end of the service again and again, and starts it anew after a growing delay. */
  async function keepAlive(running: Running, onLine: (line: string) => void): Promise<void> {
    const { service } = running
    let delayMs = firstDelayMs
    for (;;) {
      const began = performance.now()
      const exit = await running.child?.exited
      running.child = undefined
      if (stopping.signal.aborted) return
      if (performance.now() - began > steadyAfterMs) delayMs = firstDelayMs
      const how = exit ? `ended ${exitWords(exit)}` : 'could not be started'
      say(`${service.name} ${how}. Starting it again in ${delayMs / 1000} s.`)
      await waitUntil(() => Promise.resolve(false), { deadlineMs: delayMs, signal: stopping.signal })
      if (stopping.signal.aborted) return
      delayMs = Math.min(delayMs * 2, longestDelayMs)
      running.child = await spawnChild({ ...service, onLine }).catch((error: unknown) => {
        onLine(String(error))
        return undefined
      })
    }
  }

  let stopped: Promise<void> | undefined
  async function stopAll(): Promise<void> {
    stopping.abort()
    await Promise.all([...tasks].map((child) => child.stop('SIGTERM', taskGraceMs)))
    for (const running of services.toReversed()) {
      const end = () =>
        running.child?.stop(running.service.stopSignal ?? 'SIGTERM', running.service.graceMs ?? 8_000)
      await end()
      // One that was just being started, for the first time or anew, is there only now.
      await running.starting.catch(() => undefined)
      await running.done
      await end()
    }
  }

  return {
    run,
    serve,
    pidOf: (name) => services.find(({ service }) => service.name === name)?.child?.pid,
    stop: () => (stopped ??= stopAll()),
  }
}

async function becomesReady(service: Service, child: Child, signal: AbortSignal): Promise<boolean> {
  if (!service.ready) return true
  let ended = false
  void child.exited.then(() => (ended = true))
  const { ready } = service
  const answers = await waitUntil(async () => ended || (await ready()), {
    deadlineMs: service.readyWithinMs ?? 60_000,
    signal,
  })
  return answers && !ended
}
