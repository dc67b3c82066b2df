import 'server-only'
import type { Kysely } from 'kysely'
import { updateCarry, updateCarryPiece } from '@/db/queries/carry-changes'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { findPiecesById, type PieceRecord } from '@/db/queries/pieces'
import { movePiece } from '@/db/queries/places'
import type { RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { checkPiece } from '@/lib/carry/judge'
import { byPress, namesOf } from '@/lib/carry/summary'
import type { Cover } from '@/lib/pieces/piece'
import { ok } from '@/lib/result'
import { viewerOf } from './piece-view'
import { fail, failField, type Outcome } from './problem'

interface StartAsked {
  pieceIds: readonly number[]
  room: Pick<RoomRecord, 'id' | 'name'>
  cover: Cover
  stayMinutes: number
  outAt: Date
  againstAdvice: boolean
}

interface Start {
  pieces: readonly PieceRecord[]
  roomId: number
  cover: ReadonlyMap<number, Cover>
  outAt: Date
  isAgainstAdvice: boolean
}

/**
 * Whether pieces may go out now. Their rows must be locked. Whoever goes against the advice has to say so: a check is
 * made here again, as the one on the screen may be an hour old.
 */
export async function mayStart(
  db: Kysely<Database>,
  member: SiteMember,
  asked: StartAsked,
  now: Date,
): Promise<Outcome<Start>> {
  const pieces = await findPiecesById(db, member.siteId, asked.pieceIds, viewerOf(member))
  const gone = pieces.filter((piece) => piece.isOut)
  if (gone.length > 0)
    return fail(
      'already-out',
      `${namesOf(gone)} ${gone.length === 1 ? 'is' : 'are'} out already. Bring it back first.`,
      {
        errors: gone.map((piece) => ({ path: piece.number, message: 'is out already' })),
      },
    )
  const there = pieces.filter((piece) => piece.room?.roomId === asked.room.id)
  if (there.length > 0) return fail('not-possible', `${namesOf(there)} is in ${asked.room.name} already.`)
  const late = pieces.filter(
    (piece) => piece.since !== null && piece.since > asked.outAt && asked.outAt < now,
  )
  if (late.length > 0)
    return failField('not-possible', 'plannedAt', `${namesOf(late)} came to where it is only after that`)
  // What went out an hour ago can't be kept in by advice any more.
  const isLogged = asked.outAt < now
  const advice = isLogged ? undefined : await adviceAgainst(db, member, asked, pieces, now)
  if (advice !== undefined && !asked.againstAdvice) return advice
  return ok({
    pieces,
    roomId: asked.room.id,
    cover: new Map(pieces.map((piece) => [piece.id, asked.cover])),
    outAt: asked.outAt,
    isAgainstAdvice: advice !== undefined,
  })
}

async function adviceAgainst(
  db: Kysely<Database>,
  member: SiteMember,
  asked: StartAsked,
  pieces: readonly PieceRecord[],
  now: Date,
) {
  const material = await loadCarryMaterial(db, member, asked.pieceIds, [asked.room.id], now)
  const leaves = pieces.flatMap((piece) => {
    const check = checkPiece(material, {
      pieceId: piece.id,
      toRoomId: asked.room.id,
      startsAt: asked.outAt,
      stayMinutes: asked.stayMinutes,
      cover: asked.cover,
    })
    return check?.kind === 'verdict' && check.verdict === 'leave' ? { piece, check } : []
  })
  const first = byPress(leaves)[0]
  if (first === undefined) return undefined
  const reason = first.piece.isHidden ? '' : ` ${first.check.reason}`
  return fail('advised-against', `Leave ${namesOf(leaves.map((one) => one.piece))} where it is.${reason}`, {
    errors: leaves.map(({ piece, check }) => ({
      path: piece.number,
      message: piece.isHidden ? check.words : `${check.words}. ${check.reason}`,
    })),
  })
}

/** Writes that pieces went out: the carry and the places of the pieces at once. */
export async function setOut(
  db: Kysely<Database>,
  member: SiteMember,
  carryId: number,
  start: Start,
): Promise<void> {
  const { siteId, userId } = member
  for (const piece of start.pieces) {
    const cover = start.cover.get(piece.id) ?? 'open'
    const to = { roomId: start.roomId, cover, at: start.outAt, carryId, userId }
    const outAt = await movePiece(db, siteId, piece.id, to)
    await updateCarryPiece(db, siteId, carryId, piece.id, {
      cover,
      outAt,
      fromRoomId: piece.room?.roomId ?? null,
    })
  }
  await updateCarry(db, siteId, carryId, {
    state: 'out',
    startedAt: start.outAt,
    againstAdvice: start.isAgainstAdvice,
  })
}
