import { allowanceOfFit, type Allowance } from '@/lib/fit/grades'
import { quarterTurnLossMmPerPct } from '@/lib/fit/lid-fit'
import type { InPlaneMovement } from '@/lib/fit/ovality'
import { LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { woodMovement } from '@/lib/wood/movement-class'
import type { PieceFacts } from './carry-check'
import type { RingSize } from './joint'

/** Where a size was not told. Status: guess, all of them. */
const WALL_MM = 2.5
const WALL_OF_BODY = 0.6
const WALL_OF_BODY_MIN_MM = 2
const WALL_OF_BODY_MAX_MM = 4
const SPIGOT_MM = 6
const PLUG_LID_MM = 8

export type RingFacts = Pick<PieceFacts, 'wood' | 'grain' | 'wallMm' | 'spigotMm' | 'bodyWallMm'>
export type JointFacts = RingFacts &
  Pick<PieceFacts, 'jointDiameterMm' | 'lidForm' | 'lidMm' | 'fitGrade' | 'clearanceMm' | 'allowanceMm'>

/** What is needed to follow a piece's wood: no joint diameter yet. */
export type Ring = {
  readonly size: RingSize
  readonly densityKgM3: number
  /** What was not told and is taken as usual, each as a short phrase. */
  readonly assumed: readonly string[]
}

export type ResolvedJoint = Ring & {
  readonly diameterMm: number
  readonly lidMm: number
  /** In the plane of the joint; for a side-grain box that plane holds the direction along the grain. */
  readonly movement: InPlaneMovement
  /** Clearance lost a quarter turn on for each % MC. */
  readonly lossMmPerPct: number
  readonly allowance: Allowance
  /** Points of % MC either side of the cut at which the allowance is gone. */
  readonly allowedMcPct: number
}

function wallOf({ wallMm, bodyWallMm }: RingFacts): { wallMm: number; isAssumed: boolean } {
  if (wallMm !== null) return { wallMm, isAssumed: false }
  if (bodyWallMm === null) return { wallMm: WALL_MM, isAssumed: true }
  const ofBody = Math.min(WALL_OF_BODY_MAX_MM, Math.max(WALL_OF_BODY_MIN_MM, WALL_OF_BODY * bodyWallMm))
  return { wallMm: ofBody, isAssumed: true }
}

/** To a tenth, without an idle nought. */
const figure = (value: number): string => String(Math.round(value * 10) / 10)

/**
 * The ring of a piece's joint, with every size that was not told filled in and named.
 * @param facts what is known of the piece; null where it isn't
 * @returns sizes in mm, density in kg/m³ at 12 % MC
 *
 * Defaults: status guess, stated beside each constant.
 */
export function ringOfPiece(facts: RingFacts): Ring {
  const wood = woodMovement(facts.wood ?? undefined)
  const wall = wallOf(facts)
  const assumed: string[] = []
  if (wood.assumed.includes('wood'))
    assumed.push('wood not known: taken as one of medium movement, 650 kg/m³')
  else if (wood.assumed.includes('density')) assumed.push(`density ${String(wood.densityKgM3)} kg/m³`)
  if (wall.isAssumed) assumed.push(`wall ${figure(wall.wallMm)} mm at the spigot`)
  if (facts.spigotMm === null) assumed.push(`spigot ${figure(SPIGOT_MM)} mm long`)
  return {
    size: { wallMm: wall.wallMm, spigotMm: facts.spigotMm ?? SPIGOT_MM, grain: facts.grain },
    densityKgM3: wood.densityKgM3,
    assumed,
  }
}

/**
 * The joint of a piece, with everything that was not told filled in and named.
 * @param facts what is known of the piece; null where it isn't
 * @returns undefined where there is nothing to work with: no joint diameter, or a threaded lid
 *
 * Defaults: status guess, stated beside each constant; movement by `woodMovement`, allowance by `allowanceOfFit`.
 */
export function jointOfPiece(facts: JointFacts): ResolvedJoint | undefined {
  const allowance = allowanceOfFit(facts)
  if (facts.jointDiameterMm === null || allowance === undefined) return undefined
  const ring = ringOfPiece(facts)
  const wood = woodMovement(facts.wood ?? undefined)
  const movement: InPlaneMovement = {
    tangentialPerPct: wood.tangentialPerPct,
    radialPerPct: facts.grain === 'end-grain' ? wood.radialPerPct : LONGITUDINAL_PER_PCT,
  }
  const lossMmPerPct = quarterTurnLossMmPerPct(facts.jointDiameterMm, movement)
  const assumed = [...ring.assumed]
  const isKnownWood = !wood.assumed.includes('wood')
  if (isKnownWood && wood.assumed.includes('movement'))
    assumed.push('movement of its class: none is published')
  if (facts.lidForm === 'plug' && facts.lidMm === null) assumed.push(`lid ${figure(PLUG_LID_MM)} mm thick`)
  if (allowance.basis === 'unknown') assumed.push('allowance 0.15 mm: tell us how the lid fits')
  if (allowance.basis === 'grade')
    assumed.push(`allowance ${allowance.allowanceMm.toFixed(2)} mm for its grade of fit`)
  if (allowance.basis === 'measured')
    assumed.push(`allowance ${allowance.allowanceMm.toFixed(2)} mm of its clearance`)
  return {
    ...ring,
    diameterMm: facts.jointDiameterMm,
    lidMm: facts.lidMm ?? PLUG_LID_MM,
    movement,
    lossMmPerPct,
    allowance,
    allowedMcPct: allowance.allowanceMm / lossMmPerPct,
    assumed,
  }
}
