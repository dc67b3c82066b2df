import type { Kysely } from 'kysely'
import { listNoticeSites } from '@/db/queries/notice-state'
import type { Database } from '@/db/schema'
import { evaluateSite } from './evaluate'
import type { CostlyFacts } from './surroundings'

/**
 * Decides for the sites whose air was read since the last time, and takes them out of `heard`; one that somebody else is
 * deciding for just now may have been looked at without that reading, so it stays in.
 * @param heard numbers of sites; added to by whoever hears of a reading
 * @returns how many notices are new
 */
export async function evaluateHeard(
  db: Kysely<Database>,
  heard: Set<number>,
  now: Date,
  baseUrl: string,
  onError: (siteCode: string, error: unknown) => void,
  costly: CostlyFacts = new Map(),
): Promise<number> {
  if (heard.size === 0) return 0
  const due = new Set(heard)
  // Before anything is loaded: a reading that comes while these are decided counts for the next time.
  heard.clear()
  let told = 0
  for (const site of await listNoticeSites(db)) {
    if (!due.has(site.siteId)) continue
    try {
      const made = await evaluateSite(db, site, now, baseUrl, costly)
      if (made === null) heard.add(site.siteId)
      else told += made
    } catch (error) {
      onError(site.siteCode, error)
    }
  }
  return told
}
