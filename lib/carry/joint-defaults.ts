import { allowanceOfFit, type Allowance } from '@/lib/fit/grades'
import { quarterTurnLossMmPerPct } from '@/lib/fit/lid-fit'
import type { InPlaneMovement } from '@/lib/fit/ovality'
import { type FilterFacts, pieceFilter, ROUGHED_WALL_MM } from '@/lib/follow/piece-filter'
import type { PieceFilter } from '@/lib/follow/wood-state'
import { LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { movementOfWood, type WoodMovement, woodMovement } from '@/lib/wood/movement-class'
import type { PieceFacts } from './carry-check'
import { jointLoss, type JointLoss } from './joint-loss'

/** Where a size was not told. Status: guess, all of them. */
export const WALL_MM = 2.5
export const WALL_OF_BODY = 0.6
export const WALL_OF_BODY_MIN_MM = 2
export const WALL_OF_BODY_MAX_MM = 4
export const SPIGOT_MM = 6
export const PLUG_LID_MM = 8

export type WoodFacts = Pick<
  PieceFacts,
  | 'stage'
  | 'wood'
  | 'ownFigures'
  | 'grain'
  | 'wallMm'
  | 'spigotMm'
  | 'bodyWallMm'
  | 'lidForm'
  | 'lidMm'
  | 'lidWallMm'
  | 'blankDiameterMm'
  | 'endsSealed'
  | 'finish'
>
export type JointFacts = WoodFacts &
  Pick<PieceFacts, 'jointDiameterMm' | 'spigotOn' | 'fitGrade' | 'clearanceMm' | 'allowanceMm'>

/** A joint of which nothing has been told yet. */
export const UNTOLD_JOINT: JointFacts = {
  stage: 'box',
  wood: null,
  grain: 'end-grain',
  spigotOn: 'base',
  lidForm: 'plug',
  jointDiameterMm: null,
  wallMm: null,
  spigotMm: null,
  lidMm: null,
  lidWallMm: null,
  bodyWallMm: null,
  blankDiameterMm: null,
  endsSealed: false,
  finish: '',
  fitGrade: null,
  clearanceMm: null,
  allowanceMm: null,
}

/** What is needed to follow a piece's wood: no joint diameter yet. */
export type FollowedWood = {
  readonly filter: PieceFilter
  readonly movement: WoodMovement
  /** What was not told and is taken as usual, each as a short phrase. */
  readonly assumed: readonly string[]
}

export type ResolvedJoint = FollowedWood & {
  readonly diameterMm: number
  /** In the plane of the joint; for a side-grain box that plane holds the direction along the grain. */
  readonly inPlane: InPlaneMovement
  readonly loss: JointLoss
  /** Clearance lost a quarter turn on for each % MC, both parts in step. */
  readonly lossMmPerPct: number
  readonly allowance: Allowance
  /** Points of % MC either side of the cut at which the allowance is gone. */
  readonly allowedMcPct: number
}

function wallOf({ wallMm, bodyWallMm }: WoodFacts): { wallMm: number; isAssumed: boolean } {
  if (wallMm !== null) return { wallMm, isAssumed: false }
  if (bodyWallMm === null) return { wallMm: WALL_MM, isAssumed: true }
  const ofBody = Math.min(WALL_OF_BODY_MAX_MM, Math.max(WALL_OF_BODY_MIN_MM, WALL_OF_BODY * bodyWallMm))
  return { wallMm: ofBody, isAssumed: true }
}

/** To a tenth, without an idle nought. */
const figure = (value: number): string => String(Math.round(value * 10) / 10)

/** What the wood of a piece does: by the site's own figures where it has some, else by the table's. */
export const movementOfPiece = ({
  wood,
  ownFigures,
}: Pick<PieceFacts, 'wood' | 'ownFigures'>): WoodMovement =>
  ownFigures === undefined ? woodMovement(wood ?? undefined) : movementOfWood(ownFigures)

/**
 * A piece's wood, ready to be followed, with every size that was not told filled in and named.
 * @param facts what is known of the piece; null where it isn't
 *
 * Defaults: status guess, stated beside each constant.
 */
export function woodOfPiece(facts: WoodFacts): FollowedWood {
  const movement = movementOfPiece(facts)
  const wall = wallOf(facts)
  const filled: FilterFacts = {
    stage: facts.stage,
    grain: facts.grain,
    lidForm: facts.lidForm,
    wallMm: wall.wallMm,
    spigotMm: facts.spigotMm ?? SPIGOT_MM,
    lidMm: facts.lidMm ?? PLUG_LID_MM,
    lidWallMm: facts.lidWallMm ?? wall.wallMm,
    bodyWallMm: facts.bodyWallMm,
    blankDiameterMm: facts.blankDiameterMm,
    endsSealed: facts.endsSealed,
    finish: facts.finish,
    densityKgM3: movement.densityKgM3,
  }
  return { filter: pieceFilter(filled), movement, assumed: assumedOf(facts, movement, wall) }
}

function assumedOf(
  facts: WoodFacts,
  movement: WoodMovement,
  wall: { wallMm: number; isAssumed: boolean },
): string[] {
  const assumed: string[] = []
  if (movement.assumed.includes('wood'))
    assumed.push('wood not known: taken as one of medium movement, 650 kg/m³')
  else if (movement.assumed.includes('density')) assumed.push(`density ${String(movement.densityKgM3)} kg/m³`)
  if (facts.stage === 'box') {
    if (wall.isAssumed) assumed.push(`wall ${figure(wall.wallMm)} mm at the spigot`)
    if (facts.spigotMm === null) assumed.push(`spigot ${figure(SPIGOT_MM)} mm long`)
  } else if (facts.stage === 'roughed' && facts.bodyWallMm === null) {
    assumed.push(`wall ${figure(ROUGHED_WALL_MM)} mm`)
  }
  return assumed
}

/**
 * The joint of a piece, with everything that was not told filled in and named.
 * @param facts what is known of the piece; null where it isn't
 * @returns undefined where there is nothing to work with: no joint diameter, or a threaded lid
 *
 * Defaults: status guess, stated beside each constant; movement by `movementOfPiece`, allowance by `allowanceOfFit`.
 */
export function jointOfPiece(facts: JointFacts): ResolvedJoint | undefined {
  const allowance = allowanceOfFit(facts)
  if (facts.jointDiameterMm === null || allowance === undefined) return undefined
  const wood = woodOfPiece(facts)
  const inPlane: InPlaneMovement = {
    tangentialPerPct: wood.movement.tangentialPerPct,
    radialPerPct: facts.grain === 'end-grain' ? wood.movement.radialPerPct : LONGITUDINAL_PER_PCT,
  }
  const lossMmPerPct = quarterTurnLossMmPerPct(facts.jointDiameterMm, inPlane)
  const assumed = [...wood.assumed]
  if (!wood.movement.assumed.includes('wood') && wood.movement.assumed.includes('movement'))
    assumed.push('movement of its class: none is published')
  if (facts.lidForm === 'plug' && facts.lidMm === null) assumed.push(`lid ${figure(PLUG_LID_MM)} mm thick`)
  if (allowance.basis === 'unknown') assumed.push('allowance 0.15 mm: tell us how the lid fits')
  if (allowance.basis === 'grade')
    assumed.push(`allowance ${allowance.allowanceMm.toFixed(2)} mm for its grade of fit`)
  if (allowance.basis === 'measured')
    assumed.push(`allowance ${allowance.allowanceMm.toFixed(2)} mm of its clearance`)
  return {
    ...wood,
    diameterMm: facts.jointDiameterMm,
    inPlane,
    loss: jointLoss(facts.jointDiameterMm, inPlane, facts.spigotOn),
    lossMmPerPct,
    allowance,
    allowedMcPct: allowance.allowanceMm / lossMmPerPct,
    assumed,
  }
}
