import type { UnitSystem } from '@/lib/sites/site'
import { inchesFromMm } from '@/lib/units'
import type { DoubtfulPart } from './clearance-curve'
import type { LidShape, LidTurned } from './lid-view'
import type { Oval } from './ovality'

const NBSP = '\u00a0'

const figure = (lengthMm: number, units: UnitSystem): string => {
  const text = units === 'metric' ? lengthMm.toFixed(2) : inchesFromMm(lengthMm).toFixed(4)
  return Number(text) === 0 ? text.replace('-', '') : text.replace('-', '−')
}
const unit = (units: UnitSystem): string => (units === 'metric' ? 'mm' : 'in')

/** A worked size to 0.01 mm (or 0.0004 in): finer than wood is known, for those who check the reckoning. */
export const formatWorkedLength = (lengthMm: number, units: UnitSystem = 'metric'): string =>
  `${figure(lengthMm, units)}${NBSP}${unit(units)}`

export type WorkedFigure = {
  readonly of: 'socket' | 'spigot' | 'spigot-oval' | 'socket-oval' | 'clearance' | 'lined-up' | 'quarter'
  readonly value: string
}

/** Out of round with 8 in 10 round it, mm: change and movement err apart (root of the sum of squares). */
function ovalSpan(oval: Oval, diameterMm: number, part: DoubtfulPart): readonly [number, number] {
  const perPctMm = diameterMm * Math.abs(part.tangentialPerPct - part.radialPerPct)
  const spreadMm = Math.hypot(perPctMm * part.mcChangeDoubtPct, oval.outOfRoundMm * part.movementDoubt)
  return [Math.max(0, oval.outOfRoundMm - spreadMm), oval.outOfRoundMm + spreadMm]
}

/**
 * The sizes behind a lid view, to 0.01 mm, for the fold that is headed so.
 * @returns both diameters of each part (along the rings first), how far out of round each is, and the clearances
 */
export function workedFigures(
  shape: LidShape,
  turned: LidTurned,
  units: UnitSystem = 'metric',
): readonly WorkedFigure[] {
  const { joint, spigot, socket, curve } = shape
  const sizes = (oval: Oval) =>
    `${figure(oval.tangentialDiameterMm, units)} × ${formatWorkedLength(oval.radialDiameterMm, units)}`
  const span = (middleMm: number, lowMm: number, highMm: number) => {
    const middle = formatWorkedLength(middleMm, units)
    const [low, high] = [figure(lowMm, units), figure(highMm, units)]
    return low === high ? middle : `${middle} (${low} to ${high})`
  }
  const oval = (of: Oval, diameterMm: number, part: DoubtfulPart) =>
    span(of.outOfRoundMm, ...ovalSpan(of, diameterMm, part))
  const point = (angleDeg: number) => {
    const at = curve[angleDeg]
    return at === undefined ? '' : span(at.middleMm, at.lowMm, at.highMm)
  }
  const { middleMm, lowMm, highMm } = turned.clearance
  return [
    { of: 'socket', value: sizes(socket) },
    { of: 'spigot', value: sizes(spigot) },
    { of: 'socket-oval', value: oval(socket, joint.diameterMm + joint.clearanceMm, joint.socket) },
    { of: 'spigot-oval', value: oval(spigot, joint.diameterMm, joint.spigot) },
    { of: 'clearance', value: span(middleMm, lowMm, highMm) },
    { of: 'lined-up', value: point(0) },
    { of: 'quarter', value: point(90) },
  ]
}
