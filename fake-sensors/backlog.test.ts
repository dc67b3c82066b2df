import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, test } from 'vitest'
import { batteryPct } from './battery'
import { BACKLOG_MOST_MS, missedInstants } from './backlog'
import { KeptState } from './kept-state'
import { frontShare } from './scenarios/damp-front'
import { dropOutCatchUp } from './scenarios/drop-out-catch-up'
import { normalDay } from './scenarios/normal-day'

const minute = 60_000
const now = Date.UTC(2026, 2, 5, 13, 10)

describe('readings of the time that the program was off', () => {
  test('are ten minutes apart and lie between the last one and now', () => {
    expect(missedInstants(now - 35 * minute, now, 10 * minute)).toEqual([
      now - 25 * minute,
      now - 15 * minute,
      now - 5 * minute,
    ])
    expect(missedInstants(now - minute, now, 10 * minute)).toEqual([])
  })

  test('go back two days at most: what is older stays a gap', () => {
    const missed = missedInstants(now - 30 * 24 * 60 * minute, now, 10 * minute)
    expect(missed[0]).toBe(now - BACKLOG_MOST_MS)
    expect(missed).toHaveLength(288)
  })
})

describe('what outlasts a restart', () => {
  let folder: string
  beforeEach(async () => (folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-state-'))))
  afterEach(() => rm(folder, { recursive: true, force: true }))

  test('is the latest acknowledged instant of each sensor', async () => {
    const file = path.join(folder, 'state.json')
    const state = await KeptState.open(file)
    state.acknowledge('a', now)
    state.acknowledge('a', now - minute)
    state.acknowledge('b', now - 5 * minute)
    await state.save()
    const again = await KeptState.open(file)
    expect(again.lastAtMs('a')).toBe(now)
    expect(again.lastAtMs('b')).toBe(now - 5 * minute)
    expect(again.lastAtMs('c')).toBeUndefined()
  })

  test('a spoilt file counts as empty', async () => {
    const file = path.join(folder, 'state.json')
    await writeFile(file, '{"a": "2026-0')
    expect((await KeptState.open(file)).lastAtMs('a')).toBeUndefined()
  })
})

describe('scenarios', () => {
  const hours = Array.from({ length: 24 * 60 }, (_, index) => now + index * minute)
  const awayMinutes = (scenario: typeof normalDay, habit: 'steady' | 'drops-out' | 'silent') =>
    hours.filter((at) => scenario.isAway({ habit }, now, at)).length

  test('on a normal day one sensor is silent and one drops out now and then, never at the start', () => {
    expect(awayMinutes(normalDay, 'steady')).toBe(0)
    expect(awayMinutes(normalDay, 'silent')).toBe(24 * 60)
    expect(awayMinutes(normalDay, 'drops-out')).toBeGreaterThan(100)
    expect(awayMinutes(normalDay, 'drops-out')).toBeLessThan(240)
    expect(normalDay.isAway({ habit: 'drops-out' }, now, now)).toBe(false)
  })

  test('with drop-outs even steady sensors are away for two thirds of the time', () => {
    expect(awayMinutes(dropOutCatchUp, 'steady')).toBe(16 * 60)
  })

  test('a front comes, stays and leaves', () => {
    expect([-1, 0, 10, 30, 50].map(frontShare)).toEqual([0, 0, 1, 1, 0])
    expect(frontShare(0.75)).toBeCloseTo(0.35, 9)
  })
})

describe('a battery', () => {
  const sensor = {
    code: 'aaaaaaaaaa',
    model: 'study',
    secret: 's',
    everyS: 60,
    habit: 'steady',
    lastAt: new Date(now).toISOString(),
    batteryPct: 31,
  } as const

  test('goes on from what the history says, falls slowly, and is never quite empty', () => {
    const after = (days: number) => batteryPct(sensor, now + days * 24 * 60 * minute)
    expect(after(0)).toBe(31)
    expect(after(55)).toBe(21)
    expect(after(5_000)).toBe(3)
    expect(batteryPct({ ...sensor, batteryPct: 1 }, now)).toBe(1)
  })
})
