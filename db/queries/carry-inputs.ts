import { type Kysely, sql } from 'kysely'
import { type CarryMaterial, historyMs, type PieceMaterial, type RoomMaterial } from '@/lib/carry/material'
import type { PieceFacts } from '@/lib/carry/carry-check'
import { dayOfInstant, monthOf, monthsBefore } from '@/lib/climate/days'
import {
  fitGradeSchema,
  grainSchema,
  lidFormSchema,
  placeCoverSchema,
  spigotOnSchema,
  stageSchema,
  woodKindSchema,
} from '@/lib/pieces/piece'
import { roomAir } from '@/lib/rooms/air'
import type { Database } from '../schema'
import { findMonthMeans, findRoomYears, monthKey } from './room-figures'
import { listHangingSensors, listRoomRecords, type RoomRecord } from './rooms'

/**
 * Loads what the checks of any number of pieces look at, in a handful of statements whatever their number: the places of
 * 60 days, the hours of the rooms that they were in and may go to, the keep room's mean, the month of the fit.
 * Page, API and the notices' worker all load by this and judge by `carryCheck`.
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
  const [pieces, places, rooms, sensors, years] = await Promise.all([
    listFacts(db, siteId, pieceIds),
    listPlacesSince(db, siteId, pieceIds, new Date(now.getTime() - historyMs)),
    listRoomRecords(db, siteId),
    listHangingSensors(db, siteId),
    findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn),
  ])
  const placeRoomIds = [...places.values()].flat().map((place) => place.roomId)
  const [hours, cuts] = await Promise.all([
    listHoursOfRooms(db, siteId, new Set([...placeRoomIds, ...toRoomIds]), now),
    findMonthMeans(
      db,
      siteId,
      pieces.flatMap((piece) => cutMonth(piece) ?? []),
    ),
  ])
  const assumedKeep = assumedKeepRoom(rooms)
  const kinds = new Map(rooms.map((room) => [room.id, room.kind]))
  const roomMaterial = (roomId: number): RoomMaterial => ({
    air: roomAir(
      sensors.filter((sensor) => sensor.roomId === roomId).flatMap((sensor) => sensor.last ?? []),
      kinds.get(roomId) ?? 'store',
      now,
    ),
    hours: hours.get(roomId) ?? new Map(),
    emcPctMean: years.get(roomId)?.emcPctMean ?? null,
  })
  const pieceMaterial = (piece: FactsRow): PieceMaterial => {
    const month = cutMonth(piece)
    const monthMean = month && cuts.get(monthKey(month.roomId, month.firstOn))
    return {
      code: piece.code,
      facts: piece.facts,
      places: places.get(piece.id) ?? [],
      keepRoomId: piece.keepRoomId ?? assumedKeep?.id ?? null,
      isKeepRoomAssumed: piece.keepRoomId === null,
      cutMcPct: piece.fitMcPct ?? monthMean ?? null,
    }
  }
  return {
    now,
    pieces: new Map(pieces.map((piece) => [piece.id, pieceMaterial(piece)])),
    rooms: new Map(
      [...new Set([...rooms.map((room) => room.id), ...placeRoomIds])].map((id) => [id, roomMaterial(id)]),
    ),
  }
}

/** The room that pieces are kept for when nobody said: the site's first cupboard, else its first room in the house. */
export function assumedKeepRoom<T extends Pick<RoomRecord, 'kind'>>(rooms: readonly T[]): T | undefined {
  return rooms.find((room) => room.kind === 'cupboard') ?? rooms.find((room) => room.kind === 'house')
}

interface FactsRow {
  id: number
  code: string
  facts: PieceFacts
  keepRoomId: number | null
  fittedRoomId: number | null
  fittedOn: string | null
  fitMcPct: number | null
}

const cutMonth = (piece: FactsRow) =>
  piece.fitMcPct === null && piece.fittedRoomId !== null && piece.fittedOn !== null
    ? { roomId: piece.fittedRoomId, ...monthOf(piece.fittedOn) }
    : undefined

async function listFacts(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
): Promise<FactsRow[]> {
  if (pieceIds.length === 0) return []
  const rows = await db
    .selectFrom('piece')
    .where('site_id', '=', siteId)
    .where('id', 'in', [...pieceIds])
    .select([
      'id',
      'code',
      'number',
      'stage',
      'wood',
      'wood_kind',
      'grain',
      'spigot_on',
      'lid_form',
      'joint_diameter_mm',
      'wall_mm',
      'spigot_mm',
      'lid_mm',
      'body_wall_mm',
      'fit_grade',
      'clearance_mm',
      'allowance_mm',
      'keep_room_id',
      'fitted_room_id',
      'fitted_on',
      'fit_mc_pct',
    ])
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    facts: {
      number: row.number,
      stage: stageSchema.parse(row.stage),
      wood: row.wood,
      woodKind: woodKindSchema.parse(row.wood_kind),
      grain: grainSchema.parse(row.grain),
      spigotOn: spigotOnSchema.parse(row.spigot_on),
      lidForm: lidFormSchema.parse(row.lid_form),
      jointDiameterMm: row.joint_diameter_mm,
      wallMm: row.wall_mm,
      spigotMm: row.spigot_mm,
      lidMm: row.lid_mm,
      bodyWallMm: row.body_wall_mm,
      fitGrade: row.fit_grade === null ? null : fitGradeSchema.parse(row.fit_grade),
      clearanceMm: row.clearance_mm,
      allowanceMm: row.allowance_mm,
    },
    keepRoomId: row.keep_room_id,
    fittedRoomId: row.fitted_room_id,
    fittedOn: row.fitted_on,
    fitMcPct: row.fit_mc_pct,
  }))
}

async function listPlacesSince(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
  since: Date,
): Promise<Map<number, PieceMaterial['places'][number][]>> {
  const places = new Map<number, PieceMaterial['places'][number][]>()
  if (pieceIds.length === 0) return places
  const rows = await db
    .selectFrom('piece_place')
    .where('site_id', '=', siteId)
    .where('piece_id', 'in', [...pieceIds])
    .where((eb) => eb.or([eb('to_at', 'is', null), eb('to_at', '>', since)]))
    .select(['piece_id', 'room_id', 'from_at', 'to_at', 'cover'])
    .orderBy('piece_id')
    .orderBy('from_at')
    .execute()
  for (const row of rows) {
    const own = places.get(row.piece_id) ?? []
    own.push({
      roomId: row.room_id,
      fromAt: row.from_at,
      toAt: row.to_at,
      cover: placeCoverSchema.parse(row.cover),
    })
    places.set(row.piece_id, own)
  }
  return places
}

/** A room's hour is the mean over its sensors' own means. */
async function listHoursOfRooms(
  db: Kysely<Database>,
  siteId: number,
  roomIds: ReadonlySet<number>,
  now: Date,
): Promise<Map<number, Map<number, { emcPct: number; temperatureC: number }>>> {
  const hours = new Map<number, Map<number, { emcPct: number; temperatureC: number }>>()
  if (roomIds.size === 0) return hours
  const since = new Date(Math.floor((now.getTime() - historyMs) / 3_600_000) * 3_600_000)
  const { rows } = await sql<{ room_id: number; hour_at: Date; emc_pct: number; temperature_c: number }>`
    select room_id, hour_at,
      avg(emc_milli_sum::float8 / n / 1000) as emc_pct,
      avg(temperature_milli_sum::float8 / n / 1000) as temperature_c
    from room_hour
    where site_id = ${siteId} and room_id = any(${[...roomIds]}::int[])
      and hour_at >= ${since} and hour_at <= ${now}
    group by room_id, hour_at
    order by room_id, hour_at`.execute(db)
  for (const row of rows) {
    const own = hours.get(row.room_id) ?? new Map<number, { emcPct: number; temperatureC: number }>()
    own.set(row.hour_at.getTime(), { emcPct: row.emc_pct, temperatureC: row.temperature_c })
    hours.set(row.room_id, own)
  }
  return hours
}
