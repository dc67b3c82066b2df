import 'server-only'
import type { Kysely } from 'kysely'
import type { SiteMember } from '@/db/queries/members'
import { findMonthMeans, monthKey } from '@/db/queries/room-figures'
import {
  findPieceEvent,
  insertPieceEvent,
  listFitEntries,
  listPieceEvents,
  type PieceEventRecord,
  updateEventUndone,
  updateFit,
} from '@/db/queries/piece-events'
import { listPieceFacts, listStays } from '@/db/queries/piece-facts'
import { assumedKeepRoom } from '@/db/queries/carry-inputs'
import { followPieces } from '@/db/queries/follow-pieces'
import { notifySite } from '@/db/queries/live'
import type { PieceRecord } from '@/db/queries/pieces'
import { listRoomRecords } from '@/db/queries/rooms'
import { inTransaction } from '@/db/queries/transaction'
import { findWoodAt } from '@/db/queries/wood-at'
import type { Database } from '@/db/schema'
import { dayOfInstant, monthOf } from '@/lib/climate/days'
import { mcDoubtPct } from '@/lib/follow/doubt'
import { type EventData, isFitKind, type NewEvent, type PieceEventView } from '@/lib/pieces/event'
import { afterFit, type FitFacts, fitOfEntries, isLatestFit } from '@/lib/pieces/fit-record'
import { ok } from '@/lib/result'
import { may } from '@/lib/sites/permissions'
import { findOpenPiece, lockOpenPiece } from './open-piece'
import { fail, failField, notThere, type Outcome } from './problem'

const viewOf = (event: PieceEventRecord): PieceEventView => ({
  id: event.code,
  kind: event.kind,
  at: event.at.toISOString(),
  room: event.room === null ? null : { id: event.room.code, name: event.room.name, mark: event.room.mark },
  data: event.data,
  note: event.note,
  by: event.by,
  isUndone: event.isUndone,
})

/** What happened to a piece, newest first. */
export async function getPieceEvents(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
): Promise<Outcome<{ items: PieceEventView[] }>> {
  const piece = await findOpenPiece(db, member, pieceCode)
  if (!piece.ok) return piece
  const events = await listPieceEvents(db, member.siteId, piece.value.id)
  return ok({ items: events.map(viewOf) })
}

/** Entries from before this are slips of the pen. */
const oldestMs = 100 * 365 * 86_400_000

/** Something happened to a piece. For a final fit its wood at that moment is worked out here, and the joint counts from it. */
export async function createPieceEvent(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  input: NewEvent,
  now: Date,
): Promise<Outcome<PieceEventView>> {
  if (input.kind !== 'note' && !may(member.role, 'pieces:change'))
    return fail('not-yours-to-do', `Your role here is ${member.role}: you can add notes.`)
  const at = input.at === undefined ? now : new Date(input.at)
  if (at > now) return failField('not-possible', 'at', 'a time to come: enter it when it has happened')
  if (now.getTime() - at.getTime() > oldestMs) return failField('not-possible', 'at', 'too long ago')
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, pieceCode)
    if (!found.ok) return found
    const piece = found.value
    const stays = (await listStays(trx, member.siteId, [piece.id])).get(piece.id) ?? []
    const stay = stays.find(({ fromAt, toAt }) => fromAt <= at && (toAt === null || toAt > at))
    const data = await dataOf(trx, member, piece, input, at, now)
    const isFit = isFitKind(input.kind)
    const before = factsOf(piece)
    const entered = await insertPieceEvent(
      trx,
      member.siteId,
      {
        pieceId: piece.id,
        kind: input.kind,
        at,
        roomId: stay?.roomId ?? null,
        data,
        ...(isFit ? { before } : {}),
        note: input.note,
        userId: member.userId,
      },
      now,
    )
    if (isFit) {
      const entries = await listFitEntries(trx, member, piece.id)
      const entry = entries.find(({ id }) => id === entered.id)
      // One that was made before another that stands is kept in the record and changes nothing.
      if (entry !== undefined && isLatestFit(entry, entries))
        await updateFit(trx, member.siteId, piece.id, afterFit(before, entry))
    }
    return toldAnew(trx, member, piece, entered.code, now)
  })
}

/** Marks an entry as entered by mistake, or as standing again; a final fit takes what followed from it along. */
export async function setEventUndone(
  db: Kysely<Database>,
  member: SiteMember,
  asked: { piece: string; event: string },
  isUndone: boolean,
  now: Date,
): Promise<Outcome<PieceEventView>> {
  return inTransaction(db, async (trx) => {
    const found = await lockOpenPiece(trx, member, asked.piece)
    if (!found.ok) return found
    const piece = found.value
    const event = await findPieceEvent(trx, member.siteId, piece.id, asked.event)
    if (event === undefined) return notThere()
    const isOwnNote = event.kind === 'note' && event.userId === member.userId
    if (!isOwnNote && !may(member.role, 'pieces:change'))
      return fail('not-yours-to-do', `Your role here is ${member.role}: you can undo your own notes.`)
    if (event.isUndone !== isUndone) {
      await updateEventUndone(trx, member.siteId, event.id, isUndone ? now : null)
      if (isFitKind(event.kind)) {
        const fit = fitOfEntries(await listFitEntries(trx, member, piece.id))
        if (fit !== undefined) await updateFit(trx, member.siteId, piece.id, fit)
      }
    }
    return toldAnew(trx, member, piece, event.code, now)
  })
}

async function toldAnew(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  eventCode: string,
  now: Date,
): Promise<Outcome<PieceEventView>> {
  await followPieces(db, member, [piece.id], now)
  await notifySite(db, member.siteId, 'piece', piece.code)
  const event = await findPieceEvent(db, member.siteId, piece.id, eventCode)
  return event === undefined ? notThere() : ok(viewOf(event))
}

const factsOf = (piece: PieceRecord): FitFacts => ({
  stage: piece.stage,
  fittedAt: piece.fittedAt?.toISOString() ?? null,
  fittedOn: piece.fittedOn,
  fittedRoomId: piece.fittedRoomId,
  fitMcPct: piece.fitMcPct,
  fitLidMcPct: piece.fitLidMcPct,
  fitGrade: piece.fitGrade,
  clearanceMm: piece.clearanceMm,
  allowanceMm: piece.allowanceMm,
  jointDiameterMm: piece.jointDiameterMm,
})

async function dataOf(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  input: NewEvent,
  at: Date,
  now: Date,
): Promise<EventData> {
  const told: EventData = {
    ...(input.mcPct === undefined ? {} : { mcPct: input.mcPct }),
    ...(input.ovenDryG === undefined ? {} : { ovenDryG: input.ovenDryG }),
    ...(input.fitGrade === undefined ? {} : { fitGrade: input.fitGrade }),
    ...(input.clearanceMm === undefined ? {} : { clearanceMm: input.clearanceMm }),
    ...(input.jointDiameterMm === undefined ? {} : { jointDiameterMm: input.jointDiameterMm }),
  }
  return isFitKind(input.kind) ? { ...told, ...(await woodAtFit(db, member, piece, at, now)) } : told
}

/** Of wood that nobody followed: how far it may be from its keep room's month, ± % MC. Status: guess. */
const monthMeanDoubtPct = 1.5

/** The wood when the joint was cut: as followed; before its record, its keep room's mean of that month. */
async function woodAtFit(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  at: Date,
  now: Date,
): Promise<EventData> {
  const wood = await findWoodAt(db, member, piece.id, at, now)
  if (wood !== undefined)
    return {
      ringMcPct: wood.ringPct,
      lidMcPct: wood.lidPct,
      doubtPct: mcDoubtPct(wood),
      basis: 'followed',
    }
  const [row] = await listPieceFacts(db, member.siteId, [piece.id])
  const keepRoomId = row?.keepRoomId ?? assumedKeepRoom(await listRoomRecords(db, member.siteId))?.id
  if (keepRoomId === undefined) return {}
  const month = { roomId: keepRoomId, ...monthOf(dayOfInstant(at, member.timeZone)) }
  const means = await findMonthMeans(db, member.siteId, [month])
  const mean = means.get(monthKey(month.roomId, month.firstOn))
  return mean === undefined
    ? {}
    : { ringMcPct: mean, lidMcPct: mean, doubtPct: monthMeanDoubtPct, basis: 'month-mean' }
}
