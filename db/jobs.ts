import { runMigrations } from 'graphile-worker'
import { type Kysely, sql } from 'kysely'
import type { Database } from './schema'

/** Makes the job queue's own tables, in a schema of their own. Does nothing when they are up to date. */
export const migrateJobs = (databaseUrl: string): Promise<void> =>
  runMigrations({ connectionString: databaseUrl })

/** Sends what waits for one person. One job at a time for each person, so that the order of the notices is kept. */
export const mailPersonTask = 'mail_person'

/**
 * Queues the sending of a person's mail, in the transaction that made the mail. Asked twice for the same moment it
 * stays one job, and one that was failing is tried again at once.
 */
export async function queueMail(db: Kysely<Database>, userId: string, runAt: Date | null): Promise<void> {
  const key = `mail ${userId} ${runAt === null ? 'now' : runAt.toISOString()}`
  await sql`
    select graphile_worker.add_job(
      ${mailPersonTask}::text,
      payload := ${JSON.stringify({ userId })}::json,
      queue_name := ${`mail ${userId}`}::text,
      run_at := coalesce(${runAt}::timestamptz, now()),
      job_key := ${key}::text
    )`.execute(db)
}
