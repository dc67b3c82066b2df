import { dewPointC } from './dew-point'
import { DRY_AIR_HEAT_CAPACITY, VAPORISATION_HEAT_AT_ZERO, VAPOUR_HEAT_CAPACITY } from './enthalpy'
import { assertAir, humidityRatio, STANDARD_PRESSURE_PA, vapourPressurePa } from './humidity'
import { saturationPressurePa } from './saturation'

/*
 * Above freezing: fall of the heat of vaporisation with temperature and heat capacity of water, kJ/(kg K).
 * Below: heat of sublimation at 0 °C, kJ/kg, its fall and the heat capacity of ice, kJ/(kg K).
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 33 and 35.
 */
export const VAPORISATION_FALL = 2.326
export const WATER_HEAT_CAPACITY = 4.186
export const SUBLIMATION_HEAT_AT_ZERO = 2830
export const SUBLIMATION_FALL = 0.24
export const ICE_HEAT_CAPACITY = 2.1

/** Lowest wet bulb looked for in air without any water, °C: under that of the coldest air accepted. */
const LOWEST_WET_BULB_C = -60
const TOLERANCE_C = 1e-6

function ratioAtWetBulb(temperatureC: number, wetBulb: number, pressurePa: number): number {
  const saturated = humidityRatio(saturationPressurePa(wetBulb), pressurePa)
  const sensible = DRY_AIR_HEAT_CAPACITY * (temperatureC - wetBulb)
  const vapour = VAPOUR_HEAT_CAPACITY * temperatureC
  return wetBulb >= 0
    ? ((VAPORISATION_HEAT_AT_ZERO - VAPORISATION_FALL * wetBulb) * saturated - sensible) /
        (VAPORISATION_HEAT_AT_ZERO + vapour - WATER_HEAT_CAPACITY * wetBulb)
    : ((SUBLIMATION_HEAT_AT_ZERO - SUBLIMATION_FALL * wetBulb) * saturated - sensible) /
        (SUBLIMATION_HEAT_AT_ZERO + vapour - ICE_HEAT_CAPACITY * wetBulb)
}

/**
 * What a thermometer in a wet wick, in moving air, would show.
 * @param temperatureC air temperature, °C, -40 to 60
 * @param humidityPct relative humidity, percent, 0 to 100 (over ice below 0 °C)
 * @param pressurePa total pressure, Pa
 * @returns °C, never above temperatureC
 * @throws RangeError for an input out of range or NaN
 *
 * Found by halving between dew point and air temperature (to 1e-6 K). Where the wick freezes the equations for
 * water and ice differ, so a figure within about 0.5 K of 0 °C is no better than that. Agrees with psychrolib
 * 1.1.1 within 0.001 K.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 33 and 35.
 */
export function wetBulbC(
  temperatureC: number,
  humidityPct: number,
  pressurePa: number = STANDARD_PRESSURE_PA,
): number {
  assertAir(temperatureC, humidityPct)
  const vapourPa = vapourPressurePa(temperatureC, humidityPct)
  const ratio = humidityRatio(vapourPa, pressurePa)
  const dewPoint = dewPointC(vapourPa)
  let low = dewPoint.ok ? Math.min(dewPoint.value, temperatureC) : LOWEST_WET_BULB_C
  let high = temperatureC
  while (high - low > TOLERANCE_C) {
    const middle = (low + high) / 2
    if (ratioAtWetBulb(temperatureC, middle, pressurePa) > ratio) high = middle
    else low = middle
  }
  return (low + high) / 2
}
