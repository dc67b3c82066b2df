import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import { clearanceWithDoubt, type Clearance, type DoubtfulJoint, type DoubtfulPart } from './clearance-curve'
import { GRADE_FIGURES, type Allowance } from './grades'
import type { InPlaneMovement } from './ovality'

/** How finely a clearance can be measured in a shop, ± mm. Status: guess (a feeler gauge's step). */
const MEASURED_DOUBT_MM = 0.02
/** A grade stands for its clearance, half of it either way. Status: guess. */
const GRADE_SPREAD = 0.5

/** A lid on its box as it was cut, as plain figures. */
export type LidJoint = {
  readonly diameterMm: number
  readonly clearanceMm: number
  readonly clearanceDoubtMm: number
  /** In the plane of the joint, fractions per % MC. */
  readonly movement: InPlaneMovement
  /** ± on it, as a fraction. */
  readonly movementDoubt: number
  /** Which part carries the spigot: the base (the lid goes over) or the lid (it drops in). */
  readonly spigotOn: 'base' | 'lid'
  readonly cut: { readonly ringMcPct: number; readonly lidMcPct: number }
}

/** Where the wood of both parts stands, % MC; and how far their change since the cut may be out, ± for 8 in 10. */
export type LidPlace = {
  readonly ringMcPct: number
  readonly lidMcPct: number
  readonly doubtPct: number
}

/** The clearance that a joint was cut with, and how well that is known, mm. */
export function cutClearance(
  told: { readonly clearanceMm: number | null },
  allowance: Allowance,
): Pick<LidJoint, 'clearanceMm' | 'clearanceDoubtMm'> {
  if (told.clearanceMm !== null) return { clearanceMm: told.clearanceMm, clearanceDoubtMm: MEASURED_DOUBT_MM }
  const { clearanceMm } = allowance
  if (clearanceMm !== undefined)
    return { clearanceMm, clearanceDoubtMm: GRADE_SPREAD * Math.abs(clearanceMm) }
  // Nobody has said how it fits: between snug and easy, and as doubtful as what it may lose.
  return {
    clearanceMm: allowance.allowanceMm,
    clearanceDoubtMm: Math.max(
      allowance.allowanceMm - allowance.lowMm,
      (allowance.highMm - allowance.lowMm) / 2,
      GRADE_FIGURES.snug.clearanceMm * GRADE_SPREAD,
    ),
  }
}

/** A lid where its wood stands, ready to be drawn. */
export function jointAt(joint: LidJoint, place: LidPlace): DoubtfulJoint {
  const part = (mcPct: number, cutMcPct: number): DoubtfulPart => ({
    ...joint.movement,
    mcChangePct: mcPct - cutMcPct,
    mcChangeDoubtPct: place.doubtPct,
    movementDoubt: joint.movementDoubt,
  })
  const base = part(place.ringMcPct, joint.cut.ringMcPct)
  const lid = part(place.lidMcPct, joint.cut.lidMcPct)
  const { diameterMm, clearanceMm, clearanceDoubtMm } = joint
  const [spigot, socket] = joint.spigotOn === 'base' ? [base, lid] : [lid, base]
  return { diameterMm, clearanceMm, clearanceDoubtMm, spigot, socket }
}

/** Where both parts end in an air, given time. */
export const placeGivenTime = (emcPct: number, emcDoubtPct: number, cutDoubtPct: number): LidPlace => ({
  ringMcPct: emcPct,
  lidMcPct: emcPct,
  doubtPct: Math.hypot(emcDoubtPct, cutDoubtPct),
})

/** Half the way from slow to quick wood, as ± for 8 in 10. */
export const paceDoubtPct = (slowPct: number, fastPct: number, nodeDeviations: number): number =>
  (Math.abs(fastPct - slowPct) / 2) * (EDGE_OF_EIGHT_IN_TEN / nodeDeviations)

/** Clearance at a quarter turn in a month of the keep room's or the home's year, given time. */
export type MonthClearance = Clearance & {
  /** The first of it. */
  readonly monthOn: string
  readonly emcPct: number
}

/**
 * Clearance of a lid at a quarter turn, month by month, in the air of a room or a home.
 * @param months mean EMC of each, % MC
 * @param doubtPct how far the wood's change may be out, ± % MC, 8 in 10
 *
 * The walls of a box follow within days to weeks, so it is taken to stand at each month's mean. Status: derived.
 */
export const clearanceByMonth = (
  joint: LidJoint,
  months: readonly { readonly monthOn: string; readonly emcPct: number }[],
  doubtPct: number,
): readonly MonthClearance[] =>
  months.map(({ monthOn, emcPct }) => ({
    monthOn,
    emcPct,
    ...clearanceWithDoubt(jointAt(joint, { ringMcPct: emcPct, lidMcPct: emcPct, doubtPct }), 90),
  }))
