import { findSpecies } from '@/lib/wood/species'
import type { Grain, Stage } from './piece'

const stageWords: Record<Stage, string> = { blank: 'blank', roughed: 'roughed pair', box: 'box' }

/** The wood by its full common name. */
export function woodName(wood: string | null): string {
  if (wood === null) return 'wood not known'
  return findSpecies(wood)?.commonName ?? wood
}

/** "Ash box", "Walnut blank", "Roughed pair, wood not known": wood and stage in words. */
export function pieceTitle(piece: { stage: Stage; wood: string | null; isHidden?: boolean }): string {
  if (piece.isHidden === true) return 'Private piece'
  const stage = stageWords[piece.stage]
  if (piece.wood === null) return `${stage[0]?.toUpperCase() ?? ''}${stage.slice(1)}, wood not known`
  // "Ash, white (American)" is ash for short.
  const short = woodName(piece.wood).split(/[,(]/)[0]?.trim() ?? piece.wood
  return `${short} ${stage}`
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
