import { DRY_AIR_HEAT_CAPACITY } from '@/lib/air/enthalpy'
import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { AIR_DENSITY_KG_M3 } from './water'

const SECONDS_PER_H = 3600
const J_PER_KJ = 1000

/** Heat that one m³ of air takes for each K, spread over an hour: 0.335 W h. Often rounded to 0.33. */
export const AIR_HEAT_WH_PER_M3_K = (AIR_DENSITY_KG_M3 * DRY_AIR_HEAT_CAPACITY * J_PER_KJ) / SECONDS_PER_H

/** Heat to evaporate water at room temperature, MJ/kg. Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, rounded. */
export const LATENT_HEAT_MJ_PER_KG = 2.45
const MJ_PER_KWH = 3.6

/** Heat to hold a room so much warmer than what is round it, W. */
export type HoldingHeat = {
  readonly airW: number
  /** Through walls, roof and floor; undefined where the shell is not known. Often the larger part. */
  readonly shellW: number | undefined
}

/**
 * Heat to hold a room warmer than the outside.
 * @param volumeM3 room, m³, above 0
 * @param airChangesPerH air changes an hour, 0 to 50
 * @param warmerByK how much warmer than outside, K, 0 to 80
 * @param shellWPerK loss of the whole shell, W/K, 0 to 10000; there is no usual figure, so none is assumed
 * @returns W
 * @throws RangeError for an input out of range or NaN
 *
 * Holds it warm; to warm it up takes more for the first hours or days, for walls and wood are warmed too.
 * Source: derived; heat balance with air at 1.2 kg/m³ and 1.006 kJ/(kg K).
 */
export function holdingHeat(
  volumeM3: number,
  airChangesPerH: number,
  warmerByK: number,
  shellWPerK: number | undefined,
): HoldingHeat {
  assertFiniteAbove('volumeM3', volumeM3, 0)
  assertInRange('airChangesPerH', airChangesPerH, 0, 50)
  assertInRange('warmerByK', warmerByK, 0, 80)
  if (shellWPerK !== undefined) assertInRange('shellWPerK', shellWPerK, 0, 10_000)
  return {
    airW: AIR_HEAT_WH_PER_M3_K * airChangesPerH * volumeM3 * warmerByK,
    shellW: shellWPerK === undefined ? undefined : shellWPerK * warmerByK,
  }
}

/**
 * Heat bound in water that evaporates, or set free where a dehumidifier condenses it.
 * @param waterKg kg, 0 or more
 * @returns kWh: 0.68 for each kg
 * @throws RangeError for an input out of range or NaN
 */
export function latentHeatKwh(waterKg: number): number {
  assertInRange('waterKg', waterKg, 0, 1_000_000)
  return (waterKg * LATENT_HEAT_MJ_PER_KG) / MJ_PER_KWH
}
