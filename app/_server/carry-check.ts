import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { findPieces, type PieceRecord } from '@/db/queries/pieces'
import { findRoom, listHangingSensors, type RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import type { CarryCheckAnswer, CarryCheckRequest } from '@/lib/carry/carry-check'
import { carryCautions } from '@/lib/carry/cautions'
import { NO_FORECAST_NOTE } from '@/lib/carry/forecast'
import { judgePiece } from '@/lib/carry/judge'
import { byPress, checkHeadline, worstOf } from '@/lib/carry/summary'
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

/** The answer before a carry: what the air there would do to each piece in that time and cover. */
export async function checkCarry(
  db: Kysely<Database>,
  member: SiteMember,
  request: CarryCheckRequest,
  now: Date,
): Promise<Outcome<CarryCheckAnswer>> {
  const found = await findPiecesAndRoom(db, member, request.pieceIds, request.toRoomId)
  if (!found.ok) return found
  const { pieces, room } = found.value
  const startsAt = request.startsAt === undefined ? now : new Date(request.startsAt)
  if (startsAt.getTime() < now.getTime() - 24 * 3_600_000)
    return fail('not-possible', 'The time to go lies more than a day back.')
  if (startsAt.getTime() > now.getTime() + 366 * 24 * 3_600_000)
    return fail('not-possible', 'The time to go lies more than a year ahead.')
  const material = await loadCarryMaterial(
    db,
    member,
    pieces.map((piece) => piece.id),
    [room.id],
    now,
  )
  const asked = { toRoomId: room.id, startsAt, stayMinutes: request.stayMinutes, cover: request.cover }
  const judged = pieces.flatMap((piece) => {
    const result = judgePiece(material, { ...asked, pieceId: piece.id })
    if (result === undefined) return []
    return {
      id: piece.code,
      number: piece.number,
      title: pieceTitle(piece),
      check: piece.isHidden ? hiddenCheck(result.check) : result.check,
      bagged: result.closed,
    }
  })
  const air = material.rooms.get(room.id)?.air ?? { kind: 'never' }
  const sensors = await listHangingSensors(db, member.siteId, room.id)
  return ok({
    at: now.toISOString(),
    startsAt: startsAt.toISOString(),
    stayMinutes: request.stayMinutes,
    cover: request.cover,
    room: {
      id: room.code,
      name: room.name,
      mark: room.mark,
      emcPct: air.kind === 'fresh' ? air.emcPct : null,
    },
    headline: checkHeadline(judged, room.name, request.stayMinutes, { timeZone: member.timeZone, now }),
    pieces: byPress(judged),
    worst: worstOf(judged.map((piece) => piece.check)),
    forecastNote: air.kind === 'fresh' ? NO_FORECAST_NOTE : '',
    cautions: [...carryCautions],
    ...settledTo(
      sensors.flatMap((sensor) => sensor.last ?? []),
      room.kind,
      now,
    ),
  })
}
