import { assertInRange } from '@/lib/assert'
import { AIR_MAX_C, AIR_MIN_C } from './humidity'

/** Heat capacity of dry air and of vapour, kJ/(kg K), and heat of vaporisation at 0 °C, kJ/kg. Source: as below. */
export const DRY_AIR_HEAT_CAPACITY = 1.006
export const VAPOUR_HEAT_CAPACITY = 1.86
export const VAPORISATION_HEAT_AT_ZERO = 2501

/**
 * Heat in moist air, counted from dry air and liquid water at 0 °C.
 * @param temperatureC air temperature, °C, -40 to 60
 * @param ratio humidity ratio, kg per kg of dry air, 0 to 1
 * @returns kJ per kg of dry air
 * @throws RangeError for an input out of range or NaN
 *
 * Ideal gas; within 1 % of ASHRAE's printed real-gas table.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 30.
 */
export function enthalpyKjKg(temperatureC: number, ratio: number): number {
  assertInRange('temperatureC', temperatureC, AIR_MIN_C, AIR_MAX_C)
  assertInRange('ratio', ratio, 0, 1)
  return (
    DRY_AIR_HEAT_CAPACITY * temperatureC +
    ratio * (VAPORISATION_HEAT_AT_ZERO + VAPOUR_HEAT_CAPACITY * temperatureC)
  )
}
