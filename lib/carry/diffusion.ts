import { assertInRange } from '@/lib/assert'
import { kelvinFromCelsius } from '@/lib/units'

/* Siau, Transport Processes in Wood (1984): bound-water coefficient and cell geometry. Status: from memory. */
export const BOUND_WATER_M2_PER_S = 7e-6
export const ACTIVATION_J_PER_MOL = 38_500
export const ACTIVATION_FALL_J_PER_MOL_PCT = 290
export const GAS_CONSTANT_J_PER_MOL_K = 8.314462618
export const CELL_GEOMETRY_AT_DRY = 0.667
export const CELL_GEOMETRY_PER_PCT = 0.01
/** Density at 12 % MC over this is the basic specific gravity, kg/m³. */
export const DENSITY_TO_GRAVITY_KG_M3 = 1120
/** Above this the formula is not meant to be used, % MC. */
export const MC_CAP_PCT = 25

/** Range of wood that this product answers for, kg/m³ at 12 % MC. */
export const DENSITY_MIN_KG_M3 = 200
export const DENSITY_MAX_KG_M3 = 1400

/**
 * How much faster moisture moves along the grain than across it. Status: from memory ("10 to 15 times" in drying
 * manuals); reported from 2 to over 50, so this is the least certain number of a joint.
 */
export const LONGITUDINAL_RATIO = 10

/**
 * Resistance of a bare surface in nearly still air, m/s on moisture content. Status: derived (mass transfer times
 * saturation density times slope of the isotherm over dry density gives 1.2e-7 to 9e-7 over 8 to 20 °C).
 */
export const SURFACE_M_PER_S = 3e-7

/**
 * How fast moisture moves through wood across the grain.
 * @param temperatureC °C, -10 to 50
 * @param mcPct moisture content, % MC, 0 to 30; counted as 25 above that
 * @param densityKgM3 density at 12 % MC, kg/m³, 200 to 1400
 * @returns m²/s
 * @throws RangeError for an input out of range or NaN
 *
 * Good to a factor of two either way. The resistance of the cell cavities is left out: high by under 1 % at 10 % MC,
 * up to 5 % at 18 %. Above about 1220 kg/m³ the cavities are gone and density no longer counts.
 * Source: Siau, Transport Processes in Wood (1984); formula from memory, checked against thin-sample sorption of
 * spruce (0.94e-10 radial, 1.00e-10 tangential; the formula gives 0.86e-10).
 */
export function transverseDiffusionM2PerS(temperatureC: number, mcPct: number, densityKgM3: number): number {
  assertInRange('temperatureC', temperatureC, -10, 50)
  assertInRange('mcPct', mcPct, 0, 30)
  assertInRange('densityKgM3', densityKgM3, DENSITY_MIN_KG_M3, DENSITY_MAX_KG_M3)
  return diffusionUncheckedM2PerS(temperatureC, mcPct, densityKgM3 / DENSITY_TO_GRAVITY_KG_M3)
}

/** Basic specific gravity of wood by its density at 12 % MC. */
export const gravityOfDensity = (densityKgM3: number): number => densityKgM3 / DENSITY_TO_GRAVITY_KG_M3

/**
 * `transverseDiffusionM2PerS` for callers that step thousands of pieces through thousands of hours and have checked
 * their inputs once: the same formula, no ranges.
 */
export function diffusionUncheckedM2PerS(temperatureC: number, mcPct: number, gravity: number): number {
  const mc = mcPct > MC_CAP_PCT ? MC_CAP_PCT : mcPct
  const energy = ACTIVATION_J_PER_MOL - ACTIVATION_FALL_J_PER_MOL_PCT * mc
  const boundWater =
    BOUND_WATER_M2_PER_S * Math.exp(-energy / (GAS_CONSTANT_J_PER_MOL_K * kelvinFromCelsius(temperatureC)))
  const filled = gravity * (CELL_GEOMETRY_AT_DRY + CELL_GEOMETRY_PER_PCT * mc)
  return filled >= 1 ? boundWater : boundWater / (filled * (1 - Math.sqrt(1 - filled)))
}
