import type { RoomKind } from '@/lib/rooms/room'
import { type FeatureTable, featuresOf } from './features'
import { type HourlyRecord, hourOfDayIn, HOUR_MS, type Measure, MEASURES } from './record'
import { FORECAST_HOURS } from './room-forecast'
import { type DayBefore, seasonMoves, seasonOf } from './season'
import { unwarmed, type WarmedCourse, type Warming, warmingsOf } from './warmings'

/** What a room's forecast is made of. Every record ends with the last whole hour before it is made. */
export interface ForecastInput {
  /** Epoch ms, on a whole hour. */
  readonly madeAt: number
  readonly timeZone: string
  /** The room's hours up to `madeAt`: some weeks of them. */
  readonly record: HourlyRecord
  /** An outdoor room's, if the site has one. */
  readonly outdoors: HourlyRecord | null
  /** The room's days a year before, around the record and the days to come; may be empty. */
  readonly lastYear: readonly DayBefore[]
  /** Whether it is a room that somebody lights a stove in now and then; a house is warmed by the clock. */
  readonly isWarmedByHand: boolean
}

export interface Prepared {
  readonly input: ForecastInput
  /** Unwarmed, and without the season's move. */
  readonly calm: HourlyRecord
  readonly moves: { readonly [measure in Measure]: Float64Array } | null
  readonly table: FeatureTable
  readonly isWarmed: Uint8Array
  readonly warmings: readonly Warming[]
  readonly courses: readonly WarmedCourse[]
  readonly hourOfDay: (at: number) => number
}

/** So many of the last seven days' hours must be on record for a forecast. */
const RECENT_HOURS = 7 * 24
const RECENT_MIN = 0.8 * RECENT_HOURS

/** Whether there is enough on record: most of the last seven days, with the hour just past. */
export function isEnough(record: HourlyRecord): boolean {
  const recent = record.emcPct.slice(-RECENT_HOURS)
  let known = 0
  for (const value of recent) if (!Number.isNaN(value)) known += 1
  return known >= RECENT_MIN && !Number.isNaN(recent.at(-1) ?? NaN)
}

/** Takes warmings and season off a record and lays out what is looked at of each hour. */
export function prepared(input: ForecastInput): Prepared {
  const { record } = input
  const hourOfDay = hourOfDayIn(input.timeZone)
  const warmings = input.isWarmedByHand
    ? warmingsOf(record, (n) => hourOfDay(record.firstAt + n * HOUR_MS))
    : []
  const without = unwarmed(record, warmings)
  const moves =
    input.lastYear.length === 0 ? null : seasonMoves(record, seasonOf(input.lastYear), FORECAST_HOURS + 1)
  const calm = { ...without.record }
  if (moves !== null)
    for (const measure of MEASURES)
      calm[measure] = calm[measure].map((value, n) => value - (moves[measure][n] ?? 0))
  return {
    input,
    calm,
    moves,
    table: featuresOf(calm, hourOfDay, input.outdoors),
    isWarmed: without.isWarmed,
    warmings,
    courses: without.courses,
    hourOfDay,
  }
}

/** Rooms in which somebody lights a fire now and then; a house is warmed by the clock, which its hours of day tell. */
export const isWarmedByHand = (kind: RoomKind): boolean =>
  kind === 'shop' || kind === 'store' || kind === 'van'

/** The hours of a room on record that were warmed by hand, epoch ms. */
export function warmedHours(input: ForecastInput): ReadonlySet<number> {
  const { isWarmed } = prepared(input)
  const { firstAt } = input.record
  return new Set([...isWarmed].flatMap((warmed, n) => (warmed === 1 ? [firstAt + n * HOUR_MS] : [])))
}
