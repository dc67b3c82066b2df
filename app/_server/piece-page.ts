import 'server-only'
import type { Kysely } from 'kysely'
import type { SiteMember } from '@/db/queries/members'
import type { Database } from '@/db/schema'
import type { PieceEventView } from '@/lib/pieces/event'
import type { PieceOutcomes } from '@/lib/pieces/outcome'
import type { PieceFit } from '@/lib/pieces/piece-fit'
import { may } from '@/lib/sites/permissions'
import { getOutcomes } from './outcomes'
import { getPieceEvents } from './piece-events'
import { getPieceFit, pieceFitQuerySchema } from './piece-fit'

export interface PieceRecordPart {
  fit: PieceFit
  events: { items: PieceEventView[] }
  outcomes: PieceOutcomes
}

/** How a piece fits and what happened to it, for its page; null for those who don't see that. */
export async function findPieceRecordPart(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  now: Date,
): Promise<PieceRecordPart | null> {
  if (!may(member.role, 'pieces:record')) return null
  const [fit, events, outcomes] = await Promise.all([
    getPieceFit(db, member, pieceCode, pieceFitQuerySchema.parse({}), now),
    getPieceEvents(db, member, pieceCode),
    getOutcomes(db, member, pieceCode),
  ])
  return fit.ok && events.ok && outcomes.ok
    ? { fit: fit.value, events: events.value, outcomes: outcomes.value }
    : null
}
