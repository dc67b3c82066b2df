import { type Kysely, sql, type Transaction } from 'kysely'
import { refusalReasonSchema, type Refusal, type RefusalReason } from '@/lib/readings/refusal'
import type { Database } from '../schema'

/** Kept for each site: the newest of them. Older ones live on in the counts. */
export const REFUSED_KEPT = 1_000

export interface NewRefused extends Refusal {
  siteId: number
  sensorId: number
  at: Date
  topic: string
  sizeBytes: number
  /** The first 64 bytes. */
  headHex: string
}

/** Records messages that could not be used, and lets the oldest of their sites go. */
export async function insertRefused(
  trx: Transaction<Database>,
  refused: readonly NewRefused[],
): Promise<void> {
  if (refused.length === 0) return
  await sql`
    insert into refused (site_id, sensor_id, at, topic, reason, field, detail, size_bytes, head_hex)
    select g.site_id, g.sensor_id, g.at, g.topic, g.reason, g.field, g.detail, g.size_bytes, g.head_hex
    from unnest(
      ${refused.map((one) => one.siteId)}::int[],
      ${refused.map((one) => one.sensorId)}::int[],
      ${refused.map((one) => one.at.toISOString())}::timestamptz[],
      ${refused.map((one) => one.topic)}::text[],
      ${refused.map((one) => one.reason)}::text[],
      ${refused.map((one) => one.field)}::text[],
      ${refused.map((one) => one.detail)}::text[],
      ${refused.map((one) => one.sizeBytes)}::int[],
      ${refused.map((one) => one.headHex)}::text[]
    ) with ordinality as g (site_id, sensor_id, at, topic, reason, field, detail, size_bytes, head_hex, place)
    join sensor on sensor.site_id = g.site_id and sensor.id = g.sensor_id
    order by g.place`.execute(trx)
  const sites = [...new Set(refused.map((one) => one.siteId))].sort((a, b) => a - b)
  for (const siteId of sites)
    await sql`
      delete from refused where site_id = ${siteId} and id <= (
        select id from refused where site_id = ${siteId} order by id desc offset ${REFUSED_KEPT} limit 1
      )`.execute(trx)
}

export interface RefusedRecord {
  id: number
  at: Date
  sensorCode: string | null
  sensorName: string | null
  topic: string
  reason: RefusalReason
  field: string | null
  detail: string
  sizeBytes: number
  headHex: string
}

/** The newest refused messages of a site, or of one sensor of it; `beforeId` continues a list. */
export async function listRefused(
  db: Kysely<Database>,
  siteId: number,
  options: { limit: number; sensorId?: number; beforeId?: number },
): Promise<RefusedRecord[]> {
  const { limit, sensorId, beforeId } = options
  const rows = await db
    .selectFrom('refused')
    .leftJoin('sensor', (join) =>
      join.onRef('sensor.site_id', '=', 'refused.site_id').onRef('sensor.id', '=', 'refused.sensor_id'),
    )
    .where('refused.site_id', '=', siteId)
    .$if(sensorId !== undefined, (query) => query.where('refused.sensor_id', '=', sensorId ?? 0))
    .$if(beforeId !== undefined, (query) => query.where('refused.id', '<', beforeId ?? 0))
    .select([
      'refused.id',
      'refused.at',
      'refused.topic',
      'refused.reason',
      'refused.field',
      'refused.detail',
      'refused.size_bytes',
      'refused.head_hex',
      'sensor.code as sensor_code',
      'sensor.name as sensor_name',
    ])
    .orderBy('refused.id', 'desc')
    .limit(limit)
    .execute()
  return rows.map((row) => ({
    id: row.id,
    at: row.at,
    sensorCode: row.sensor_code,
    sensorName: row.sensor_name,
    topic: row.topic,
    reason: refusalReasonSchema.parse(row.reason),
    field: row.field,
    detail: row.detail,
    sizeBytes: row.size_bytes,
    headHex: row.head_hex,
  }))
}
