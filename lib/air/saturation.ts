import { assertInRange } from '@/lib/assert'
import { kelvinFromCelsius } from '@/lib/units'

/**
 * What the humidity of freezing air is counted against. Published tables use ice below the triple point; common
 * room sensors report over water at every temperature (WMO practice; status: from memory), so what comes from a
 * sensor is worked out with `water`.
 */
export type SaturatedOver = 'ice-below-zero' | 'water'

/** Temperature at which ice, water and vapour meet, °C. Source: ITS-90. */
export const TRIPLE_POINT_C = 0.01

export const SATURATION_MIN_C = -100
export const SATURATION_MAX_C = 200

/*
 * Hyland and Wexler's coefficients, in ln(Pa) against kelvin: 1/K, constant, K, K², K³, K⁴, ln K.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 5 (ice) and 6 (water).
 */
export const OVER_ICE = [
  -5.6745359e3, 6.3925247, -9.677843e-3, 6.2215701e-7, 2.0747825e-9, -9.484024e-13, 4.1635019,
] as const
export const OVER_WATER = [
  -5.8002206e3, 1.3914993, -4.8640239e-2, 4.1764768e-5, -1.4452093e-8, 0, 6.5459673,
] as const

/**
 * The pressure of water vapour in saturated air.
 * @param temperatureC air temperature, °C, -100 to 200
 * @param over whether freezing air is counted against ice (as tables are) or water (as sensors are)
 * @returns pascal
 * @throws RangeError for an input out of range or NaN
 *
 * Within 0.022 % of the IAPWS saturation equation over 5 to 50 °C. Over water below 0 °C the water equation is
 * continued; it lies 5 % above ice at -5 °C and 10 % at -10 °C.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 5 and 6 (Hyland and Wexler 1983).
 */
export function saturationPressurePa(temperatureC: number, over: SaturatedOver = 'ice-below-zero'): number {
  assertInRange('temperatureC', temperatureC, SATURATION_MIN_C, SATURATION_MAX_C)
  const k = kelvinFromCelsius(temperatureC)
  const ice = over === 'ice-below-zero' && temperatureC <= TRIPLE_POINT_C
  const [c0, c1, c2, c3, c4, c5, c6] = ice ? OVER_ICE : OVER_WATER
  return Math.exp(c0 / k + c1 + k * (c2 + k * (c3 + k * (c4 + k * c5))) + c6 * Math.log(k))
}

/** Magnus coefficients: Pa, none, °C. Source: WMO Guide to Instruments (WMO-No. 8), annex 4.B. Status: from memory. */
export const MAGNUS_PA = 611.2
export const MAGNUS_A = 17.62
export const MAGNUS_B_C = 243.12

/**
 * A short form of the above for lines on charts, where a pixel is coarser than its error.
 * @param temperatureC air temperature, °C, -45 to 60
 * @returns pascal, over water
 * @throws RangeError for an input out of range or NaN
 *
 * Between -0.29 % and +0.01 % from the full equation over 0 to 50 °C.
 * Source: Magnus form with the coefficients of the WMO Guide to Instruments (WMO-No. 8); status: from memory.
 */
export function saturationPressureForChartsPa(temperatureC: number): number {
  assertInRange('temperatureC', temperatureC, -45, 60)
  return MAGNUS_PA * Math.exp((MAGNUS_A * temperatureC) / (MAGNUS_B_C + temperatureC))
}
