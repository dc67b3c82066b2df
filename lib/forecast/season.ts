import type { HourlyRecord, Measure } from './record'
import { HOUR_MS, MEASURES } from './record'

const DAY_MS = 24 * HOUR_MS
const YEAR_DAYS = 365
/** A day's season is the mean of the days this near it, the nearest counting most. Status: guess. */
const NEAR_DAYS = 16
/** Fewer days on record around a day say nothing of its season. */
const DAYS_MIN = 15

/** A room's day a year before, epoch ms of its middle. */
export type DayBefore = { readonly at: number } & { readonly [measure in Measure]: number }

/** What the season made of a room in the same weeks of the year before; undefined where they are not on record. */
export type SeasonOf = (at: number, measure: Measure) => number | undefined

/** The season from the days of the year before, each day's from those around it. */
export function seasonOf(days: readonly DayBefore[]): SeasonOf {
  const known = new Map<string, number | undefined>()
  return (at, measure) => {
    const day = Math.floor(at / DAY_MS)
    const key = `${measure} ${String(day)}`
    if (!known.has(key)) known.set(key, around(days, (day - YEAR_DAYS + 0.5) * DAY_MS, measure))
    return known.get(key)
  }
}

function around(days: readonly DayBefore[], at: number, measure: Measure): number | undefined {
  let sum = 0
  let weights = 0
  let count = 0
  for (const day of days) {
    const weight = 1 - Math.abs(day.at - at) / (NEAR_DAYS * DAY_MS)
    if (weight <= 0) continue
    sum += weight * day[measure]
    weights += weight
    count += 1
  }
  return count < DAYS_MIN ? undefined : sum / weights
}

/**
 * How far the season has moved since the record began, hour by hour; null where it is not on record throughout.
 * @param beyondHours for how long past the record's end
 */
export function seasonMoves(
  record: HourlyRecord,
  season: SeasonOf,
  beyondHours: number,
): { readonly [measure in Measure]: Float64Array } | null {
  const length = record.length + beyondHours
  const moves = {} as { [measure in Measure]: Float64Array }
  for (const measure of MEASURES) {
    const first = season(record.firstAt, measure)
    const last = season(record.firstAt + length * HOUR_MS, measure)
    if (first === undefined || last === undefined) return null
    const values = new Float64Array(length)
    for (let n = 0; n < length; n += 1) {
      const at = record.firstAt + n * HOUR_MS
      const here = season(at, measure)
      const next = season(at + DAY_MS, measure)
      if (here === undefined || next === undefined) return null
      values[n] = here + (next - here) * ((at % DAY_MS) / DAY_MS) - first
    }
    moves[measure] = values
  }
  return moves
}
