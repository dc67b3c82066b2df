import { appendFileSync, mkdirSync, renameSync, statSync } from 'node:fs'
import path from 'node:path'

const maxBytes = 5_000_000
const tailLines = 20

/** What one part says: kept in a file of bounded size, and its last lines at hand for when it fails. */
export interface PartLog {
  write(line: string): void
  tail(): string[]
  file: string
}

export function openPartLog(folder: string, name: string): PartLog {
  mkdirSync(folder, { recursive: true })
  const file = path.join(folder, `${name}.log`)
  let bytes = statSync(file, { throwIfNoEntry: false })?.size ?? 0
  const last: string[] = []
  return {
    file,
    write(line) {
      if (bytes > maxBytes) {
        renameSync(file, `${file}.1`)
        bytes = 0
      }
      appendFileSync(file, `${line}\n`, { mode: 0o600 })
      bytes += Buffer.byteLength(line) + 1
      last.push(line)
      if (last.length > tailLines) last.shift()
    },
    tail: () => [...last],
  }
}

/** By name, or by the number that the logger gives to "warn", "error" and "fatal". */
const shownLevels: ReadonlySet<unknown> = new Set(['warn', 'error', 'fatal', 40, 50, 60])

/** The sentence of a worker's log line that a person at the terminal should see, or undefined. */
export function warningIn(line: string): string | undefined {
  if (!line.startsWith('{')) return undefined
  try {
    const entry: unknown = JSON.parse(line)
    if (typeof entry !== 'object' || entry === null) return undefined
    const { level, msg, err } = entry as { level?: unknown; msg?: unknown; err?: { message?: unknown } }
    if (!shownLevels.has(level)) return undefined
    const reason = typeof err?.message === 'string' && err.message !== msg ? ` (${err.message})` : ''
    return `${String(msg ?? 'a warning')}${reason}`
  } catch {
    return undefined
  }
}
