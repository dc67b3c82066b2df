import { type Kysely, sql, type Transaction } from 'kysely'
import type { Database } from '../schema'

/** What can happen to a message other than being simply stored. */
export type IngestKind = 'duplicate' | 'conflict' | 'late' | 'refused'

export interface IngestCount {
  siteId: number
  sensorId: number
  kind: IngestKind
  n: number
}

/** Adds to the counts of the site's day, in the order of their key. */
export async function addIngestCounts(
  trx: Transaction<Database>,
  counts: readonly IngestCount[],
  now: Date,
): Promise<void> {
  if (counts.length === 0) return
  await sql`
    insert into ingest_count as c (site_id, sensor_id, day_on, kind, n)
    select g.site_id, g.sensor_id, (${now}::timestamptz at time zone site.time_zone)::date as day_on, g.kind, sum(g.n)
    from unnest(
      ${counts.map((one) => one.siteId)}::int[],
      ${counts.map((one) => one.sensorId)}::int[],
      ${counts.map((one) => one.kind)}::text[],
      ${counts.map((one) => one.n)}::int[]
    ) as g (site_id, sensor_id, kind, n)
    join site on site.id = g.site_id
    join sensor on sensor.site_id = g.site_id and sensor.id = g.sensor_id
    group by g.site_id, g.sensor_id, day_on, g.kind
    order by g.site_id, g.sensor_id, day_on, g.kind
    on conflict (site_id, sensor_id, day_on, kind) do update set n = c.n + excluded.n`.execute(trx)
}

/** A sensor's counts of one of the site's days, by kind. */
export async function findIngestCounts(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
  dayOn: string,
): Promise<Map<string, number>> {
  const rows = await db
    .selectFrom('ingest_count')
    .where('site_id', '=', siteId)
    .where('sensor_id', '=', sensorId)
    .where('day_on', '=', dayOn)
    .select(['kind', 'n'])
    .execute()
  return new Map(rows.map((row) => [row.kind, row.n]))
}

/** What came from nobody we know, so that no site can be told. */
export type StrayKind =
  'bad-sign-in' | 'bad-client-id' | 'bad-protocol' | 'too-large' | 'too-many' | 'unstorable'

export async function addStrayCounts(
  db: Kysely<Database>,
  counts: ReadonlyMap<StrayKind, number>,
  now: Date,
): Promise<void> {
  if (counts.size === 0) return
  await sql`
    insert into stray_count as c (day_on, kind, n)
    select (${now}::timestamptz at time zone 'UTC')::date, g.kind, g.n
    from unnest(${[...counts.keys()]}::text[], ${[...counts.values()]}::int[]) as g (kind, n)
    order by g.kind
    on conflict (day_on, kind) do update set n = c.n + excluded.n`.execute(db)
}
