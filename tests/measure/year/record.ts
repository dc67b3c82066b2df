import type { RoomMaterial } from '@/lib/carry/material'
import { usualGapAfter } from '@/lib/readings/usual-gap'
import { readingFigures } from '@/lib/readings/figures'
import { type LastReading, roomAir } from '@/lib/rooms/air'
import type { RoomKind } from '@/lib/rooms/room'

/** What the product has of one room: hourly figures that grow reading by reading, as the ingest grows them. */
export interface RoomRecord {
  readonly take: (atMs: number, reading: { temperatureC: number; humidityPct: number }) => void
  readonly material: (now: Date) => RoomMaterial
  readonly last: () => LastReading | null
  /** Mean EMC of the last days, % MC; undefined without a reading. */
  readonly meanPct: (days: number) => number | undefined
  /** Every hour so far, oldest first. */
  readonly hours: () => readonly HourFigures[]
}

export interface HourFigures {
  readonly at: number
  readonly n: number
  readonly temperatureC: number
  readonly humidityPct: number
  readonly emcPct: number
}

const HOUR_MS = 3_600_000
/** As many hours as a check loads, and some for a piece that is out for long. */
const KEPT_HOURS = 8 * 24
const YEAR_DAYS = 365

export function roomRecord(kind: RoomKind): RoomRecord {
  const hours: HourFigures[] = []
  const recent = new Map<number, { emcPct: number; temperatureC: number }>()
  const days: { sum: number; n: number }[] = []
  let last: LastReading | null = null

  const hourOf = (at: number, c: number, pct: number, emc: number): HourFigures => {
    const before = hours.at(-1)
    if (before?.at !== at) return { at, n: 1, temperatureC: c, humidityPct: pct, emcPct: emc }
    hours.pop()
    const n = before.n + 1
    const mean = (old: number, value: number) => old + (value - old) / n
    return {
      at,
      n,
      temperatureC: mean(before.temperatureC, c),
      humidityPct: mean(before.humidityPct, pct),
      emcPct: mean(before.emcPct, emc),
    }
  }
  return {
    take(atMs, reading) {
      const figures = readingFigures(reading.temperatureC, reading.humidityPct)
      const emcPct = figures.emcMilli / 1000
      const at = Math.floor(atMs / HOUR_MS) * HOUR_MS
      const hour = hourOf(at, reading.temperatureC, reading.humidityPct, emcPct)
      if (hour.n === 1) {
        for (const old of recent.keys()) {
          if (old >= at - KEPT_HOURS * HOUR_MS) break
          recent.delete(old)
        }
        if (days.length === 0 || at % (24 * HOUR_MS) === 0) days.push({ sum: 0, n: 0 })
      }
      hours.push(hour)
      recent.set(at, hour)
      const day = days.at(-1)
      if (day !== undefined) {
        day.sum += emcPct
        day.n += 1
      }
      const usualGapS = usualGapAfter(last?.usualGapS ?? null, last?.at ?? null, [new Date(atMs)])
      last = { isTyped: false, at: new Date(atMs), ...reading, emcPct, usualGapS }
    },
    material: (now) => ({
      air: roomAir(last === null ? [] : [last], kind, now),
      hours: recent,
      emcPctMean: meanOf(days.slice(-YEAR_DAYS)) ?? null,
    }),
    last: () => last,
    meanPct: (count) => meanOf(days.slice(-count)),
    hours: () => hours,
  }
}

function meanOf(days: readonly { sum: number; n: number }[]): number | undefined {
  const n = days.reduce((sum, day) => sum + day.n, 0)
  return n === 0 ? undefined : days.reduce((sum, day) => sum + day.sum, 0) / n
}
