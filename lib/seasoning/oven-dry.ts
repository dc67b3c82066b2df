import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { err, ok, type Result } from '@/lib/result'

/** Most that green wood holds, % MC: light woods reach about 200. Status: from memory, generous. */
export const MC_MAX_PCT = 300

/**
 * Moisture content by weight.
 * @param grams mass as weighed, g, above 0
 * @param ovenDryG mass of the same wood oven-dry, g, above 0
 * @returns % of oven-dry mass; or `lighter-than-oven-dry` where the two masses cannot belong together
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-1; ASTM D4442 method A is how the oven-dry mass is found
 * (from memory).
 */
export function moistureByWeightPct(
  grams: number,
  ovenDryG: number,
): Result<number, { readonly code: 'lighter-than-oven-dry' }> {
  assertFiniteAbove('grams', grams, 0)
  assertFiniteAbove('ovenDryG', ovenDryG, 0)
  if (grams < ovenDryG) return err({ code: 'lighter-than-oven-dry' })
  return ok((100 * (grams - ovenDryG)) / ovenDryG)
}

/**
 * Oven-dry mass of wood whose moisture content is known, from a meter or a model.
 * @param grams mass as weighed, g, above 0
 * @param mcPct moisture content at that moment, % MC, 0 to 300
 * @returns g. An error of 1 point in mcPct is one of about 0.9 % in the mass.
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-1, solved for the oven-dry mass.
 */
export function ovenDryG(grams: number, mcPct: number): number {
  assertFiniteAbove('grams', grams, 0)
  assertInRange('mcPct', mcPct, 0, MC_MAX_PCT)
  return grams / (1 + mcPct / 100)
}

/**
 * What wood of that oven-dry mass weighs at a moisture content, such as that of the room it is kept to match.
 * @param ovenDry oven-dry mass, g, above 0
 * @param mcPct moisture content, % MC, 0 to 300
 * @returns g
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4, Eq. 4-1, solved for the mass.
 */
export function weightAtMoistureG(ovenDry: number, mcPct: number): number {
  assertFiniteAbove('ovenDryG', ovenDry, 0)
  assertInRange('mcPct', mcPct, 0, MC_MAX_PCT)
  return ovenDry * (1 + mcPct / 100)
}
