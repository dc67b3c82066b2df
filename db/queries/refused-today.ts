import type { Kysely } from 'kysely'
import type { Database } from '../schema'

/** How many messages of each sensor could not be used on one of the site's days. */
export async function countRefusedBySensor(
  db: Kysely<Database>,
  siteId: number,
  dayOn: string,
): Promise<Map<number, number>> {
  const rows = await db
    .selectFrom('ingest_count')
    .where('site_id', '=', siteId)
    .where('day_on', '=', dayOn)
    .where('kind', '=', 'refused')
    .select(['sensor_id', 'n'])
    .execute()
  return new Map(rows.map((row) => [row.sensor_id, row.n]))
}
