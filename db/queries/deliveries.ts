import type { Kysely } from 'kysely'
import { z } from 'zod'
import { ruleSchema, type Rule } from '@/lib/notices/notice'
import { queueMail } from '../jobs'
import type { Database } from '../schema'

export interface WaitingMail {
  siteId: number
  noticeId: number
  userId: string
  messageId: string
  tries: number
  address: string
  siteCode: string
  siteName: string
  rule: Rule
  urgency: 'now' | 'soon' | 'whenever'
  title: string
  body: string
  link: string
  noticeAt: Date
  /** What it was about has ended since. */
  isOver: boolean
}

/** A person's mail that is due, in the order in which the notices were made. */
export async function listWaitingMail(
  db: Kysely<Database>,
  userId: string,
  now: Date,
): Promise<WaitingMail[]> {
  const rows = await db
    .selectFrom('delivery')
    .innerJoin('notice', (join) =>
      join.onRef('notice.site_id', '=', 'delivery.site_id').onRef('notice.id', '=', 'delivery.notice_id'),
    )
    .innerJoin('site', 'site.id', 'delivery.site_id')
    .innerJoin('user', 'user.id', 'delivery.user_id')
    .leftJoin('episode', (join) =>
      join.onRef('episode.site_id', '=', 'notice.site_id').onRef('episode.id', '=', 'notice.episode_id'),
    )
    .where('delivery.user_id', '=', userId)
    .where('delivery.channel', '=', 'mail')
    .where('delivery.state', 'in', ['held', 'waiting'])
    .where((eb) => eb.or([eb('delivery.hold_until', 'is', null), eb('delivery.hold_until', '<=', now)]))
    .select([
      'delivery.site_id',
      'delivery.notice_id',
      'delivery.message_id',
      'delivery.tries',
      'user.email',
      'site.code as site_code',
      'site.name as site_name',
      'notice.rule',
      'notice.urgency',
      'notice.title',
      'notice.body',
      'notice.link',
      'notice.at',
      'episode.state as episode_state',
    ])
    .orderBy('notice.at')
    .orderBy('notice.site_id')
    .orderBy('notice.id')
    .limit(200)
    .execute()
  return rows.map((row) => ({
    siteId: row.site_id,
    noticeId: row.notice_id,
    userId,
    messageId: row.message_id,
    tries: row.tries,
    address: row.email,
    siteCode: row.site_code,
    siteName: row.site_name,
    rule: ruleSchema.parse(row.rule),
    urgency: urgencySchema.parse(row.urgency),
    title: row.title,
    body: row.body,
    link: row.link,
    noticeAt: row.at,
    isOver: row.episode_state === 'over',
  }))
}

const urgencySchema = z.enum(['now', 'soon', 'whenever'])

export type DeliveryOutcome =
  { state: 'sent'; at: Date } | { state: 'waiting'; error: string } | { state: 'given-up'; error: string }

/** Sets down how a try went. */
export async function storeDeliveryOutcome(
  db: Kysely<Database>,
  siteId: number,
  mail: { noticeId: number; userId: string },
  outcome: DeliveryOutcome,
): Promise<void> {
  await db
    .updateTable('delivery')
    .set((eb) => ({
      state: outcome.state,
      tries: eb('tries', '+', 1),
      sent_at: outcome.state === 'sent' ? outcome.at : null,
      last_error: outcome.state === 'sent' ? null : outcome.error.slice(0, 500),
    }))
    .where('site_id', '=', siteId)
    .where('notice_id', '=', mail.noticeId)
    .where('user_id', '=', mail.userId)
    .where('channel', '=', 'mail')
    .execute()
}

/** Queues the people anew whose mail is due and still waits, so that a long back-off never outlasts an outage for long. */
export async function requeueWaitingMail(db: Kysely<Database>, now: Date): Promise<number> {
  const people = await db
    .selectFrom('delivery')
    .where('state', 'in', ['held', 'waiting'])
    .where((eb) => eb.or([eb('hold_until', 'is', null), eb('hold_until', '<=', now)]))
    .select('user_id')
    .distinct()
    .execute()
  for (const { user_id } of people) await queueMail(db, user_id, null)
  return people.length
}
