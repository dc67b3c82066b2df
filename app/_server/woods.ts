import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import type { SiteMember } from '@/db/queries/members'
import { findSiteWood, listSiteWoods } from '@/db/queries/site-woods'
import type { Database } from '@/db/schema'
import type { WoodKind } from '@/lib/pieces/piece'
import { ok } from '@/lib/result'
import { findWoods, inOrder } from '@/lib/wood/find-woods'
import {
  type ResolvedWood,
  resolvedOwnWood,
  resolveWood,
  type SiteWood,
  ownWoodCode,
} from '@/lib/wood/site-wood'
import { SPECIES } from '@/lib/wood/species'
import { type Wood, type WoodChoice, woodChoice, woodView } from '@/lib/wood/wood'
import { decodeCursor, listQueryShape, type Page, pageOf } from './list'
import { failField, notThere, type Outcome } from './problem'

export const woodsQuerySchema = z.strictObject({
  q: z.string().trim().max(60).optional(),
  /** The site's own woods that were put away, and nothing else. */
  away: z.enum(['yes', 'no']).default('no'),
  ...listQueryShape(['best', 'name', '-name']),
})
export type WoodsQuery = z.output<typeof woodsQuerySchema>

const cursorSchema = z.strictObject({ slug: z.string().max(60) })

/** Every wood that can be chosen at a site: the table's, with the site's figures where it has them, and its own. */
export async function offeredWoods(db: Kysely<Database>, siteId: number): Promise<Wood[]> {
  return woodsOf(await listSiteWoods(db, siteId), false)
}

/** The site's own woods that were put away. */
export async function awayWoods(db: Kysely<Database>, siteId: number): Promise<Wood[]> {
  return woodsOf(await listSiteWoods(db, siteId), true)
}

/** The offered ones as the field for a piece's wood needs them, with the one that the piece has, even when it was put away. */
export async function woodChoices(
  db: Kysely<Database>,
  siteId: number,
  current: string | null = null,
): Promise<WoodChoice[]> {
  const rows = await listSiteWoods(db, siteId)
  const offered = woodsOf(rows, false)
  const own = offered.some((wood) => wood.slug === current) ? undefined : resolveWood(current, rows)
  return [...offered, ...(own === undefined ? [] : [woodView(own, undefined)])].map(woodChoice)
}

function woodsOf(rows: readonly SiteWood[], away: boolean): Wood[] {
  const own = rows.filter((row) => row.overrides === null && row.isArchived === away)
  const views = own.map((row) => woodView(resolvedOwnWood(row), row))
  if (away) return views.toSorted(inOrder)
  const ofTable = SPECIES.map((species) => {
    const row = rows.find((one) => one.overrides === species.slug && !one.isArchived)
    return woodView(resolveWood(species.slug, rows) ?? species, row)
  })
  return [...views, ...ofTable].toSorted(inOrder)
}

/** With a search, its kind of wood too: "burr walnut" asks for walnut with wild grain. */
export type WoodPage = Page<Wood> & { suggestedKind: WoodKind | null }

export async function listWoods(
  db: Kysely<Database>,
  member: SiteMember,
  query: WoodsQuery,
): Promise<Outcome<WoodPage>> {
  const after = query.cursor === undefined ? undefined : decodeCursor(query.cursor, cursorSchema)
  const rows = await listSiteWoods(db, member.siteId)
  const found = findWoods(query.q ?? '', woodsOf(rows, query.away === 'yes'))
  const woods = inAskedOrder(found.woods, query.sort)
  const last = after === undefined ? -1 : woods.findIndex((wood) => wood.slug === after.slug)
  if (query.cursor !== undefined && last < 0)
    return failField('malformed', 'cursor', 'was not given out here')
  const page = pageOf(woods.slice(last + 1), query.limit, ({ slug }) => ({ slug }))
  return ok({ ...page, suggestedKind: found.suggestedKind ?? null })
}

function inAskedOrder(woods: readonly Wood[], sort: WoodsQuery['sort']): readonly Wood[] {
  if (sort === 'best') return woods
  const byName = woods.toSorted((a, b) => inOrder({ ...a, isOwn: false }, { ...b, isOwn: false }))
  return sort === 'name' ? byName : byName.toReversed()
}

/** One wood, as it counts at the site. One of its own that was put away is there still, for what was made of it. */
export async function getWood(
  db: Kysely<Database>,
  member: SiteMember,
  wood: string,
): Promise<Outcome<Wood>> {
  const isOwn = ownWoodCode(wood) !== undefined
  const row = await findSiteWood(db, member.siteId, wood, { withArchived: isOwn })
  const resolved: ResolvedWood | undefined = resolveWood(wood, row === undefined ? [] : [row])
  return resolved === undefined ? notThere() : ok(woodView(resolved, row))
}
