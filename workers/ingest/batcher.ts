import { setTimeout as delay } from 'node:timers/promises'

export interface BatcherOptions<T> {
  /** Writes all of them or none. */
  write: (items: readonly T[]) => Promise<void>
  /** How many rows an item makes. */
  sizeOf: (item: T) => number
  /** A batch waits this long for more after its first item. */
  lingerMs: number
  /** A batch is closed at this many rows. */
  batchRows: number
  /** More rows than this are not held in memory. */
  pendingRows: number
  /** Whether a failure lies in what was written, so that trying again can't help. */
  isTheirFault: (error: unknown) => boolean
  /** Told of an item that can never be written. */
  onUnstorable: (error: unknown, item: T) => void
  /** Told when writing begins to fail, and at each further try. */
  onAway: (error: unknown, tries: number) => void
  onBack: () => void
}

export type Stored = 'stored' | 'unstorable'

/** An item that was not stored and will not be: its sender has to send it again. */
export class NotStoredError extends Error {
  constructor(readonly reason: 'full' | 'stopped' | 'unwanted') {
    super(`not stored: ${reason}`)
  }
}

export interface Batcher<T> {
  /**
   * Resolves once the item is written for good, or has proved to be one that never can be.
   * While the store is away it waits; an item that is not wanted any more by then is let go.
   * @throws NotStoredError
   */
  add(item: T, isWanted?: () => boolean): Promise<Stored>
  pendingRows(): number
  /** Takes no more, writes what is left, and gives up on it after the deadline. */
  stop(deadlineMs: number): Promise<void>
}

interface Entry<T> {
  item: T
  rows: number
  isWanted: () => boolean
  settle: (stored: Stored | NotStoredError) => void
}

const firstPauseMs = 50
const longestPauseMs = 2_000

/**
 * Gathers items from many senders into few writes. One write runs at a time, so what arrives meanwhile makes the
 * next batch: the slower the store, the larger the batches.
 */
export function createBatcher<T>(options: BatcherOptions<T>): Batcher<T> {
  const queue: Entry<T>[] = []
  const giveUp = new AbortController()
  let pendingRows = 0
  let running: Promise<void> | undefined
  let isStopping = false
  let isFull: () => void = () => undefined

  const settle = (entry: Entry<T>, stored: Stored | NotStoredError) => {
    pendingRows -= entry.rows
    entry.settle(stored)
  }

  async function run(): Promise<void> {
    while (queue.length > 0) {
      await linger()
      await writeAll(take())
    }
    running = undefined
  }

  async function linger(): Promise<void> {
    if (isStopping || pendingRows >= options.batchRows) return
    await new Promise<void>((resolve) => {
      const timer = setTimeout(resolve, options.lingerMs)
      isFull = () => {
        clearTimeout(timer)
        resolve()
      }
    })
    isFull = () => undefined
  }

  function take(): Entry<T>[] {
    let rows = 0
    let count = 0
    for (const entry of queue) {
      if (count > 0 && rows + entry.rows > options.batchRows) break
      rows += entry.rows
      count += 1
    }
    return queue.splice(0, count)
  }

  async function writeAll(entries: readonly Entry<T>[]): Promise<void> {
    let left = entries
    for (let tries = 1; left.length > 0; tries += 1) {
      try {
        await options.write(left.map((entry) => entry.item))
        if (tries > 1) options.onBack()
        for (const entry of left) settle(entry, 'stored')
        return
      } catch (error) {
        if (options.isTheirFault(error)) return writeApart(left, error)
        options.onAway(error, tries)
        left = await pause(left, tries)
      }
    }
  }

  /** Finds the items that can't be written by halving, so that they cost the others nothing. */
  async function writeApart(entries: readonly Entry<T>[], error: unknown): Promise<void> {
    const [first] = entries
    if (entries.length === 1 && first) {
      options.onUnstorable(error, first.item)
      return settle(first, 'unstorable')
    }
    const middle = Math.ceil(entries.length / 2)
    await writeAll(entries.slice(0, middle))
    await writeAll(entries.slice(middle))
  }

  async function pause(entries: readonly Entry<T>[], tries: number): Promise<readonly Entry<T>[]> {
    const pauseMs = Math.min(longestPauseMs, firstPauseMs * 2 ** Math.min(tries - 1, 10))
    await delay(pauseMs, undefined, { signal: giveUp.signal }).catch(() => undefined)
    const isLost = (entry: Entry<T>): boolean => giveUp.signal.aborted || !entry.isWanted()
    const reason = giveUp.signal.aborted ? 'stopped' : 'unwanted'
    for (const entry of entries.filter(isLost)) settle(entry, new NotStoredError(reason))
    return entries.filter((entry) => !isLost(entry))
  }

  return {
    add(item, isWanted = () => true) {
      const rows = options.sizeOf(item)
      if (isStopping) return Promise.reject(new NotStoredError('stopped'))
      if (pendingRows + rows > options.pendingRows) return Promise.reject(new NotStoredError('full'))
      return new Promise((resolve, reject) => {
        pendingRows += rows
        const settled = (stored: Stored | NotStoredError) =>
          stored instanceof NotStoredError ? reject(stored) : resolve(stored)
        queue.push({ item, rows, isWanted, settle: settled })
        running ??= run()
        if (pendingRows >= options.batchRows) isFull()
      })
    },
    pendingRows: () => pendingRows,
    async stop(deadlineMs) {
      isStopping = true
      isFull()
      const timer = setTimeout(() => giveUp.abort(), deadlineMs)
      // A write that hangs is not waited for beyond the deadline.
      await Promise.race([running, delay(deadlineMs, undefined, { ref: false })])
      clearTimeout(timer)
    },
  }
}
