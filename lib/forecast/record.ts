import { TZDate } from '@date-fns/tz'

export const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS

export const MEASURES = ['emcPct', 'temperatureC', 'humidityPct'] as const
export type Measure = (typeof MEASURES)[number]

export type HourOfRoom = { readonly at: number } & { readonly [measure in Measure]: number }

/** Hour after hour of a room without a break; an hour that is not known is NaN in every measure. */
export type HourlyRecord = {
  /** Epoch ms of the first hour's start; every further one begins an hour later. */
  readonly firstAt: number
  readonly length: number
} & { readonly [measure in Measure]: Float64Array }

/** Gaps up to this long are bridged by a straight line; a longer one stays a gap. Status: guess. */
const BRIDGED_HOURS = 3

/**
 * The hours of a room laid side by side.
 * @param hours in any order, their `at` on whole hours; those outside are left out
 * @param untilAt up to but without this whole hour, epoch ms
 */
export function hourlyRecord(hours: Iterable<HourOfRoom>, firstAt: number, untilAt: number): HourlyRecord {
  const length = Math.max(0, Math.round((untilAt - firstAt) / HOUR_MS))
  const empty = () => new Float64Array(length).fill(NaN)
  const record = { firstAt, length, emcPct: empty(), temperatureC: empty(), humidityPct: empty() }
  for (const hour of hours) {
    const n = Math.round((hour.at - firstAt) / HOUR_MS)
    if (n < 0 || n >= length) continue
    for (const measure of MEASURES) record[measure][n] = hour[measure]
  }
  for (const measure of MEASURES) bridge(record[measure])
  return record
}

function bridge(values: Float64Array): void {
  let known = -1
  for (let n = 0; n < values.length; n += 1) {
    const value = values[n] ?? NaN
    if (Number.isNaN(value)) continue
    const before = values[known] ?? NaN
    if (known >= 0 && n - known > 1 && n - known - 1 <= BRIDGED_HOURS)
      for (let gap = known + 1; gap < n; gap += 1)
        values[gap] = before + ((value - before) * (gap - known)) / (n - known)
    known = n
  }
}

/** A shorter piece of a record, up to but without an hour: what was known then. */
export function recordUpTo(record: HourlyRecord, fromAt: number, untilAt: number): HourlyRecord {
  const from = Math.max(0, Math.round((fromAt - record.firstAt) / HOUR_MS))
  const until = Math.min(record.length, Math.round((untilAt - record.firstAt) / HOUR_MS))
  return {
    firstAt: record.firstAt + from * HOUR_MS,
    length: Math.max(0, until - from),
    emcPct: record.emcPct.slice(from, until),
    temperatureC: record.temperatureC.slice(from, until),
    humidityPct: record.humidityPct.slice(from, until),
  }
}

/** The hour of the day that clocks in a zone show, 0 to 24, worked out once for each day of UTC. */
export function hourOfDayIn(timeZone: string): (at: number) => number {
  const offsets = new Map<number, number>()
  return (at) => {
    const day = Math.floor(at / DAY_MS)
    let offsetMs = offsets.get(day)
    if (offsetMs === undefined) {
      offsetMs = -new TZDate(day * DAY_MS + DAY_MS / 2, timeZone).getTimezoneOffset() * 60_000
      offsets.set(day, offsetMs)
    }
    return ((((at + offsetMs) / HOUR_MS) % 24) + 24) % 24
  }
}

/** The mean of the hours before and with each one, over so many hours; NaN where any of them is not known. */
export function trailingMean(values: Float64Array, hours: number): Float64Array {
  const means = new Float64Array(values.length).fill(NaN)
  let sum = 0
  let known = 0
  values.forEach((value, n) => {
    if (!Number.isNaN(value)) {
      sum += value
      known += 1
    }
    const gone = values[n - hours]
    if (gone !== undefined && !Number.isNaN(gone)) {
      sum -= gone
      known -= 1
    }
    if (known === hours) means[n] = sum / hours
  })
  return means
}
