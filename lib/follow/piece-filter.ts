import type { Grain, Stage } from '@/lib/pieces/piece'
import { filmOfFinish, restingSurfaceMPerS } from './finish'
import { partFilter, type PartShape } from './part'
import type { PieceFilter } from './wood-state'

/** Where a blank's size was not told. Status: guess; as the table of typical response times has them. */
export const ROUGHED_WALL_MM = 20
export const BLANK_DIAMETER_MM = 75
/** A blank in the round is taken to be twice as long as it is thick. Status: guess. */
export const BLANK_LENGTH_OF_DIAMETER = 2

/** The sizes of a piece that its wood is followed by, all told or filled in. */
export type FilterFacts = {
  readonly stage: Stage
  readonly grain: Grain
  readonly lidForm: 'plug' | 'hollow'
  readonly wallMm: number
  readonly spigotMm: number
  readonly lidMm: number
  readonly lidWallMm: number
  readonly bodyWallMm: number | null
  readonly blankDiameterMm: number | null
  readonly endsSealed: boolean
  readonly finish: string
  readonly densityKgM3: number
}

function blankShape(facts: FilterFacts): PartShape {
  const isHollowed = facts.stage === 'roughed' || facts.bodyWallMm !== null
  if (isHollowed) return { kind: 'wall', wallMm: facts.bodyWallMm ?? ROUGHED_WALL_MM }
  const diameterMm = facts.blankDiameterMm ?? BLANK_DIAMETER_MM
  return {
    kind: 'solid',
    diameterMm,
    lengthMm: BLANK_LENGTH_OF_DIAMETER * diameterMm,
    endsSealed: facts.endsSealed,
  }
}

/**
 * How the wood of a piece follows the air: a box by the ring and the lid of its joint, a roughed blank by its wall, one in
 * the round by its thickness.
 * @param facts sizes in mm, density in kg/m³ at 12 % MC
 * @throws RangeError for a size that is not above 0, or NaN
 */
export function pieceFilter(facts: FilterFacts): PieceFilter {
  const { grain, densityKgM3 } = facts
  if (facts.stage !== 'box') return { ring: partFilter(blankShape(facts), densityKgM3), lid: null }
  const surfaceMPerS = restingSurfaceMPerS(filmOfFinish(facts.finish))
  const ring: PartShape = { kind: 'ring', wallMm: facts.wallMm, lengthMm: facts.spigotMm, grain }
  const lid: PartShape =
    facts.lidForm === 'plug'
      ? { kind: 'disc', thicknessMm: facts.lidMm, grain }
      : { kind: 'ring', wallMm: facts.lidWallMm, lengthMm: facts.spigotMm, grain }
  return {
    ring: partFilter(ring, densityKgM3, surfaceMPerS),
    lid: partFilter(lid, densityKgM3, surfaceMPerS),
  }
}
