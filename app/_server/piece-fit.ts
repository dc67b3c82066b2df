import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { findMonthMeans, findRoomYears, monthKey } from '@/db/queries/room-figures'
import { findRoom, listRoomRecords, type RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { capital } from '@/lib/format/capital'
import type { PieceFacts } from '@/lib/carry/carry-check'
import { movementOfPiece, woodOfPiece } from '@/lib/carry/joint-defaults'
import { lidOfPiece, placeAfterStay } from '@/lib/carry/lid-of-piece'
import { type CarryMaterial, carryCheckInput, type PieceMaterial, woodAt } from '@/lib/carry/material'
import { dayOfInstant, monthOf, monthsBefore } from '@/lib/climate/days'
import { fitCheck, type FitCheckInput, type TargetYear } from '@/lib/fit/fit-check'
import { clearanceByMonth, placeGivenTime } from '@/lib/fit/lid-place'
import { jointMovement } from '@/lib/fit/piece-size'
import { mcDoubtPct } from '@/lib/follow/doubt'
import { coverSchema, type FitGrade, fitGradeSchema } from '@/lib/pieces/piece'
import type { CutQuestion, LidRoom, LidStay, PieceFit } from '@/lib/pieces/piece-fit'
import { ok } from '@/lib/result'
import { findOpenPiece } from './open-piece'
import { failField, notThere, type Outcome } from './problem'

/** A stay to see the lid after, and a joint that is still to be cut. */
export const pieceFitQuerySchema = z.strictObject({
  room: z.string().optional(),
  stayMinutes: z.coerce.number().int().min(1).max(43_200).optional(),
  cover: coverSchema.default('open'),
  diameterMm: z.coerce.number().min(5, '5 to 600 mm').max(600, '5 to 600 mm').optional(),
  fitGrade: fitGradeSchema.optional(),
})
type FitQuery = z.output<typeof pieceFitQuerySchema>

/** How a piece's lid fits, and whether its joint may be cut: everything that its page shows of it. */
export async function getPieceFit(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  query: FitQuery,
  now: Date,
): Promise<Outcome<PieceFit>> {
  const found = await findOpenPiece(db, member, pieceCode)
  if (!found.ok) return found
  const piece = found.value
  if ((query.room === undefined) !== (query.stayMinutes === undefined))
    return failField('malformed', query.room === undefined ? 'room' : 'stayMinutes', 'goes with a stay')
  const room = query.room === undefined ? undefined : await findRoom(db, member.siteId, query.room)
  if (query.room !== undefined && room === undefined) return notThere()
  const [material, rooms] = await Promise.all([
    loadCarryMaterial(db, member, [piece.id], room === undefined ? [] : [room.id], now),
    listRoomRecords(db, member.siteId),
  ])
  const own = material.pieces.get(piece.id)
  if (own === undefined) return notThere()
  const lid = lidOfPiece(own.facts, woodAt(material, own, now.getTime()), own.cut)
  const cutDoubtPct = lid.kind === 'joint' ? lid.cutDoubtPct : 0
  const keepRoom = rooms.find(({ id }) => id === own.keepRoomId)
  const months = keepRoom === undefined ? [] : await monthsOf(db, member, keepRoom.id, now)
  return ok({
    at: now.toISOString(),
    lid,
    rooms: rooms.map((one) => roomOf(one, material, cutDoubtPct)),
    stay:
      room === undefined || query.stayMinutes === undefined
        ? null
        : stayOf(material, own, piece.id, room, { ...query, stayMinutes: query.stayMinutes }, now),
    keepRoom: keepRoom === undefined ? null : nameOf(keepRoom),
    isKeepRoomAssumed: own.isKeepRoomAssumed,
    year:
      lid.kind === 'joint' ? clearanceByMonth(lid.joint, months, Math.hypot(cutDoubtPct, monthStrayPct)) : [],
    cut: await cutQuestion(db, member, { material, own, keepRoom, months: months.length }, query, now),
  })
}

/** How far a room strays from its month's mean, ± % MC. Status: guess. */
const monthStrayPct = 0.7

const nameOf = ({ code, name, mark }: Pick<RoomRecord, 'code' | 'name' | 'mark'>) => ({
  id: code,
  name,
  mark,
})

function roomOf(room: RoomRecord, material: CarryMaterial, cutDoubtPct: number): LidRoom {
  const air = material.rooms.get(room.id)?.air
  if (air?.kind !== 'fresh')
    return { ...nameOf(room), place: null, readAt: air?.kind === 'stale' ? air.at : null }
  return {
    ...nameOf(room),
    place: placeGivenTime(air.emcPct, air.emcDoubtPct, cutDoubtPct),
    readAt: null,
  }
}

function stayOf(
  material: CarryMaterial,
  own: PieceMaterial,
  pieceId: number,
  room: Pick<RoomRecord, 'id' | 'code' | 'name' | 'mark'>,
  { stayMinutes, cover }: { stayMinutes: number; cover: FitQuery['cover'] },
  now: Date,
): LidStay {
  const input = carryCheckInput(material, { pieceId, toRoomId: room.id, startsAt: now, stayMinutes, cover })
  const isDrawn = own.facts.woodKind === 'plain' || own.facts.woodKind === 'hybrid'
  const place = input === undefined || !isDrawn ? undefined : placeAfterStay(input)
  return { room: nameOf(room), stayMinutes, cover, place: place ?? null }
}

/** A room's last twelve months, oldest first; months without a reading are left out. */
async function monthsOf(
  db: Kysely<Database>,
  { siteId, timeZone }: SiteMember,
  roomId: number,
  now: Date,
): Promise<{ monthOn: string; emcPct: number }[]> {
  const today = dayOfInstant(now, timeZone)
  const asked = Array.from({ length: 12 }, (_, n) => ({
    roomId,
    ...monthOf(monthsBefore(today, 11 - n)),
  }))
  const means = await findMonthMeans(db, siteId, asked)
  return asked.flatMap(({ firstOn }) => {
    const emcPct = means.get(monthKey(roomId, firstOn))
    return emcPct === undefined ? [] : { monthOn: firstOn, emcPct }
  })
}

interface CutMaterial {
  material: CarryMaterial
  own: PieceMaterial
  keepRoom: RoomRecord | undefined
  months: number
}

async function cutQuestion(
  db: Kysely<Database>,
  member: SiteMember,
  { material, own, keepRoom, months }: CutMaterial,
  query: FitQuery,
  now: Date,
): Promise<CutQuestion> {
  const diameterMm = query.diameterMm ?? own.facts.jointDiameterMm
  if (diameterMm === null) return { kind: 'ask-diameter' }
  const today = dayOfInstant(now, member.timeZone)
  const years = await findRoomYears(db, member.siteId, monthsBefore(today, 12), today)
  const year = keepRoom && years.get(keepRoom.id)
  if (keepRoom === undefined || year === undefined)
    return { kind: 'unknown', words: 'Nothing is known yet of the air of the room that it is kept for.' }
  const wood = woodAt(material, own, now.getTime())
  if (wood === null) return { kind: 'unknown', words: 'Nothing is known yet of the air that it has been in.' }
  const grade = query.fitGrade ?? own.facts.fitGrade ?? 'snug'
  const target: TargetYear = {
    basis: 'keep-room',
    lowMcPct: year.emcPctLow,
    middleMcPct: year.emcPctMiddle,
    highMcPct: year.emcPctHigh,
    months: Math.max(1, months),
  }
  const input = cutInput(own.facts, { mcPct: onScale(wood.ringPct), mcDoubtPct: mcDoubtPct(wood) }, target, {
    diameterMm,
    grade,
  })
  return {
    kind: 'check',
    against: nameOf(keepRoom),
    grade,
    input,
    check: fitCheck(input),
    assumed: cutAssumed(own, keepRoom, query),
  }
}

function cutInput(
  facts: PieceFacts,
  mc: Pick<FitCheckInput, 'mcPct' | 'mcDoubtPct'>,
  target: TargetYear,
  joint: { diameterMm: number; grade: FitGrade },
): FitCheckInput {
  const wood = movementOfPiece(facts)
  return {
    ...mc,
    ...joint,
    target,
    movement: jointMovement(wood, facts.grain),
    movementDoubt: wood.movementDoubt,
    woodKind: facts.woodKind,
  }
}

const cutAssumed = (own: PieceMaterial, keepRoom: RoomRecord, query: FitQuery): string[] => [
  ...woodOfPiece(own.facts).assumed.map((phrase) => `${capital(phrase)}.`),
  ...(own.isKeepRoomAssumed ? [`Kept to match ${keepRoom.name}.`] : []),
  ...(query.fitGrade === undefined && own.facts.fitGrade === null ? ['A snug lid is wanted.'] : []),
]

/** The check's own scale ends at fibre saturation: green wood stands there. */
const onScale = (mcPct: number): number => Math.min(30, Math.max(0, mcPct))
