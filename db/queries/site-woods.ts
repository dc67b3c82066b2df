import { type Kysely, type Selectable, sql } from 'kysely'
import { movementClassSchema, ownWoodCode, type SiteWood, type SiteWoodChange } from '@/lib/wood/site-wood'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** A wood of a site's own, or its figures for one of the table, as the server knows it. */
export interface SiteWoodRecord extends SiteWood {
  id: number
}

const columns = [
  'id',
  'code',
  'overrides',
  'common_name',
  'latin_name',
  'movement_class',
  'radial_per_pct',
  'tangential_per_pct',
  'density_kg_m3',
  'source',
  'note',
  'version',
  'archived_at',
] as const

type Row = Pick<Selectable<Database['site_wood']>, (typeof columns)[number]>

const woodOf = (row: Row): SiteWoodRecord => ({
  id: row.id,
  code: row.code,
  overrides: row.overrides,
  commonName: row.common_name,
  latinName: row.latin_name,
  movementClass: movementClassSchema.parse(row.movement_class),
  radialPerPct: row.radial_per_pct,
  tangentialPerPct: row.tangential_per_pct,
  densityKgM3: row.density_kg_m3,
  source: row.source,
  note: row.note,
  version: row.version,
  isArchived: row.archived_at !== null,
})

/**
 * All of a site's woods and figures, put-away ones included, as `resolveWood` wants them: a piece keeps the wood that it
 * was made of.
 */
export async function listSiteWoods(db: Kysely<Database>, siteId: number): Promise<SiteWoodRecord[]> {
  const rows = await db
    .selectFrom('site_wood')
    .where('site_id', '=', siteId)
    .select(columns)
    .orderBy('id')
    .execute()
  return rows.map(woodOf)
}

/**
 * The site's row for a wood, by what stands for the wood in an address: `own-` and a code, or a slug of the table.
 * Of figures for a wood of the table those in force come first, then those that were put away last.
 */
export async function findSiteWood(
  db: Kysely<Database>,
  siteId: number,
  wood: string,
  options: { withArchived?: boolean; forUpdate?: boolean } = {},
): Promise<SiteWoodRecord | undefined> {
  const code = ownWoodCode(wood)
  const row = await db
    .selectFrom('site_wood')
    .where('site_id', '=', siteId)
    .$if(code !== undefined, (query) => query.where('code', '=', code ?? '').where('overrides', 'is', null))
    .$if(code === undefined, (query) => query.where('overrides', '=', wood))
    .$if(options.withArchived !== true, (query) => query.where('archived_at', 'is', null))
    .select(columns)
    .orderBy(sql`archived_at desc nulls first`)
    .orderBy('id', 'desc')
    .limit(1)
    .$if(options.forUpdate === true, (query) => query.forUpdate())
    .executeTakeFirst()
  return row === undefined ? undefined : woodOf(row)
}

/** Whether another wood of the site's own has the name, in whatever letters. */
export async function isWoodNameTaken(
  db: Kysely<Database>,
  siteId: number,
  commonName: string,
  butFor = 0,
): Promise<boolean> {
  const row = await db
    .selectFrom('site_wood')
    .where('site_id', '=', siteId)
    .where('overrides', 'is', null)
    .where('archived_at', 'is', null)
    .where(sql<boolean>`lower(common_name) = lower(${commonName})`)
    .where('id', '<>', butFor)
    .select('id')
    .executeTakeFirst()
  return row !== undefined
}

export type SiteWoodValues = Required<SiteWoodChange> & { overrides: string | null }

export async function insertSiteWood(
  db: Kysely<Database>,
  siteId: number,
  wood: SiteWoodValues,
  now: Date,
): Promise<SiteWoodRecord> {
  const id = await takeIds(db, siteId, 'wood')
  const row = await db
    .insertInto('site_wood')
    .values({
      site_id: siteId,
      id,
      code: newCode(),
      overrides: wood.overrides,
      common_name: wood.commonName,
      latin_name: wood.latinName,
      movement_class: wood.movementClass,
      radial_per_pct: wood.radialPerPct,
      tangential_per_pct: wood.tangentialPerPct,
      density_kg_m3: wood.densityKgM3,
      source: wood.source,
      note: wood.note,
      created_at: now,
      archived_at: null,
    })
    .returning(columns)
    .executeTakeFirstOrThrow()
  return woodOf(row)
}

/** Changes a wood that is still at the version that the writer saw; `undefined` when it has moved on. */
export async function updateSiteWood(
  db: Kysely<Database>,
  siteId: number,
  woodId: number,
  version: number,
  change: SiteWoodChange & { archivedAt?: Date | null },
): Promise<SiteWoodRecord | undefined> {
  const row = await db
    .updateTable('site_wood')
    .set((eb) => ({
      common_name: change.commonName,
      latin_name: change.latinName,
      movement_class: change.movementClass,
      radial_per_pct: change.radialPerPct,
      tangential_per_pct: change.tangentialPerPct,
      density_kg_m3: change.densityKgM3,
      source: change.source,
      note: change.note,
      archived_at: change.archivedAt,
      version: eb('version', '+', 1),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', woodId)
    .where('version', '=', version)
    .returning(columns)
    .executeTakeFirst()
  return row === undefined ? undefined : woodOf(row)
}
