import type { Kysely } from 'kysely'
import type { DemoMail } from '@/lib/sites/demo'
import type { Database } from '../schema'

/** The mails that the demo kept instead of sending, newest first; those before `beforeId`, where one is given. */
export async function listDemoMail(
  db: Kysely<Database>,
  options: { limit: number; beforeId?: number },
): Promise<DemoMail[]> {
  const rows = await db
    .selectFrom('demo_mail')
    .$if(options.beforeId !== undefined, (query) => query.where('id', '<', options.beforeId ?? 0))
    .select(['id', 'at', 'sender', 'recipients', 'subject', 'text_body'])
    .orderBy('id', 'desc')
    .limit(options.limit)
    .execute()
  return rows.map((row) => ({
    id: String(row.id),
    at: row.at.toISOString(),
    from: row.sender,
    to: row.recipients,
    subject: row.subject,
    text: row.text_body,
  }))
}
