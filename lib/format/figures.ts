import type { UnitSystem } from '@/lib/sites/site'
import { fahrenheitFromCelsius, inchesFromMm, ouncesFromGrams } from '@/lib/units'

/** A no-break space, so that a figure never parts from its unit at the end of a line. */
const NBSP = '\u00a0'

/** Rounds without ever giving a minus sign to zero. */
function fixed(value: number, digits: number): string {
  const text = value.toFixed(digits)
  return Number(text) === 0 ? (0).toFixed(digits) : text.replace('-', '−')
}

/** Equilibrium or wood moisture content to 0.1: "8.5 % MC". */
export const formatEmc = (emcPct: number): string => `${fixed(emcPct, 1)}${NBSP}%${NBSP}MC`

/** Just the figure, for scales and table columns whose heading carries the unit: "8.5". */
export const formatEmcFigure = (emcPct: number): string => fixed(emcPct, 1)

/** Relative humidity to 1: "71 % RH". */
export const formatHumidity = (humidityPct: number): string => `${fixed(humidityPct, 0)}${NBSP}%${NBSP}RH`

/** A difference of moisture contents, in points of % MC: "5.1 points", "1.0 point". */
export function formatPoints(points: number): string {
  const text = fixed(Math.abs(points), 1)
  return `${text}${NBSP}${text === '1.0' ? 'point' : 'points'}`
}

/** Temperature to 0.1 °C, or to 1 °F: "8.2 °C". */
export function formatTemperature(temperatureC: number, units: UnitSystem = 'metric'): string {
  return units === 'metric'
    ? `${fixed(temperatureC, 1)}${NBSP}°C`
    : `${fixed(fahrenheitFromCelsius(temperatureC), 0)}${NBSP}°F`
}

/** A length as a maker reads it: to 0.1 mm (or 0.01 in), without an idle nought: "62 mm", "2.5 mm". */
export function formatLength(lengthMm: number, units: UnitSystem = 'metric'): string {
  return units === 'metric'
    ? `${trimmed(lengthMm, 1)}${NBSP}mm`
    : `${fixed(inchesFromMm(lengthMm), 2)}${NBSP}in`
}

/** A clearance, an ovality or another fine size of a joint, to 0.05 mm (or 0.002 in): "0.15 mm". */
export function formatFineLength(lengthMm: number, units: UnitSystem = 'metric'): string {
  return units === 'metric'
    ? `${fixed(Math.round(lengthMm * 20) / 20, 2)}${NBSP}mm`
    : `${fixed(Math.round(inchesFromMm(lengthMm) * 500) / 500, 3)}${NBSP}in`
}

/** Mass to 0.1 g (or 0.01 oz), without an idle nought: "84.5 g". */
export function formatMass(massG: number, units: UnitSystem = 'metric'): string {
  return units === 'metric' ? `${trimmed(massG, 1)}${NBSP}g` : `${fixed(ouncesFromGrams(massG), 2)}${NBSP}oz`
}

/** "1 sensor", "9 sensors". */
export function formatCount(count: number, one: string, many = `${one}s`): string {
  return `${String(count)} ${count === 1 ? one : many}`
}

/** A share of what a lid may lose, in words: "a quarter used", "half used", "more than all used". */
export function formatUsed(fraction: number): string {
  if (fraction > 1.02) return 'more than all used'
  const step = USED_WORDS.find(([upTo]) => fraction <= upTo)
  return `${step?.[1] ?? 'all'} used`
}

const USED_WORDS: readonly (readonly [number, string])[] = [
  [0.05, 'hardly any'],
  [0.17, 'a tenth'],
  [0.29, 'a quarter'],
  [0.41, 'a third'],
  [0.58, 'half'],
  [0.71, 'two thirds'],
  [0.87, 'three quarters'],
  [0.97, 'nearly all'],
]

function trimmed(value: number, digits: number): string {
  return fixed(value, digits).replace(/\.0+$/, '')
}
