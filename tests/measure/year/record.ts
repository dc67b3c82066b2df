import type { RoomMaterial } from '@/lib/carry/material'
import { usualGapAfter } from '@/lib/readings/usual-gap'
import { readingFigures } from '@/lib/readings/figures'
import type { RoomDay } from '@/lib/notices/surroundings'
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
  /** Every day so far, the last of them still growing. Days of UTC, which is near enough here. */
  readonly days: () => readonly RoomDay[]
}

export interface HourFigures {
  readonly at: number
  readonly n: number
  readonly temperatureC: number
  readonly humidityPct: number
  readonly emcPct: number
  readonly emcPctMin: number
  readonly emcPctMax: number
}

const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS
/** As many hours as a check loads, and some for a piece that is out for long. */
const KEPT_HOURS = 8 * 24
const YEAR_DAYS = 365

export function roomRecord(kind: RoomKind): RoomRecord {
  const hours: HourFigures[] = []
  const recent = new Map<number, { emcPct: number; temperatureC: number }>()
  const days: (RoomDay & { n: number })[] = []
  let last: LastReading | null = null

  const hourWith = (at: number, c: number, pct: number, emc: number): HourFigures => {
    const before = hours.at(-1)
    if (before?.at !== at)
      return { at, n: 1, temperatureC: c, humidityPct: pct, emcPct: emc, emcPctMin: emc, emcPctMax: emc }
    hours.pop()
    return {
      ...withReading(before, c, pct, emc),
      at,
      emcPctMin: Math.min(before.emcPctMin, emc),
      emcPctMax: Math.max(before.emcPctMax, emc),
    }
  }
  const addToDay = (hourAt: number, c: number, pct: number, emc: number): void => {
    const at = Math.floor(hourAt / DAY_MS) * DAY_MS
    const before = days.at(-1)
    if (before?.at === at) {
      days[days.length - 1] = { ...before, ...withReading(before, c, pct, emc) }
      return
    }
    const dayOn = new Date(at).toISOString().slice(0, 10)
    days.push({ dayOn, at, endsAt: at + DAY_MS, n: 1, temperatureC: c, humidityPct: pct, emcPct: emc })
  }
  return {
    take(atMs, reading) {
      const figures = readingFigures(reading.temperatureC, reading.humidityPct)
      const emcPct = figures.emcMilli / 1000
      const at = Math.floor(atMs / HOUR_MS) * HOUR_MS
      const hour = hourWith(at, reading.temperatureC, reading.humidityPct, emcPct)
      if (hour.n === 1)
        for (const old of recent.keys()) {
          if (old >= at - KEPT_HOURS * HOUR_MS) break
          recent.delete(old)
        }
      hours.push(hour)
      recent.set(at, hour)
      addToDay(at, reading.temperatureC, reading.humidityPct, emcPct)
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
    days: () => days,
  }
}

interface Means {
  readonly n: number
  readonly temperatureC: number
  readonly humidityPct: number
  readonly emcPct: number
}

function withReading(before: Means, c: number, pct: number, emc: number): Means {
  const n = before.n + 1
  const mean = (old: number, value: number) => old + (value - old) / n
  return {
    n,
    temperatureC: mean(before.temperatureC, c),
    humidityPct: mean(before.humidityPct, pct),
    emcPct: mean(before.emcPct, emc),
  }
}

const meanOf = (days: readonly Pick<RoomDay, 'emcPct'>[]): number | undefined =>
  days.length === 0 ? undefined : days.reduce((sum, { emcPct }) => sum + emcPct, 0) / days.length
