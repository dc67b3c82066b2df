import type { DemoJoint } from '@/db/queries/demo-pieces'
import type { CarryCheckInput, PieceCheck } from '@/lib/carry/carry-check'
import { carryCheck } from '@/lib/carry/check'
import type { FitGrade } from '@/lib/pieces/piece'

/** How long after the start of a carry the early edge of a piece should lie, minutes. */
export interface WantedEdge {
  least: number
  aim: number
  most: number
}

type VerdictCheck = Extract<PieceCheck, { kind: 'verdict' }>

const MINUTE_MS = 60_000
/** Allowances that a maker might state, mm. */
const ALLOWANCE_MIN_MM = 0.03
const ALLOWANCE_MAX_MM = 0.6
const HALVINGS = 8
/** A box that has used up more than this where it rests would not be part of a story about going out. */
const USED_AT_REST_MOST = 0.85

/** Sizes to try beside a piece's own: parts of its joint's diameter, and of its wall. */
const sizes = [
  { diameter: 1, wall: 1 },
  { diameter: 0.85, wall: 1.15 },
  { diameter: 1.15, wall: 0.8 },
  { diameter: 0.7, wall: 1.3 },
  { diameter: 1.3, wall: 0.65 },
] as const

interface Tried {
  joint: DemoJoint
  edgeMinutes: number
  usedAtStart: number
}

/**
 * A joint for which the air of just now makes the wanted story: the piece as it is if that will do, else with an
 * allowance, and if need be a size, that does. The same check judges it that will judge it on the page.
 * @returns the nearest joint that was found, and whether it does what is wanted
 */
export function chosenJoint(
  input: CarryCheckInput,
  wanted: WantedEdge,
): { joint: DemoJoint; isAsWanted: boolean } {
  const { jointDiameterMm, wallMm, fitGrade, allowanceMm } = input.piece
  const own = tried(input, { jointDiameterMm, wallMm, fitGrade, allowanceMm })
  if (suits(own, wanted)) return { joint: own.joint, isAsWanted: true }
  let nearest = own
  for (const size of sizes) {
    const joint = {
      jointDiameterMm: jointDiameterMm === null ? null : Math.round(jointDiameterMm * size.diameter),
      wallMm: wallMm === null ? null : Math.round(wallMm * size.wall * 2) / 2,
    }
    const one = withAllowance(input, joint, wanted.aim)
    if (suits(one, wanted)) return { joint: one.joint, isAsWanted: true }
    if (Math.abs(one.edgeMinutes - wanted.aim) < Math.abs(nearest.edgeMinutes - wanted.aim)) nearest = one
  }
  return { joint: nearest.joint, isAsWanted: false }
}

const suits = ({ edgeMinutes, usedAtStart }: Tried, { least, most }: WantedEdge): boolean =>
  edgeMinutes >= least && edgeMinutes <= most && usedAtStart <= USED_AT_REST_MOST

/** The early edge comes later the more the joint may lose, so halving finds the allowance. */
function withAllowance(
  input: CarryCheckInput,
  size: Pick<DemoJoint, 'jointDiameterMm' | 'wallMm'>,
  aimMinutes: number,
): Tried {
  const at = (allowanceMm: number): Tried =>
    tried(input, { ...size, allowanceMm, fitGrade: gradeOf(allowanceMm) })
  let low = ALLOWANCE_MIN_MM
  let high = ALLOWANCE_MAX_MM
  for (let n = 0; n < HALVINGS; n++) {
    const middle = (low + high) / 2
    if (at(middle).edgeMinutes < aimMinutes) low = middle
    else high = middle
  }
  return at(Math.round(high * 100) / 100)
}

/** What a maker would call a fit that may lose so much. */
function gradeOf(allowanceMm: number): FitGrade {
  if (allowanceMm < 0.05) return 'suction'
  if (allowanceMm <= 0.12) return 'snug'
  return allowanceMm <= 0.3 ? 'easy' : 'loose'
}

function tried(input: CarryCheckInput, joint: DemoJoint): Tried {
  const check = carryCheck({ ...input, piece: { ...input.piece, ...joint } })
  if (check.kind !== 'verdict') throw new Error(`${input.piece.number} can not be judged: ${check.words}`)
  return { joint, edgeMinutes: edgeMinutes(check, input.startsAt), usedAtStart: check.usedAtStart }
}

function edgeMinutes({ earlyAt }: VerdictCheck, startsAt: number): number {
  return earlyAt === null ? Infinity : (Date.parse(earlyAt) - startsAt) / MINUTE_MS
}
