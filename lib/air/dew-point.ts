import { assertInRange } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'
import { STANDARD_PRESSURE_PA } from './humidity'
import { saturationPressurePa, SATURATION_MIN_C, type SaturatedOver } from './saturation'

/** Water boils here under the standard atmosphere, °C: no dew point lies above it. */
const DEW_POINT_MAX_C = 100
const TOLERANCE_C = 1e-9

/**
 * The temperature at which this air would begin to wet a surface (or frost it, below the triple point).
 * @param vapourPa pressure of the vapour, Pa, 0 to 101325
 * @param over whether a dew point below freezing is a frost point (tables) or counted over water (sensors)
 * @returns °C; or `too-dry` where there is none: no water at all, or so little that it lies under -100 °C
 * @throws RangeError for an input out of range or NaN
 *
 * Saturation pressure rises strictly with temperature, so halving finds the one answer (to 1e-9 K). Agrees with
 * psychrolib 1.1.1 within 0.001 K.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, eqs. 5 and 6, inverted.
 */
export function dewPointC(
  vapourPa: number,
  over: SaturatedOver = 'ice-below-zero',
): Result<number, { readonly code: 'too-dry' }> {
  assertInRange('vapourPa', vapourPa, 0, STANDARD_PRESSURE_PA)
  if (vapourPa < saturationPressurePa(SATURATION_MIN_C, over)) return err({ code: 'too-dry' })
  let low = SATURATION_MIN_C
  let high = DEW_POINT_MAX_C
  while (high - low > TOLERANCE_C) {
    const middle = (low + high) / 2
    if (saturationPressurePa(middle, over) < vapourPa) low = middle
    else high = middle
  }
  return ok((low + high) / 2)
}
