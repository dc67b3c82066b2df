import { assertFiniteAbove } from '@/lib/assert'
import type { Grain } from '@/lib/pieces/piece'
import { LONGITUDINAL_PER_PCT, sizeChangeMm } from '@/lib/wood/movement'
import { assertMovement, type InPlaneMovement } from './ovality'

/**
 * How the wood moves in the plane of the joint.
 * @param movement of the wood along the rings and across them, fractions per % MC, 0 to 0.01
 * @param grain end-grain: the axis runs along the grain; side-grain: across it
 * @returns for a side-grain box the direction along the grain in place of the one across the rings: there the
 *   difference that makes a joint oval is 1.5 to 3 times as large, and the lid must stay lined up
 * @throws RangeError for an input out of range or NaN
 *
 * A side-grain joint may hold either of the wood's two cross directions beside the grain; the larger is taken, so that
 * it is an upper figure. Source: derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2.
 */
export function jointMovement(movement: InPlaneMovement, grain: Grain): InPlaneMovement {
  assertMovement(movement, 0)
  const { tangentialPerPct, radialPerPct } = movement
  return grain === 'end-grain'
    ? { tangentialPerPct, radialPerPct }
    : { tangentialPerPct: Math.max(tangentialPerPct, radialPerPct), radialPerPct: LONGITUDINAL_PER_PCT }
}

export type PieceSize = {
  readonly grain: Grain
  /** From base to lid, mm. */
  readonly heightMm: number
  /** Outside, mm. */
  readonly diameterMm: number
}

export type SizeChanges = {
  readonly heightMm: number
  /** Of the diameter in the direction that moves more, and in the one that moves less. */
  readonly diameterMostMm: number
  readonly diameterLeastMm: number
  /** Which way of the wood each of them is, in words. */
  readonly words: { readonly height: string; readonly most: string; readonly least: string }
}

/**
 * How much a whole piece grows or shrinks, along the grain, across the rings and round them.
 * @param size height and outside diameter, mm, above 0
 * @param movement of the wood along the rings and across them, fractions per % MC, 0 to 0.01
 * @param mcChangePct change of moisture content, % MC, -30 to 30
 * @returns mm, negative when it shrinks
 * @throws RangeError for an input out of range or NaN
 *
 * The height of a spindle box changes by height × 0.00005 × change: 0.03 mm of 70 mm in 8 points. A side-grain box's
 * height is one of the two cross directions; the larger is taken.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2; along the grain see `LONGITUDINAL_PER_PCT`.
 */
export function sizeChangesMm(size: PieceSize, movement: InPlaneMovement, mcChangePct: number): SizeChanges {
  assertFiniteAbove('heightMm', size.heightMm, 0)
  assertFiniteAbove('diameterMm', size.diameterMm, 0)
  assertMovement(movement, mcChangePct)
  const plane = jointMovement(movement, size.grain)
  const isEndGrain = size.grain === 'end-grain'
  const heightPerPct = isEndGrain ? LONGITUDINAL_PER_PCT : plane.tangentialPerPct
  const [mostPerPct, leastPerPct] =
    plane.tangentialPerPct >= plane.radialPerPct
      ? [plane.tangentialPerPct, plane.radialPerPct]
      : [plane.radialPerPct, plane.tangentialPerPct]
  return {
    heightMm: sizeChangeMm(size.heightMm, heightPerPct, mcChangePct),
    diameterMostMm: sizeChangeMm(size.diameterMm, mostPerPct, mcChangePct),
    diameterLeastMm: sizeChangeMm(size.diameterMm, leastPerPct, mcChangePct),
    words: isEndGrain
      ? { height: 'along the grain', most: 'along the rings', least: 'across the rings' }
      : { height: 'across the grain', most: 'across the grain', least: 'along the grain' },
  }
}
