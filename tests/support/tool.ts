import { spawnChild, type Child } from '@/workers/supervisor/child'
import { cleanEnvironment } from './env'
import { root } from './stack'

export interface ToolEnd {
  code: number
  output: string
}

const running = new Set<Child>()
/** A tool that hangs must end well before CI's own patience does; a busy machine takes its time. */
const longestMs = 25 * 60_000
const keptLines = 400

/** Runs a package's command with Node; a tool that hangs is ended, and counts as failed. */
export async function runPackageTool(
  args: readonly string[],
  env: Record<string, string> = {},
): Promise<ToolEnd> {
  const lines: string[] = []
  const [file = '', ...rest] = args
  const child = await spawnChild({
    command: process.execPath,
    args: [`node_modules/${file}`, ...rest],
    cwd: root,
    env: { ...cleanEnvironment(), ...env },
    onLine: (line) => {
      lines.push(line)
      if (lines.length > keptLines) lines.shift()
    },
  })
  running.add(child)
  const overdue = setTimeout(() => {
    lines.push(`It was ended after ${longestMs / 60_000} minutes.`)
    void child.stop('SIGTERM', 5_000)
  }, longestMs)
  const { code } = await child.exited
  clearTimeout(overdue)
  running.delete(child)
  return { code: code ?? 1, output: lines.join('\n') }
}

export async function endRunningTools(): Promise<void> {
  await Promise.all([...running].map((child) => child.stop('SIGTERM', 10_000)))
}
