import { assertInRange } from '@/lib/assert'

/*
 * Parameters of the two-hydrate sorption equation, degree Celsius form, each a quadratic in temperature:
 * constant, per °C, per °C². Source: Wood Handbook (Ross ed., USDA Forest Products Laboratory, FPL-GTR-190,
 * 2010), ch. 4, Eq. 4-5, after Simpson, Forest Products Journal 23(5), 1973.
 */
const W = [349, 1.29, 0.0135] as const
const K = [0.805, 0.000736, -0.00000273] as const
const K1 = [6.27, -0.00938, -0.000303] as const
const K2 = [1.91, 0.0407, -0.000293] as const
const PCT_SCALE = 1800

/** The same by name, for the page that prints the equation. */
export const EMC_PARAMETERS = { W, K, K1, K2, scale: PCT_SCALE } as const

/** The warmest and coldest the printed table reaches, °C (30 and 200 °F). */
const EQUATION_MIN_C = -1.2
const EQUATION_MAX_C = 93.4

const quadratic = (c: readonly [number, number, number], t: number): number => c[0] + c[1] * t + c[2] * t * t

/**
 * Equilibrium moisture content by the bare equation, over the whole range of its printed table.
 * Readings go through `emcPct`, which keeps to the range this product trusts.
 * @param temperatureC air temperature, °C, -1.2 to 93.4
 * @param humidityPct relative humidity, percent, 0 to 100 (printed for 5 to 95; beyond is extrapolation)
 * @returns moisture content, percent of oven-dry mass
 * @throws RangeError for an input out of range or NaN
 *
 * Within 0.056 % MC of all the printed cells of Table 4-2 that were compared.
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-5 (p. 4-3).
 */
export function emcEquationPct(temperatureC: number, humidityPct: number): number {
  assertInRange('temperatureC', temperatureC, EQUATION_MIN_C, EQUATION_MAX_C)
  assertInRange('humidityPct', humidityPct, 0, 100)
  const k1 = quadratic(K1, temperatureC)
  const k2 = quadratic(K2, temperatureC)
  const x = quadratic(K, temperatureC) * (humidityPct / 100)
  const dissolved = x / (1 - x)
  const hydrated = (k1 * x + 2 * k1 * k2 * x * x) / (1 + k1 * x + k1 * k2 * x * x)
  return (PCT_SCALE / quadratic(W, temperatureC)) * (dissolved + hydrated)
}

/**
 * How steeply the equation's moisture content rises with relative humidity.
 * @param temperatureC air temperature, °C, -1.2 to 93.4
 * @param humidityPct relative humidity, percent, 0 to 100
 * @returns % MC per % RH, always above zero
 * @throws RangeError for an input out of range or NaN
 *
 * Exact derivative of the equation above with respect to relative humidity.
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-5, differentiated.
 */
export function emcEquationSlope(temperatureC: number, humidityPct: number): number {
  assertInRange('temperatureC', temperatureC, EQUATION_MIN_C, EQUATION_MAX_C)
  assertInRange('humidityPct', humidityPct, 0, 100)
  const k1 = quadratic(K1, temperatureC)
  const k2 = quadratic(K2, temperatureC)
  const k = quadratic(K, temperatureC)
  const x = k * (humidityPct / 100)
  const top = k1 * x + 2 * k1 * k2 * x * x
  const bottom = 1 + k1 * x + k1 * k2 * x * x
  const dissolvedSlope = 1 / (1 - x) ** 2
  const hydratedSlope = ((k1 + 4 * k1 * k2 * x) * bottom - top * (k1 + 2 * k1 * k2 * x)) / bottom ** 2
  return (PCT_SCALE / quadratic(W, temperatureC)) * (dissolvedSlope + hydratedSlope) * (k / 100)
}
