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

/** Decides for one site and stores what was decided, all in one transaction. Returns how many notices are new. */
export function evaluateSite(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  baseUrl: string,
): Promise<number> {
  const host = new URL(baseUrl).hostname
  return db.transaction().execute(async (trx) => {
    if (!(await takeSiteForNotices(trx, site.siteId))) return 0
    const state = await loadNoticeState(trx, site.siteId, now)
    const inputs = await loadNoticeInputs(trx, site, now)
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
): Promise<number> {
  let told = 0
  for (const site of await listNoticeSites(db)) {
    try {
      told += await evaluateSite(db, site, now, baseUrl)
    } catch (error) {
      onError(site.siteCode, error)
    }
  }
  return told
}
