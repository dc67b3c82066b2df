import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { assertDiameter, assertMovement, ovalOfJoint, type InPlaneMovement, type Oval } from './ovality'

export const CLEARANCE_MAX_MM = 10

/** One part of a joint: how its wood moves, and how far its moisture content is from when the joint was cut. */
export type JointPart = InPlaneMovement & { readonly mcChangePct: number }

/** A spigot and the socket over it. Where the lid drops in, the lid carries the spigot: exchange the two parts. */
export type Joint = {
  /** Of the spigot as turned; the socket is larger by the clearance. */
  readonly diameterMm: number
  /** Difference of the two diameters as turned. */
  readonly clearanceMm: number
  readonly spigot: JointPart
  readonly socket: JointPart
}

function assertJoint(joint: Joint, angleDeg: number): void {
  assertDiameter(joint.diameterMm)
  assertInRange('clearanceMm', joint.clearanceMm, -CLEARANCE_MAX_MM, CLEARANCE_MAX_MM)
  // Less, and there would be no recess at all.
  assertFiniteAbove('clearanceMm', joint.clearanceMm, -joint.diameterMm)
  assertInRange('angleDeg', angleDeg, -360, 360)
  assertMovement(joint.spigot, joint.spigot.mcChangePct)
  assertMovement(joint.socket, joint.socket.mcChangePct)
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180

/** An oval is the same after half a turn; without this, rounding would make 180 degrees differ from 0. */
const sinOfTurn = (angleDeg: number): number => (angleDeg % 180 === 0 ? 0 : Math.sin(radians(angleDeg)))

const swell = (part: JointPart): number =>
  ((part.tangentialPerPct + part.radialPerPct) / 2) * part.mcChangePct
const skew = (part: JointPart): number => ((part.tangentialPerPct - part.radialPerPct) / 2) * part.mcChangePct

/**
 * The tightest clearance all round, to first order.
 * @param joint diameter above 0 to 1000 mm, clearance -10 to 10 mm and above the negative of the diameter, both parts
 *   with their change of moisture content
 * @param angleDeg turn of the lid from where the grain lines up, degrees, -360 to 360
 * @returns diametral clearance, mm; below 0 the lid binds by that much
 * @throws RangeError for an input out of range or NaN
 *
 * Parts of one wood that changed alike lose diameter × |C_T - C_R| × |change| × |sin angle|: nothing with the grain
 * lined up, the most a quarter turn on, swelling and drying the same. A part that lags the other binds at every angle.
 * Within 0.007 mm of the exact figure up to 60 mm and 0.3 mm clearance, within 0.014 mm up to 100 mm and 0.4 mm.
 * Source: derived from the ovals of both parts, Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2 in both directions.
 */
export function clearanceFirstOrderMm(joint: Joint, angleDeg: number): number {
  assertJoint(joint, angleDeg)
  const { diameterMm, clearanceMm, spigot, socket } = joint
  const one = skew(spigot)
  const other = skew(socket)
  // e₁² + e₂² - 2 e₁ e₂ cos 2θ, written so that equal parts at a whole half turn give exactly nothing; rounding may
  // leave a hair below zero.
  const apart = Math.sqrt(Math.max(0, (one - other) ** 2 + 4 * one * other * sinOfTurn(angleDeg) ** 2))
  return clearanceMm + diameterMm * (swell(socket) - swell(spigot)) - diameterMm * apart
}

const caliperWidthMm = (oval: Oval, direction: number): number => {
  const alongMm = oval.tangentialDiameterMm * Math.cos(direction)
  const acrossMm = oval.radialDiameterMm * Math.sin(direction)
  return Math.sqrt(alongMm * alongMm + acrossMm * acrossMm)
}

/** Both widths go up and down twice in a turn, smoothly: every other degree brackets the least. */
const DIRECTIONS = 90
const GOLDEN = (Math.sqrt(5) - 1) / 2
const DIRECTION_TOLERANCE = 1e-7

/** Where a lid is closest to its base. */
export type ClosestPlace = {
  /** Diametral clearance there, mm; below 0 the lid binds by that much. */
  readonly clearanceMm: number
  /** From the socket's direction along the rings towards the way the spigot is turned, degrees, 0 to below 180. */
  readonly directionDeg: number
}

/**
 * The tightest clearance all round and where it is, from the ovals themselves.
 * @param joint as for the first order
 * @param angleDeg turn of the two parts from where the grain lines up, degrees, -360 to 360
 * @returns diametral clearance in mm, and the direction in which the two are closest: there and half a turn on
 * @throws RangeError for an input out of range or NaN
 *
 * The least difference of the two caliper widths over all directions (to 1e-6 mm). Both ovals are convex and
 * centrally symmetric, so shifting the lid sideways cannot help. Which of the two parts is turned makes no difference.
 * Source: derived (widths of an ellipse).
 */
export function closestExact(joint: Joint, angleDeg: number): ClosestPlace {
  assertJoint(joint, angleDeg)
  const { diameterMm, clearanceMm, spigot, socket } = joint
  const inner = ovalOfJoint(diameterMm, spigot, spigot.mcChangePct)
  const outer = ovalOfJoint(diameterMm + clearanceMm, socket, socket.mcChangePct)
  const turn = radians(angleDeg % 180)
  const gapMm = (direction: number): number =>
    caliperWidthMm(outer, direction) - caliperWidthMm(inner, direction - turn)
  const step = Math.PI / DIRECTIONS
  let tightest = 0
  let leastMm = gapMm(0)
  for (let n = 1; n < DIRECTIONS; n += 1) {
    const hereMm = gapMm(n * step)
    if (hereMm < leastMm) {
      leastMm = hereMm
      tightest = n * step
    }
  }
  let low = tightest - step
  let high = tightest + step
  while (high - low > DIRECTION_TOLERANCE) {
    const nearLow = high - GOLDEN * (high - low)
    const nearHigh = low + GOLDEN * (high - low)
    if (gapMm(nearLow) < gapMm(nearHigh)) high = nearHigh
    else low = nearLow
  }
  const direction = (low + high) / 2
  return { clearanceMm: gapMm(direction), directionDeg: ((((direction * 180) / Math.PI) % 180) + 180) % 180 }
}

/**
 * The tightest clearance all round, from the ovals themselves.
 * @param joint as for the first order
 * @param angleDeg turn of the lid from where the grain lines up, degrees, -360 to 360
 * @returns diametral clearance, mm; below 0 the lid binds by that much
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived, `closestExact`.
 */
export const clearanceExactMm = (joint: Joint, angleDeg: number): number =>
  closestExact(joint, angleDeg).clearanceMm

/**
 * How much clearance a joint loses a quarter turn on, for each % MC that both parts change alike.
 * @param diameterMm joint diameter, mm, above 0 to 1000
 * @param movement fractions per % MC
 * @returns mm per % MC, the same for swelling and drying
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived, as `clearanceFirstOrderMm` at a quarter turn.
 */
export function quarterTurnLossMmPerPct(diameterMm: number, movement: InPlaneMovement): number {
  assertDiameter(diameterMm)
  assertMovement(movement, 0)
  return diameterMm * Math.abs(movement.tangentialPerPct - movement.radialPerPct)
}

/**
 * The largest change of moisture content, both parts alike, at which a clearance is left.
 * @param diameterMm joint diameter, mm, above 0 to 1000
 * @param clearanceMm clearance as turned, mm, -10 to 10
 * @param movement fractions per % MC
 * @param angleDeg turn of the lid, degrees, -360 to 360; "any angle" is 90
 * @param keepMm clearance to be left, mm, -10 to 10
 * @returns % MC either way; 0 where no more than that is there to begin with; undefined where nothing is lost at that
 *   angle, so that there is no limit
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived, `clearanceFirstOrderMm` solved for the change.
 */
export function allowedMcChangePct(
  diameterMm: number,
  clearanceMm: number,
  movement: InPlaneMovement,
  angleDeg: number,
  keepMm = 0,
): number | undefined {
  assertInRange('clearanceMm', clearanceMm, -CLEARANCE_MAX_MM, CLEARANCE_MAX_MM)
  assertInRange('angleDeg', angleDeg, -360, 360)
  assertInRange('keepMm', keepMm, -CLEARANCE_MAX_MM, CLEARANCE_MAX_MM)
  const lossMmPerPct = quarterTurnLossMmPerPct(diameterMm, movement) * Math.abs(sinOfTurn(angleDeg))
  if (lossMmPerPct === 0) return undefined
  return Math.max(0, clearanceMm - keepMm) / lossMmPerPct
}

/** A change smaller than this is none, % MC: its proportion would be rounding. */
const NO_CHANGE_PCT = 1e-9
/** Losses smaller than this for each % MC are rounding, mm. */
const NO_LOSS_MM = 1e-12

const scaled = (joint: Joint, factor: number): Joint => ({
  ...joint,
  spigot: { ...joint.spigot, mcChangePct: joint.spigot.mcChangePct * factor },
  socket: { ...joint.socket, mcChangePct: joint.socket.mcChangePct * factor },
})

/**
 * The largest change at which a clearance is left, where the two parts change in the proportion given.
 * @param joint as for `clearanceFirstOrderMm`; where neither part has changed, both are taken to change alike
 * @param angleDeg turn of the lid, degrees, -360 to 360
 * @param keepMm clearance to be left, mm
 * @returns % MC of the part that changes more; 0 where no more than that is there to begin with; undefined where
 *   nothing is lost at that angle, so that there is no limit
 * @throws RangeError for an input out of range or NaN
 *
 * The loss grows in proportion to the change. For parts alike this is `allowedMcChangePct`.
 * Source: derived, `clearanceFirstOrderMm` solved for the change.
 */
export function allowedChange(joint: Joint, angleDeg: number, keepMm: number): number | undefined {
  assertInRange('keepMm', keepMm, -CLEARANCE_MAX_MM, CLEARANCE_MAX_MM)
  const most = Math.max(Math.abs(joint.spigot.mcChangePct), Math.abs(joint.socket.mcChangePct))
  const lossesMm =
    most > NO_CHANGE_PCT
      ? [joint.clearanceMm - clearanceFirstOrderMm(scaled(joint, 1 / most), angleDeg)]
      : [1, -1].map((mcChangePct) => {
          const unit = {
            ...joint,
            spigot: { ...joint.spigot, mcChangePct },
            socket: { ...joint.socket, mcChangePct },
          }
          return joint.clearanceMm - clearanceFirstOrderMm(unit, angleDeg)
        })
  const lossMmPerPct = Math.max(...lossesMm)
  if (lossMmPerPct < NO_LOSS_MM) return undefined
  return Math.max(0, joint.clearanceMm - keepMm) / lossMmPerPct
}

/**
 * The largest change at which a clearance is left however the lid is turned.
 * @param joint as for `allowedChange`
 * @param keepMm clearance to be left, mm
 * @returns as for `allowedChange`; undefined where nothing is lost at any angle
 * @throws RangeError for an input out of range or NaN
 *
 * What is lost grows or shrinks steadily from the grain lined up to a quarter turn, so the worst is at one of the two.
 * Source: derived, `clearanceFirstOrderMm`.
 */
export function allowedChangeAnyAngle(joint: Joint, keepMm: number): number | undefined {
  const limits = [0, 90].flatMap((angleDeg) => allowedChange(joint, angleDeg, keepMm) ?? [])
  return limits.length === 0 ? undefined : Math.min(...limits)
}
