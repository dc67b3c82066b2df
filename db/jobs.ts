import { runMigrations } from 'graphile-worker'
import { type Kysely, sql } from 'kysely'
import type { Channel } from '@/lib/notices/inputs'
import type { Database } from './schema'

/** Makes the job queue's own tables, in a schema of their own. Does nothing when they are up to date. */
export const migrateJobs = (databaseUrl: string): Promise<void> =>
  runMigrations({ connectionString: databaseUrl })

/** Sends what waits for one person by one channel. One job at a time for each, so that the order of the notices is kept. */
export const personTasks: Readonly<Record<Channel, string>> = { mail: 'mail_person', push: 'push_person' }

/**
 * Queues the sending of what waits for a person, in the transaction that made it. Asked twice for the same moment it
 * stays one job, and one that was failing is tried again at once.
 */
export async function queueDelivery(
  db: Kysely<Database>,
  userId: string,
  channel: Channel,
  runAt: Date | null,
): Promise<void> {
  const key = `${channel} ${userId} ${runAt === null ? 'now' : runAt.toISOString()}`
  await sql`
    select graphile_worker.add_job(
      ${personTasks[channel]}::text,
      payload := ${JSON.stringify({ userId })}::json,
      queue_name := ${`${channel} ${userId}`}::text,
      run_at := coalesce(${runAt}::timestamptz, now()),
      job_key := ${key}::text
    )`.execute(db)
}
