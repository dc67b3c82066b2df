import { spawn } from 'node:child_process'
import { createInterface } from 'node:readline'
import type { Readable } from 'node:stream'

export interface ChildSpec {
  command: string
  args: readonly string[]
  cwd: string
  env: Record<string, string | undefined>
  onLine: (line: string) => void
}

export interface Exit {
  code: number | null
  signal: NodeJS.Signals | null
}

export interface Child {
  pid: number
  exited: Promise<Exit>
  /** Asks the process to end and, when the grace is over, ends its whole group. */
  stop(signal: NodeJS.Signals, graceMs: number): Promise<void>
}

/**
 * Starts a process in a group of its own, so that Ctrl-C reaches the supervisor alone, and asks the kernel to end it
 * when the supervisor is killed without a chance to do so.
 */
export async function spawnChild(spec: ChildSpec): Promise<Child> {
  const ends = spec.command === 'setpriv' ? [] : ['setpriv', '--pdeathsig', 'TERM', '--', spec.command]
  const [command = spec.command, ...before] = ends
  const child = spawn(command, [...before, ...spec.args], {
    cwd: spec.cwd,
    env: { NODE_ENV: 'production', ...spec.env },
    stdio: ['ignore', 'pipe', 'pipe'],
    detached: true,
  })
  // Taken at once: a listener that is added after an await would miss a process that ends straight away.
  const exited = new Promise<Exit>((resolve) => {
    child.once('exit', (code, signal) => {
      endGroup(child.pid)
      // Its last lines come with 'close'; something that left the group may hold the pipes open for longer.
      setTimeout(() => resolve({ code, signal }), 1_000).unref()
    })
    child.once('close', (code, signal) => resolve({ code, signal }))
  })
  readLines(child.stdout, spec.onLine)
  readLines(child.stderr, spec.onLine)
  const pid = await new Promise<number>((resolve, reject) => {
    child.once('error', reject)
    child.once('spawn', () => resolve(child.pid ?? 0))
  })
  return {
    pid,
    exited,
    async stop(signal, graceMs) {
      child.kill(signal)
      const overdue = setTimeout(() => endGroup(pid), graceMs)
      await exited
      clearTimeout(overdue)
    },
  }
}

function readLines(stream: Readable, onLine: (line: string) => void): void {
  createInterface({ input: stream, crlfDelay: Infinity }).on('line', onLine)
}

/** What a process left behind in its group (a compiler's service, a web server's helpers) goes with it. */
function endGroup(pid: number | undefined): void {
  if (pid === undefined) return
  try {
    process.kill(-pid, 'SIGKILL')
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ESRCH')) throw error
  }
}

export const exitWords = ({ code, signal }: Exit): string => (signal ? `by ${signal}` : `with code ${code}`)
