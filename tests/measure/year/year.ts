import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { availableParallelism } from 'node:os'
import path from 'node:path'
import { deserialize } from 'node:v8'
import { readingToNoticeMs } from './latency'
import type { YearScore } from './score'
import { DEFINITIONS, latencyRow, scoreNotes, scoreTable, yearRows } from './table'

const SEEDS = [1, 2, 3]

/** The seeds that `--seeds 1,2,3` asks for. */
export function seedsOf(args: readonly string[]): number[] {
  const place = args.findIndex((arg) => arg === '--seeds' || arg.startsWith('--seeds='))
  if (place < 0) return SEEDS
  const text = args[place]?.split('=')[1] ?? args[place + 1] ?? ''
  const seeds = text.split(',').map(Number)
  if (seeds.some((seed) => !Number.isSafeInteger(seed) || seed < 0))
    throw new Error(`--seeds wants whole numbers with commas between them, such as 1,2,3, not "${text}".`)
  return seeds
}

const ONE_SEED = path.join(import.meta.dirname, 'one-seed.ts')

async function yearOf(seed: number, say: (text: string) => void): Promise<YearScore> {
  const begin = performance.now()
  const child = spawn(process.execPath, ['--import', 'tsx', ONE_SEED, String(seed)], {
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  const parts: Buffer[] = []
  child.stdout.on('data', (part: Buffer) => parts.push(part))
  const [code] = (await once(child, 'close')) as [number | null]
  if (code !== 0) throw new Error(`The year of seed ${String(seed)} ended with ${String(code)}.`)
  say(`seed ${String(seed)}: a year in ${((performance.now() - begin) / 1000).toFixed(0)} s\n`)
  return deserialize(Buffer.concat(parts)) as YearScore
}

/** The years of all seeds, as many at a time as the machine has cores, and one more. */
async function yearsOf(seeds: readonly number[], say: (text: string) => void): Promise<YearScore[]> {
  const scores: YearScore[] = []
  const waiting = seeds.map((seed, n) => ({ seed, n }))
  const work = async (): Promise<void> => {
    for (let next = waiting.shift(); next !== undefined; next = waiting.shift())
      scores[next.n] = await yearOf(next.seed, say)
  }
  await Promise.all(Array.from({ length: availableParallelism() + 1 }, work))
  return scores
}

/** A simulated year for each seed, judged by a truth of its own, and the way of a reading to its notice, for real. */
export async function scoredYear(seeds: readonly number[], say: (text: string) => void): Promise<void> {
  const scores = await yearsOf(seeds, say)
  const rows = [...yearRows(scores), latencyRow(await readingToNoticeMs(), seeds.length)]
  say(`\n${scoreTable(seeds, rows)}\n\n${scoreNotes(scores)}\n\n${DEFINITIONS}\n`)
}
