import { describe, expect, test } from 'vitest'
import { emcOfReadingPct } from '@/lib/wood/emc'
import { historyLines } from '../history'
import { dampFront } from '../scenarios/damp-front'
import { createInstruments, instrumentNames } from './instruments'
import { createNoise } from './noise'
import { DAY_MS, HOUR_MS } from './outdoor'
import { climateRooms, createRooms, type ClimateRoom } from './rooms'

const seed = 7
const fourteenMonthsDays = 425
const startMs = Date.UTC(2025, 9, 1)
const emcOf = ({ temperatureC, humidityPct }: { temperatureC: number; humidityPct: number }) =>
  emcOfReadingPct(temperatureC, humidityPct)

describe('noise', () => {
  test('stays between -1 and 1, has no jump, and differs by seed and channel', () => {
    const noise = createNoise(seed)
    let before = noise(1, -3)
    for (let x = -3; x < 30; x += 0.01) {
      const value = noise(1, x)
      expect(Math.abs(value)).toBeLessThanOrEqual(1)
      expect(Math.abs(value - before)).toBeLessThan(0.05)
      before = value
    }
    expect(noise(1, 4.5)).not.toBe(noise(2, 4.5))
    expect(noise(1, 4.5)).not.toBe(createNoise(seed + 1)(1, 4.5))
  })
})

// Worked out for thousands of hours: a busy machine takes its time.
describe('the simulated place', { timeout: 60_000 }, () => {
  test('is the same for the same seed, whatever is asked first', () => {
    const forward = createRooms(seed)
    const backward = createRooms(seed)
    const instants = Array.from({ length: 50 }, (_, index) => startMs + index * 7.3 * HOUR_MS)
    const answers = instants.map((at) => climateRooms.map((room) => forward(room, at)))
    const again = instants
      .toReversed()
      .map((at) =>
        climateRooms
          .toReversed()
          .map((room) => backward(room, at))
          .toReversed(),
      )
      .toReversed()
    expect(again).toEqual(answers)
    expect(createRooms(seed + 1)('shop', startMs)).not.toEqual(forward('shop', startMs))
  })

  test('has no jump from one minute to the next, over the hours of a day and over midnight', () => {
    const air = createRooms(seed)
    for (const room of climateRooms)
      for (let at = startMs + DAY_MS; at < startMs + 2.2 * DAY_MS; at += 60_000) {
        const before = air(room, at - 60_000)
        const after = air(room, at)
        expect(Math.abs(after.temperatureC - before.temperatureC)).toBeLessThan(0.12)
        expect(Math.abs(after.humidityPct - before.humidityPct)).toBeLessThan(room === 'kitchen' ? 1 : 0.35)
      }
  })

  test(
    'keeps the house drier than the shop on every day of ten years, by 2.5 points at least',
    { timeout: 60_000 },
    () => {
      const air = createRooms(seed)
      let least = Infinity
      for (let day = 0; day < 3653; day++) {
        const means = dayMeans(air, startMs + day * DAY_MS, ['cupboard', 'study', 'shop'])
        least = Math.min(least, means.shop - means.cupboard, means.shop - means.study)
      }
      expect(least).toBeGreaterThan(2.5)
    },
  )

  test('stays in the ranges that the place is known for over fourteen months, each season with its own', () => {
    const air = createRooms(seed)
    const days = Array.from({ length: fourteenMonthsDays }, (_, day) =>
      dayMeans(air, startMs + day * DAY_MS, climateRooms),
    )
    const range = (room: ClimateRoom) => {
      const all = days.map((means) => means[room])
      return { min: Math.min(...all), max: Math.max(...all) }
    }
    expect(range('cupboard').min).toBeGreaterThan(6.8)
    expect(range('cupboard').max).toBeLessThan(11)
    // The house follows the year: a winter's heating takes two points and more out of the cupboard.
    expect(range('cupboard').max - range('cupboard').min).toBeGreaterThan(2)
    expect(range('shop').min).toBeGreaterThan(11.5)
    expect(range('shop').max).toBeLessThan(17)
    expect(range('store').max).toBeLessThan(20)
    expect(range('store').min).toBeGreaterThan(range('cupboard').max)
    expect(range('tub').min).toBeGreaterThan(9)
    expect(range('tub').max).toBeLessThan(13.5)
  })

  test('has a tub that hardly moves from day to day', () => {
    const air = createRooms(seed)
    for (let day = 0; day < 60; day++) {
      const today = air('tub', startMs + day * DAY_MS).humidityPct
      expect(Math.abs(air('tub', startMs + (day + 1) * DAY_MS).humidityPct - today)).toBeLessThan(0.6)
    }
  })
})

describe('the simulated instruments', { timeout: 60_000 }, () => {
  test('show between 5 and 100 % RH and a living temperature at any season', () => {
    const measure = createInstruments(seed)
    for (let day = 0; day < fourteenMonthsDays; day++)
      for (const name of instrumentNames)
        for (const hour of [5, 13]) {
          const at = startMs + day * DAY_MS + hour * HOUR_MS
          const { temperatureC, humidityPct } = measure(name, at)
          expect(humidityPct).toBeGreaterThanOrEqual(5)
          expect(humidityPct).toBeLessThanOrEqual(100)
          expect(temperatureC).toBeGreaterThan(-10)
          expect(temperatureC).toBeLessThan(32)
        }
  })

  test('write the same history as they report live, to the last digit', () => {
    const everyS = 600
    const fromS = startMs / 1000
    const names = ['shop-bench', 'kitchen'] as const
    const lines = [...historyLines(seed, fromS, fromS + 36 * everyS, everyS, names)]
      .join('')
      .trim()
      .split('\n')
    expect(lines).toHaveLength(72)
    const live = createInstruments(seed, dampFront.weatherFrom((fromS + 36 * everyS) * 1000))
    for (const line of lines) {
      const [index = 0, atS = 0, temperatureC, humidityPct] = line.split(',').map(Number)
      const name = names[index] ?? 'shop-bench'
      expect(live(name, atS * 1000)).toEqual({ temperatureC, humidityPct })
    }
  })

  test('feel a damp front only after it has come, and without a jump', () => {
    const frontMs = startMs + 20 * DAY_MS
    const plain = createRooms(seed)
    const damp = createRooms(seed, dampFront.weatherFrom(frontMs))
    expect(damp('shop', frontMs - 60_000)).toEqual(plain('shop', frontMs - 60_000))
    const jump = damp('shop', frontMs + 60_000).humidityPct - damp('shop', frontMs).humidityPct
    expect(Math.abs(jump)).toBeLessThan(0.3)
    const after = frontMs + 26 * HOUR_MS
    expect(emcOf(damp('shop', after))).toBeGreaterThan(emcOf(plain('shop', after)) + 0.5)
    expect(damp('shop', after).humidityPct).toBeLessThanOrEqual(97)
  })
})

function dayMeans<R extends ClimateRoom>(
  air: ReturnType<typeof createRooms>,
  dayMs: number,
  rooms: readonly R[],
): Record<R, number> {
  const means = {} as Record<R, number>
  for (const room of rooms) {
    let sum = 0
    for (let hour = 0; hour < 24; hour += 3) sum += emcOf(air(room, dayMs + hour * HOUR_MS))
    means[room] = sum / 8
  }
  return means
}
