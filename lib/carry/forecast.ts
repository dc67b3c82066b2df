import { FORECAST_HOURS, type RoomForecast } from '@/lib/forecast/room-forecast'

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

/**
 * The coming hours of a room that has a forecast, shifted by how far the present is from it, which fades over 6 h.
 * @returns one for each hour from `startsAt` that the forecast still holds; fewer than asked for past its end
 */
export function forecastHours(input: {
  readonly now: number
  readonly startsAt: number
  readonly hours: number
  readonly present: { readonly emcPct: number; readonly temperatureC: number }
  readonly forecast: RoomForecast
}): AirHour[] {
  const { forecast, now, present } = input
  const indexOf = (at: number) => Math.floor((at - forecast.madeAt) / HOUR_MS)
  const valueAt = (at: number, measure: Measure): number => {
    const told = (when: number) => forecast[measure][Math.max(0, indexOf(when))] ?? present[measure]
    const stays = Math.max(0, 1 - Math.max(0, at - now) / FADES_OVER_MS)
    return told(at) + (present[measure] - told(now)) * stays
  }
  const held = FORECAST_HOURS - indexOf(input.startsAt)
  return Array.from({ length: Math.max(0, Math.min(input.hours, held)) }, (_, n) => {
    const at = input.startsAt + n * HOUR_MS
    return {
      at,
      emcPct: Math.min(30, Math.max(0, valueAt(at, 'emcPct'))),
      temperatureC: valueAt(at, 'temperatureC'),
    }
  })
}

/** Half the middle 8 in 10 of an hour so far ahead, ± % MC; beyond the forecast as in its last hour. */
const forecastDoubtPct = (forecast: RoomForecast, at: number): number => {
  const n = Math.min(FORECAST_HOURS - 1, Math.max(0, Math.floor((at - forecast.madeAt) / HOUR_MS)))
  return ((forecast.emcPctHigh[n] ?? 0) - (forecast.emcPctLow[n] ?? 0)) / 2
}

/** From a mean error, either way, to the edge of the middle 8 in 10. Source: the normal law, 1.2816 √(π/2). */
const EDGE_OF_MEAN_ERROR = 1.606
/** How soon yesterday's hours are as far out as they ever are. Status: guess. */
const REPEAT_DOUBT_FULL_MS = DAY_MS

/** How far the same hour of the day before was out on record, ± % MC; nothing known of it: 0. */
function repeatDoubtPct(record: readonly AirRecord[]): number {
  const byHour = new Map(record.map((hour) => [hour.at, hour.emcPct]))
  const errors = record.flatMap(({ at, emcPct }) => {
    const before = byHour.get(at - DAY_MS) ?? null
    return emcPct === null || before === null ? [] : Math.abs(emcPct - before)
  })
  return errors.length === 0
    ? 0
    : (EDGE_OF_MEAN_ERROR * errors.reduce((sum, one) => sum + one, 0)) / errors.length
}

/**
 * How far the air of a stay may come out other than told, ± % MC, 8 in 10: the mean over its hours, as wood feels their
 * mean. What was recorded already is not in doubt here, so that a longer stay ahead is a wider one.
 */
export function aheadDoubtPct(input: {
  readonly now: number
  readonly startsAt: number
  readonly stayMs: number
  readonly forecast: RoomForecast | null
  readonly record: readonly AirRecord[]
}): number {
  const { now, startsAt, forecast } = input
  const steps = Math.max(1, Math.min(72, Math.ceil(input.stayMs / HOUR_MS)))
  const repeat = forecast === null ? repeatDoubtPct(input.record) : 0
  let sum = 0
  for (let n = 0; n < steps; n += 1) {
    const at = startsAt + ((n + 0.5) * input.stayMs) / steps
    if (at <= now) continue
    sum +=
      forecast === null
        ? repeat * Math.min(1, (at - now) / REPEAT_DOUBT_FULL_MS)
        : forecastDoubtPct(forecast, at)
  }
  return sum / steps
}
