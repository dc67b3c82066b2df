import { humidityAfterTemperatureChangePct } from '@/lib/air/humidity'
import type { UnitSystem } from '@/lib/sites/site'
import { celsiusFromFahrenheit, fahrenheitFromCelsius } from '@/lib/units'
import { humidityForEmcPct } from '@/lib/wood/emc'

export type AirPoint = { readonly temperatureC: number; readonly humidityPct: number }

/** Moisture contents that have a line, % MC. */
export const LINES_PCT = [6, 8, 10, 12, 14, 16, 18] as const

const USUAL_C: readonly [number, number] = [0, 35]
const STEP_C = 2.5

/** The temperatures that are drawn: those of houses and shops, or as far as the points lie. */
export function temperatureDomain(temperaturesC: readonly number[]): readonly [number, number] {
  const low = Math.floor(Math.min(USUAL_C[0], ...temperaturesC) / 5) * 5
  const high = Math.ceil(Math.max(USUAL_C[1], ...temperaturesC) / 5) * 5
  return [low, high]
}

function temperatures([low, high]: readonly [number, number]): number[] {
  return Array.from({ length: Math.round((high - low) / STEP_C) + 1 }, (_, step) => low + step * STEP_C)
}

/** Where wood ends at this moisture content: one point for each temperature. */
export function lineOfEmc(emcPct: number, domain: readonly [number, number]): AirPoint[] {
  return temperatures(domain).flatMap((temperatureC) => {
    const found = humidityForEmcPct(temperatureC, emcPct)
    return found.ok ? [{ temperatureC, humidityPct: found.value }] : []
  })
}

/** The plot cuts a line off at saturation; one point beyond lets it reach there. */
const BEYOND_PCT = 120

/** The same air at other temperatures, no water added or taken, up to a little past where it condenses. */
export function lineOfSameAir(air: AirPoint, domain: readonly [number, number]): AirPoint[] {
  return temperatures(domain)
    .concat(air.temperatureC)
    .sort((a, b) => a - b)
    .map((temperatureC) => ({
      temperatureC,
      humidityPct: humidityAfterTemperatureChangePct(air.humidityPct, air.temperatureC, temperatureC),
    }))
    .filter((point) => point.humidityPct <= BEYOND_PCT)
}

/** Whole temperatures for the axis, with what is written there. */
export function temperatureTicks(
  [low, high]: readonly [number, number],
  units: UnitSystem,
  isNarrow: boolean,
): { temperatureC: number; text: string }[] {
  const [from, to, every] =
    units === 'metric'
      ? [low, high, isNarrow ? 10 : 5]
      : [fahrenheitFromCelsius(low), fahrenheitFromCelsius(high), isNarrow ? 20 : 10]
  const first = Math.ceil(from / every) * every
  return Array.from({ length: Math.floor((to - first) / every) + 1 }, (_, step) => {
    const value = first + step * every
    return {
      temperatureC: units === 'metric' ? value : celsiusFromFahrenheit(value),
      text: String(value).replace('-', '−'),
    }
  })
}
