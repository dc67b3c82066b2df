import { assertInRange } from '@/lib/assert'

/*
 * Parameters of the two-hydrate sorption equation, degree Celsius form, each a quadratic in temperature:
 * constant, per °C, per °C². Source: Wood Handbook (Ross ed., USDA Forest Products Laboratory, FPL-GTR-190,
 * 2010), ch. 4, Eq. 4-5, after Simpson, Forest Products Journal 23(5), 1973.
 */
const W_0 = 349
const W_1 = 1.29
const W_2 = 0.0135
const K_0 = 0.805
const K_1 = 0.000736
const K_2 = -0.00000273
const K1_0 = 6.27
const K1_1 = -0.00938
const K1_2 = -0.000303
const K2_0 = 1.91
const K2_1 = 0.0407
const K2_2 = -0.000293
const PCT_SCALE = 1800

/** The same by name, for the page that prints the equation. */
export const EMC_PARAMETERS = {
  W: [W_0, W_1, W_2],
  K: [K_0, K_1, K_2],
  K1: [K1_0, K1_1, K1_2],
  K2: [K2_0, K2_1, K2_2],
  scale: PCT_SCALE,
} as const

const hydrateW = (t: number): number => W_0 + W_1 * t + W_2 * t * t
const hydrateK = (t: number): number => K_0 + K_1 * t + K_2 * t * t
const hydrateK1 = (t: number): number => K1_0 + K1_1 * t + K1_2 * t * t
const hydrateK2 = (t: number): number => K2_0 + K2_1 * t + K2_2 * t * t

/**
 * The bare equation, for callers that have checked the air themselves: every reading ever taken passes here.
 * @param temperatureC °C, within the printed table; @param humidityPct percent, 0 to 100
 */
export function emcUncheckedPct(temperatureC: number, humidityPct: number): number {
  const t = temperatureC
  // Written out rather than by the four functions above: the engine then sets it into the caller's loop.
  const k1 = K1_0 + K1_1 * t + K1_2 * t * t
  const k1k2 = k1 * (K2_0 + K2_1 * t + K2_2 * t * t)
  const x = (K_0 + K_1 * t + K_2 * t * t) * humidityPct * 0.01
  const both = k1k2 * x * x
  const dry = 1 - x
  const hydrates = 1 + k1 * x + both
  // x / dry + (k1 x + 2 both) / hydrates, all over W, brought to one denominator: a division costs as much as ten products.
  return (
    (PCT_SCALE * (x * hydrates + (k1 * x + 2 * both) * dry)) /
    ((W_0 + W_1 * t + W_2 * t * t) * dry * hydrates)
  )
}

/** The warmest and coldest the printed table reaches, °C (30 and 200 °F). */
const EQUATION_MIN_C = -1.2
const EQUATION_MAX_C = 93.4

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
  return emcUncheckedPct(temperatureC, humidityPct)
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
  const k1 = hydrateK1(temperatureC)
  const k2 = hydrateK2(temperatureC)
  const k = hydrateK(temperatureC)
  const x = k * (humidityPct / 100)
  const top = k1 * x + 2 * k1 * k2 * x * x
  const bottom = 1 + k1 * x + k1 * k2 * x * x
  const dissolvedSlope = 1 / (1 - x) ** 2
  const hydratedSlope = ((k1 + 4 * k1 * k2 * x) * bottom - top * (k1 + 2 * k1 * k2 * x)) / bottom ** 2
  return (PCT_SCALE / hydrateW(temperatureC)) * (dissolvedSlope + hydratedSlope) * (k / 100)
}
