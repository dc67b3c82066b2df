import { type Kysely, sql } from 'kysely'
import type { SensorAddress } from '@/lib/readings/topic'
import type { Database } from '../schema'

/** What the broker needs to know of a sensor that signs in. */
export interface SensorCredential {
  siteId: number
  sensorId: number
  secretHash: string
  /** A sensor that was removed from its site may not sign in any more. */
  isArchived: boolean
}

/** The credential behind a sign-in name; the rows of typed readings have none. */
export async function findSensorCredential(
  db: Kysely<Database>,
  { siteCode, sensorCode }: SensorAddress,
): Promise<SensorCredential | undefined> {
  const row = await db
    .selectFrom('sensor')
    .innerJoin('site', 'site.id', 'sensor.site_id')
    .where('site.code', '=', siteCode)
    .where('sensor.code', '=', sensorCode)
    .select(['sensor.site_id', 'sensor.id', 'sensor.secret_hash', 'sensor.archived_at'])
    .executeTakeFirst()
  if (!row || row.secret_hash === null) return undefined
  return {
    siteId: row.site_id,
    sensorId: row.id,
    secretHash: row.secret_hash,
    isArchived: row.archived_at !== null,
  }
}

export interface HeldCredential {
  siteId: number
  sensorId: number
  secretHash: string
}

/** Of these credentials, those that still open the door: not renewed since, and their sensor not removed. */
export async function listValidCredentials(
  db: Kysely<Database>,
  held: readonly HeldCredential[],
): Promise<HeldCredential[]> {
  if (held.length === 0) return []
  const { rows } = await sql<{ site_id: number; sensor_id: number; secret_hash: string }>`
    select held.site_id, held.sensor_id, held.secret_hash
    from unnest(
      ${held.map((one) => one.siteId)}::int[],
      ${held.map((one) => one.sensorId)}::int[],
      ${held.map((one) => one.secretHash)}::text[]
    ) as held (site_id, sensor_id, secret_hash)
    join sensor on sensor.site_id = held.site_id and sensor.id = held.sensor_id
      and sensor.secret_hash = held.secret_hash and sensor.archived_at is null`.execute(db)
  return rows.map((row) => ({ siteId: row.site_id, sensorId: row.sensor_id, secretHash: row.secret_hash }))
}
