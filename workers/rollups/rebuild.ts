import type { Kysely } from 'kysely'
import { rebuildSiteFigures } from '@/db/queries/rollups'
import type { Database } from '@/db/schema'

export interface Rebuilt {
  siteCode: string
  ms: number
}

/**
 * Makes the hourly and daily figures of one site, or of all, again from their readings. Never needed in the course of
 * things: a changed placement or zone does its own part. For after a repair by hand.
 */
export async function rebuild(
  db: Kysely<Database>,
  siteCode: string | undefined,
  onDone: (rebuilt: Rebuilt) => void,
): Promise<number> {
  const sites = await db
    .selectFrom('site')
    .$if(siteCode !== undefined, (query) => query.where('code', '=', siteCode ?? ''))
    .select(['id', 'code'])
    .orderBy('id')
    .execute()
  for (const site of sites) {
    const startedAt = performance.now()
    await rebuildSiteFigures(db, site.id)
    onDone({ siteCode: site.code, ms: Math.round(performance.now() - startedAt) })
  }
  return sites.length
}
