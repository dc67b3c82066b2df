import 'server-only'
import type { Kysely } from 'kysely'
import {
  findRepeat,
  insertRepeat,
  listRepeatRecords,
  lockRepeat,
  type RepeatRecord,
  replaceRepeatPieces,
  updateRepeat,
} from '@/db/queries/carry-repeats'
import { insertChange } from '@/db/queries/changes'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { findPiecesById, type PieceRecord } from '@/db/queries/pieces'
import { adjustComing, callOffComing, makeCarriesOf, planAgain } from '@/db/queries/repeat-carries'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { namesOf } from '@/lib/carry/summary'
import {
  type NewRepeat,
  nextOccurrence,
  type Repeat,
  type RepeatChange,
  repeatWords,
} from '@/lib/carry/repeat'
import { undoEndRepeatMs } from '@/lib/notices/policy'
import { ok } from '@/lib/result'
import { findPiecesAndRoom } from './carry-check'
import { viewerOf } from './piece-view'
import { fail, failField, notThere, type Outcome } from './problem'

/** Plans that come again, those that ended within the day among them. */
export async function listRepeats(db: Kysely<Database>, member: SiteMember, now: Date): Promise<Repeat[]> {
  const records = await listRepeatRecords(db, member.siteId, new Date(now.getTime() - undoEndRepeatMs))
  return viewRepeats(db, member, records, now)
}

async function viewRepeats(
  db: Kysely<Database>,
  member: SiteMember,
  records: readonly RepeatRecord[],
  now: Date,
): Promise<Repeat[]> {
  const ids = [...new Set(records.flatMap((repeat) => repeat.pieces.map(({ pieceId }) => pieceId)))]
  const pieces = await findPiecesById(db, member.siteId, ids, viewerOf(member))
  const byId = new Map(pieces.map((piece) => [piece.id, piece]))
  return records.map((record) => viewRepeat(record, byId, member, now))
}

function viewRepeat(
  record: RepeatRecord,
  pieces: ReadonlyMap<number, PieceRecord>,
  member: SiteMember,
  now: Date,
): Repeat {
  const isRunning = record.pausedAt === null && record.endedAt === null
  const next = isRunning ? nextOccurrence(record, member.timeZone, now) : undefined
  return {
    id: record.code,
    toRoom: { id: record.toRoom.code, name: record.toRoom.name },
    cover: record.cover,
    weekdays: [...record.weekdays],
    atTime: record.atTime,
    stayMinutes: record.stayMinutes,
    takesWhatever: record.takesWhatever,
    pieces: record.pieces.flatMap(({ pieceId }) => {
      const piece = pieces.get(pieceId)
      return piece === undefined ? [] : { id: piece.code, number: piece.number }
    }),
    note: record.note,
    by: record.createdByName,
    words: repeatWords(record),
    nextAt: next?.at.toISOString() ?? null,
    pausedAt: record.pausedAt?.toISOString() ?? null,
    endedAt: record.endedAt?.toISOString() ?? null,
    version: record.version,
  }
}

async function getRepeat(
  db: Kysely<Database>,
  member: SiteMember,
  code: string,
  now: Date,
): Promise<Outcome<Repeat>> {
  const record = await findRepeat(db, member.siteId, code)
  const [view] = record === undefined ? [] : await viewRepeats(db, member, [record], now)
  return view === undefined ? notThere() : ok(view)
}

/** A plan that comes again; its carries of the coming days are made at once. */
export async function createRepeat(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewRepeat,
  now: Date,
): Promise<Outcome<Repeat>> {
  return inTransaction(db, async (trx) => {
    const found = await findPiecesAndRoom(trx, member, input.pieceIds, input.toRoomId)
    if (!found.ok) return found
    const { pieces, room } = found.value
    const there = pieces.filter((piece) => piece.room?.roomId === room.id)
    if (there.length > 0)
      return failField('not-possible', 'toRoomId', `${namesOf(there)} is in ${room.name} already`)
    const pieceIds = pieces.map((piece) => piece.id)
    const { pieceIds: codes, ...facts } = input
    const values = { ...facts, toRoomId: room.id, userId: member.userId, pieceIds }
    const code = await insertRepeat(trx, member.siteId, values, now)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'repeat',
      subjectCode: code,
      action: 'create',
      after: { ...facts, pieceIds: codes },
    })
    await makeCarriesOf(trx, member, code, now)
    await notifySite(trx, member.siteId, 'carry')
    return getRepeat(trx, member, code, now)
  })
}

type Work = (trx: Kysely<Database>, repeat: RepeatRecord) => Promise<Outcome<undefined>>

/** One change of a repeat: its row is locked, the version compared, and what is there afterwards is the answer. */
function changed(
  db: Kysely<Database>,
  member: SiteMember,
  code: string,
  version: number | undefined,
  now: Date,
  work: Work,
): Promise<Outcome<Repeat>> {
  return inTransaction(db, async (trx) => {
    const repeat = await lockRepeat(trx, member.siteId, code)
    if (repeat === undefined) return notThere()
    if (version !== undefined && repeat.version !== version) {
      const current = await getRepeat(trx, member, code, now)
      return fail('changed-meanwhile', 'Somebody changed this plan meanwhile. Look at it again.', {
        current: current.ok ? current.value : undefined,
        version: repeat.version,
      })
    }
    const done = await work(trx, repeat)
    if (!done.ok) return done
    await notifySite(trx, member.siteId, 'carry')
    return getRepeat(trx, member, code, now)
  })
}

const done = ok(undefined)

/** Other days, another hour, stay, cover or pieces; or a pause. What is to come of it follows. */
export function changeRepeat(
  db: Kysely<Database>,
  member: SiteMember,
  code: string,
  version: number,
  { isPaused, pieceIds, ...change }: RepeatChange,
  now: Date,
): Promise<Outcome<Repeat>> {
  return changed(db, member, code, version, now, async (trx, repeat) => {
    const { siteId } = member
    if (repeat.endedAt !== null) return fail('already-done', 'This plan has ended. Take that back first.')
    if (pieceIds !== undefined) {
      const found = await findPiecesAndRoom(trx, member, pieceIds, repeat.toRoom.code)
      if (!found.ok) return found
      const ids = found.value.pieces.map((piece) => piece.id)
      await replaceRepeatPieces(trx, siteId, repeat.id, ids)
    }
    const pausedAt = isPaused === undefined ? repeat.pausedAt : isPaused ? (repeat.pausedAt ?? now) : null
    await updateRepeat(trx, siteId, repeat.id, {
      ...change,
      pausedAt,
      takesWhatever: pieceIds === undefined ? undefined : false,
    })
    await insertChange(trx, siteId, {
      userId: member.userId,
      subjectKind: 'repeat',
      subjectCode: code,
      action: 'update',
      before: { weekdays: repeat.weekdays, atTime: repeat.atTime, isPaused: repeat.pausedAt !== null },
      after: { ...change, isPaused: pausedAt !== null },
    })
    await follow(trx, member, repeat, pausedAt, now)
    return done
  })
}

/** Has the carries to come follow a repeat that was just changed, paused or taken up again. */
async function follow(
  trx: Kysely<Database>,
  member: SiteMember,
  before: RepeatRecord,
  stoppedAt: Date | null,
  now: Date,
): Promise<void> {
  const { siteId } = member
  if (stoppedAt !== null) {
    if (before.pausedAt === null || before.endedAt !== null)
      await callOffComing(trx, siteId, before.id, stoppedAt)
    return
  }
  const wasStoppedAt = before.endedAt ?? before.pausedAt
  if (wasStoppedAt !== null) await planAgain(trx, siteId, before.id, wasStoppedAt, now)
  const repeat = await findRepeat(trx, siteId, before.code)
  if (repeat !== undefined) await adjustComing(trx, member, repeat, now)
  await makeCarriesOf(trx, member, before.code, now)
}

/** It comes no more; what is to come of it is called off. Ended twice, it has ended once. */
export function endRepeat(
  db: Kysely<Database>,
  member: SiteMember,
  code: string,
  version: number,
  now: Date,
): Promise<Outcome<Repeat>> {
  return changed(db, member, code, version, now, async (trx, repeat) => {
    if (repeat.endedAt !== null) return done
    await updateRepeat(trx, member.siteId, repeat.id, { endedAt: now })
    await callOffComing(trx, member.siteId, repeat.id, now)
    await noteEnd(trx, member, code, true)
    return done
  })
}

/** Takes the end back: what was to come of it is to come again. */
export function restoreRepeat(
  db: Kysely<Database>,
  member: SiteMember,
  code: string,
  now: Date,
): Promise<Outcome<Repeat>> {
  return changed(db, member, code, undefined, now, async (trx, repeat) => {
    if (repeat.endedAt === null) return done
    await updateRepeat(trx, member.siteId, repeat.id, { endedAt: null })
    await noteEnd(trx, member, code, false)
    if (repeat.pausedAt === null) await follow(trx, member, repeat, null, now)
    return done
  })
}

const noteEnd = (trx: Kysely<Database>, member: SiteMember, code: string, isEnded: boolean): Promise<void> =>
  insertChange(trx, member.siteId, {
    userId: member.userId,
    subjectKind: 'repeat',
    subjectCode: code,
    action: 'update',
    before: { isEnded: !isEnded },
    after: { isEnded },
  })
