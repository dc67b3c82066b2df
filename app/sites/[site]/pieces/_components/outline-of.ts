import type { Outline } from '@/app/_components/ui/piece-outline'
import type { Piece } from '@/lib/pieces/piece'

/** Which outline stands for a piece: blanks and pairs as a taped pair, wide boxes low, small ones round, the rest tall. */
export function outlineOf(piece: Pick<Piece, 'stage' | 'jointDiameterMm'>): Outline {
  if (piece.stage !== 'box') return 'pair'
  const diameterMm = piece.jointDiameterMm ?? 60
  if (diameterMm >= 75) return 'low'
  return diameterMm <= 48 ? 'round' : 'tall'
}
