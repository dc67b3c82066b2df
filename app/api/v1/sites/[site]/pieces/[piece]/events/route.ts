import { moveToRoom } from '@/app/_server/piece-changes'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { pieceEventSchema } from '@/lib/pieces/piece'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'pieces:move', params: { piece: codeSchema }, body: pieceEventSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    const { roomId, at } = body
    const piece = await moveToRoom(db, member, params.piece, { roomId, at }, now)
    return piece.ok ? answer(piece.value, { status: 201, etag: piece.value.version }) : piece
  },
)
