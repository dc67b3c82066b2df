import { type ExpressionBuilder, type Kysely, sql } from 'kysely'
import {
  fitGradeSchema,
  grainSchema,
  lidFormSchema,
  placeCoverSchema,
  type PlaceCover,
  spigotOnSchema,
  stageSchema,
  woodKindSchema,
} from '@/lib/pieces/piece'
import type { PieceFacts } from '@/lib/carry/carry-check'
import { ownWoodId } from '@/lib/wood/site-wood'
import type { Database } from '../schema'

/** Who looks: what a private piece shows, and which pieces an onlooker sees at all, follow from it. */
export interface Viewer {
  userId: string
  role: string
}

interface RoomOfPiece {
  roomId: number
  code: string
  name: string
  mark: number
  isShared: boolean
}

/** A piece as the server knows it, with where it is now. */
export interface PieceRecord extends PieceFacts {
  id: number
  code: string
  /** The names of a wood of the site's own, put away or not; null for one of the table, or not known. */
  ownWood: { commonName: string; latinName: string } | null
  finish: string
  keepRoom: RoomOfPiece | null
  fittedRoomId: number | null
  fittedRoomCode: string | null
  fittedOn: string | null
  fittedAt: Date | null
  fitMcPct: number | null
  fitLidMcPct: number | null
  roughedOn: string | null
  /** Set by the maker: weights alone decide whether it is ready. */
  isReadyByWeight: boolean
  note: string
  ownerUserId: string | null
  isPrivate: boolean
  isShared: boolean
  version: number
  createdAt: Date
  archivedAt: Date | null
  room: RoomOfPiece | null
  cover: PlaceCover
  since: Date | null
  isOut: boolean
  /** Private and not the viewer's: only number, room and time out are shown. */
  isHidden: boolean
}

/**
 * The pieces with where each is, for any further narrowing. A private piece is open to its owner; when the owner has
 * left, to the site's owners, so that it is not lost to everybody.
 */
export function pieceQuery(db: Kysely<Database>, siteId: number, viewer: Viewer) {
  return db
    .selectFrom('piece')
    .leftJoin('piece_place as place', (join) =>
      join
        .onRef('place.site_id', '=', 'piece.site_id')
        .onRef('place.piece_id', '=', 'piece.id')
        .on('place.to_at', 'is', null),
    )
    .leftJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'piece.site_id').onRef('room.id', '=', 'place.room_id'),
    )
    .leftJoin('room as keep', (join) =>
      join.onRef('keep.site_id', '=', 'piece.site_id').onRef('keep.id', '=', 'piece.keep_room_id'),
    )
    .leftJoin('room as fitted', (join) =>
      join.onRef('fitted.site_id', '=', 'piece.site_id').onRef('fitted.id', '=', 'piece.fitted_room_id'),
    )
    .leftJoin('site_wood as own_wood', (join) =>
      join
        .onRef('own_wood.site_id', '=', 'piece.site_id')
        .on('own_wood.overrides', 'is', null)
        .on(sql<boolean>`${sql.lit(ownWoodId(''))} || own_wood.code = piece.wood`),
    )
    .where('piece.site_id', '=', siteId)
    .$if(viewer.role === 'onlooker', (query) =>
      query.where('piece.is_shared', '=', true).where('piece.is_private', '=', false),
    )
    .select([
      'piece.id',
      'piece.code',
      'piece.number',
      'piece.stage',
      'piece.wood',
      'piece.wood_kind',
      'piece.grain',
      'piece.spigot_on',
      'piece.lid_form',
      'piece.joint_diameter_mm',
      'piece.wall_mm',
      'piece.spigot_mm',
      'piece.lid_mm',
      'piece.body_wall_mm',
      'piece.lid_wall_mm',
      'piece.blank_diameter_mm',
      'piece.ends_sealed',
      'piece.roughed_on',
      'piece.ready_by_weight',
      'piece.fit_lid_mc_pct',
      'piece.fit_grade',
      'piece.clearance_mm',
      'piece.allowance_mm',
      'piece.finish',
      'piece.keep_room_id',
      'piece.fitted_room_id',
      'piece.fitted_on',
      'piece.fitted_at',
      'piece.fit_mc_pct',
      'piece.note',
      'piece.owner_user_id',
      'piece.is_private',
      'piece.is_shared',
      'piece.version',
      'piece.created_at',
      'piece.archived_at',
      'place.room_id',
      'place.cover',
      'place.from_at',
      'room.code as room_code',
      'room.name as room_name',
      'room.mark as room_mark',
      'room.is_shared as room_is_shared',
      'keep.code as keep_code',
      'keep.name as keep_name',
      'keep.mark as keep_mark',
      'keep.is_shared as keep_is_shared',
      'fitted.code as fitted_code',
      'own_wood.common_name as own_wood_name',
      'own_wood.latin_name as own_wood_latin_name',
    ])
    .select(isOut)
    .select(isOpenTo(viewer).as('is_open'))
}

const isOut = (eb: ExpressionBuilder<Database, 'piece'>) =>
  eb
    .exists(
      eb
        .selectFrom('carry_piece')
        .whereRef('carry_piece.site_id', '=', 'piece.site_id')
        .whereRef('carry_piece.piece_id', '=', 'piece.id')
        .where('carry_piece.out_at', 'is not', null)
        .where('carry_piece.back_at', 'is', null)
        .select('carry_piece.carry_id'),
    )
    .as('is_out')

/** Whether the viewer sees all of a piece. */
export const isOpenTo = (viewer: Viewer) =>
  sql<boolean>`(not piece.is_private or piece.owner_user_id = ${viewer.userId}
    or (piece.owner_user_id is null and ${viewer.role === 'owner'}::boolean))`

type Row = Awaited<ReturnType<ReturnType<typeof pieceQuery>['executeTakeFirstOrThrow']>>

const roomOf = (
  roomId: number | null,
  code: string | null,
  name: string | null,
  mark: number | null,
  isShared: boolean | null,
): RoomOfPiece | null =>
  roomId === null || code === null || name === null
    ? null
    : { roomId, code, name, mark: mark ?? 0, isShared: isShared ?? false }

export function pieceOf(row: Row): PieceRecord {
  return {
    id: row.id,
    code: row.code,
    number: row.number,
    stage: stageSchema.parse(row.stage),
    wood: row.wood,
    ownWood:
      row.own_wood_name === null
        ? null
        : { commonName: row.own_wood_name, latinName: row.own_wood_latin_name ?? '' },
    woodKind: woodKindSchema.parse(row.wood_kind),
    grain: grainSchema.parse(row.grain),
    spigotOn: spigotOnSchema.parse(row.spigot_on),
    lidForm: lidFormSchema.parse(row.lid_form),
    jointDiameterMm: row.joint_diameter_mm,
    wallMm: row.wall_mm,
    spigotMm: row.spigot_mm,
    lidMm: row.lid_mm,
    bodyWallMm: row.body_wall_mm,
    lidWallMm: row.lid_wall_mm,
    blankDiameterMm: row.blank_diameter_mm,
    endsSealed: row.ends_sealed,
    roughedOn: row.roughed_on,
    isReadyByWeight: row.ready_by_weight,
    fitGrade: row.fit_grade === null ? null : fitGradeSchema.parse(row.fit_grade),
    clearanceMm: row.clearance_mm,
    allowanceMm: row.allowance_mm,
    finish: row.finish,
    keepRoom: roomOf(row.keep_room_id, row.keep_code, row.keep_name, row.keep_mark, row.keep_is_shared),
    fittedRoomId: row.fitted_room_id,
    fittedRoomCode: row.fitted_code,
    fittedOn: row.fitted_on,
    fittedAt: row.fitted_at,
    fitMcPct: row.fit_mc_pct,
    fitLidMcPct: row.fit_lid_mc_pct,
    note: row.note,
    ownerUserId: row.owner_user_id,
    isPrivate: row.is_private,
    isShared: row.is_shared,
    version: row.version,
    createdAt: row.created_at,
    archivedAt: row.archived_at,
    room: roomOf(row.room_id, row.room_code, row.room_name, row.room_mark, row.room_is_shared),
    cover: row.cover === null ? 'closed' : placeCoverSchema.parse(row.cover),
    since: row.from_at,
    isOut: Boolean(row.is_out),
    isHidden: !row.is_open,
  }
}

/** Pieces by their codes, archived ones left out. The order is that of the numbers inside, not that of the codes. */
export async function findPieces(
  db: Kysely<Database>,
  siteId: number,
  codes: readonly string[],
  viewer: Viewer,
): Promise<PieceRecord[]> {
  if (codes.length === 0) return []
  const rows = await pieceQuery(db, siteId, viewer)
    .where('piece.code', 'in', [...codes])
    .where('piece.archived_at', 'is', null)
    .orderBy('piece.id')
    .execute()
  return rows.map(pieceOf)
}

export async function findPiecesById(
  db: Kysely<Database>,
  siteId: number,
  ids: readonly number[],
  viewer: Viewer,
): Promise<PieceRecord[]> {
  if (ids.length === 0) return []
  const rows = await pieceQuery(db, siteId, viewer)
    .where('piece.id', 'in', [...ids])
    .execute()
  return rows.map(pieceOf)
}

export async function findPiece(
  db: Kysely<Database>,
  siteId: number,
  code: string,
  viewer: Viewer,
  options: { withArchived?: boolean } = {},
): Promise<PieceRecord | undefined> {
  const row = await pieceQuery(db, siteId, viewer)
    .where('piece.code', '=', code)
    .$if(options.withArchived !== true, (query) => query.where('piece.archived_at', 'is', null))
    .executeTakeFirst()
  return row === undefined ? undefined : pieceOf(row)
}

export async function listPiecesInRoom(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  viewer: Viewer,
): Promise<PieceRecord[]> {
  const rows = await pieceQuery(db, siteId, viewer)
    .where('place.room_id', '=', roomId)
    .where('piece.archived_at', 'is', null)
    .orderBy(sql`lower(piece.number)`)
    .execute()
  return rows.map(pieceOf)
}

/** More would not find room on the rule. */
const standingMax = 300

/** The pieces in use, the newest first, for the rule. */
export async function listStandingPieces(
  db: Kysely<Database>,
  siteId: number,
  viewer: Viewer,
): Promise<PieceRecord[]> {
  const rows = await pieceQuery(db, siteId, viewer)
    .where('piece.archived_at', 'is', null)
    .orderBy('piece.id', 'desc')
    .limit(standingMax)
    .execute()
  return rows.map(pieceOf)
}
