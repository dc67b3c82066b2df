import { findSpecies, speciesSlug } from '@/lib/wood/species'
import type { Grain, Stage } from './piece'

const stageWords: Record<Stage, string> = { blank: 'blank', roughed: 'roughed pair', box: 'box' }

/** What a piece's wood goes by: a slug of the table, or an id of the site's own wood with that wood's names beside it. */
export interface NamedWood {
  wood: string | null
  ownWood?: { commonName: string; latinName: string } | null
}

/** The wood by its full common name. */
export function woodName({ wood, ownWood }: NamedWood): string {
  if (wood === null) return 'wood not known'
  return ownWood?.commonName ?? findSpecies(wood)?.commonName ?? wood
}

/** By what the dust, the oil and the protection of a piece's wood are looked up: Latin name in lower case with hyphens. */
export const latinSlugOfPiece = ({ wood, ownWood }: NamedWood): string | null =>
  ownWood ? speciesSlug(ownWood.latinName) : wood

/** "Ash box", "Walnut blank", "Roughed pair, wood not known": wood and stage in words. */
export function pieceTitle(piece: NamedWood & { stage: Stage; isHidden?: boolean }): string {
  if (piece.isHidden === true) return 'Private piece'
  const stage = stageWords[piece.stage]
  if (piece.wood === null) return `${stage[0]?.toUpperCase() ?? ''}${stage.slice(1)}, wood not known`
  // "Ash, white (American)" is ash for short.
  const name = woodName(piece)
  return `${name.split(/[,(]/)[0]?.trim() || name} ${stage}`
}

/** Which of the outlines stands for a piece; its height isn't asked for, so this goes by what is known. */
export function pieceOutline(piece: {
  stage: Stage
  grain: Grain
  jointDiameterMm: number | null
}): 'low' | 'tall' | 'round' | 'pair' {
  if (piece.stage === 'roughed') return 'pair'
  if (piece.stage === 'blank') return 'round'
  const isNarrow = piece.jointDiameterMm !== null && piece.jointDiameterMm <= 60
  return piece.grain === 'end-grain' && isNarrow ? 'tall' : 'low'
}
