import 'server-only'
import type { Kysely } from 'kysely'
import { type CarryPieceRecord, type CarryRecord, lockCarry } from '@/db/queries/carries'
import { replaceCarryPieces, updateCarry, updateCarryPiece } from '@/db/queries/carry-changes'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { lockPieces } from '@/db/queries/piece-writes'
import { findPiecesById } from '@/db/queries/pieces'
import { findCurrentPlace, movePiece, undoMove } from '@/db/queries/places'
import { findRoom } from '@/db/queries/rooms'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import type { Carry } from '@/lib/carry/carry'
import { namesOf } from '@/lib/carry/summary'
import { undoBringBackMs } from '@/lib/notices/policy'
import type { Cover } from '@/lib/pieces/piece'
import { ok } from '@/lib/result'
import { findPiecesAndRoom } from './carry-check'
import { mayStart, setOut } from './carry-start'
import { viewCarries } from './carry-view'
import { viewerOf } from './piece-view'
import { fail, failField, notThere, type Outcome } from './problem'

/** One step of a carry: its row is locked, then the step is made, and what is there afterwards is the answer. */
function step(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
  work: (trx: Kysely<Database>, carry: CarryRecord) => Promise<Outcome<'changed' | 'as it was'>>,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    if (carry === undefined) return notThere()
    const done = await work(trx, carry)
    if (!done.ok) return done
    if (done.value === 'changed') await notifySite(trx, member.siteId, 'carry', carry.code)
    const record = await lockCarry(trx, member.siteId, carryCode)
    const [view] = record === undefined ? [] : await viewCarries(trx, member, [record], now)
    return view === undefined ? notThere() : ok(view)
  })
}

const asItWas = ok('as it was' as const)
const changed = ok('changed' as const)

/** A planned carry goes out. Pressed twice, it goes out once. */
export function startCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  { pieceIds: taken, againstAdvice }: { againstAdvice: boolean; pieceIds?: readonly string[] },
  now: Date,
): Promise<Outcome<Carry>> {
  return step(db, member, carryCode, now, async (trx, carry) => {
    if (carry.state === 'out') return asItWas
    if (carry.state !== 'planned') return fail('already-done', 'This carry is over.')
    const parts = await partsThatGo(trx, member, carry, taken)
    if (!parts.ok) return parts
    const pieceIds = parts.value.map((piece) => piece.pieceId)
    await lockPieces(trx, member.siteId, pieceIds)
    const room = { id: carry.toRoom.roomId, name: carry.toRoom.name }
    const { cover, stayMinutes } = carry
    const start = await mayStart(
      trx,
      member,
      { pieceIds, room, cover, stayMinutes, outAt: now, againstAdvice },
      now,
    )
    if (!start.ok) return start
    const covers = new Map(parts.value.map((piece) => [piece.pieceId, piece.cover]))
    if (carry.takesWhatever)
      await replaceCarryPieces(
        trx,
        member.siteId,
        carry.id,
        cover,
        pieceIds.map((pieceId) => ({ pieceId, fromRoomId: null })),
      )
    await setOut(trx, member, carry.id, { ...start.value, cover: covers })
    return changed
  })
}

/** What a plan takes: the pieces that it names, or those that are chosen now where it names none. */
async function partsThatGo(
  db: Kysely<Database>,
  member: SiteMember,
  carry: CarryRecord,
  taken: readonly string[] | undefined,
): Promise<Outcome<{ pieceId: number; cover: Cover }[]>> {
  if (!carry.takesWhatever) {
    if (taken === undefined) return ok(carry.pieces)
    return failField('not-possible', 'pieceIds', 'this plan names its pieces already: change the plan first')
  }
  if (taken === undefined) return failField('not-possible', 'pieceIds', 'say what you take')
  const found = await findPiecesAndRoom(db, member, taken, carry.toRoom.code)
  if (!found.ok) return found
  return ok(found.value.pieces.map((piece) => ({ pieceId: piece.id, cover: carry.cover })))
}

/** Those of the named pieces that are out still; all that are, when none is named. Foreign names refuse the whole. */
async function stillOut(
  db: Kysely<Database>,
  member: SiteMember,
  carry: CarryRecord,
  codes: readonly string[] | undefined,
): Promise<Outcome<{ part: CarryPieceRecord; number: string }[]>> {
  const ids = carry.pieces.map((piece) => piece.pieceId)
  await lockPieces(db, member.siteId, ids)
  const pieces = await findPiecesById(db, member.siteId, ids, viewerOf(member))
  const byCode = new Map(pieces.map((piece) => [piece.code, piece]))
  if (codes?.some((code) => !byCode.has(code)) === true) return notThere()
  const named = new Set(codes?.map((code) => byCode.get(code)?.id) ?? ids)
  const numbers = new Map(pieces.map((piece) => [piece.id, piece.number]))
  return ok(
    carry.pieces
      .filter((part) => named.has(part.pieceId) && part.outAt !== null && part.backAt === null)
      .map((part) => ({ part, number: numbers.get(part.pieceId) ?? '' })),
  )
}

/** Pieces come in: each to where it came from, unless a room is named. The last one ends the carry. */
export function bringBack(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  asked: { pieceIds?: readonly string[]; roomId?: string },
  now: Date,
): Promise<Outcome<Carry>> {
  return step(db, member, carryCode, now, async (trx, carry) => {
    if (carry.state === 'planned') return fail('not-possible', 'It has not gone out yet.')
    if (carry.state === 'called-off') return fail('already-done', 'It was called off and never went out.')
    const room = asked.roomId === undefined ? undefined : await findRoom(trx, member.siteId, asked.roomId)
    if (asked.roomId !== undefined && room === undefined) return notThere()
    if (room?.id === carry.toRoom.roomId)
      return failField('not-possible', 'roomId', 'that is where it is: choose another room')
    const out = await stillOut(trx, member, carry, asked.pieceIds)
    if (!out.ok) return out
    if (out.value.length === 0) return asItWas
    const nowhere = out.value.filter(({ part }) => room === undefined && part.fromRoom === null)
    if (nowhere.length > 0)
      return failField(
        'not-possible',
        'roomId',
        `say where ${namesOf(nowhere)} goes: where it came from is not known`,
      )
    for (const { part } of out.value) {
      const roomId = room?.id ?? part.fromRoom?.roomId
      if (roomId === undefined) continue
      await comeIn(trx, member, carry.id, part.pieceId, roomId, now)
    }
    const left = carry.pieces.filter((piece) => piece.outAt !== null && piece.backAt === null).length
    await updateCarry(
      trx,
      member.siteId,
      carry.id,
      left === out.value.length ? { state: 'back', endedAt: now } : {},
    )
    return changed
  })
}

async function comeIn(
  db: Kysely<Database>,
  member: SiteMember,
  carryId: number,
  pieceId: number,
  roomId: number,
  now: Date,
): Promise<void> {
  const to = { roomId, cover: 'closed' as const, at: now, carryId: null, userId: member.userId }
  const backAt = await movePiece(db, member.siteId, pieceId, to)
  await updateCarryPiece(db, member.siteId, carryId, pieceId, { backAt, backRoomId: roomId })
}

/** "Bagged": how pieces sit out there changes, and counts from now on. */
export function changeCover(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  asked: { pieceIds?: readonly string[]; cover: Cover },
  now: Date,
): Promise<Outcome<Carry>> {
  return step(db, member, carryCode, now, async (trx, carry) => {
    if (carry.state !== 'out')
      return fail('not-possible', 'It is not out. Change the cover of a plan with the plan itself.')
    const out = await stillOut(trx, member, carry, asked.pieceIds)
    if (!out.ok) return out
    const other = out.value.filter(({ part }) => part.cover !== asked.cover)
    if (other.length === 0) return asItWas
    for (const { part } of other) {
      await movePiece(trx, member.siteId, part.pieceId, {
        roomId: carry.toRoom.roomId,
        cover: asked.cover,
        at: now,
        carryId: carry.id,
        userId: member.userId,
      })
      await updateCarryPiece(trx, member.siteId, carry.id, part.pieceId, { cover: asked.cover })
    }
    const isAll = asked.pieceIds === undefined
    await updateCarry(trx, member.siteId, carry.id, isAll ? { cover: asked.cover } : {})
    return changed
  })
}

/** Pieces that came back with one press count as one: a press writes them within moments. */
const onePressMs = 1000

/** Takes back the last bring-back, within ten minutes, as long as nobody has moved the pieces since. */
export function undoBringBack(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
): Promise<Outcome<Carry>> {
  return step(db, member, carryCode, now, async (trx, carry) => {
    const lastAt = Math.max(0, ...carry.pieces.map((piece) => piece.backAt?.getTime() ?? 0))
    if (lastAt <= now.getTime() - undoBringBackMs)
      return carry.state === 'out'
        ? asItWas
        : fail('not-possible', 'It came back more than ten minutes ago. Start a new carry instead.')
    const back = carry.pieces.flatMap(({ pieceId, backAt }) =>
      backAt !== null && backAt.getTime() > lastAt - onePressMs ? { pieceId, backAt } : [],
    )
    await lockPieces(
      trx,
      member.siteId,
      back.map((piece) => piece.pieceId),
    )
    for (const { pieceId, backAt } of back) {
      const place = await findCurrentPlace(trx, member.siteId, pieceId)
      if (place?.fromAt.getTime() !== backAt.getTime())
        return fail('not-possible', 'It has been moved since. Start a new carry instead.')
    }
    for (const { pieceId, backAt } of back) {
      await undoMove(trx, member.siteId, pieceId, backAt)
      await updateCarryPiece(trx, member.siteId, carry.id, pieceId, { backAt: null, backRoomId: null })
    }
    await updateCarry(trx, member.siteId, carry.id, { state: 'out', endedAt: null })
    return changed
  })
}
