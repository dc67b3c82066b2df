import type { Piece } from '@/lib/pieces/piece'
import { pieceOutline } from '@/lib/pieces/title'

/** The outline of a piece in a list, where its grain is not told: end grain, as most boxes are. */
export const listedOutline = (piece: Piece) => pieceOutline({ ...piece, grain: 'end-grain' })
