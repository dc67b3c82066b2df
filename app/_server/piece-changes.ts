import 'server-only'
import type { Kysely } from 'kysely'
import { findCarryOfPieceOut, findPlannedCarry } from '@/db/queries/carries'
import { changedFields, insertChange } from '@/db/queries/changes'
import { takeIds } from '@/db/queries/counters'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { findPiece, type PieceRecord } from '@/db/queries/pieces'
import {
  insertPiece,
  isNumberTaken,
  lockPieces,
  type PieceRooms,
  updatePiece,
} from '@/db/queries/piece-writes'
import { movePiece } from '@/db/queries/places'
import { findRoom } from '@/db/queries/rooms'
import { findSiteWood } from '@/db/queries/site-woods'
import { inTransaction } from '@/db/queries/transaction'
import { followPieces } from '@/db/queries/follow-pieces'
import type { Database } from '@/db/schema'
import { formatMoment } from '@/lib/format/times'
import type { NewPiece, PieceChange, PieceDetail } from '@/lib/pieces/piece'
import { ok } from '@/lib/result'
import { ownWoodCode } from '@/lib/wood/site-wood'
import { findSpecies } from '@/lib/wood/species'
import { bringBack } from './carry-steps'
import { viewerOf } from './piece-view'
import { getPiece } from './pieces'
import { fail, failField, notThere, type Outcome } from './problem'

/** The rooms that a request names, by their inner numbers. A room that isn't there refuses the whole. */
async function roomsOf(
  db: Kysely<Database>,
  member: SiteMember,
  asked: { keepRoomId?: string | null; fittedRoomId?: string | null },
): Promise<Outcome<PieceRooms>> {
  const rooms: PieceRooms = {}
  for (const name of ['keepRoomId', 'fittedRoomId'] as const) {
    const code = asked[name]
    if (code === undefined || code === null) {
      rooms[name] = code
      continue
    }
    // A box may have been fitted in a room that has been put away since.
    const withArchived = name === 'fittedRoomId'
    const room = await findRoom(db, member.siteId, code, { withArchived })
    if (room === undefined) return notThere()
    rooms[name] = room.id
  }
  return ok(rooms)
}

/** A wood must be in the table, or one of the site's own that is offered still; a piece may keep one that was put away. */
async function refusedWood(
  db: Kysely<Database>,
  siteId: number,
  wood: string | null | undefined,
  before: string | null = null,
) {
  if (wood === null || wood === undefined || wood === before) return undefined
  const isThere =
    ownWoodCode(wood) === undefined
      ? findSpecies(wood) !== undefined
      : (await findSiteWood(db, siteId, wood)) !== undefined
  return isThere
    ? undefined
    : failField('not-possible', 'wood', 'not in the list of woods: choose one, or leave it unknown')
}

const numberTaken = () => failField('name-taken', 'number', 'another piece has this number')

export async function createPiece(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewPiece,
  now: Date,
): Promise<Outcome<PieceDetail>> {
  return inTransaction(db, async (trx) => {
    const refusal = await refusedWood(trx, member.siteId, input.wood)
    if (refusal !== undefined) return refusal
    const room = await findRoom(trx, member.siteId, input.roomId)
    if (room === undefined) return notThere()
    const rooms = await roomsOf(trx, member, input)
    if (!rooms.ok) return rooms
    // Holding the row of numbers makes two who choose the same one wait for one another.
    await takeIds(trx, member.siteId, 'piece', 0)
    if (await isNumberTaken(trx, member.siteId, input.number)) return numberTaken()
    const piece = await insertPiece(trx, member.siteId, input, rooms.value, member.userId, now)
    const place = { roomId: room.id, cover: 'closed' as const, at: now, carryId: null }
    await movePiece(trx, member.siteId, piece.id, { ...place, userId: member.userId })
    await followPieces(trx, member, [piece.id], now)
    await notifySite(trx, member.siteId, 'piece', piece.code)
    return getPiece(trx, member, piece.code, now)
  })
}

/** Finds a piece for a change, with its row locked. A private one is its owner's to change. */
async function pieceToChange(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  options: { withArchived?: boolean } = {},
): Promise<Outcome<PieceRecord>> {
  const seen = await findPiece(db, member.siteId, pieceCode, viewerOf(member), options)
  if (seen === undefined) return notThere()
  await lockPieces(db, member.siteId, [seen.id])
  const piece = await findPiece(db, member.siteId, pieceCode, viewerOf(member), options)
  if (piece === undefined) return notThere()
  if (piece.isHidden) return fail('not-yours-to-do', 'This piece is private to its maker.')
  return ok(piece)
}

export async function changePiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  version: number,
  change: PieceChange,
  now: Date,
): Promise<Outcome<PieceDetail>> {
  return inTransaction(db, async (trx) => {
    await takeIds(trx, member.siteId, 'piece', 0)
    const found = await pieceToChange(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    if (piece.version !== version) return changedMeanwhile(trx, member, piece, now)
    if (change.isPrivate === true && !piece.isPrivate && piece.ownerUserId !== member.userId)
      return fail('not-yours-to-do', 'Only its own maker can make a piece private.')
    const refusal = await refusedWood(trx, member.siteId, change.wood, piece.wood)
    if (refusal !== undefined) return refusal
    const rooms = await roomsOf(trx, member, change)
    if (!rooms.ok) return rooms
    if (change.number !== undefined && (await isNumberTaken(trx, member.siteId, change.number, piece.id)))
      return numberTaken()
    const { keepRoomId: _keep, fittedRoomId: _fitted, ...facts } = change
    await updatePiece(trx, member.siteId, piece.id, version, facts, rooms.value)
    await followPieces(trx, member, [piece.id], now)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'piece',
      subjectCode: piece.code,
      action: 'change',
      ...changedFields({ ...shownFacts(piece) }, { ...change }),
    })
    await notifySite(trx, member.siteId, 'piece', piece.code)
    return getPiece(trx, member, piece.code, now)
  })
}

const shownFacts = (piece: PieceRecord): Record<string, unknown> => ({
  ...piece,
  keepRoomId: piece.keepRoom?.code ?? null,
  fittedRoomId: piece.fittedRoomCode,
})

/** Puts a piece away. Its history stays, and its number is free again. */
export async function archivePiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  version: number,
  now: Date,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const found = await pieceToChange(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    if (piece.version !== version) return changedMeanwhile(trx, member, piece, now)
    if (piece.isOut) return fail('already-out', `${piece.number} is out. Bring it back first.`)
    if ((await findPlannedCarry(trx, member.siteId, piece.id)) !== undefined)
      return fail('conflict', `${piece.number} is in a planned carry. Call that off, or take it out, first.`)
    await updatePiece(trx, member.siteId, piece.id, version, {}, { archivedAt: now })
    await logAndTell(trx, member, piece, 'archive')
    return ok(undefined)
  })
}

/** Brings a piece out again that was put away. */
export async function restorePiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  now: Date,
): Promise<Outcome<PieceDetail>> {
  return inTransaction(db, async (trx) => {
    await takeIds(trx, member.siteId, 'piece', 0)
    const found = await pieceToChange(trx, member, pieceCode, { withArchived: true })
    if (!found.ok) return found
    const piece = found.value
    if (piece.archivedAt !== null) {
      if (await isNumberTaken(trx, member.siteId, piece.number, piece.id)) return numberTaken()
      await updatePiece(trx, member.siteId, piece.id, piece.version, {}, { archivedAt: null })
      await logAndTell(trx, member, piece, 'restore')
    }
    return getPiece(trx, member, piece.code, now)
  })
}

async function logAndTell(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  action: string,
): Promise<void> {
  await insertChange(db, member.siteId, {
    userId: member.userId,
    subjectKind: 'piece',
    subjectCode: piece.code,
    action,
  })
  await notifySite(db, member.siteId, 'piece', piece.code)
}

/** A piece goes to stay in another room, for good or for now. One that is out ends its time out there. */
export async function moveToRoom(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  asked: { roomId: string; at?: string },
  now: Date,
): Promise<Outcome<PieceDetail>> {
  return inTransaction(db, async (trx) => {
    const seen = await findPiece(trx, member.siteId, pieceCode, viewerOf(member))
    const room = await findRoom(trx, member.siteId, asked.roomId)
    if (seen === undefined || room === undefined) return notThere()
    const out = await findCarryOfPieceOut(trx, member.siteId, seen.id)
    if (out !== undefined) {
      if (asked.at !== undefined)
        return fail('not-possible', `${seen.number} is out. Bring it back, then move it.`)
      const request = { pieceIds: [seen.code], roomId: room.code }
      const back = await bringBack(trx, member, out.carryCode, request, now)
      return back.ok ? getPiece(trx, member, seen.code, now) : back
    }
    await lockPieces(trx, member.siteId, [seen.id])
    const piece = await findPiece(trx, member.siteId, pieceCode, viewerOf(member))
    if (piece === undefined) return notThere()
    // Pressed twice, it has moved once.
    if (piece.room?.roomId === room.id) return getPiece(trx, member, piece.code, now)
    const at = asked.at === undefined ? now : new Date(asked.at)
    if (at > now) return failField('not-possible', 'at', 'a time to come: plan a carry for that')
    if (piece.since !== null && at <= piece.since && asked.at !== undefined) {
      const since = formatMoment(piece.since, member.timeZone, now)
      return failField('not-possible', 'at', `it came to where it is only at ${since}`)
    }
    await movePiece(trx, member.siteId, piece.id, {
      roomId: room.id,
      cover: 'closed',
      at,
      carryId: null,
      userId: member.userId,
    })
    await followPieces(trx, member, [piece.id], now)
    await notifySite(trx, member.siteId, 'piece', piece.code)
    return getPiece(trx, member, piece.code, now)
  })
}

async function changedMeanwhile(db: Kysely<Database>, member: SiteMember, piece: PieceRecord, now: Date) {
  const current = await getPiece(db, member, piece.code, now)
  return fail('changed-meanwhile', 'Somebody changed this piece meanwhile. Look at it again.', {
    current: current.ok ? current.value : undefined,
    version: piece.version,
  })
}
