import type { Kysely } from 'kysely'
import {
  listNoticeSites,
  loadNoticeState,
  type NoticeSite,
  storeEpisodes,
  storeNotices,
  takeSiteForNotices,
} from '@/db/queries/notice-state'
import type { Database } from '@/db/schema'
import { decideNotices } from '@/lib/notices/decide'
import { loadNoticeInputs } from './inputs'
import type { CostlyFacts } from './surroundings'

/**
 * Decides for one site and stores what was decided, all in one transaction.
 * @returns how many notices are new; null where somebody else was at it
 */
export function evaluateSite(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  baseUrl: string,
  costly?: CostlyFacts,
): Promise<number | null> {
  const host = new URL(baseUrl).hostname
  return db.transaction().execute(async (trx) => {
    if (!(await takeSiteForNotices(trx, site.siteId))) return null
    const state = await loadNoticeState(trx, site.siteId, now)
    const inputs = await loadNoticeInputs(trx, site, now, costly)
    const decision = decideNotices(now.getTime(), state, inputs)
    const episodes = await storeEpisodes(trx, site.siteId, now, decision.episodes)
    return storeNotices(
      trx,
      site.siteId,
      now,
      decision.notices,
      episodes,
      (noticeCode, userId) => `<${noticeCode}.${userId.toLowerCase()}@${host}>`,
    )
  })
}

/** Every site in turn. One site's trouble must not keep the others from being told. */
export async function evaluateAll(
  db: Kysely<Database>,
  now: Date,
  baseUrl: string,
  onError: (siteCode: string, error: unknown) => void,
  costly: CostlyFacts = new Map(),
  isStopping: () => boolean = () => false,
): Promise<number> {
  let told = 0
  for (const site of await listNoticeSites(db)) {
    if (isStopping()) break
    try {
      told += (await evaluateSite(db, site, now, baseUrl, costly)) ?? 0
    } catch (error) {
      onError(site.siteCode, error)
    }
  }
  return told
}
