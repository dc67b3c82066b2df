import { assertInRange } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import { emcEquationPct, emcEquationSlope, emcUncheckedPct } from './emc-equation'

/* Not exported, so that the innermost loops find them as plain numbers. */
const COLDEST_C = -10
const WARMEST_C = 50

/** Range of air this product answers for, °C and percent. Colder or warmer air is refused, never guessed. */
export const EMC_TEMPERATURE_MIN_C = COLDEST_C
export const EMC_TEMPERATURE_MAX_C = WARMEST_C

/**
 * Fibre saturation as a round figure: no moisture content above it is ever given for wood in air.
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4 (30 % as the usual average).
 */
export const EMC_MAX_PCT = 30

/** Typical accuracy of a room sensor. Status: from memory; data sheets give ±2 to 3 % RH and ±0.3 K. */
export const TYPICAL_HUMIDITY_DOUBT_PCT = 3
export const TYPICAL_TEMPERATURE_DOUBT_C = 0.3

/** Half width of the step over which the small effect of temperature is measured, K. */
const TEMPERATURE_STEP_C = 0.5
const HUMIDITY_TOLERANCE_PCT = 1e-9

export type EmcFlag = 'below-zero' | 'below-5-rh' | 'above-95-rh'

const clamped = (value: number, min: number, max: number): number => Math.min(max, Math.max(min, value))

/** Below freezing the equation's temperature term is extrapolation: the figure at 0 °C stands, flagged. */
const equationC = (temperatureC: number): number => Math.max(0, temperatureC)

function assertAir(temperatureC: number, humidityPct: number): void {
  assertInRange('temperatureC', temperatureC, EMC_TEMPERATURE_MIN_C, EMC_TEMPERATURE_MAX_C)
  assertInRange('humidityPct', humidityPct, 0, 100)
}

/**
 * Equilibrium moisture content: what wood left in this air for long enough ends up at.
 * @param temperatureC air temperature, °C, -10 to 50; below 0 the figure for 0 °C is returned (see `emcFlags`)
 * @param humidityPct relative humidity, percent, 0 to 100
 * @returns moisture content, percent of oven-dry mass, 0 to 30
 * @throws RangeError for an input out of range or NaN. Readings are checked before they come here.
 *
 * One average curve for all woods, near the drying branch; quote it as ±1 % MC. A difference between two rooms
 * is better known than that. Wood that takes up water after having been drier ends up to 15 % of the figure lower.
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-5 and Table 4-2 (p. 4-3, 4-4).
 */
export function emcPct(temperatureC: number, humidityPct: number): number {
  // Written so that NaN fails too. What is wrong is named out of line: this stands in the innermost loops.
  if (!(temperatureC >= COLDEST_C && temperatureC <= WARMEST_C && humidityPct >= 0 && humidityPct <= 100))
    throw outsideOf(temperatureC, humidityPct)
  // At 100 % RH the curve ends at 29.0 (0 °C), so that nothing needs to be held under `EMC_MAX_PCT` (tested).
  return emcUncheckedPct(temperatureC > 0 ? temperatureC : 0, humidityPct)
}

/** Names the input that is out of range. */
function outsideOf(temperatureC: number, humidityPct: number): Error {
  try {
    assertAir(temperatureC, humidityPct)
  } catch (error) {
    if (error instanceof Error) return error
  }
  return new RangeError('the range of the air and the range that is named differ')
}

/**
 * EMC of a stored reading: a total function, so that an hourly figure never fails over an odd but valid reading.
 * @param temperatureC °C; taken as the nearer end outside 0 to 50
 * @param humidityPct percent; taken as the nearer end outside 0 to 100
 * @returns moisture content, percent of oven-dry mass, 0 to 30
 * @throws RangeError only for NaN, which no checked reading holds
 *
 * Source: as `emcPct`.
 */
export function emcOfReadingPct(temperatureC: number, humidityPct: number): number {
  return emcPct(clamped(temperatureC, 0, EMC_TEMPERATURE_MAX_C), clamped(humidityPct, 0, 100))
}

/**
 * How much the EMC rises for one more percent of relative humidity.
 * @param temperatureC air temperature, °C, -10 to 50
 * @param humidityPct relative humidity, percent, 0 to 100
 * @returns % MC per % RH
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-5, differentiated.
 */
export function emcSlope(temperatureC: number, humidityPct: number): number {
  assertAir(temperatureC, humidityPct)
  return emcEquationSlope(equationC(temperatureC), humidityPct)
}

/**
 * How far the EMC may be out because the sensor is not exact.
 * @param temperatureC air temperature, °C, -10 to 50
 * @param humidityPct relative humidity, percent, 0 to 100
 * @param humidityDoubtPct accuracy of the humidity, ± percent RH, 0 to 50
 * @param temperatureDoubtC accuracy of the temperature, ± K, 0 to 20
 * @returns ± % MC, the root of the summed squares of both effects
 * @throws RangeError for an input out of range or NaN
 *
 * Covers the sensor only, not where it hangs nor the ±1 % MC of the curve itself.
 * Source: law of propagation of uncertainty (JCGM 100:2008, 5.1.2) on Wood Handbook Eq. 4-5.
 */
export function emcDoubtPct(
  temperatureC: number,
  humidityPct: number,
  humidityDoubtPct: number = TYPICAL_HUMIDITY_DOUBT_PCT,
  temperatureDoubtC: number = TYPICAL_TEMPERATURE_DOUBT_C,
): number {
  assertAir(temperatureC, humidityPct)
  assertInRange('humidityDoubtPct', humidityDoubtPct, 0, 50)
  assertInRange('temperatureDoubtC', temperatureDoubtC, 0, 20)
  const atC = equationC(temperatureC)
  const lowC = Math.max(0, atC - TEMPERATURE_STEP_C)
  const highC = atC + TEMPERATURE_STEP_C
  const perKelvin = (emcEquationPct(highC, humidityPct) - emcEquationPct(lowC, humidityPct)) / (highC - lowC)
  return Math.hypot(emcSlope(temperatureC, humidityPct) * humidityDoubtPct, perKelvin * temperatureDoubtC)
}

/**
 * What to know about an EMC worked out from this air.
 * @param temperatureC air temperature, °C
 * @param humidityPct relative humidity, percent
 * @returns the flags that apply: the equation is confirmed between 0 and 50 °C and 5 and 95 % RH
 */
export function emcFlags(temperatureC: number, humidityPct: number): EmcFlag[] {
  const flags: EmcFlag[] = []
  if (temperatureC < 0) flags.push('below-zero')
  if (humidityPct < 5) flags.push('below-5-rh')
  if (humidityPct > 95) flags.push('above-95-rh')
  return flags
}

export type HumidityForEmcError = { readonly code: 'above-saturation'; readonly emcMaxPct: number }

/**
 * The relative humidity at which wood would settle at a wanted moisture content.
 * @param temperatureC air temperature, °C, -10 to 50
 * @param wantedEmcPct moisture content wanted, percent of oven-dry mass, 0 to 30
 * @returns relative humidity, percent, 0 to 100; or `above-saturation` when no air that warm holds wood so wet,
 *   with the most that it can
 * @throws RangeError for an input out of range or NaN
 *
 * EMC rises strictly with humidity, so halving the interval always finds the one answer (to 1e-9 % RH).
 * Source: inverse of Wood Handbook (FPL-GTR-190, 2010), Eq. 4-5.
 */
export function humidityForEmcPct(
  temperatureC: number,
  wantedEmcPct: number,
): Result<number, HumidityForEmcError> {
  assertAir(temperatureC, 0)
  assertInRange('emcPct', wantedEmcPct, 0, EMC_MAX_PCT)
  const emcMaxPct = emcPct(temperatureC, 100)
  if (wantedEmcPct > emcMaxPct) return err({ code: 'above-saturation', emcMaxPct })
  let low = 0
  let high = 100
  while (high - low > HUMIDITY_TOLERANCE_PCT) {
    const middle = (low + high) / 2
    if (emcPct(temperatureC, middle) < wantedEmcPct) low = middle
    else high = middle
  }
  return ok((low + high) / 2)
}
