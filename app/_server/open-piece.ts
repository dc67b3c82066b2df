import 'server-only'
import type { Kysely } from 'kysely'
import type { SiteMember } from '@/db/queries/members'
import { lockPieces } from '@/db/queries/piece-writes'
import { findPiece, type PieceRecord } from '@/db/queries/pieces'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import { viewerOf } from './piece-view'
import { fail, notThere, type Outcome } from './problem'

/** A piece whose record the member may read: there, and not private to somebody else. */
export async function findOpenPiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  options: { withArchived?: boolean } = { withArchived: true },
): Promise<Outcome<PieceRecord>> {
  const piece = await findPiece(db, member.siteId, pieceCode, viewerOf(member), options)
  if (piece === undefined) return notThere()
  return piece.isHidden ? fail('not-yours-to-do', 'This piece is private to its maker.') : ok(piece)
}

/** The same for an entry in its record: with its row locked for the rest of the transaction. */
export async function lockOpenPiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
): Promise<Outcome<PieceRecord>> {
  const seen = await findOpenPiece(db, member, pieceCode, {})
  if (!seen.ok) return seen
  await lockPieces(db, member.siteId, [seen.value.id])
  return findOpenPiece(db, member, pieceCode, {})
}
