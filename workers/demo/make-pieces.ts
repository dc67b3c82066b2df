import type { Transaction } from 'kysely'
import {
  insertDemoCarry,
  insertDemoCarryPiece,
  insertDemoPiece,
  type DemoPieceRow,
  type DemoPlace,
} from '@/db/queries/demo-pieces'
import { findRoomSpan } from '@/db/queries/room-figures'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { placeCarries, type PlaceCarry } from './carries'
import type { MadePlace } from './make-place'
import { daysBefore, instantOf } from './moments'
import { placePieces, type PlacePiece } from './pieces'
import { placeTimeZone } from './place'

export interface MadePieces {
  /** By the piece's number. */
  pieces: ReadonlyMap<string, { id: number; code: string }>
  carries: readonly MadeCarry[]
}

export interface MadeCarry extends PlaceCarry {
  id: number
  code: string
  plannedAt: Date
  startedAt: Date | null
  endedAt: Date | null
}

/** For how long before its joint was cut the wood of a piece is taken to have rested in that room, days. */
const RESTED_DAYS = 10

/** Makes carries and pieces with all that has happened to them. */
export async function makePieces(
  trx: Transaction<Database>,
  place: MadePlace,
  now: Date,
): Promise<MadePieces> {
  const carries: MadeCarry[] = []
  for (const carry of placeCarries) carries.push(await makeCarry(trx, place, carry, now))
  const pieces = new Map<string, { id: number; code: string }>()
  for (const piece of placePieces) {
    const row = await pieceRow(trx, place, piece, carries, now)
    pieces.set(piece.number, await insertDemoPiece(trx, place.siteId, row))
  }
  for (const carry of carries)
    for (const number of carry.pieces) {
      const piece = placePieces.find((one) => one.number === number)
      const made = pieces.get(number)
      if (piece === undefined || made === undefined) throw new RangeError(`no piece ${number} for a carry`)
      await insertDemoCarryPiece(trx, place.siteId, {
        carryId: carry.id,
        pieceId: made.id,
        fromRoomId: place.rooms[piece.room],
        cover: carry.cover,
        outAt: carry.startedAt,
        backAt: carry.startedAt === null ? null : carry.endedAt,
      })
    }
  return { pieces, carries }
}

async function makeCarry(
  trx: Transaction<Database>,
  place: MadePlace,
  carry: PlaceCarry,
  now: Date,
): Promise<MadeCarry> {
  const at = (moment: PlaceCarry['started']) =>
    moment === undefined ? null : instantOf(moment, now, placeTimeZone)
  const plannedAt = instantOf(carry.planned, now, placeTimeZone)
  const startedAt = at(carry.started)
  const endedAt = carry.isCalledOff ? plannedAt : at(carry.ended)
  const state = carry.isCalledOff ? 'called-off' : endedAt ? 'back' : startedAt ? 'out' : 'planned'
  const row = await insertDemoCarry(trx, place.siteId, {
    state,
    toRoomId: place.rooms[carry.to],
    cover: carry.cover,
    plannedAt,
    stayMinutes: carry.stayMinutes,
    startedAt,
    endedAt,
    againstAdvice: carry.isAgainstAdvice ?? false,
    note: carry.note ?? '',
    createdBy: place.users[carry.by],
    // Planned the day before; what was not planned was made when it went.
    createdAt: startedAt ?? daysBefore(now, 0.8),
  })
  return { ...carry, ...row, plannedAt, startedAt, endedAt }
}

async function pieceRow(
  trx: Transaction<Database>,
  place: MadePlace,
  piece: PlacePiece,
  carries: readonly MadeCarry[],
  now: Date,
): Promise<DemoPieceRow> {
  const bornAt = daysBefore(now, piece.bornDaysAgo)
  const { fit } = piece
  const fittedAt = fit === undefined ? null : daysBefore(now, fit.daysAgo)
  const isOurs = fittedAt !== null && fit?.isImported !== true
  return {
    number: piece.number,
    stage: piece.stage,
    wood: piece.wood,
    woodKind: piece.woodKind ?? 'plain',
    grain: piece.grain ?? 'end-grain',
    spigotOn: piece.spigotOn ?? 'base',
    lidForm: piece.lidForm ?? 'plug',
    jointDiameterMm: piece.jointDiameterMm ?? null,
    wallMm: piece.wallMm ?? null,
    spigotMm: piece.spigotMm ?? null,
    lidMm: piece.lidMm ?? null,
    bodyWallMm: piece.bodyWallMm ?? null,
    lidWallMm: null,
    blankDiameterMm: piece.blankDiameterMm ?? null,
    endsSealed: piece.endsSealed ?? false,
    roughedOn: roughedOn(piece, bornAt, now),
    isReadyByWeight: false,
    fitGrade: piece.fitGrade ?? null,
    clearanceMm: piece.clearanceMm ?? null,
    allowanceMm: piece.allowanceMm ?? null,
    finish: piece.finish ?? '',
    note: piece.note ?? '',
    isPrivate: piece.isPrivate ?? false,
    isShared: piece.isShared ?? false,
    keepRoomId: piece.keep === undefined ? null : place.rooms[piece.keep],
    fittedRoomId: fit === undefined ? null : place.rooms[fit.room],
    fittedOn: fittedAt === null ? null : dayOfInstant(fittedAt, placeTimeZone),
    fittedAt: isOurs ? fittedAt : null,
    fitMcPct: isOurs && fit ? await restedMcPct(trx, place, place.rooms[fit.room], fittedAt) : null,
    ownerUserId: place.users[piece.owner ?? 'maker'],
    createdAt: bornAt,
    places: placesOf(place, piece, carries, bornAt, now),
  }
}

/** A pair was roughed out when it came into the record; a blank only where it says so. */
function roughedOn({ stage, roughedDaysAgo }: PlacePiece, bornAt: Date, now: Date): string | null {
  if (roughedDaysAgo !== undefined) return dayOfInstant(daysBefore(now, roughedDaysAgo), placeTimeZone)
  return stage === 'roughed' ? dayOfInstant(bornAt, placeTimeZone) : null
}

/** What wood that rested in a room before the cut has come to: the mean of the room's last days. */
async function restedMcPct(
  trx: Transaction<Database>,
  place: MadePlace,
  roomId: number,
  fittedAt: Date,
): Promise<number | null> {
  const toOn = dayOfInstant(fittedAt, placeTimeZone)
  const span = await findRoomSpan(trx, place.siteId, roomId, daysAfter(toOn, -RESTED_DAYS), toOn)
  return span?.emcPctMean ?? null
}

/** Its first room, its own room, and each time out of it and back. */
function placesOf(
  place: MadePlace,
  piece: PlacePiece,
  carries: readonly MadeCarry[],
  bornAt: Date,
  now: Date,
): DemoPlace[] {
  const atRest = piece.stage === 'box' ? 'closed' : 'open'
  const home = { roomId: place.rooms[piece.room], cover: atRest } as const
  const { before } = piece
  const owner = place.users[piece.owner ?? 'maker']
  const places: DemoPlace[] =
    before === undefined
      ? [{ ...home, fromAt: bornAt, movedBy: owner }]
      : [
          { roomId: place.rooms[before.room], fromAt: bornAt, cover: 'open', movedBy: owner },
          { ...home, fromAt: daysBefore(now, before.untilDaysAgo), movedBy: owner },
        ]
  for (const { id, pieces, to, cover, startedAt, endedAt, by } of carries) {
    if (startedAt === null || !pieces.includes(piece.number)) continue
    const movedBy = place.users[by]
    places.push({ roomId: place.rooms[to], fromAt: startedAt, cover, carryId: id, movedBy })
    if (endedAt !== null) places.push({ ...home, fromAt: endedAt, movedBy })
  }
  return places
}
