import { saturationPressurePa } from '@/lib/air/saturation'
import type { Noise } from './noise'

export interface OutdoorAir {
  temperatureC: number
  /** Pressure of the water vapour, Pa. */
  vapourPa: number
  /** 0 in a clear sky, 1 under full cloud. */
  cloud: number
}

/** What a scenario adds to the weather; both fall back to nought. */
export interface WeatherChange {
  warmerC: number
  /** How much nearer the dew point comes to the temperature, as a fraction: 1 is fog. */
  damper: number
}

export type Weather = (atMs: number) => WeatherChange

export const plainWeather: Weather = () => ({ warmerC: 0, damper: 0 })

export const HOUR_MS = 3_600_000
export const DAY_MS = 24 * HOUR_MS
const DAYS_A_YEAR = 365.2425
/** Day of the year on which the estuary is warmest on average. Invented, like every figure of this place. */
const WARMEST_DAY = 205

/** 1 at the height of summer, -1 in the depth of winter. */
export const seasonOf = (atMs: number): number =>
  Math.cos((2 * Math.PI * (atMs / DAY_MS - WARMEST_DAY)) / DAYS_A_YEAR)

export const hourOfDay = (atMs: number): number => (atMs / HOUR_MS) % 24

const between = (value: number, min: number, max: number): number => Math.min(max, Math.max(min, value))

/** Channels of the noise, one for each thing that wanders by itself. */
const channel = { spell: 1, front: 2, squall: 3, cloud: 4, dampness: 5 }

/**
 * The air outside: a mild, damp northern estuary. Seasons and days are cosines; weather is smooth noise at periods of
 * nine days, four days and a day and a half. The dew point follows the day's temperature, so that the humidity falls
 * by itself on a sunny afternoon and reaches the nineties at night.
 */
export function outdoorAir(noise: Noise, weather: Weather, atMs: number): OutdoorAir {
  const days = atMs / DAY_MS
  const season = seasonOf(atMs)
  const summer = (1 + season) / 2
  const change = weather(atMs)

  const front = noise(channel.front, days / 3.7)
  const cloud = between(
    0.55 + 0.45 * noise(channel.cloud, days / 1.6) + 0.25 * front + 0.5 * change.damper,
    0,
    1,
  )
  const dayC =
    9.6 +
    5.4 * season +
    (2.6 - summer) * noise(channel.spell, days / 9) +
    2 * front +
    0.8 * noise(channel.squall, days / 1.4) +
    change.warmerC
  const swingC = (0.8 + 3 * summer) * (1.25 - cloud)
  const temperatureC = dayC + swingC * Math.cos((2 * Math.PI * (hourOfDay(atMs) - 14.5)) / 24)

  const dryC = 2.2 + 1.3 * summer - 1.1 * noise(channel.dampness, days / 2.6) - 0.8 * cloud
  const dewPointC = dayC - between(dryC, 0.5, 8) * (1 - change.damper)
  const mostPa = 0.97 * saturationPressurePa(temperatureC, 'water')
  return { temperatureC, cloud, vapourPa: Math.min(mostPa, saturationPressurePa(dewPointC, 'water')) }
}
