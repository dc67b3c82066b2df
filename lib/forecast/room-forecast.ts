import { z } from 'zod'

/** How many hours a forecast speaks of. */
export const FORECAST_HOURS = 48
/** The hours ahead that are looked at again once they have come. */
export const SCORED_LEADS = [1, 3, 6, 12, 24, 48] as const

/** Which way of telling an hour is used: the room's own record, same as now, or the same hour of the last whole day. */
export const forecastMethodSchema = z.enum(['record', 'same-as-now', 'yesterday'])
export type ForecastMethod = z.infer<typeof forecastMethodSchema>

const columnOf = <T extends z.ZodType>(value: T) => z.array(value).length(FORECAST_HOURS)

/** What a room would be if it were lit: told only where the room's own record holds enough of that. */
export const warmedSchema = z.object({
  /** The usual hour of lighting on record, "08:00" in the site's zone. */
  litAtTime: z.string(),
  /** When it would be lit: the coming moments of that hour, epoch ms. */
  litAt: z.array(z.number()),
  /** How many warmings on record it is taken from. */
  warmings: z.int(),
  /** Hours of warmth, from the lighting on. */
  lengthHours: z.int(),
  /** For each of the 48 hours what it would be; null for those that no lighting would warm. */
  temperatureC: columnOf(z.number().nullable()),
  emcPct: columnOf(z.number().nullable()),
  emcPctLow: columnOf(z.number().nullable()),
  emcPctHigh: columnOf(z.number().nullable()),
})
export type WarmedForecast = z.infer<typeof warmedSchema>

/**
 * The next 48 hours of a room that nobody warms. Element n speaks of the hour that begins n hours after `madeAt`, which
 * is n + 1 hours after the last whole hour that was read.
 */
export const roomForecastSchema = z.object({
  /** Epoch ms, on a whole hour. */
  madeAt: z.number(),
  temperatureC: columnOf(z.number()),
  humidityPct: columnOf(z.number()),
  emcPct: columnOf(z.number()),
  /** The middle 8 in 10. */
  emcPctLow: columnOf(z.number()),
  emcPctHigh: columnOf(z.number()),
  method: columnOf(forecastMethodSchema),
  /** What each way says by itself, % MC: kept so that each can be scored. */
  recordPct: columnOf(z.number()),
  sameAsNowPct: z.number(),
  yesterdayPct: columnOf(z.number().nullable()),
  /** From an outdoor room as well as from its own record. */
  usesOutdoors: z.boolean(),
  /** The season is taken from the same weeks a year before. */
  usesLastYear: z.boolean(),
  warmed: warmedSchema.nullable(),
})
export type RoomForecast = z.infer<typeof roomForecastSchema>

/** The same forecast for a room that is lit at the usual hour; itself where no lighting is promised. */
export function litForecast(forecast: RoomForecast): RoomForecast {
  const { warmed } = forecast
  if (warmed === null) return forecast
  const either = (lit: readonly (number | null)[], unlit: readonly number[]) =>
    unlit.map((value, n) => lit[n] ?? value)
  return {
    ...forecast,
    temperatureC: either(warmed.temperatureC, forecast.temperatureC),
    emcPct: either(warmed.emcPct, forecast.emcPct),
    emcPctLow: either(warmed.emcPctLow, forecast.emcPctLow),
    emcPctHigh: either(warmed.emcPctHigh, forecast.emcPctHigh),
  }
}
