import { restorePiece } from '@/app/_server/piece-changes'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'pieces:change', params: { piece: codeSchema } },
  async ({ db, member, params, now }) => {
    const piece = await restorePiece(db, member, params.piece, now)
    return piece.ok ? answer(piece.value, { etag: piece.value.version }) : piece
  },
)
