import { createPieceEvent, getPieceEvents } from '@/app/_server/piece-events'
import { moveToRoom } from '@/app/_server/piece-changes'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { enteredEventSchema } from '@/lib/pieces/event'
import { codeSchema } from '@/lib/sites/site'

const params = { piece: codeSchema }

export const GET = siteRoute({ action: 'pieces:record', params }, async ({ db, member, params }) => {
  const events = await getPieceEvents(db, member, params.piece)
  return events.ok ? answer(events.value) : events
})

export const POST = siteRoute(
  { action: 'pieces:move', params, body: enteredEventSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    if (body.kind === 'move') {
      const { roomId, at } = body
      const piece = await moveToRoom(db, member, params.piece, { roomId, at }, now)
      return piece.ok ? answer(piece.value, { status: 201, etag: piece.value.version }) : piece
    }
    const event = await createPieceEvent(db, member, params.piece, body, now)
    return event.ok ? answer(event.value, { status: 201 }) : event
  },
)
