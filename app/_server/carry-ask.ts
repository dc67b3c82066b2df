import 'server-only'
import type { Kysely } from 'kysely'
import { lockCarry } from '@/db/queries/carries'
import { updateCarryPiece } from '@/db/queries/carry-changes'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { findPieces } from '@/db/queries/pieces'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import type { Carry } from '@/lib/carry/carry'
import { getCarry } from './carries'
import { viewerOf } from './piece-view'
import { notThere, type Outcome } from './problem'

/** Passes over "how did the lid turn?" for one piece of a carry, for everybody: it is not asked again on any screen. */
export async function skipAsk(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  pieceCode: string,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    const [piece] = await findPieces(trx, member.siteId, [pieceCode], viewerOf(member))
    const part = carry?.pieces.find(({ pieceId }) => pieceId === piece?.id)
    if (carry === undefined || part === undefined) return notThere()
    if (!part.isAskSkipped) {
      await updateCarryPiece(trx, member.siteId, carry.id, part.pieceId, { askSkippedAt: now })
      await notifySite(trx, member.siteId, 'carry', carry.code)
    }
    return getCarry(trx, member, carryCode, now)
  })
}
