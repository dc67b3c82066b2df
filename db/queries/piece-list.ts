import { type Kysely, sql } from 'kysely'
import { SPECIES } from '@/lib/wood/species'
import type { Stage } from '@/lib/pieces/piece'
import type { Database } from '../schema'
import { isOpenTo, pieceOf, pieceQuery, type PieceRecord, type Viewer } from './pieces'

export interface PieceListQuery {
  /** Text in the number or the name of the wood, taken letter for letter. */
  q?: string
  stage?: Stage
  roomId?: number
  isOut?: boolean
  sort: 'number' | 'wood' | 'room' | 'created'
  isDescending: boolean
  limit: number
  /** The place in the order after which to go on. */
  after?: PieceCursor
}

export interface PieceCursor {
  key: string
  id: number
}

const speciesSlugs = SPECIES.map((species) => species.slug)
const speciesNames = SPECIES.map((species) => species.commonName.toLowerCase())

const woodNameSql = sql<string>`coalesce(lower(own_wood.common_name),
  (select names.name from unnest(${speciesSlugs}::text[], ${speciesNames}::text[]) as names (slug, name)
    where names.slug = piece.wood), '')`

/** One text to sort by, in plain byte order, whatever order the database was made with. */
function sortKey(sort: PieceListQuery['sort'], viewer: Viewer) {
  switch (sort) {
    case 'number':
      // Numbers go by their value, so that 99 stands before 100; names made of letters stand behind.
      return sql<string>`(case when piece.number ~ '^[0-9]'
        then lpad(substring(piece.number from '^[0-9]+'), 12, '0') || lower(piece.number)
        else '~' || lower(piece.number) end) collate "C"`
    case 'wood':
      // A private piece must not give its wood away by where it stands.
      return sql<string>`(case when ${isOpenTo(viewer)} then ${woodNameSql} else '' end) collate "C"`
    case 'room':
      return viewer.role === 'onlooker'
        ? sql<string>`(case when room.is_shared then lower(room.name) else '' end) collate "C"`
        : sql<string>`coalesce(lower(room.name), '') collate "C"`
    case 'created':
      return sql<string>`to_char(piece.created_at at time zone 'UTC', 'YYYYMMDDHH24MISSUS') collate "C"`
  }
}

/** Every sign of LIKE in a search is meant as itself. */
const literally = (text: string): string => text.replaceAll(/[\\%_]/g, String.raw`\$&`)

/** One more row than asked for, which says that there is a next page. */
export async function listPieceRecords(
  db: Kysely<Database>,
  siteId: number,
  viewer: Viewer,
  asked: PieceListQuery,
): Promise<(PieceRecord & { sortKey: string })[]> {
  const key = sortKey(asked.sort, viewer)
  const isOpen = isOpenTo(viewer)
  let query = pieceQuery(db, siteId, viewer).where('piece.archived_at', 'is', null)
  if (asked.q !== undefined && asked.q !== '') {
    const like = `%${literally(asked.q)}%`
    query = query.where(
      sql<boolean>`(piece.number ilike ${like}
        or (${isOpen} and (replace(coalesce(own_wood.latin_name, piece.wood, ''), '-', ' ') ilike ${like} or ${woodNameSql} ilike ${like})))`,
    )
  }
  if (asked.stage !== undefined)
    query = query.where('piece.stage', '=', asked.stage).where(sql<boolean>`${isOpen}`)
  if (asked.roomId !== undefined) query = query.where('place.room_id', '=', asked.roomId)
  if (asked.isOut !== undefined) {
    const out = sql<boolean>`exists (select 1 from carry_piece
      where carry_piece.site_id = piece.site_id and carry_piece.piece_id = piece.id
        and carry_piece.out_at is not null and carry_piece.back_at is null)`
    query = query.where(asked.isOut ? out : sql<boolean>`not ${out}`)
  }
  if (asked.after !== undefined) {
    const { key: afterKey, id } = asked.after
    query = query.where(
      asked.isDescending
        ? sql<boolean>`(${key}, piece.id) < (${afterKey} collate "C", ${id}::int)`
        : sql<boolean>`(${key}, piece.id) > (${afterKey} collate "C", ${id}::int)`,
    )
  }
  const way = asked.isDescending ? 'desc' : 'asc'
  const rows = await query
    .select(key.as('sort_key'))
    .orderBy(key, way)
    .orderBy('piece.id', way)
    .limit(asked.limit + 1)
    .execute()
  return rows.map((row) => ({ ...pieceOf(row), sortKey: row.sort_key }))
}
