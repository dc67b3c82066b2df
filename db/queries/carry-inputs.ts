import type { Kysely } from 'kysely'
import type { CutMc } from '@/lib/carry/carry-check'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import { type CarryMaterial, hoursBackMs, type PieceMaterial, type RoomMaterial } from '@/lib/carry/material'
import { dayOfInstant, monthOf, monthsBefore } from '@/lib/climate/days'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import { roomAir } from '@/lib/rooms/air'
import type { Database } from '../schema'
import { findForecasts } from './forecasts'
import { findMoisture, findPaces, followedOf, listRoomHours } from './moisture'
import { type FactsRow, listOutings, listPieceFacts, listStays } from './piece-facts'
import { findMonthMeans, findRoomYears, monthKey } from './room-figures'
import { listHangingSensors, listRoomRecords, type RoomRecord } from './rooms'

/**
 * Loads what the checks of any number of pieces look at, in a handful of statements whatever their number: their wood as
 * kept with them, their places and the air of the last days, the keep room's mean, the month of the fit.
 * Page, API and the notices' worker all load by this and judge by `carryCheck`. Nothing is followed from its start here.
 * @param toRoomIds rooms that pieces may go to or are out in, besides those of their history
 */
export async function loadCarryMaterial(
  db: Kysely<Database>,
  site: { siteId: number; timeZone: string },
  pieceIds: readonly number[],
  toRoomIds: readonly number[],
  now: Date,
): Promise<CarryMaterial> {
  const { siteId, timeZone } = site
  const todayOn = dayOfInstant(now, timeZone)
  const outings = await listOutings(db, siteId, pieceIds)
  // Of a piece that is out, the air since it went is looked at, however long ago that was.
  const sinceMs = Math.min(
    now.getTime() - hoursBackMs,
    ...[...outings.values()].map((outAt) => outAt.getTime() - 3_600_000),
  )
  const [pieces, stays, stored, rooms, sensors, years, paces] = await Promise.all([
    listPieceFacts(db, siteId, pieceIds),
    listStays(db, siteId, pieceIds, new Date(sinceMs)),
    findMoisture(db, siteId, pieceIds),
    listRoomRecords(db, siteId),
    listHangingSensors(db, siteId),
    findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn),
    findPaces(db, siteId),
  ])
  const assumedKeep = assumedKeepRoom(rooms)
  const keepRoomOf = (piece: FactsRow) => piece.keepRoomId ?? assumedKeep?.id ?? null
  const stayRoomIds = [...stays.values()].flat().map((stay) => stay.roomId)
  const airRoomIds = new Set([...stayRoomIds, ...toRoomIds])
  const [hours, forecasts, cuts] = await Promise.all([
    listRoomHours(db, siteId, airRoomIds, new Date(sinceMs), now),
    findForecasts(db, siteId, airRoomIds, now),
    findMonthMeans(
      db,
      siteId,
      pieces.flatMap((piece) => cutMonth(piece, keepRoomOf(piece)) ?? []),
    ),
  ])
  const kinds = new Map(rooms.map((room) => [room.id, room.kind]))
  const roomMaterial = (roomId: number): RoomMaterial => ({
    air: roomAir(
      sensors.filter((sensor) => sensor.roomId === roomId).flatMap((sensor) => sensor.last ?? []),
      kinds.get(roomId) ?? 'store',
      now,
    ),
    hours: hours.get(roomId) ?? new Map(),
    emcPctMean: years.get(roomId)?.emcPctMean ?? null,
    forecast: forecasts.get(roomId) ?? null,
  })
  const pieceMaterial = (piece: FactsRow): PieceMaterial => {
    const moisture = stored.get(piece.id)
    return {
      code: piece.code,
      facts: piece.facts,
      stays: stays.get(piece.id) ?? [],
      followed:
        moisture === undefined ? null : (followedOf(woodOfPiece(piece.facts).filter, moisture) ?? null),
      keepRoomId: keepRoomOf(piece),
      isKeepRoomAssumed: piece.keepRoomId === null,
      cut: cutOf(piece, keepRoomOf(piece), cuts),
      pace: paces.get(piece.movementClass) ?? UNLEARNED_PACE,
    }
  }
  return {
    now,
    tub: readTub(rooms, roomMaterial),
    pieces: new Map(pieces.map((piece) => [piece.id, pieceMaterial(piece)])),
    rooms: new Map(
      [...new Set([...rooms.map((room) => room.id), ...stayRoomIds])].map((id) => [id, roomMaterial(id)]),
    ),
  }
}

/** The first tub with a sensor of its own that was heard lately. */
function readTub(
  rooms: readonly RoomRecord[],
  material: (roomId: number) => RoomMaterial,
): CarryMaterial['tub'] {
  for (const { id, name, kind } of rooms) {
    const air = kind === 'tub' ? material(id).air : undefined
    if (air?.kind === 'fresh') return { name, emcPct: air.emcPct, temperatureC: air.temperatureC }
  }
  return undefined
}

/** How well the moisture content at the cut is known, ± % MC: followed then; a room's month; a month alone. */
const followedCutDoubtPct = 0.5
/** Status: guess, how far a room strays from its month's mean. */
const monthCutDoubtPct = 0.7
/** Status: guess. */
const assumedCutDoubtPct = 1.5

/** The month and room of a fit that nobody followed; the keep room's where no room was told. */
function cutMonth(piece: FactsRow, keepRoomId: number | null) {
  const roomId = piece.fittedRoomId ?? keepRoomId
  return piece.fitMcPct === null && roomId !== null && piece.fittedOn !== null
    ? { roomId, ...monthOf(piece.fittedOn) }
    : undefined
}

function cutOf(
  piece: FactsRow,
  keepRoomId: number | null,
  monthMeans: ReadonlyMap<string, number>,
): CutMc | null {
  if (piece.fitMcPct !== null)
    return {
      ringMcPct: piece.fitMcPct,
      lidMcPct: piece.fitLidMcPct ?? piece.fitMcPct,
      doubtPct: piece.fitDoubtPct ?? followedCutDoubtPct,
    }
  const month = cutMonth(piece, keepRoomId)
  const mean = month && monthMeans.get(monthKey(month.roomId, month.firstOn))
  if (mean === undefined) return null
  const doubtPct = piece.fittedRoomId === null ? assumedCutDoubtPct : monthCutDoubtPct
  return { ringMcPct: mean, lidMcPct: mean, doubtPct }
}

/** The room that pieces are kept for when nobody said: the site's first cupboard, else its first room in the house. */
export function assumedKeepRoom<T extends Pick<RoomRecord, 'kind'>>(rooms: readonly T[]): T | undefined {
  return rooms.find((room) => room.kind === 'cupboard') ?? rooms.find((room) => room.kind === 'house')
}
