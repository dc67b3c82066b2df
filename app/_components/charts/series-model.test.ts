import { describe, expect, it } from 'vitest'
import type { RoomSeries } from '@/lib/rooms/room'
import { axisOf, nearestIndex, seriesGaps, seriesPoints } from './series-model'

const start = new Date('2026-03-05T00:00:00Z').getTime()
const iso = (minutes: number) => new Date(start + minutes * 60_000).toISOString()

function series(minutes: number[], values?: (number | null)[]): RoomSeries {
  const column = values ?? minutes.map(() => 10)
  return {
    grain: 'raw',
    from: iso(0),
    to: iso(600),
    at: minutes.map(iso),
    temperatureC: column,
    humidityPct: column,
    emcPct: column,
    emcPctMin: column,
    emcPctMax: column,
    completeTo: null,
    age: null,
  }
}

describe('a series with gaps', () => {
  it('breaks the line between readings that lie too far apart', () => {
    const points = seriesPoints(series([0, 10, 20, 200, 210]))
    expect(points.map((point) => point.emc)).toEqual([10, 10, 10, null, 10, 10])
  })

  it('hatches from the last reading before to the first after, and at the end', () => {
    const given = series([0, 10, 20, 200, 210])
    expect(seriesGaps(given, seriesPoints(given))).toEqual([
      { from: start + 20 * 60_000, to: start + 200 * 60_000 },
      { from: start + 210 * 60_000, to: start + 600 * 60_000 },
    ])
  })

  it('treats a null in the answer as a gap and not as nought', () => {
    const given = series([0, 30, 60, 90, 120, 600], [10, null, null, null, 11, 10])
    expect(seriesGaps(given, seriesPoints(given))[0]).toEqual({ from: start, to: start + 120 * 60_000 })
  })

  it('hatches everything when nothing was read', () => {
    const given = series([])
    expect(seriesGaps(given, seriesPoints(given))).toEqual([{ from: start, to: start + 600 * 60_000 }])
  })

  it('finds the reading nearest to the crosshair', () => {
    const points = seriesPoints(series([0, 10, 20]))
    expect(nearestIndex(points, start + 14 * 60_000)).toBe(1)
  })
})

describe('an axis', () => {
  it('holds every value between round ends', () => {
    const { domain, ticks } = axisOf([12.2, 14.7, null], 1)
    expect(domain[0]).toBeLessThanOrEqual(12.2)
    expect(domain[1]).toBeGreaterThanOrEqual(14.7)
    expect(ticks.length).toBeLessThanOrEqual(5)
  })

  it('does not blow up a steady room', () => {
    const { domain } = axisOf([8.5, 8.5], 2)
    expect(domain[1] - domain[0]).toBeGreaterThanOrEqual(2)
  })
})
