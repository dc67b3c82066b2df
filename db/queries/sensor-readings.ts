import type { Kysely } from 'kysely'
import type { Database } from '../schema'

export interface StoredReading {
  at: Date
  temperatureC: number
  humidityPct: number
}

/** One sensor's readings, newest first; one more than asked for, which says that there is a next page. */
export async function listSensorReadings(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
  asked: { from: Date; to: Date; limit: number; before?: Date },
): Promise<StoredReading[]> {
  const { before } = asked
  const rows = await db
    .selectFrom('reading')
    .where('site_id', '=', siteId)
    .where('sensor_id', '=', sensorId)
    .where('at', '>=', asked.from)
    .where('at', '<', asked.to)
    .$if(before !== undefined, (query) => query.where('at', '<', before ?? asked.to))
    .select(['at', 'temperature_c', 'humidity_pct'])
    .orderBy('at', 'desc')
    .limit(asked.limit + 1)
    .execute()
  return rows.map((row) => ({
    at: row.at,
    temperatureC: row.temperature_c,
    humidityPct: row.humidity_pct,
  }))
}
