import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { insertChange } from '@/db/queries/changes'
import { followPieces } from '@/db/queries/follow-pieces'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import type { PieceRecord } from '@/db/queries/pieces'
import { listHangingSensors, listRoomRecords } from '@/db/queries/rooms'
import { rememberScaleStep } from '@/db/queries/sites'
import { inTransaction } from '@/db/queries/transaction'
import {
  findWeighing,
  findWeighingAt,
  insertWeighing,
  listWeighings,
  updateWeighingUndone,
  type WeighingRecord,
} from '@/db/queries/weighings'
import type { Database } from '@/db/schema'
import type { NewWeighing, Weighing } from '@/lib/pieces/event'
import { ok } from '@/lib/result'
import { settledTo } from '@/lib/rooms/air'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import { decodeCursor, listQueryShape, pageOf } from './list'
import { findOpenPiece, lockOpenPiece } from './open-piece'
import { fail, failField, notThere, type Outcome } from './problem'
import { restOfPiece } from './rest'

export const weighingsQuerySchema = z.strictObject(listQueryShape(['-at']))
export type WeighingsQuery = z.output<typeof weighingsQuerySchema>

const cursorSchema = z.strictObject({ at: z.iso.datetime(), id: z.int() })

const viewOf = ({ code, at, grams, stepG, note, by, isUndone }: WeighingRecord): Weighing => ({
  id: code,
  at: at.toISOString(),
  grams,
  stepG,
  note,
  by,
  isUndone,
})

/** What a piece weighed, the newest first and undone ones marked, with where it stands by that. */
export async function getWeighings(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  query: WeighingsQuery,
  now: Date,
): Promise<Outcome<WeighingsPage>> {
  const found = await findOpenPiece(db, member, pieceCode)
  if (!found.ok) return found
  const piece = found.value
  const after = query.cursor === undefined ? undefined : decodeCursor(query.cursor, cursorSchema)
  if (query.cursor !== undefined && after === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const [records, material, settled] = await Promise.all([
    listWeighings(db, member.siteId, piece.id, {
      limit: query.limit,
      after: after && { at: new Date(after.at), id: after.id },
    }),
    loadCarryMaterial(db, member, [piece.id], [], now),
    settledOf(db, member, piece, now),
  ])
  const page = pageOf(records, query.limit, (record) => ({ at: record.at.toISOString(), id: record.id }))
  return ok({
    items: page.items.map(viewOf),
    nextCursor: page.nextCursor,
    rest: (await restOfPiece(db, member, piece, material, now)) ?? null,
    ...settled,
  })
}

/** Up to when the figures of its room are settled: the moisture that is reckoned stands on them. */
async function settledOf(db: Kysely<Database>, member: SiteMember, piece: PieceRecord, now: Date) {
  const roomId = piece.room?.roomId
  if (roomId === undefined) return { completeTo: null, age: null }
  const [sensors, rooms] = await Promise.all([
    listHangingSensors(db, member.siteId, roomId),
    listRoomRecords(db, member.siteId),
  ])
  const readings = sensors.flatMap((sensor) => sensor.last ?? [])
  return settledTo(readings, rooms.find((room) => room.id === roomId)?.kind ?? 'store', now)
}

/** Weights from before this are slips of the pen. */
const oldestMs = 100 * 365 * 86_400_000

/**
 * Keeps what a piece weighed. Sent twice, it is kept once: a weight at the very same moment is the same weighing. The
 * step of the scale that is told first becomes the site's.
 */
export async function createWeighing(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  input: NewWeighing,
  now: Date,
): Promise<Outcome<Weighing>> {
  const at = input.at === undefined ? now : new Date(input.at)
  if (at > now) return failField('not-possible', 'at', 'a time to come: weigh it first')
  if (now.getTime() - at.getTime() > oldestMs) return failField('not-possible', 'at', 'too long ago')
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    const before = await findWeighingAt(trx, member.siteId, piece.id, at)
    if (before !== undefined) {
      // The column holds single precision.
      if (Math.fround(before.grams) === Math.fround(input.grams)) return ok(viewOf(before))
      return failField('conflict', 'at', 'there is another weight at that very moment: undo it first')
    }
    const { grams, note } = input
    const stepG = input.stepG ?? member.site.scaleStepG
    const values = { pieceId: piece.id, at, grams, stepG, note, userId: member.userId }
    const code = await insertWeighing(trx, member.siteId, values, now)
    if (input.stepG !== undefined && (await rememberScaleStep(trx, member.siteId, input.stepG))) {
      await insertChange(trx, member.siteId, {
        userId: member.userId,
        subjectKind: 'site',
        subjectCode: member.siteCode,
        action: 'update',
        before: { scaleStepG: null },
        after: { scaleStepG: input.stepG },
      })
      await notifySite(trx, member.siteId, 'site')
    }
    return followAndTell(trx, member, piece, code, now)
  })
}

/** Takes a weighing out of the count. It stays in the list, marked, and can be brought back. */
export const undoWeighing = (
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  weighingCode: string,
  now: Date,
): Promise<Outcome<Weighing>> => setUndone(db, member, pieceCode, weighingCode, now, true)

/** Brings back a weighing that was undone, unless another has its moment by now. */
export const restoreWeighing = (
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  weighingCode: string,
  now: Date,
): Promise<Outcome<Weighing>> => setUndone(db, member, pieceCode, weighingCode, now, false)

async function setUndone(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  weighingCode: string,
  now: Date,
  isUndone: boolean,
): Promise<Outcome<Weighing>> {
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    const weighing = await findWeighing(trx, member.siteId, piece.id, weighingCode)
    if (weighing === undefined) return notThere()
    // Pressed twice, it is done once.
    if (weighing.isUndone === isUndone) return ok(viewOf(weighing))
    if (!isUndone && (await findWeighingAt(trx, member.siteId, piece.id, weighing.at)) !== undefined)
      return fail('conflict', 'There is another weight at that very moment by now. Undo that one first.')
    await updateWeighingUndone(trx, member.siteId, weighing.id, isUndone ? now : null)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'weighing',
      subjectCode: weighing.code,
      action: isUndone ? 'undo' : 'restore',
    })
    return followAndTell(trx, member, piece, weighing.code, now)
  })
}

/** A weight corrects the wood as followed, so what is kept of it is brought up to date at once. */
async function followAndTell(
  trx: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  weighingCode: string,
  now: Date,
): Promise<Outcome<Weighing>> {
  await followPieces(trx, member, [piece.id], now)
  await notifySite(trx, member.siteId, 'piece', piece.code)
  const weighing = await findWeighing(trx, member.siteId, piece.id, weighingCode)
  return weighing === undefined ? notThere() : ok(viewOf(weighing))
}
