import type { Kysely } from 'kysely'
import { listNoticeSites } from '@/db/queries/notice-state'
import { makeComingCarries } from '@/db/queries/repeat-carries'
import type { Database } from '@/db/schema'

/** Makes the coming carries of every site's repeats. One site's trouble must not keep the others from theirs. */
export async function makeRepeats(
  db: Kysely<Database>,
  now: Date,
  onError: (siteCode: string, error: unknown) => void,
): Promise<number> {
  let made = 0
  for (const site of await listNoticeSites(db)) {
    try {
      made += await makeComingCarries(db, site, now)
    } catch (error) {
      onError(site.siteCode, error)
    }
  }
  return made
}
