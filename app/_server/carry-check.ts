import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { findPieces, type PieceRecord } from '@/db/queries/pieces'
import { findRoom, listHangingSensors, type RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { bestHoursWords } from '@/lib/carry/best-hours-words'
import type { BetterHoursAsked } from '@/lib/carry/better-hours'
import { type BetterWays, betterWays } from '@/lib/carry/better-ways'
import type { CarryCheckAnswer, CarryCheckRequest, CheckedPiece } from '@/lib/carry/carry-answer'
import { carryCautions } from '@/lib/carry/cautions'
import { NO_FORECAST_NOTE } from '@/lib/carry/forecast'
import { type JudgedPiece, judgePiece } from '@/lib/carry/judge'
import type { CarryMaterial } from '@/lib/carry/material'
import { sessionOf } from '@/lib/carry/session'
import { byPress, checkHeadline, worstOf } from '@/lib/carry/summary'
import { moistureOfToldAir, type ToldAir } from '@/lib/carry/told-air'
import { usualHours } from '@/lib/carry/usual-hours'
import { hourStrip } from '@/lib/forecast/hour-strip'
import { pieceTitle } from '@/lib/pieces/title'
import { ok } from '@/lib/result'
import { settledTo } from '@/lib/rooms/air'
import { hiddenCheck, viewerOf } from './piece-view'
import { fail, notThere, type Outcome } from './problem'

/** Pieces and room of a request. One that isn't there, or isn't yours, refuses the whole. */
export async function findPiecesAndRoom(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCodes: readonly string[],
  roomCode: string,
): Promise<Outcome<{ pieces: PieceRecord[]; room: RoomRecord }>> {
  const codes = [...new Set(pieceCodes)]
  const room = await findRoom(db, member.siteId, roomCode)
  const pieces = await findPieces(db, member.siteId, codes, viewerOf(member))
  if (room === undefined || pieces.length !== codes.length) return notThere()
  return ok({ pieces, room })
}

type Asked = { pieces: PieceRecord[]; to: { room: RoomRecord } | { toAir: ToldAir } }

/** As `findPiecesAndRoom`, for a request that may name the air of another place instead of a room. */
async function findAsked(
  db: Kysely<Database>,
  member: SiteMember,
  { pieceIds, toRoomId, toAir }: CarryCheckRequest,
): Promise<Outcome<Asked>> {
  if (toAir === undefined) {
    const found = await findPiecesAndRoom(db, member, pieceIds, toRoomId ?? '')
    return found.ok ? ok({ pieces: found.value.pieces, to: { room: found.value.room } }) : found
  }
  const codes = [...new Set(pieceIds)]
  const pieces = await findPieces(db, member.siteId, codes, viewerOf(member))
  return pieces.length === codes.length ? ok({ pieces, to: { toAir } }) : notThere()
}

/** The answer before a carry: what the air there would do to each piece in that time and cover. */
export async function checkCarry(
  db: Kysely<Database>,
  member: SiteMember,
  request: CarryCheckRequest,
  now: Date,
): Promise<Outcome<CarryCheckAnswer>> {
  const found = await findAsked(db, member, request)
  if (!found.ok) return found
  const { pieces, to } = found.value
  const startsAt = request.startsAt === undefined ? now : new Date(request.startsAt)
  if (startsAt.getTime() < now.getTime() - 24 * 3_600_000)
    return fail('not-possible', 'The time to go lies more than a day back.')
  if (startsAt.getTime() > now.getTime() + 366 * 24 * 3_600_000)
    return fail('not-possible', 'The time to go lies more than a year ahead.')
  const pieceIds = pieces.map((piece) => piece.id)
  const material = await loadCarryMaterial(db, member, pieceIds, 'room' in to ? [to.room.id] : [], now)
  const asked = { startsAt, stayMinutes: request.stayMinutes, cover: request.cover }
  const judged = pieces.flatMap((piece) => {
    const where = 'room' in to ? { toRoomId: to.room.id } : { toAir: to.toAir }
    const result = judgePiece(material, { ...asked, ...where, pieceId: piece.id })
    return result === undefined ? [] : shownPiece(piece, result)
  })
  const codeOf = new Map(pieces.map((piece) => [piece.id, piece.code]))
  const place = await placeOf(db, member, to, material, now)
  const better =
    'room' in to
      ? betterWays(material, { ...asked, pieceIds, toRoomId: to.room.id }, codeOf)
      : { hours: [], betterHour: null, keeps: null }
  return ok({
    at: now.toISOString(),
    startsAt: startsAt.toISOString(),
    stayMinutes: request.stayMinutes,
    cover: request.cover,
    headline: checkHeadline(judged, place.room.name, request.stayMinutes, { timeZone: member.timeZone, now }),
    pieces: byPress(judged),
    worst: worstOf(judged.map((piece) => piece.check)),
    session: sessionOf(judged, {
      startsAt,
      stayMinutes: request.stayMinutes,
      lockUpAt: member.site.lockUpAt,
      timeZone: member.timeZone,
      now,
    }),
    betterHour: better.betterHour,
    keepsByHour:
      better.keeps === null
        ? null
        : {
            number: judged.find((piece) => piece.id === better.keeps?.id)?.number ?? '',
            hours: better.keeps.hours,
          },
    ...('room' in to
      ? comingHours(member, material, { ...asked, pieceIds, toRoomId: to.room.id }, better)
      : { strip: null, bestHours: null }),
    cautions: [...carryCautions],
    ...place,
  })
}

/** The hours of the room as a strip, and the best of the week in words: all by the least forgiving piece. */
function comingHours(
  { timeZone }: SiteMember,
  material: CarryMaterial,
  asked: BetterHoursAsked,
  { hours }: BetterWays,
): Pick<CarryCheckAnswer, 'strip' | 'bestHours'> {
  const { pieceIds, toRoomId, stayMinutes, cover } = asked
  const keepRoomId = pieceIds.flatMap((id) => material.pieces.get(id)?.keepRoomId ?? [])[0] ?? null
  const { now } = material
  return {
    strip: hourStrip(material, {
      roomId: toRoomId,
      pieceIds,
      keepRoomId,
      timeZone,
      stay: { stayMinutes, cover },
    }),
    bestHours: bestHoursWords(hours, usualHours(material, { ...asked, timeZone }), { timeZone, now }),
  }
}

/** Of a piece that is private to another: its number and its time out. */
function shownPiece(piece: PieceRecord, result: JudgedPiece): CheckedPiece {
  const { check, hangsOn, backHome } = result
  return {
    ...result,
    id: piece.code,
    number: piece.number,
    title: pieceTitle(piece),
    check: piece.isHidden ? hiddenCheck(check) : check,
    hangsOn: piece.isHidden ? null : hangsOn,
    backHome: piece.isHidden ? null : backHome,
  }
}

type Place = Pick<CarryCheckAnswer, 'room' | 'forecastNote' | 'completeTo' | 'age'>

async function placeOf(
  db: Kysely<Database>,
  member: SiteMember,
  to: Asked['to'],
  material: CarryMaterial,
  now: Date,
): Promise<Place> {
  if ('toAir' in to) {
    const { emcPct } = moistureOfToldAir(to.toAir)
    return {
      room: { id: null, name: to.toAir.name, mark: 0, emcPct, isTold: true },
      forecastNote: 'The air there is taken as you typed it, the whole time, and as ± 5 % RH.',
      completeTo: null,
      age: null,
    }
  }
  const { room } = to
  const own = material.rooms.get(room.id)
  const isFresh = own?.air.kind === 'fresh'
  const sensors = await listHangingSensors(db, member.siteId, room.id)
  return {
    room: {
      id: room.code,
      name: room.name,
      mark: room.mark,
      emcPct: own?.air.kind === 'fresh' ? own.air.emcPct : null,
      isTold: false,
    },
    forecastNote: isFresh && (own.forecast ?? null) === null ? NO_FORECAST_NOTE : '',
    ...settledTo(
      sensors.flatMap((sensor) => sensor.last ?? []),
      room.kind,
      now,
    ),
  }
}
