const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS

/** How long the present difference from yesterday counts, fading to nothing. Status: guess. */
const FADES_OVER_MS = 6 * HOUR_MS
/** Yesterday's hour may be missing: this many days back are looked at for the same hour. */
const DAYS_BACK = 3

/** What is shown while the coming hours are carried over from yesterday. */
export const NO_FORECAST_NOTE =
  'No forecast yet: the same hours as yesterday, with the present difference fading over 6 h.'

export type AirHour = { readonly at: number; readonly emcPct: number; readonly temperatureC: number }
export type AirRecord = {
  readonly at: number
  readonly emcPct: number | null
  readonly temperatureC: number | null
}

type Measure = 'emcPct' | 'temperatureC'

/** The mean of the hour that holds a moment, on the last day that has one. Undefined where none of them does. */
function sameHourBefore(
  record: ReadonlyMap<number, AirRecord>,
  at: number,
  now: number,
  measure: Measure,
): number | undefined {
  const hourAt = Math.floor(at / HOUR_MS) * HOUR_MS
  const daysToPast = Math.max(1, Math.ceil((hourAt + HOUR_MS - now) / DAY_MS))
  for (let days = daysToPast; days < daysToPast + DAYS_BACK; days += 1) {
    const value = record.get(hourAt - days * DAY_MS)?.[measure]
    if (value !== undefined && value !== null) return value
  }
  return undefined
}

/**
 * The coming hours of a room without a forecast: the same hours as yesterday, shifted by how far the present is from
 * yesterday's, which fades over 6 h.
 * @param input `present` as last read; `record` hourly means of the last days (their `at` on whole hours, epoch ms);
 *   `startsAt` and `hours`: which hours are wanted
 * @returns EMC (% MC, 0 to 30) and temperature (°C) for each hour from `startsAt`; where no day before has that hour,
 *   the present value
 *
 * Source: none; the simplest forecast that knows day from night. Status: guess.
 */
export function comingHours(input: {
  readonly now: number
  readonly startsAt: number
  readonly hours: number
  readonly present: { readonly emcPct: number; readonly temperatureC: number }
  readonly record: readonly AirRecord[]
}): AirHour[] {
  const record = new Map(input.record.map((hour) => [hour.at, hour]))
  const valueAt = (at: number, measure: Measure): number => {
    const present = input.present[measure]
    const before = sameHourBefore(record, at, input.now, measure)
    if (before === undefined) return present
    const beforeNow = sameHourBefore(record, input.now, input.now, measure) ?? present
    const stays = Math.max(0, 1 - Math.max(0, at - input.now) / FADES_OVER_MS)
    return before + (present - beforeNow) * stays
  }
  return Array.from({ length: input.hours }, (_, n) => {
    const at = input.startsAt + n * HOUR_MS
    return {
      at,
      emcPct: Math.min(30, Math.max(0, valueAt(at, 'emcPct'))),
      temperatureC: valueAt(at, 'temperatureC'),
    }
  })
}
