import 'server-only'
import type { Kysely } from 'kysely'
import type { SiteMember } from '@/db/queries/members'
import { findPaces } from '@/db/queries/moisture'
import { findPiecesById } from '@/db/queries/pieces'
import { countOutcomes, listTrackRows } from '@/db/queries/track-record'
import type { Database } from '@/db/schema'
import { trackRecord, type TrackRecord } from '@/lib/carry/track-record'
import { viewerOf } from './piece-view'

/** How good the verdicts were. Pieces that are private to another are left out: how their lids turn is theirs to tell. */
export async function getTrackRecord(db: Kysely<Database>, member: SiteMember): Promise<TrackRecord> {
  const { siteId } = member
  const [rows, all, paces] = await Promise.all([
    listTrackRows(db, siteId),
    countOutcomes(db, siteId),
    findPaces(db, siteId),
  ])
  const ids = [...new Set(rows.map((row) => row.pieceId))]
  const pieces = await findPiecesById(db, siteId, ids, viewerOf(member))
  const seen = new Map(pieces.filter((piece) => !piece.isHidden).map((piece) => [piece.id, piece]))
  const points = rows.flatMap(({ pieceId, carryCode, at, ...row }) => {
    const piece = seen.get(pieceId)
    if (piece === undefined) return []
    return { ...row, pieceId: piece.code, number: piece.number, carryId: carryCode, at: at.toISOString() }
  })
  return trackRecord(points, paces, Math.max(0, all - rows.length))
}
