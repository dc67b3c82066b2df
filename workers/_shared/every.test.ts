import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { every } from './every'

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

describe('every', () => {
  it('goes on after a failure and reports it', async () => {
    const failures: unknown[] = []
    let runs = 0
    const loop = every({ intervalMs: 1000, onError: (error) => failures.push(error) }, async () => {
      runs += 1
      if (runs === 1) throw new Error('database away')
    })
    await vi.advanceTimersByTimeAsync(1000)
    expect(runs).toBe(2)
    expect(failures).toEqual([new Error('database away')])
    await loop.stop()
  })

  it('never runs twice at a time and runs once more for any number of nudges meanwhile', async () => {
    let inside = 0
    let most = 0
    let runs = 0
    const loop = every({ intervalMs: 60_000, onError: () => undefined }, async () => {
      runs += 1
      inside += 1
      most = Math.max(most, inside)
      await new Promise((resolve) => setTimeout(resolve, 100))
      inside -= 1
    })
    loop.nudge()
    loop.nudge()
    await vi.advanceTimersByTimeAsync(1000)
    expect({ runs, most }).toEqual({ runs: 2, most: 1 })
    await loop.stop()
  })

  it('waits for a run that is under way when it stops, and starts no other', async () => {
    let finished = 0
    const loop = every({ intervalMs: 10, onError: () => undefined }, async () => {
      await new Promise((resolve) => setTimeout(resolve, 100))
      finished += 1
    })
    const stopped = loop.stop()
    await vi.advanceTimersByTimeAsync(1000)
    await stopped
    expect(finished).toBe(1)
  })
})
