import { type Kysely, sql } from 'kysely'
import type { PieceFacts } from '@/lib/carry/carry-check'
import type { Stay } from '@/lib/follow/record'
import {
  fitGradeSchema,
  grainSchema,
  lidFormSchema,
  placeCoverSchema,
  spigotOnSchema,
  stageSchema,
  woodKindSchema,
} from '@/lib/pieces/piece'
import { resolveWood } from '@/lib/wood/site-wood'
import { findSpecies, type MovementClass } from '@/lib/wood/species'
import { UNKNOWN_WOOD_CLASS } from '@/lib/wood/movement-class'
import type { Database } from '../schema'
import { listSiteWoods } from './site-woods'

/** What the wood model takes of a piece, its wood resolved to the site's own figures where it has some. */
export interface FactsRow {
  id: number
  code: string
  facts: PieceFacts
  movementClass: MovementClass
  keepRoomId: number | null
  fittedRoomId: number | null
  fittedOn: string | null
  fitMcPct: number | null
  fitLidMcPct: number | null
  /** How well that is known, ± % MC; null where the fit was not entered as it was made. */
  fitDoubtPct: number | null
}

/** @param pieceIds null for every piece in use */
export async function listPieceFacts(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[] | null,
): Promise<FactsRow[]> {
  if (pieceIds?.length === 0) return []
  const rows = await db
    .selectFrom('piece')
    .where('site_id', '=', siteId)
    .$if(pieceIds !== null, (query) => query.where('id', 'in', [...(pieceIds ?? [])]))
    .$if(pieceIds === null, (query) => query.where('archived_at', 'is', null))
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
      'lid_wall_mm',
      'body_wall_mm',
      'blank_diameter_mm',
      'ends_sealed',
      'finish',
      'fit_grade',
      'clearance_mm',
      'allowance_mm',
      'keep_room_id',
      'fitted_room_id',
      'fitted_on',
      'fit_mc_pct',
      'fit_lid_mc_pct',
    ])
    .select((eb) =>
      eb
        .selectFrom('piece_event as fit')
        .whereRef('fit.site_id', '=', 'piece.site_id')
        .whereRef('fit.piece_id', '=', 'piece.id')
        .whereRef('fit.at', '=', 'piece.fitted_at')
        .where('fit.kind', 'in', ['final-fit', 're-true'])
        .where('fit.undone_at', 'is', null)
        .select(sql<number | null>`(fit.data->>'doubtPct')::float8`.as('doubt_pct'))
        .orderBy('fit.id', 'desc')
        .limit(1)
        .as('fit_doubt_pct'),
    )
    .execute()
  const siteWoods = await listSiteWoods(db, siteId)
  return rows.map((row) => {
    const wood = row.wood === null ? undefined : resolveWood(row.wood, siteWoods)
    const isTable = row.wood !== null && wood === findSpecies(row.wood)
    return {
      id: row.id,
      code: row.code,
      facts: {
        number: row.number,
        stage: stageSchema.parse(row.stage),
        wood: row.wood,
        ...(wood === undefined || isTable ? {} : { ownFigures: wood }),
        woodKind: woodKindSchema.parse(row.wood_kind),
        grain: grainSchema.parse(row.grain),
        spigotOn: spigotOnSchema.parse(row.spigot_on),
        lidForm: lidFormSchema.parse(row.lid_form),
        jointDiameterMm: row.joint_diameter_mm,
        wallMm: row.wall_mm,
        spigotMm: row.spigot_mm,
        lidMm: row.lid_mm,
        lidWallMm: row.lid_wall_mm,
        bodyWallMm: row.body_wall_mm,
        blankDiameterMm: row.blank_diameter_mm,
        endsSealed: row.ends_sealed,
        finish: row.finish,
        fitGrade: row.fit_grade === null ? null : fitGradeSchema.parse(row.fit_grade),
        clearanceMm: row.clearance_mm,
        allowanceMm: row.allowance_mm,
      },
      movementClass: wood?.movementClass ?? UNKNOWN_WOOD_CLASS,
      keepRoomId: row.keep_room_id,
      fittedRoomId: row.fitted_room_id,
      fittedOn: row.fitted_on,
      fitMcPct: row.fit_mc_pct,
      fitLidMcPct: row.fit_lid_mc_pct,
      fitDoubtPct: row.fit_doubt_pct,
    }
  })
}

/** Where pieces have been, oldest first; with `since`, only the stays that reach beyond it. */
export async function listStays(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
  since?: Date,
): Promise<Map<number, Stay[]>> {
  const stays = new Map<number, Stay[]>()
  if (pieceIds.length === 0) return stays
  const rows = await db
    .selectFrom('piece_place')
    .where('site_id', '=', siteId)
    .where(sql<boolean>`piece_id = any(${[...pieceIds]}::int[])`)
    .$if(since !== undefined, (query) =>
      query.where((eb) => eb.or([eb('to_at', 'is', null), eb('to_at', '>', since ?? new Date(0))])),
    )
    .select(['piece_id', 'room_id', 'from_at', 'to_at', 'cover'])
    .orderBy('piece_id')
    .orderBy('from_at')
    .execute()
  for (const row of rows) {
    const own = stays.get(row.piece_id) ?? []
    own.push({
      roomId: row.room_id,
      fromAt: row.from_at,
      toAt: row.to_at,
      cover: placeCoverSchema.parse(row.cover),
    })
    stays.set(row.piece_id, own)
  }
  return stays
}

/** When each piece went out, of those that are out. */
export async function listOutings(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
): Promise<Map<number, Date>> {
  if (pieceIds.length === 0) return new Map()
  const rows = await db
    .selectFrom('carry_piece')
    .where('site_id', '=', siteId)
    .where(sql<boolean>`piece_id = any(${[...pieceIds]}::int[])`)
    .where('out_at', 'is not', null)
    .where('back_at', 'is', null)
    .select(['piece_id', 'out_at'])
    .execute()
  return new Map(rows.flatMap((row) => (row.out_at === null ? [] : [[row.piece_id, row.out_at] as const])))
}
