import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { type CarryPieceRecord, type CarryRecord, findCarry } from '@/db/queries/carries'
import type { SiteMember } from '@/db/queries/members'
import { findPiecesById } from '@/db/queries/pieces'
import { findStayOnRecord } from '@/db/queries/wood-at'
import type { Database } from '@/db/schema'
import { type Forgotten, forgottenFigures, howBadWords, tonightWords, tryWords } from '@/lib/carry/forgotten'
import { type CarryMaterial, carryThereAndBack } from '@/lib/carry/material'
import { ok } from '@/lib/result'
import { viewerOf } from './piece-view'
import { notThere, type Outcome } from './problem'

/** "I forgot it", of each piece of a carry that has been out: how bad, what to do tonight, when to try the quarter turn. */
export async function getForgotten(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
): Promise<Outcome<{ items: Forgotten[] }>> {
  const carry = await findCarry(db, member.siteId, carryCode)
  if (carry === undefined) return notThere()
  const parts = carry.pieces.filter(({ outAt }) => outAt !== null)
  const ids = parts.map(({ pieceId }) => pieceId)
  const [pieces, material] = await Promise.all([
    findPiecesById(db, member.siteId, ids, viewerOf(member)),
    loadCarryMaterial(db, member, ids, [carry.toRoom.roomId], now),
  ])
  const clock = { timeZone: member.timeZone, now }
  const items = await Promise.all(
    parts.map(async (part): Promise<Forgotten[]> => {
      const piece = pieces.find(({ id }) => id === part.pieceId)
      if (piece === undefined || piece.stage !== 'box') return []
      const figures = piece.isHidden ? undefined : await figuresOf(db, member, material, carry, part, now)
      const isOut = part.backAt === null
      return [
        {
          ...{ pieceId: piece.code, number: piece.number, isOut },
          ...(figures ?? { usedNow: null, usedMost: null, tryAt: null, tryAtLate: null }),
          howBad: howBadWords(figures, clock),
          tonight: tonightWords(isOut),
          tryIt: tryWords(figures, clock),
        },
      ]
    }),
  )
  return ok({ items: items.flat() })
}

async function figuresOf(
  db: Kysely<Database>,
  member: SiteMember,
  material: CarryMaterial,
  carry: CarryRecord,
  { pieceId, outAt, cover }: CarryPieceRecord,
  now: Date,
) {
  if (outAt === null || outAt >= now) return undefined
  const stayMinutes = Math.min(43_200, Math.ceil((now.getTime() - outAt.getTime()) / 60_000))
  const input = carryThereAndBack(material, {
    ...{ pieceId, toRoomId: carry.toRoom.roomId, startsAt: outAt, stayMinutes, cover },
  })
  const onRecord = await findStayOnRecord(db, member, pieceId, { from: outAt, until: now }, now)
  if (input === undefined || onRecord === undefined) return undefined
  return forgottenFigures({ ...input, start: onRecord.start }, onRecord.airs, input.home ?? [])
}
