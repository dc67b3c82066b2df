/** What a measure takes: the least of several runs, as whatever else the machine does only ever adds. */
export interface Taken {
  /** Wall clock, ms. */
  readonly ms: number
  /** Processor time of this process, ms. */
  readonly cpuMs: number
}

/** Runs work once to warm up and then some times more; gives the quickest. The result is kept so that nothing is optimised away. */
export function quickest(runs: number, work: () => number): Taken {
  let kept = work()
  let best: Taken = { ms: Infinity, cpuMs: Infinity }
  for (let n = 0; n < runs; n += 1) {
    const cpu = process.cpuUsage()
    const begin = performance.now()
    kept += work()
    const ms = performance.now() - begin
    const { user, system } = process.cpuUsage(cpu)
    if (ms < best.ms) best = { ms, cpuMs: (user + system) / 1000 }
  }
  if (Number.isNaN(kept)) throw new Error('a measure came to no number')
  return best
}

export interface Line {
  readonly what: string
  readonly figure: string
  readonly ratio: string
  readonly aim: string
}

export const figures = (value: number): string =>
  value >= 100 ? Math.round(value).toLocaleString('en-GB') : value.toPrecision(3)

/** A table for the terminal, columns as wide as their longest cell. */
export function tableOf(lines: readonly Line[]): string {
  const rows = [{ what: 'what', figure: 'measured', ratio: 'ratio', aim: 'aim' }, ...lines]
  const width = (key: keyof Line) => Math.max(...rows.map((row) => row[key].length))
  const keys = ['what', 'figure', 'ratio', 'aim'] as const
  return rows
    .map((row) =>
      keys
        .map((key) => row[key].padEnd(width(key)))
        .join('  ')
        .trimEnd(),
    )
    .join('\n')
}
