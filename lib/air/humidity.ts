import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { kelvinFromCelsius } from '@/lib/units'
import { saturationPressurePa, type SaturatedOver } from './saturation'

/** Coldest and warmest air that these functions answer for, °C. */
export const AIR_MIN_C = -40
export const AIR_MAX_C = 60

/** Pressure of the standard atmosphere, Pa. Source: ASHRAE Handbook, Fundamentals (2017), ch. 1. */
export const STANDARD_PRESSURE_PA = 101_325

/** Molar mass of water over that of dry air. Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 20. */
export const WATER_TO_AIR_MASS_RATIO = 0.621945

/** Gas constant of water vapour, J/(kg K). Source: CODATA gas constant over the molar mass of water. */
export const VAPOUR_GAS_CONSTANT = 461.523
const GRAMS_PER_KG = 1000

export function assertAir(temperatureC: number, humidityPct: number): void {
  assertInRange('temperatureC', temperatureC, AIR_MIN_C, AIR_MAX_C)
  assertInRange('humidityPct', humidityPct, 0, 100)
}

/**
 * The pressure of the water vapour that the air holds.
 * @param temperatureC air temperature, °C, -40 to 60
 * @param humidityPct relative humidity, percent, 0 to 100
 * @param over what freezing air's humidity is counted against
 * @returns pascal
 * @throws RangeError for an input out of range or NaN
 *
 * Source: definition of relative humidity, ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 12.
 */
export function vapourPressurePa(
  temperatureC: number,
  humidityPct: number,
  over: SaturatedOver = 'ice-below-zero',
): number {
  assertAir(temperatureC, humidityPct)
  return (humidityPct / 100) * saturationPressurePa(temperatureC, over)
}

/**
 * Mass of water vapour for each kilogram of dry air.
 * @param vapourPa pressure of the vapour, Pa, 0 up to (not including) the total pressure
 * @param pressurePa total pressure, Pa
 * @returns kg per kg of dry air
 * @throws RangeError for an input out of range or NaN
 *
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 20.
 */
export function humidityRatio(vapourPa: number, pressurePa: number = STANDARD_PRESSURE_PA): number {
  assertFiniteAbove('pressurePa', pressurePa, 0)
  assertInRange('vapourPa', vapourPa, 0, pressurePa * 0.999)
  return (WATER_TO_AIR_MASS_RATIO * vapourPa) / (pressurePa - vapourPa)
}

/**
 * Mass of water vapour in each cubic metre of air.
 * @param temperatureC air temperature, °C, -40 to 60
 * @param vapourPa pressure of the vapour, Pa, 0 or more
 * @returns g/m³
 * @throws RangeError for an input out of range or NaN
 *
 * Source: ideal gas law for water vapour.
 */
export function absoluteHumidityGM3(temperatureC: number, vapourPa: number): number {
  assertInRange('temperatureC', temperatureC, AIR_MIN_C, AIR_MAX_C)
  assertInRange('vapourPa', vapourPa, 0, STANDARD_PRESSURE_PA)
  return (GRAMS_PER_KG * vapourPa) / (VAPOUR_GAS_CONSTANT * kelvinFromCelsius(temperatureC))
}

/**
 * Relative humidity of the same air after it is warmed or cooled, with no water added or removed.
 * @param humidityPct relative humidity before, percent, 0 to 100
 * @param fromC temperature before, °C, -40 to 60
 * @param toC temperature after, °C, -40 to 60
 * @param over what freezing air's humidity is counted against
 * @returns relative humidity after, percent. Over 100 means condensation; not clipped, so the caller sees it.
 * @throws RangeError for an input out of range or NaN
 *
 * Assumes equal total pressure. An error of 2 points in humidityPct becomes 2 * ps(fromC) / ps(toC) points.
 * Source: definition of relative humidity, ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 12 and 22.
 */
export function humidityAfterTemperatureChangePct(
  humidityPct: number,
  fromC: number,
  toC: number,
  over: SaturatedOver = 'ice-below-zero',
): number {
  assertInRange('humidityPct', humidityPct, 0, 100)
  assertInRange('fromC', fromC, AIR_MIN_C, AIR_MAX_C)
  assertInRange('toC', toC, AIR_MIN_C, AIR_MAX_C)
  return (humidityPct * saturationPressurePa(fromC, over)) / saturationPressurePa(toC, over)
}
