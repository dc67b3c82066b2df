import { describe, expect, it } from 'vitest'
import { type BatcherOptions, createBatcher, NotStoredError } from './batcher'

class BadItem extends Error {}

const options = (part: Partial<BatcherOptions<number>>): BatcherOptions<number> => ({
  write: async () => undefined,
  sizeOf: () => 1,
  lingerMs: 5,
  batchRows: 10,
  pendingRows: 100,
  isTheirFault: (error) => error instanceof BadItem,
  onUnstorable: () => undefined,
  onAway: () => undefined,
  onBack: () => undefined,
  ...part,
})

describe('a batcher', () => {
  it('writes what many bring in few batches, in order, and closes a batch at its size', async () => {
    const batches: number[][] = []
    const batcher = createBatcher(options({ write: async (items) => void batches.push([...items]) }))
    await Promise.all(Array.from({ length: 25 }, (_, i) => batcher.add(i)))
    expect(batches.flat()).toEqual(Array.from({ length: 25 }, (_, i) => i))
    expect(batches.map((batch) => batch.length)).toEqual([10, 10, 5])
  })

  it('answers nobody before the write is done', async () => {
    let finish: () => void = () => undefined
    let begin: () => void = () => undefined
    const begun = new Promise<void>((resolve) => (begin = resolve))
    const written = new Promise<void>((resolve) => (finish = resolve))
    let answered = false
    const batcher = createBatcher(
      options({
        write: () => {
          begin()
          return written
        },
      }),
    )
    const added = batcher.add(1).then(() => (answered = true))
    await begun
    await new Promise(setImmediate)
    expect(answered).toBe(false)
    finish()
    await added
    expect(batcher.pendingRows()).toBe(0)
  })

  it('tries again until the store is back, and says so once', async () => {
    let failures = 3
    const told: string[] = []
    const batcher = createBatcher(
      options({
        write: async () => {
          if (failures-- > 0) throw new Error('away')
        },
        onAway: (_, tries) => told.push(`away ${tries}`),
        onBack: () => told.push('back'),
      }),
    )
    expect(await batcher.add(1)).toBe('stored')
    expect(told).toEqual(['away 1', 'away 2', 'away 3', 'back'])
  })

  it('stores the good beside one that can never be stored', async () => {
    const stored: number[] = []
    const unstorable: number[] = []
    const batcher = createBatcher(
      options({
        onUnstorable: (_, item) => unstorable.push(item),
        write: async (items) => {
          if (items.includes(7)) throw new BadItem()
          stored.push(...items)
        },
      }),
    )
    const outcomes = await Promise.all(Array.from({ length: 10 }, (_, i) => batcher.add(i)))
    expect(stored.sort()).toEqual([0, 1, 2, 3, 4, 5, 6, 8, 9])
    expect(outcomes.filter((outcome) => outcome === 'unstorable')).toHaveLength(1)
    expect(outcomes[7]).toBe('unstorable')
    expect(unstorable).toEqual([7])
  })

  it('holds no more than it may, and lets go of what nobody waits for', async () => {
    let isAway = true
    let isWanted = true
    const write = async () => {
      if (isAway) throw new Error('away')
    }
    const batcher = createBatcher(options({ write, pendingRows: 2 }))
    const unwanted = batcher.add(1, () => isWanted)
    const wanted = batcher.add(2)
    await expect(batcher.add(3)).rejects.toThrow(new NotStoredError('full'))
    isWanted = false
    await expect(unwanted).rejects.toThrow(new NotStoredError('unwanted'))
    isAway = false
    expect(await wanted).toBe('stored')
    expect(batcher.pendingRows()).toBe(0)
  })

  it('writes what it has when it is stopped, takes no more, and gives up after its deadline', async () => {
    const stored: number[] = []
    const batcher = createBatcher(
      options({ lingerMs: 60_000, write: async (items) => void stored.push(...items) }),
    )
    const last = batcher.add(1)
    await batcher.stop(1_000)
    expect(await last).toBe('stored')
    await expect(batcher.add(2)).rejects.toThrow(new NotStoredError('stopped'))

    const away = createBatcher(options({ write: () => Promise.reject(new Error('away')) }))
    const lost = away.add(1)
    void away.stop(20)
    await expect(lost).rejects.toThrow(new NotStoredError('stopped'))
  })
})
