import 'server-only'
import type { Kysely } from 'kysely'
import { changedFields, insertChange } from '@/db/queries/changes'
import { takeIds } from '@/db/queries/counters'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { listPiecesInRoom } from '@/db/queries/pieces'
import { findLatestDays, findRoomSpan, findRoomYears } from '@/db/queries/room-figures'
import { findRoomUses } from '@/db/queries/room-uses'
import {
  countPiecesByRoom,
  findRoom,
  insertRoom,
  isRoomNameTaken,
  listHangingSensors,
  listRoomRecords,
  type RoomRecord,
  updateRoom,
} from '@/db/queries/rooms'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter, monthsBefore, startOfDayAt } from '@/lib/climate/days'
import { formatCount } from '@/lib/format/figures'
import { pieceTitle } from '@/lib/pieces/title'
import { ok } from '@/lib/result'
import { dailyAir, type LastReading, roomAir, settledTo } from '@/lib/rooms/air'
import { isKeepingRoom, type NewRoom, type Room, type RoomChange, type RoomDetail } from '@/lib/rooms/room'
import { roomCautions, roomHeadline, roomWords } from '@/lib/rooms/words'
import { fail, failField, notThere, type Outcome } from './problem'

/** Below this many days a room's own year says nothing yet. PRODUCT's season views use the same. */
const yearDaysMin = 20

export const isOnlooker = (member: SiteMember): boolean => member.role === 'onlooker'

/** A room as seen by a member, with what the server needs to go on working with it. */
export interface SeenRoom {
  record: RoomRecord
  view: Room
  readings: LastReading[]
}

/** Every room that the member may see, with its air. Onlookers get the shared ones, and the last whole day's mean. */
export async function seenRooms(db: Kysely<Database>, member: SiteMember, now: Date): Promise<SeenRoom[]> {
  const { siteId, timeZone } = member
  const todayOn = dayOfInstant(now, timeZone)
  const [records, sensors, pieces, years, days] = await Promise.all([
    listRoomRecords(db, siteId, { onlyShared: isOnlooker(member) }),
    listHangingSensors(db, siteId),
    countPiecesByRoom(db, siteId),
    findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn),
    isOnlooker(member) ? findLatestDays(db, siteId, todayOn) : undefined,
  ])
  return records.map((record) => {
    const own = sensors.filter((sensor) => sensor.roomId === record.id)
    const readings = own.flatMap((sensor) => sensor.last ?? [])
    const year = years.get(record.id)
    const day = days?.get(record.id)
    const endedAt = (dayOn: string) => startOfDayAt(daysAfter(dayOn, 1), timeZone)
    const { code, id: _id, archivedAt: _archivedAt, ...shown } = record
    const view: Room = {
      id: code,
      ...shown,
      note: isOnlooker(member) ? '' : record.note,
      air:
        days === undefined
          ? roomAir(readings, record.kind, now)
          : dailyAir(day && { ...day, endedAt: endedAt(day.dayOn) }, now),
      year:
        year === undefined || year.days < yearDaysMin
          ? null
          : {
              emcPctLow: year.emcPctLow,
              emcPctMiddle: year.emcPctMiddle,
              emcPctHigh: year.emcPctHigh,
              days: year.days,
            },
      sensors: own.length,
      // What stands in a room is not for onlookers, who see shared pieces only.
      pieces: isOnlooker(member) ? 0 : (pieces.get(record.id) ?? 0),
    }
    return { record, view, readings: isOnlooker(member) ? [] : readings }
  })
}

export async function listRooms(db: Kysely<Database>, member: SiteMember, now: Date): Promise<Room[]> {
  return (await seenRooms(db, member, now)).map((room) => room.view)
}

export async function getRoom(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  now: Date,
): Promise<Outcome<RoomDetail>> {
  const rooms = await seenRooms(db, member, now)
  const room = rooms.find((one) => one.record.code === roomCode)
  return room === undefined ? notThere() : ok(await detailOf(db, member, room, rooms, now))
}

async function detailOf(
  db: Kysely<Database>,
  member: SiteMember,
  room: SeenRoom,
  rooms: readonly SeenRoom[],
  now: Date,
): Promise<RoomDetail> {
  const { siteId, timeZone } = member
  const { record, view } = room
  const onlooker = isOnlooker(member)
  const todayOn = dayOfInstant(now, timeZone)
  const lastOn = onlooker ? daysAfter(todayOn, -1) : todayOn
  const [today, month, sensors, here] = await Promise.all([
    onlooker ? undefined : findRoomSpan(db, siteId, record.id, todayOn, todayOn),
    findRoomSpan(db, siteId, record.id, daysAfter(lastOn, -29), lastOn),
    onlooker ? [] : listHangingSensors(db, siteId, record.id),
    onlooker ? [] : listPiecesInRoom(db, siteId, record.id, member),
  ])
  const others = rooms.flatMap(({ view: { id, name, mark, kind, air } }) =>
    id !== view.id && air.kind === 'fresh' ? [{ id, name, mark, kind, emcPct: air.emcPct }] : [],
  )
  const keep = isKeepingRoom(record.kind) ? null : (others.find((other) => isKeepingRoom(other.kind)) ?? null)
  const forWords = {
    name: record.name,
    kind: record.kind,
    air: view.air,
    year: view.year,
    today:
      today === undefined ? null : { emcPctMin: today.emcPctMin, emcPctMax: today.emcPctMax, n: today.n },
    month:
      month === undefined
        ? null
        : {
            emcPctMin: month.emcPctMin,
            emcPctMax: month.emcPctMax,
            emcPctMean: month.emcPctMean,
            days: month.days,
          },
    keep,
  }
  return {
    ...view,
    headline: roomHeadline(forWords, timeZone, now),
    words: roomWords(forWords),
    today: forWords.today,
    month: forWords.month,
    others: others.map(({ kind: _kind, ...other }) => other),
    here: here.map((piece) => ({
      id: piece.code,
      number: piece.number,
      title: pieceTitle(piece),
      stage: piece.stage,
      isOut: piece.isOut,
    })),
    hangs: sensors.map((sensor) => ({
      id: sensor.code,
      name: sensor.name,
      spot: sensor.spot,
      isTyped: sensor.kind === 'typed',
    })),
    cautions: roomCautions(view),
    completeTo: onlooker
      ? view.air.kind === 'never'
        ? null
        : view.air.at
      : settledTo(room.readings, record.kind, now).completeTo,
  }
}

export async function createRoom(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewRoom,
  now: Date,
): Promise<Outcome<RoomDetail>> {
  return inTransaction(db, async (trx) => {
    // Holding the row of numbers makes two who choose the same name wait for one another.
    await takeIds(trx, member.siteId, 'room', 0)
    if (await isRoomNameTaken(trx, member.siteId, input.name)) return nameTaken()
    const room = await insertRoom(trx, member.siteId, input, now)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'room',
      subjectCode: room.code,
      action: 'create',
      after: { ...input },
    })
    await notifySite(trx, member.siteId, 'room', room.code)
    return getRoom(trx, member, room.code, now)
  })
}

export async function changeRoom(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  version: number,
  change: RoomChange,
  now: Date,
): Promise<Outcome<RoomDetail>> {
  return inTransaction(db, async (trx) => {
    await takeIds(trx, member.siteId, 'room', 0)
    const room = await findRoom(trx, member.siteId, roomCode, { forUpdate: true })
    if (room === undefined) return notThere()
    if (room.version !== version) return changedMeanwhile(trx, member, room, now)
    if (change.name !== undefined && (await isRoomNameTaken(trx, member.siteId, change.name, room.id)))
      return nameTaken()
    const changed = changedFields({ ...room }, { ...change })
    await updateRoom(trx, member.siteId, room.id, version, change)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'room',
      subjectCode: room.code,
      action: 'change',
      ...changed,
    })
    await notifySite(trx, member.siteId, 'room', room.code)
    return getRoom(trx, member, room.code, now)
  })
}

/** Puts a room away. Its readings and the history of the pieces that were in it stay. */
export async function archiveRoom(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  version: number,
  now: Date,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const room = await findRoom(trx, member.siteId, roomCode, { forUpdate: true })
    if (room === undefined) return notThere()
    if (room.version !== version) return changedMeanwhile(trx, member, room, now)
    const reason = await whyStillNeeded(trx, member.siteId, room)
    if (reason !== undefined) return fail('conflict', reason)
    await updateRoom(trx, member.siteId, room.id, version, { archivedAt: now })
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'room',
      subjectCode: room.code,
      action: 'archive',
    })
    await notifySite(trx, member.siteId, 'room', room.code)
    return ok(undefined)
  })
}

async function whyStillNeeded(
  db: Kysely<Database>,
  siteId: number,
  room: RoomRecord,
): Promise<string | undefined> {
  const uses = await findRoomUses(db, siteId, room.id)
  const things = [
    uses.pieces > 0 && formatCount(uses.pieces, 'piece is in it', 'pieces are in it'),
    uses.sensors > 0 && formatCount(uses.sensors, 'sensor hangs in it', 'sensors hang in it'),
    uses.carries > 0 && formatCount(uses.carries, 'carry goes there', 'carries go there'),
    uses.kept > 0 && formatCount(uses.kept, 'piece is kept to match it', 'pieces are kept to match it'),
  ].filter((thing) => thing !== false)
  if (things.length === 0) return undefined
  return `${room.name} is still needed: ${things.join(', ')}. Change that first.`
}

async function changedMeanwhile(db: Kysely<Database>, member: SiteMember, room: RoomRecord, now: Date) {
  const current = await getRoom(db, member, room.code, now)
  return fail('changed-meanwhile', 'Somebody changed this room meanwhile. Look at it again.', {
    current: current.ok ? current.value : undefined,
    version: room.version,
  })
}

const nameTaken = () => failField('name-taken', 'name', 'another room has this name')
