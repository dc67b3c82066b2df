import type { Kysely } from 'kysely'
import { z } from 'zod'
import type { Database } from '../schema'

/** One try to tell one person of one notice by one channel. */
export interface TryRecord {
  noticeId: number
  userId: string
  userName: string
  channel: 'mail' | 'push'
  at: Date
  outcome: 'sent' | 'failed' | 'given-up'
  detail: string
}

const channelSchema = z.enum(['mail', 'push'])
const outcomeSchema = z.enum(['sent', 'failed', 'given-up'])

/** Every try to send these notices, oldest first. */
export async function listTries(
  db: Kysely<Database>,
  siteId: number,
  noticeIds: readonly number[],
): Promise<TryRecord[]> {
  if (noticeIds.length === 0) return []
  const rows = await db
    .selectFrom('delivery_try as try')
    .innerJoin('user', 'user.id', 'try.user_id')
    .where('try.site_id', '=', siteId)
    .where('try.notice_id', 'in', noticeIds)
    .select([
      'try.notice_id',
      'try.user_id',
      'user.name',
      'try.channel',
      'try.at',
      'try.outcome',
      'try.detail',
    ])
    .orderBy('try.at')
    .orderBy('try.id')
    .execute()
  return rows.map((row) => ({
    noticeId: row.notice_id,
    userId: row.user_id,
    userName: row.name,
    channel: channelSchema.parse(row.channel),
    at: row.at,
    outcome: outcomeSchema.parse(row.outcome),
    detail: row.detail,
  }))
}
