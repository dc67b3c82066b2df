import type { RoomSeries } from '@/lib/rooms/room'

export type SeriesPoint = {
  at: number
  emc: number | null
  humidity: number | null
  temperature: number | null
}

/** A stretch without readings. Hatched, and never bridged by a line. */
export type Gap = { from: number; to: number }

const STEP_MS = { raw: 15 * 60_000, hour: 3_600_000, day: 86_400_000 } as const
/** A raw sensor may miss a reading or two without anything being lost to the eye. */
const GAP_AFTER = { raw: 45 * 60_000, hour: 1.5 * 3_600_000, day: 1.5 * 86_400_000 } as const

/** The columns of an answer as points in time; a `null` goes in wherever a line must break. */
export function seriesPoints(series: RoomSeries): SeriesPoint[] {
  const limit = GAP_AFTER[series.grain]
  const points: SeriesPoint[] = []
  series.at.forEach((at, index) => {
    const time = new Date(at).getTime()
    const before = points.at(-1)
    if (before && time - before.at > limit) {
      points.push({ at: (time + before.at) / 2, emc: null, humidity: null, temperature: null })
    }
    points.push({
      at: time,
      emc: series.emcPct[index] ?? null,
      humidity: series.humidityPct[index] ?? null,
      temperature: series.temperatureC[index] ?? null,
    })
  })
  return points
}

/** Where nothing was read: between two readings that lie too far apart, and at both ends of the stretch asked for. */
export function seriesGaps(series: RoomSeries, points: readonly SeriesPoint[]): Gap[] {
  const limit = GAP_AFTER[series.grain]
  const read = points.filter((point) => point.emc !== null)
  const from = new Date(series.from).getTime()
  const to = new Date(series.to).getTime()
  const first = read[0]
  const last = read.at(-1)
  if (!first || !last) return [{ from, to }]
  const gaps: Gap[] = []
  if (first.at - from > limit + STEP_MS[series.grain]) gaps.push({ from, to: first.at })
  for (let index = 1; index < read.length; index += 1) {
    const a = read[index - 1]
    const b = read[index]
    if (a && b && b.at - a.at > limit) gaps.push({ from: a.at, to: b.at })
  }
  if (to - last.at > limit + STEP_MS[series.grain]) gaps.push({ from: last.at, to })
  return gaps
}

/** The reading nearest to a moment. */
export function nearestIndex(points: readonly SeriesPoint[], at: number): number {
  let best = 0
  points.forEach((point, index) => {
    if (Math.abs(point.at - at) < Math.abs((points[best]?.at ?? Infinity) - at)) best = index
  })
  return best
}

/** Round ends and three or four lines for an axis that holds all values. */
export function axisOf(
  values: readonly (number | null)[],
  leastSpan: number,
): { domain: [number, number]; ticks: number[] } {
  const known = values.filter((value) => value !== null)
  const middle = known.length === 0 ? 0 : (Math.min(...known) + Math.max(...known)) / 2
  const span = known.length === 0 ? leastSpan : Math.max(leastSpan, Math.max(...known) - Math.min(...known))
  const step = [0.5, 1, 2, 5, 10, 20, 50].find((candidate) => span / candidate <= 3) ?? 100
  const low = Math.floor((middle - span / 2) / step) * step
  const high = Math.ceil((middle + span / 2) / step) * step
  const ticks = Array.from({ length: Math.round((high - low) / step) + 1 }, (_, index) => low + index * step)
  return { domain: [low, high], ticks }
}
