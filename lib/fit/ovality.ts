import { assertFiniteAbove, assertInRange } from '@/lib/assert'

/** How a round joint of one wood moves: both directions in the plane of the joint, fraction per % MC. */
export type InPlaneMovement = {
  readonly tangentialPerPct: number
  readonly radialPerPct: number
}

export const JOINT_DIAMETER_MAX_MM = 1000
/** A recess is larger than its joint by the clearance, 10 mm at most. */
const RECESS_DIAMETER_MAX_MM = 1010
export const PER_PCT_MAX = 0.01
export const MC_CHANGE_MAX_PCT = 30

export function assertMovement(movement: InPlaneMovement, mcChangePct: number): void {
  assertInRange('tangentialPerPct', movement.tangentialPerPct, 0, PER_PCT_MAX)
  assertInRange('radialPerPct', movement.radialPerPct, 0, PER_PCT_MAX)
  assertInRange('mcChangePct', mcChangePct, -MC_CHANGE_MAX_PCT, MC_CHANGE_MAX_PCT)
}

export function assertDiameter(diameterMm: number): void {
  assertFiniteAbove('diameterMm', diameterMm, 0)
  assertInRange('diameterMm', diameterMm, 0, JOINT_DIAMETER_MAX_MM)
}

export type Oval = {
  readonly tangentialDiameterMm: number
  readonly radialDiameterMm: number
  /** The longer diameter less the shorter. */
  readonly outOfRoundMm: number
}

/**
 * What a joint turned round becomes when its moisture content changes.
 * @param diameterMm diameter as turned, mm, above 0 to 1010: a joint of 1000 and the clearance round it
 * @param movement fractions per % MC along the rings and across them, 0 to 0.01
 * @param mcChangePct change of moisture content since it was turned, % MC, -30 to 30
 * @returns the two diameters and their difference, mm
 * @throws RangeError for an input out of range or NaN
 *
 * Holds for a blank away from the pith, its axis along the grain, the rings nearly parallel across the joint; the walls
 * do not hold each other back. Treat it as an upper figure.
 * Source: derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2, taken in both directions.
 */
export function ovalOfJoint(diameterMm: number, movement: InPlaneMovement, mcChangePct: number): Oval {
  assertFiniteAbove('diameterMm', diameterMm, 0)
  assertInRange('diameterMm', diameterMm, 0, RECESS_DIAMETER_MAX_MM)
  assertMovement(movement, mcChangePct)
  const tangentialDiameterMm = diameterMm * (1 + movement.tangentialPerPct * mcChangePct)
  const radialDiameterMm = diameterMm * (1 + movement.radialPerPct * mcChangePct)
  return {
    tangentialDiameterMm,
    radialDiameterMm,
    outOfRoundMm: Math.abs(tangentialDiameterMm - radialDiameterMm),
  }
}
