import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'
import { deleteOldForecasts } from './forecasts'
import { deleteOldAnswers } from './idempotency'
import { ensurePartitions, monthsAhead } from './partitions'
import { deleteOldCounts } from './rate-counts'
import { deleteExpiredLinks } from './used-links'

/** Refused messages kept for each site; the newest stay. */
const refusedKept = 1_000
/** Notices that are older are no longer of use to anybody. A guess. */
const noticesKeptDays = 400

/** What has to be done now and then and may be done twice: room for the months to come, and old things out. */
export async function doUpkeep(db: Kysely<Database>, now: Date): Promise<void> {
  await ensurePartitions(db, monthsAhead(now))
  await deleteOldAnswers(db, now)
  await deleteOldCounts(db, now)
  await deleteOldForecasts(db, now)
  await deleteExpiredLinks(db, now)
  await sql`
    delete from refused using (
      select site_id, id from (
        select site_id, id, row_number() over (partition by site_id order by id desc) as place from refused
      ) as ranked where place > ${refusedKept}
    ) as old
    where refused.site_id = old.site_id and refused.id = old.id`.execute(db)
  await db
    .deleteFrom('notice')
    .where('at', '<', new Date(now.getTime() - noticesKeptDays * 86_400_000))
    .execute()
  await db.deleteFrom('session').where('expiresAt', '<', now).execute()
}
