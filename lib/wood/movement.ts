import { assertFiniteAbove, assertInRange } from '@/lib/assert'

/** Moisture content below which wood begins to shrink, %. Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4. */
export const FIBRE_SATURATION_PCT = 30

/**
 * Change along the grain for each % MC, fraction: straight grain only, reaction or curly wood may have ten times that.
 * Source: 0.1 to 0.2 % from green to dry (American Wood Council, published answers), the middle over 30 % MC.
 */
export const LONGITUDINAL_PER_PCT = 0.00005

/** MC around which the coefficient per % MC is stated, %. Source: Wood Handbook, Table 13-5 (6 to 14 % MC). */
const COEFFICIENT_AT_MC_PCT = 10

const SHRINKAGE_MAX_PCT = 30

const belowSaturation = (mcPct: number, fibreSaturationPct: number): number =>
  Math.min(fibreSaturationPct, Math.max(0, mcPct))

function assertShrinkage(shrinkagePct: number, fibreSaturationPct: number): void {
  assertInRange('shrinkagePct', shrinkagePct, 0, SHRINKAGE_MAX_PCT)
  assertFiniteAbove('shrinkagePct', shrinkagePct, 0)
  assertInRange('fibreSaturationPct', fibreSaturationPct, 15, 40)
}

/**
 * How much a dimension grows with moisture content, for small ranges.
 * @param dimensionMm dimension now, mm, above 0
 * @param perPct coefficient of the direction, fraction per % MC, 0 to 0.01
 * @param mcChangePct change of moisture content, % MC, -30 to 30
 * @returns mm, negative when it shrinks
 * @throws RangeError for an input out of range or NaN
 *
 * Meant for 6 to 14 % MC. Figures vary by 15 to 20 % within a species, so a lid is not known to better than 0.05 mm.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2 and Table 13-5.
 */
export function sizeChangeMm(dimensionMm: number, perPct: number, mcChangePct: number): number {
  assertFiniteAbove('dimensionMm', dimensionMm, 0)
  assertInRange('perPct', perPct, 0, 0.01)
  assertInRange('mcChangePct', mcChangePct, -30, 30)
  return dimensionMm * perPct * mcChangePct
}

/**
 * How much a dimension grows between any two moisture contents, from the wood's whole shrinkage.
 * @param dimensionMm dimension at the first moisture content, mm, above 0
 * @param shrinkagePct shrinkage from green to oven-dry in that direction, % of the green dimension, above 0 to 30
 * @param fromMcPct first moisture content, % MC; taken as 0 to fibre saturation, beyond which nothing moves
 * @param toMcPct second moisture content, % MC; likewise
 * @returns mm, negative when it shrinks
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), Eq. 13-3, with fibre saturation left open.
 */
export function sizeChangeFromShrinkageMm(
  dimensionMm: number,
  shrinkagePct: number,
  fromMcPct: number,
  toMcPct: number,
  fibreSaturationPct: number = FIBRE_SATURATION_PCT,
): number {
  assertFiniteAbove('dimensionMm', dimensionMm, 0)
  assertShrinkage(shrinkagePct, fibreSaturationPct)
  assertInRange('fromMcPct', fromMcPct, 0, 300)
  assertInRange('toMcPct', toMcPct, 0, 300)
  const from = belowSaturation(fromMcPct, fibreSaturationPct)
  const to = belowSaturation(toMcPct, fibreSaturationPct)
  return (dimensionMm * (to - from)) / ((100 * fibreSaturationPct) / shrinkagePct - fibreSaturationPct + from)
}

/**
 * How much wood has shrunk from green by the time it is at a moisture content.
 * @param shrinkagePct shrinkage from green to oven-dry, % of the green dimension, above 0 to 30
 * @param mcPct moisture content, % MC, 0 to 300; above fibre saturation nothing has shrunk yet
 * @returns % of the green dimension
 * @throws RangeError for an input out of range or NaN
 *
 * Source: Wood Handbook (FPL-GTR-190, 2010), ch. 4 (straight line from fibre saturation to oven-dry).
 */
export function shrinkageToMcPct(
  shrinkagePct: number,
  mcPct: number,
  fibreSaturationPct: number = FIBRE_SATURATION_PCT,
): number {
  assertShrinkage(shrinkagePct, fibreSaturationPct)
  assertInRange('mcPct', mcPct, 0, 300)
  return (
    (shrinkagePct * (fibreSaturationPct - belowSaturation(mcPct, fibreSaturationPct))) / fibreSaturationPct
  )
}

/**
 * The coefficient for each % MC that goes with a printed shrinkage.
 * @param shrinkagePct shrinkage from green to oven-dry, % of the green dimension, above 0 to 30
 * @returns fraction per % MC, around 10 % MC
 * @throws RangeError for an input out of range or NaN
 *
 * Derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-3 at 10 % MC; reproduces its Table 13-5 from Table 4-3.
 */
export function perPctFromShrinkage(
  shrinkagePct: number,
  fibreSaturationPct: number = FIBRE_SATURATION_PCT,
): number {
  assertShrinkage(shrinkagePct, fibreSaturationPct)
  return 1 / ((100 * fibreSaturationPct) / shrinkagePct - fibreSaturationPct + COEFFICIENT_AT_MC_PCT)
}
