import { assertInRange } from '@/lib/assert'
import { clearanceExactMm, clearanceFirstOrderMm, type Joint, type JointPart } from './lid-fit'
import { MC_CHANGE_MAX_PCT } from './ovality'

/** One part of a joint with what isn't known of it: middle and ±, for 8 in 10. */
export type DoubtfulPart = JointPart & {
  /** ± on the change of moisture content, % MC. */
  readonly mcChangeDoubtPct: number
  /** ± on how the wood moves, as a fraction of it. */
  readonly movementDoubt: number
}

export type DoubtfulJoint = {
  readonly diameterMm: number
  readonly clearanceMm: number
  /** ± on the clearance as cut, mm. */
  readonly clearanceDoubtMm: number
  readonly spigot: DoubtfulPart
  readonly socket: DoubtfulPart
}

/** Least clearance at one angle: the middle, and the span of 8 in 10 round it, mm. */
export type Clearance = { readonly lowMm: number; readonly middleMm: number; readonly highMm: number }
export type CurvePoint = Clearance & { readonly angleDeg: number }

const CLEARANCE_DOUBT_MAX_MM = 10

function assertDoubts(joint: DoubtfulJoint): void {
  assertInRange('clearanceDoubtMm', joint.clearanceDoubtMm, 0, CLEARANCE_DOUBT_MAX_MM)
  for (const part of [joint.spigot, joint.socket]) {
    assertInRange('mcChangeDoubtPct', part.mcChangeDoubtPct, 0, MC_CHANGE_MAX_PCT)
    assertInRange('movementDoubt', part.movementDoubt, 0, 1)
  }
}

const withinRange = (mcChangePct: number): number =>
  Math.min(MC_CHANGE_MAX_PCT, Math.max(-MC_CHANGE_MAX_PCT, mcChangePct))

/** The joint with both parts' change put differently. */
function changed(joint: DoubtfulJoint, mcChangePct: (part: DoubtfulPart) => number): Joint {
  const one = (part: DoubtfulPart): JointPart => ({ ...part, mcChangePct: withinRange(mcChangePct(part)) })
  return { ...joint, spigot: one(joint.spigot), socket: one(joint.socket) }
}

/**
 * What can be wrong, each from -1 to 1 of its ±. Both parts hang in the same air and were judged by the same sensors, so
 * their changes err together; so do the figures of two woods, which come from the same kind of table.
 */
const errors: readonly ((joint: DoubtfulJoint, share: number) => Joint)[] = [
  (joint, share) => changed(joint, (part) => part.mcChangePct + share * part.mcChangeDoubtPct),
  // A movement that is larger by a tenth does what a change that is larger by a tenth does.
  (joint, share) => changed(joint, (part) => part.mcChangePct * (1 + share * part.movementDoubt)),
]

const THIRDS_STEPS = 24

/** Most clearance over the span of an error. To first order it is a concave function of the change: one summit. */
function mostMm(clearance: (share: number) => number): number {
  let low = -1
  let high = 1
  for (let step = 0; step < THIRDS_STEPS; step += 1) {
    const third = (high - low) / 3
    if (clearance(low + third) < clearance(high - third)) low += third
    else high -= third
  }
  return clearance((low + high) / 2)
}

/**
 * Least clearance of a lid at an angle, with its doubt.
 * @param joint diameter above 0 to 1000 mm, clearance -10 to 10 mm, both parts with their change and its doubt (±, 8 in
 *   10): change 0 to 30 % MC, movement 0 to 1 as a fraction, clearance 0 to 10 mm
 * @param angleDeg turn of the lid from where the grain lines up, degrees, -360 to 360
 * @returns the middle from the ovals themselves, and 8 in 10 round it, mm; below 0 the lid binds by that much
 * @throws RangeError for an input out of range or NaN
 *
 * Clearance as cut, change and movement err apart from one another, so what each does goes together as a root of the
 * sum of squares (Guide to the Expression of Uncertainty in Measurement, JCGM 100:2008, from memory), below and above
 * apart: near no change at all there is nothing to gain. What each does is taken to first order. Status: derived.
 */
export function clearanceWithDoubt(joint: DoubtfulJoint, angleDeg: number): Clearance {
  assertDoubts(joint)
  const middleMm = clearanceExactMm(joint, angleDeg)
  const firstOrderMm = clearanceFirstOrderMm(joint, angleDeg)
  let below = joint.clearanceDoubtMm ** 2
  let above = below
  for (const error of errors) {
    const at = (share: number) => clearanceFirstOrderMm(error(joint, share), angleDeg) - firstOrderMm
    below += Math.min(0, at(-1), at(1)) ** 2
    above += Math.max(0, at(-1), at(1), mostMm(at)) ** 2
  }
  return { lowMm: middleMm - Math.sqrt(below), middleMm, highMm: middleMm + Math.sqrt(above) }
}

/** Every whole degree of a quarter turn: beyond it the same comes back. */
export const CURVE_POINTS = 91

/**
 * Least clearance against how far the lid is turned, for each degree from 0 to 90.
 * @param joint as for `clearanceWithDoubt`
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived, `clearanceWithDoubt`.
 */
export function clearanceCurve(joint: DoubtfulJoint): readonly CurvePoint[] {
  return Array.from({ length: CURVE_POINTS }, (_, angleDeg) => ({
    angleDeg,
    ...clearanceWithDoubt(joint, angleDeg),
  }))
}
