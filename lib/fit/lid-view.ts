import { formatFineLength } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import {
  clearanceCurve,
  clearanceWithDoubt,
  CURVE_POINTS,
  type Clearance,
  type CurvePoint,
  type DoubtfulJoint,
} from './clearance-curve'
import { feelOfCut, feelWords, quarterTurnWords, type Feel } from './feel'
import { closestExact } from './lid-fit'
import { exaggerationOf, meanRadiusMm, outlineOf, type Outline } from './lid-outline'
import { ovalOfJoint, type Oval } from './ovality'
import { turnHeadline } from './turn-words'

/** The joint seen from the end, as far as it doesn't hang on how the lid is turned. */
export type LidShape = {
  readonly joint: DoubtfulJoint
  readonly spigot: Oval
  readonly socket: Oval
  readonly spigotOutline: Outline
  readonly socketOutline: Outline
  /** The radius both are drawn round, mm, and how many times too large what differs from it is drawn. */
  readonly radiusMm: number
  readonly exaggeration: number
  /** Least clearance for each degree from 0 to 90. */
  readonly curve: readonly CurvePoint[]
  /** How it goes round a quarter turn, without a full stop. */
  readonly headline: readonly TextPart[]
  readonly quarterTurnWords: string
}

/** Where the two are closest: one of two places opposite each other. */
export type Contact = {
  /** From the socket's direction along the rings towards the way the spigot is turned, degrees, 0 to below 360. */
  readonly directionDeg: number
  /** Diametral, mm; below 0 it binds there by that much. */
  readonly clearanceMm: number
}

/** The same joint, turned. */
export type LidTurned = {
  readonly angleDeg: number
  readonly clearance: Clearance
  readonly feel: Feel
  readonly contacts: readonly [Contact, Contact]
  /** For the middle of the drawing: "tight", "turned 28°"; and as it is heard. */
  readonly words: { readonly feel: string; readonly turned: string; readonly spoken: string }
}

/**
 * Both parts of a joint as ovals, and the clearance round a quarter turn.
 * @param joint diameter above 0 to 1000 mm, clearance -10 to 10 mm, each part with its change of moisture content and ±
 * @returns everything that a drawing needs but the turn itself
 * @throws RangeError for an input out of range or NaN, naming it
 *
 * Source: derived, `clearanceCurve` and `ovalOfJoint`.
 */
export function lidShape(joint: DoubtfulJoint, units: UnitSystem = 'metric'): LidShape {
  const curve = clearanceCurve(joint)
  const spigot = ovalOfJoint(joint.diameterMm, joint.spigot, joint.spigot.mcChangePct)
  const socket = ovalOfJoint(joint.diameterMm + joint.clearanceMm, joint.socket, joint.socket.mcChangePct)
  const spigotOutline = outlineOf(spigot)
  const socketOutline = outlineOf(socket)
  return {
    joint,
    spigot,
    socket,
    spigotOutline,
    socketOutline,
    radiusMm: meanRadiusMm(spigotOutline, socketOutline),
    exaggeration: exaggerationOf(spigotOutline, socketOutline),
    curve,
    headline: joint.clearanceMm < 0 ? tightHeadline(joint, curve, units) : turnHeadline(curve),
    quarterTurnWords: quarterTurnWords(
      curve[0]?.middleMm ?? 0,
      curve[CURVE_POINTS - 1]?.middleMm ?? 0,
      units,
      joint.clearanceMm,
    ),
  }
}

/** A snap lid is cut too tight on purpose: how much tighter still it is, not that it binds, is what counts. */
function tightHeadline(
  joint: DoubtfulJoint,
  curve: readonly CurvePoint[],
  units: UnitSystem,
): readonly TextPart[] {
  const quarterMm = curve.at(-1)?.middleMm ?? joint.clearanceMm
  const cut = formatFineLength(-joint.clearanceMm, units)
  const now = formatFineLength(Math.max(0, -quarterMm), units)
  return say`Cut about ${cut} too tight, as a snap lid is; ${strong(`a quarter turn on about ${now}`)}`
}

/**
 * A joint's lid turned by an angle.
 * @param angleDeg from where the grain lines up, degrees, -360 to 360; a handle gives 0 to 90
 * @throws RangeError for an angle out of range or NaN
 */
export function lidTurned(shape: LidShape, angleDeg: number): LidTurned {
  const clearance = clearanceWithDoubt(shape.joint, angleDeg)
  const closest = closestExact(shape.joint, angleDeg)
  const feel = feelOfCut(clearance.middleMm, shape.joint.clearanceMm)
  const degrees = String(Math.round(angleDeg))
  return {
    angleDeg,
    clearance,
    feel,
    contacts: [closest, { ...closest, directionDeg: closest.directionDeg + 180 }],
    words: {
      feel: feelWords[feel],
      turned: `turned ${degrees}°`,
      spoken: `turned ${degrees} ${degrees === '1' ? 'degree' : 'degrees'}, ${feelWords[feel]}`,
    },
  }
}
