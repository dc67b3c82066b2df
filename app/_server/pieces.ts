import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { listPieceRecords } from '@/db/queries/piece-list'
import { findPiece, type PieceRecord } from '@/db/queries/pieces'
import { listPlaces } from '@/db/queries/places'
import { findRoom, listRoomRecords } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { jointOfPiece } from '@/lib/carry/joint-defaults'
import { lossMm } from '@/lib/carry/joint-loss'
import { type CarryMaterial, type PieceMaterial, woodAt } from '@/lib/carry/material'
import { mcDoubtPct } from '@/lib/follow/doubt'
import { type Piece, type PieceDetail, pieceListQuerySchema } from '@/lib/pieces/piece'
import { assumedWords, type McNow, pieceCautions, pieceDust, pieceHeadline } from '@/lib/pieces/words'
import { ok } from '@/lib/result'
import { decodeCursor, listQueryShape, type Page, pageOf } from './list'
import { pieceView, shownRoom, viewerOf } from './piece-view'
import { failField, notThere, type Outcome } from './problem'
import { restOfPiece } from './rest'

export const piecesQuerySchema = z.strictObject({
  ...pieceListQuerySchema.shape,
  ...listQueryShape(['number', '-number', 'wood', '-wood', 'room', '-room', 'created', '-created']),
})
export type PiecesQuery = z.output<typeof piecesQuerySchema>

const cursorSchema = z.strictObject({ key: z.string().max(300), id: z.int() })

export async function listPieces(
  db: Kysely<Database>,
  member: SiteMember,
  query: PiecesQuery,
): Promise<Outcome<Page<Piece>>> {
  const after = query.cursor === undefined ? undefined : decodeCursor(query.cursor, cursorSchema)
  if (query.cursor !== undefined && after === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const onlyShared = member.role === 'onlooker'
  const room =
    query.room === undefined ? undefined : await findRoom(db, member.siteId, query.room, { onlyShared })
  if (query.room !== undefined && room === undefined) return notThere()
  const sort = query.sort.replace('-', '') as 'number' | 'wood' | 'room' | 'created'
  const records = await listPieceRecords(db, member.siteId, viewerOf(member), {
    q: query.q,
    stage: query.stage,
    roomId: room?.id,
    isOut: query.out === undefined ? undefined : query.out === 'yes',
    sort,
    isDescending: query.sort.startsWith('-'),
    limit: query.limit,
    after,
  })
  const page = pageOf(records, query.limit, (record) => ({ key: record.sortKey, id: record.id }))
  return ok({
    items: page.items.map((record) => pieceView(record, member)),
    nextCursor: page.nextCursor,
  })
}

export async function getPiece(
  db: Kysely<Database>,
  member: SiteMember,
  pieceCode: string,
  now: Date,
): Promise<Outcome<PieceDetail>> {
  const piece = await findPiece(db, member.siteId, pieceCode, viewerOf(member), { withArchived: true })
  // One that was put away stays to be looked at by those who may bring it out again.
  if (piece === undefined || (piece.archivedAt !== null && member.role === 'onlooker')) return notThere()
  return ok(piece.isHidden ? hiddenDetail(piece, member) : await openDetail(db, member, piece, now))
}

async function openDetail(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  now: Date,
): Promise<PieceDetail> {
  const isOnlooker = member.role === 'onlooker'
  const [material, places] = await Promise.all([
    loadCarryMaterial(db, member, [piece.id], [], now),
    isOnlooker ? [] : listPlaces(db, member.siteId, piece.id),
  ])
  const own = material.pieces.get(piece.id)
  const mc = own === undefined || isOnlooker ? null : mcNow(own, material, now)
  const room = shownRoom(piece.room, member)
  const rest =
    piece.stage === 'box' || isOnlooker ? undefined : await restOfPiece(db, member, piece, material, now)
  return {
    ...pieceView(piece, member),
    grain: piece.grain,
    spigotOn: piece.spigotOn,
    lidForm: piece.lidForm,
    wallMm: piece.wallMm,
    spigotMm: piece.spigotMm,
    lidMm: piece.lidMm,
    bodyWallMm: piece.bodyWallMm,
    lidWallMm: piece.lidWallMm,
    blankDiameterMm: piece.blankDiameterMm,
    endsSealed: piece.endsSealed,
    roughedOn: piece.roughedOn,
    isReadyByWeight: piece.isReadyByWeight,
    clearanceMm: piece.clearanceMm,
    allowanceMm: piece.allowanceMm,
    finish: piece.finish,
    fittedRoomId: isOnlooker ? null : piece.fittedRoomCode,
    fittedOn: piece.fittedOn,
    note: isOnlooker ? '' : piece.note,
    isPrivate: piece.isPrivate,
    isShared: piece.isShared,
    isYours: piece.ownerUserId === member.userId,
    isArchived: piece.archivedAt !== null,
    createdAt: piece.createdAt.toISOString(),
    assumed: assumedWords(own?.facts ?? piece, {
      keepRoomName: own?.isKeepRoomAssumed === true ? await keepName(db, member, own) : null,
      isCutAssumed: own?.cut === null,
    }),
    headline: pieceHeadline({ ...piece, roomName: room?.name ?? null, mc, restWords: rest?.words }),
    mc,
    places: places.map((place) => ({
      room: { id: place.room.id, name: place.room.name, mark: place.room.mark },
      fromAt: place.fromAt.toISOString(),
      toAt: place.toAt?.toISOString() ?? null,
      cover: place.cover,
      by: place.by,
    })),
    dust: pieceDust(piece),
    cautions: pieceCautions(piece),
  }
}

async function keepName(
  db: Kysely<Database>,
  member: SiteMember,
  own: PieceMaterial,
): Promise<string | null> {
  const rooms = await listRoomRecords(db, member.siteId)
  return rooms.find((room) => room.id === own.keepRoomId)?.name ?? null
}

/** Where the ring of its joint stands now. Null for pieces whose wood is not reckoned, or with no air on record. */
function mcNow(own: PieceMaterial, material: CarryMaterial, now: Date): McNow | null {
  if (own.facts.woodKind === 'wild' || own.facts.woodKind === 'stabilised') return null
  const wood = woodAt(material, own, now.getTime())
  if (wood === null) return null
  const joint = own.facts.stage === 'box' ? jointOfPiece(own.facts) : undefined
  const cut = own.cut ?? { ringMcPct: wood.ringPct, lidMcPct: wood.lidPct }
  const lost =
    joint === undefined
      ? null
      : Math.max(0, lossMm(joint.loss, wood.ringPct - cut.ringMcPct, wood.lidPct - cut.lidMcPct))
  const allowanceMm = joint?.allowance.allowanceMm ?? null
  return {
    ringMcPct: wood.ringPct,
    lidMcPct: wood.lidPct,
    cutMcPct: cut.ringMcPct,
    doubtPct: mcDoubtPct(wood),
    usedFraction: lost === null || allowanceMm === null ? null : lost / allowanceMm,
    lossMm: lost,
    allowanceMm,
  }
}

/** Of somebody else's private piece: its number, its room and its time out. */
function hiddenDetail(piece: PieceRecord, member: SiteMember): PieceDetail {
  const view = pieceView(piece, member)
  return {
    ...view,
    grain: 'end-grain',
    spigotOn: 'base',
    lidForm: 'plug',
    wallMm: null,
    spigotMm: null,
    lidMm: null,
    bodyWallMm: null,
    lidWallMm: null,
    blankDiameterMm: null,
    endsSealed: false,
    roughedOn: null,
    isReadyByWeight: false,
    clearanceMm: null,
    allowanceMm: null,
    finish: '',
    fittedRoomId: null,
    fittedOn: null,
    note: '',
    isPrivate: true,
    isShared: false,
    isYours: false,
    isArchived: piece.archivedAt !== null,
    createdAt: piece.createdAt.toISOString(),
    assumed: [],
    headline: `${piece.number} is private to its maker; it is ${piece.isOut ? 'out' : 'in'}${
      view.room === null ? '' : piece.isOut ? ` in ${view.room.name}` : ` ${view.room.name}`
    }.`,
    mc: null,
    places: [],
    dust: [],
    cautions: [],
  }
}
