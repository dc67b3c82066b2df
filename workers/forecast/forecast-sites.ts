import type { Kysely } from 'kysely'
import { listNoticeSites } from '@/db/queries/notice-state'
import type { Database } from '@/db/schema'
import { forecastSite, WAIT_MS } from './forecast-site'

const HOUR_MS = 3_600_000
/** A site whose rooms have no forecast yet is looked at this often: its record may just have come in. */
const AGAIN_MS = 10 * 60_000

export interface ForecastTurn {
  /** Called now and then; does something for each site once an hour. */
  run(
    now: Date,
    onError: (siteCode: string, error: unknown) => void,
  ): Promise<{ made: number; scored: number }>
}

/** Goes round the sites and remembers, while the process runs, which of them are done for the hour. */
export function forecastTurn(db: Kysely<Database>): ForecastTurn {
  const doneUntil = new Map<number, number>()
  return {
    async run(now, onError) {
      const total = { made: 0, scored: 0 }
      if (now.getTime() % HOUR_MS < WAIT_MS) return total
      for (const site of await listNoticeSites(db)) {
        if ((doneUntil.get(site.siteId) ?? 0) > now.getTime()) continue
        try {
          const { made, scored } = await forecastSite(db, site, now)
          total.made += made
          total.scored += scored
          const next = (Math.floor(now.getTime() / HOUR_MS) + 1) * HOUR_MS + WAIT_MS
          doneUntil.set(site.siteId, made > 0 ? next : Math.min(next, now.getTime() + AGAIN_MS))
        } catch (error) {
          onError(site.siteCode, error)
        }
      }
      return total
    },
  }
}
