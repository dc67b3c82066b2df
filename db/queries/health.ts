import { type Kysely } from 'kysely'
import type { Database } from '../schema'

export interface HealthFacts {
  /** When the broker last said that it is alive. */
  brokerBeatAt: Date | null
  /** The measured time of the newest reading of all sites. */
  newestReadingAt: Date | null
}

/** Two looks at small tables: machines may ask this every few seconds. */
export async function readHealthFacts(db: Kysely<Database>): Promise<HealthFacts> {
  const row = await db
    .selectNoFrom((eb) => [
      eb.selectFrom('heartbeat').where('part', '=', 'broker').select('at').as('broker_beat_at'),
      eb
        .selectFrom('sensor_state')
        .select((inner) => inner.fn.max('at').as('at'))
        .as('newest_reading_at'),
    ])
    .executeTakeFirstOrThrow()
  return { brokerBeatAt: row.broker_beat_at, newestReadingAt: row.newest_reading_at }
}
