import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { findCarry, listCarryRecords, lockCarry, type CarryRecord } from '@/db/queries/carries'
import { insertCarry, replaceCarryPieces, updateCarry } from '@/db/queries/carry-changes'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { lockPieces } from '@/db/queries/piece-writes'
import type { PieceRecord } from '@/db/queries/pieces'
import type { RoomRecord } from '@/db/queries/rooms'
import { inTransaction } from '@/db/queries/transaction'
import { followPieces } from '@/db/queries/follow-pieces'
import type { Database } from '@/db/schema'
import {
  type Carry,
  type carryChangeSchema,
  carryListQuerySchema,
  type CarryState,
  type NewCarry,
} from '@/lib/carry/carry'
import { namesOf } from '@/lib/carry/summary'
import { ok } from '@/lib/result'
import { findPiecesAndRoom } from './carry-check'
import { mayStart, setOut } from './carry-start'
import { viewCarries } from './carry-view'
import { decodeCursor, listQueryShape, type Page, pageOf } from './list'
import { fail, failField, notThere, type Outcome } from './problem'

export const carriesQuerySchema = z.strictObject({
  state: carryListQuerySchema.shape.state,
  ...listQueryShape(['-planned', 'planned']),
})
export type CarriesQuery = z.output<typeof carriesQuerySchema>

const statesOf: Record<NonNullable<CarriesQuery['state']> | 'any', readonly CarryState[]> = {
  planned: ['planned'],
  out: ['out'],
  open: ['planned', 'out'],
  ended: ['back', 'called-off'],
  any: ['planned', 'out', 'back', 'called-off'],
}

const cursorSchema = z.strictObject({ at: z.iso.datetime(), id: z.int() })

export async function listCarries(
  db: Kysely<Database>,
  member: SiteMember,
  query: CarriesQuery,
  now: Date,
): Promise<Outcome<Page<Carry>>> {
  const after = query.cursor === undefined ? undefined : decodeCursor(query.cursor, cursorSchema)
  if (query.cursor !== undefined && after === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const records = await listCarryRecords(db, member.siteId, {
    states: statesOf[query.state ?? 'any'],
    isDescending: query.sort === '-planned',
    limit: query.limit,
    after,
  })
  const page = pageOf(records, query.limit, (record) => ({
    at: record.plannedAt.toISOString(),
    id: record.id,
  }))
  return ok({ items: await viewCarries(db, member, page.items, now), nextCursor: page.nextCursor })
}

export async function getCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
): Promise<Outcome<Carry>> {
  const record = await findCarry(db, member.siteId, carryCode)
  if (record === undefined) return notThere()
  const [carry] = await viewCarries(db, member, [record], now)
  return carry === undefined ? notThere() : ok(carry)
}

const minuteMs = 60_000
/** A form that was filled in slowly may say a time that has just passed. */
const patienceMs = 10 * minuteMs
const aheadMsMax = 366 * 24 * 60 * minuteMs
/** What was forgotten can be logged for a week back. */
const backMsMax = 7 * 24 * 60 * minuteMs

/** Plans a carry, or logs one that goes now, or has gone already. */
export async function createCarry(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewCarry,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const found = await findPiecesAndRoom(trx, member, input.pieceIds, input.toRoomId)
    if (!found.ok) return found
    const { room } = found.value
    const starts = input.startsNow || input.plannedAt === undefined
    const plannedAt = input.plannedAt === undefined ? now : new Date(input.plannedAt)
    const refusal = refusedTime(plannedAt, starts, now) ?? refusedRoom(found.value.pieces, room)
    if (refusal !== undefined) return refusal
    const ids = found.value.pieces.map((piece) => piece.id)
    await lockPieces(trx, member.siteId, ids)
    const outAt = plannedAt < now ? plannedAt : now
    const start = starts
      ? await mayStart(trx, member, { ...input, pieceIds: ids, room, outAt }, now)
      : undefined
    if (start?.ok === false) return start
    const carry = await insertCarry(
      trx,
      member.siteId,
      {
        toRoomId: room.id,
        cover: input.cover,
        plannedAt: starts ? outAt : plannedAt,
        stayMinutes: input.stayMinutes,
        note: input.note,
        userId: member.userId,
        takesWhatever: input.takesWhatever,
        pieces: found.value.pieces.map((piece) => ({
          pieceId: piece.id,
          fromRoomId: piece.room?.roomId ?? null,
        })),
      },
      now,
    )
    if (start !== undefined) {
      await setOut(trx, member, carry.id, start.value)
      // What is logged as out since a while ago takes its wood with it.
      const pieceIds = found.value.pieces.map((piece) => piece.id)
      if (outAt < now) await followPieces(trx, member, pieceIds, now)
    }
    await notifySite(trx, member.siteId, 'carry', carry.code)
    return getCarry(trx, member, carry.code, now)
  })
}

function refusedTime(plannedAt: Date, starts: boolean, now: Date) {
  const aheadMs = plannedAt.getTime() - now.getTime()
  if (starts && aheadMs > patienceMs)
    return failField('not-possible', 'plannedAt', 'what goes now can not have a time to come')
  if (starts && aheadMs < -backMsMax)
    return failField('not-possible', 'plannedAt', 'a carry can be logged for seven days back at most')
  if (!starts && aheadMs < -patienceMs)
    return failField('not-possible', 'plannedAt', 'that time has passed: say when it is to go, or go now')
  if (aheadMs > aheadMsMax) return failField('not-possible', 'plannedAt', 'a year ahead at most')
  return undefined
}

function refusedRoom(pieces: readonly PieceRecord[], room: Pick<RoomRecord, 'id' | 'name'>) {
  const there = pieces.filter((piece) => piece.room?.roomId === room.id)
  if (there.length === 0) return undefined
  return failField('not-possible', 'toRoomId', `${namesOf(there)} is in ${room.name} already`)
}

type Change = z.output<typeof carryChangeSchema>

/** Changes a plan. Of a carry that is out only the stay and the note: the rest has happened. */
export async function changeCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  version: number,
  change: Change,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    if (carry === undefined) return notThere()
    if (carry.version !== version) return changedMeanwhile(trx, member, carry, now)
    const refusal = refusedChange(carry, change, now)
    if (refusal !== undefined) return refusal
    if (change.pieceIds !== undefined) {
      const found = await findPiecesAndRoom(trx, member, change.pieceIds, carry.toRoom.code)
      if (!found.ok) return found
      const there = refusedRoom(found.value.pieces, { id: carry.toRoom.roomId, name: carry.toRoom.name })
      if (there !== undefined) return there
      const pieces = found.value.pieces.map((piece) => ({
        pieceId: piece.id,
        fromRoomId: piece.room?.roomId ?? null,
      }))
      await replaceCarryPieces(trx, member.siteId, carry.id, change.cover ?? carry.cover, pieces)
      // Named now: it is no longer whatever is taken.
      if (carry.takesWhatever) await updateCarry(trx, member.siteId, carry.id, { takesWhatever: false })
    } else if (change.cover !== undefined) {
      const pieces = carry.pieces.map(({ pieceId, fromRoom }) => ({
        pieceId,
        fromRoomId: fromRoom?.roomId ?? null,
      }))
      await replaceCarryPieces(trx, member.siteId, carry.id, change.cover, pieces)
    }
    await updateCarry(trx, member.siteId, carry.id, {
      cover: change.cover,
      plannedAt: change.plannedAt === undefined ? undefined : new Date(change.plannedAt),
      stayMinutes: change.stayMinutes,
      note: change.note,
    })
    await notifySite(trx, member.siteId, 'carry', carry.code)
    return getCarry(trx, member, carry.code, now)
  })
}

function refusedChange(carry: CarryRecord, change: Change, now: Date) {
  if (carry.state === 'back' || carry.state === 'called-off')
    return fail('already-done', 'This carry is over. What was can not be planned anew.')
  if (carry.state === 'out') {
    const isMore =
      change.plannedAt !== undefined || change.cover !== undefined || change.pieceIds !== undefined
    return isMore
      ? fail(
          'not-possible',
          'It is out: only the stay and the note can be changed, and the cover by its own step.',
        )
      : undefined
  }
  return change.plannedAt === undefined ? undefined : refusedTime(new Date(change.plannedAt), false, now)
}

/** The plan is dropped; the pieces stay where they are. */
export async function callOffCarry(
  db: Kysely<Database>,
  member: SiteMember,
  carryCode: string,
  now: Date,
): Promise<Outcome<Carry>> {
  return inTransaction(db, async (trx) => {
    const carry = await lockCarry(trx, member.siteId, carryCode)
    if (carry === undefined) return notThere()
    if (carry.state === 'out') return fail('not-possible', 'It is out already: bring it back instead.')
    if (carry.state === 'back') return fail('already-done', 'It has been out and is back.')
    // Pressed twice, it is called off once.
    if (carry.state === 'planned') {
      await updateCarry(trx, member.siteId, carry.id, { state: 'called-off', endedAt: now })
      await notifySite(trx, member.siteId, 'carry', carry.code)
    }
    return getCarry(trx, member, carry.code, now)
  })
}

async function changedMeanwhile(db: Kysely<Database>, member: SiteMember, carry: CarryRecord, now: Date) {
  const current = await getCarry(db, member, carry.code, now)
  return fail('changed-meanwhile', 'Somebody changed this carry meanwhile. Look at it again.', {
    current: current.ok ? current.value : undefined,
    version: carry.version,
  })
}
