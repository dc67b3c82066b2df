import { readFile, rename, writeFile } from 'node:fs/promises'
import { z } from 'zod'

const stateSchema = z.record(z.string(), z.iso.datetime())

/** Up to when each sensor's readings were acknowledged, by its code: the one thing that outlasts a restart. */
export class KeptState {
  readonly #file: string
  readonly #lastAtMs: Map<string, number>
  #changed = false

  private constructor(file: string, lastAtMs: Map<string, number>) {
    this.#file = file
    this.#lastAtMs = lastAtMs
  }

  static async open(file: string): Promise<KeptState> {
    const text = await readFile(file, 'utf8').catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOENT') return '{}'
      throw error
    })
    const parsed = stateSchema.safeParse(parsedJson(text))
    const entries = parsed.success ? Object.entries(parsed.data) : []
    return new KeptState(file, new Map(entries.map(([code, at]) => [code, Date.parse(at)])))
  }

  lastAtMs(code: string): number | undefined {
    return this.#lastAtMs.get(code)
  }

  acknowledge(code: string, atMs: number): void {
    this.#lastAtMs.set(code, Math.max(atMs, this.#lastAtMs.get(code) ?? 0))
    this.#changed = true
  }

  /** Written beside and then moved into place: a process that is killed leaves the old file or the new one. */
  async save(): Promise<void> {
    if (!this.#changed) return
    this.#changed = false
    const state = Object.fromEntries(
      [...this.#lastAtMs].map(([code, atMs]) => [code, new Date(atMs).toISOString()]),
    )
    const beside = `${this.#file}.new`
    await writeFile(beside, `${JSON.stringify(state, null, 2)}\n`)
    await rename(beside, this.#file)
  }
}

/** A file that a crash or a hand has spoilt counts as empty: the roster says where to begin. */
function parsedJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    if (error instanceof SyntaxError) return {}
    throw error
  }
}
