import { archivePiece, changePiece } from '@/app/_server/piece-changes'
import { getPiece } from '@/app/_server/pieces'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { pieceChangeSchema } from '@/lib/pieces/piece'
import { codeSchema } from '@/lib/sites/site'

const params = { piece: codeSchema }

export const GET = siteRoute({ action: 'pieces:see', params }, async ({ db, member, params, now }) => {
  const piece = await getPiece(db, member, params.piece, now)
  return piece.ok ? answer(piece.value, { etag: piece.value.version }) : piece
})

export const PATCH = siteRoute(
  { action: 'pieces:change', params, body: pieceChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch, now }) => {
    const piece = await changePiece(db, member, params.piece, ifMatch, body, now)
    return piece.ok ? answer(piece.value, { etag: piece.value.version }) : piece
  },
)

export const DELETE = siteRoute(
  { action: 'pieces:change', params, ifMatch: true },
  async ({ db, member, params, ifMatch, now }) => {
    const gone = await archivePiece(db, member, params.piece, ifMatch, now)
    return gone.ok ? answer(undefined) : gone
  },
)
