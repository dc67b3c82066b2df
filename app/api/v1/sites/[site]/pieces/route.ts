import { createPiece } from '@/app/_server/piece-changes'
import { listPieces, piecesQuerySchema } from '@/app/_server/pieces'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newPieceSchema } from '@/lib/pieces/piece'

export const GET = siteRoute(
  { action: 'pieces:see', query: piecesQuerySchema },
  async ({ db, member, query }) => {
    const pieces = await listPieces(db, member, query)
    return pieces.ok ? answer(pieces.value) : pieces
  },
)

export const POST = siteRoute(
  { action: 'pieces:change', body: newPieceSchema, creates: true },
  async ({ db, member, body, now }) => {
    const piece = await createPiece(db, member, body, now)
    if (!piece.ok) return piece
    return answer(piece.value, {
      status: 201,
      etag: piece.value.version,
      location: `/api/v1/sites/${member.siteCode}/pieces/${piece.value.id}`,
    })
  },
)
