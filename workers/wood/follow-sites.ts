import type { Kysely } from 'kysely'
import { followPieces, type FollowCounts } from '@/db/queries/follow-pieces'
import { listNoticeSites } from '@/db/queries/notice-state'
import type { Database } from '@/db/schema'

/**
 * Brings the wood of every piece forward to the last whole hour, site by site, and makes anew what late or corrected
 * readings have changed. A site that fails is told of and does not hold up the others.
 */
export async function followSites(
  db: Kysely<Database>,
  now: Date,
  onError: (siteCode: string, error: unknown) => void,
): Promise<FollowCounts> {
  const total = { carriedOn: 0, rebuilt: 0 }
  for (const site of await listNoticeSites(db)) {
    try {
      const counts = await followPieces(db, site, null, now)
      total.carriedOn += counts.carriedOn
      total.rebuilt += counts.rebuilt
    } catch (error) {
      onError(site.siteCode, error)
    }
  }
  return total
}
