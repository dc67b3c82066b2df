import { type Kysely, sql } from 'kysely'
import { z } from 'zod'
import type { Channel } from '@/lib/notices/inputs'
import { type Mark, markSchema, ruleSchema, type Rule } from '@/lib/notices/notice'
import { queueDelivery } from '../jobs'
import type { Database } from '../schema'

/** One notice that is due to one person by one channel. */
export interface DueDelivery {
  siteId: number
  noticeId: number
  userId: string
  messageId: string
  tries: number
  address: string
  siteCode: string
  siteName: string
  siteTimeZone: string
  /** The person's own; null: the site's. */
  ownTimeZone: string | null
  sessionUntil: Date | null
  rule: Rule
  mark: Mark
  urgency: 'now' | 'soon' | 'whenever'
  noticeCode: string
  title: string
  body: string
  link: string
  noticeAt: Date
  /** When it was to go: the notice's own time, or the end of what held it. */
  dueAt: Date
  /** What it was about has ended since. */
  isOver: boolean
  /** Somebody has acknowledged or answered it since. */
  isTaken: boolean
}

/** More than a mail shows; the rest is counted there. */
const dueMost = 2_000

/** What is due to a person by a channel, in the order in which the notices were made. */
export async function listDue(
  db: Kysely<Database>,
  userId: string,
  channel: Channel,
  now: Date,
): Promise<DueDelivery[]> {
  const rows = await db
    .selectFrom('delivery')
    .innerJoin('notice', (join) =>
      join.onRef('notice.site_id', '=', 'delivery.site_id').onRef('notice.id', '=', 'delivery.notice_id'),
    )
    .innerJoin('site', 'site.id', 'delivery.site_id')
    .innerJoin('user', 'user.id', 'delivery.user_id')
    // Who has left the site since is told nothing more of it.
    .innerJoin('member', (join) =>
      join
        .onRef('member.organizationId', '=', 'site.organization_id')
        .onRef('member.userId', '=', 'delivery.user_id'),
    )
    .leftJoin('member_setting as setting', (join) =>
      join
        .onRef('setting.site_id', '=', 'delivery.site_id')
        .onRef('setting.user_id', '=', 'delivery.user_id'),
    )
    .leftJoin('episode', (join) =>
      join.onRef('episode.site_id', '=', 'notice.site_id').onRef('episode.id', '=', 'notice.episode_id'),
    )
    .where('delivery.user_id', '=', userId)
    .where('delivery.channel', '=', channel)
    .where('delivery.state', 'in', ['held', 'waiting'])
    .where((eb) => eb.or([eb('delivery.hold_until', 'is', null), eb('delivery.hold_until', '<=', now)]))
    .select((eb) => [
      'delivery.site_id',
      'delivery.notice_id',
      'delivery.message_id',
      'delivery.tries',
      'delivery.hold_until',
      'user.email',
      'site.code as site_code',
      'site.name as site_name',
      'site.time_zone as site_time_zone',
      'setting.time_zone as own_time_zone',
      'setting.session_until',
      'notice.rule',
      'notice.mark',
      'notice.urgency',
      'notice.code',
      'notice.title',
      'notice.body',
      'notice.link',
      'notice.at',
      'notice.acknowledged_at',
      'episode.state as episode_state',
      eb
        .exists(
          eb
            .selectFrom('notice_answer as answer')
            .whereRef('answer.site_id', '=', 'notice.site_id')
            .whereRef('answer.notice_id', '=', 'notice.id')
            .where('answer.answer', 'in', ['in', 'going', 'nothing'])
            .select(sql`1`.as('one')),
        )
        .as('is_answered'),
    ])
    .orderBy('notice.at')
    .orderBy('notice.site_id')
    .orderBy('notice.id')
    .limit(dueMost)
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
    siteTimeZone: row.site_time_zone,
    ownTimeZone: row.own_time_zone,
    sessionUntil: row.session_until,
    rule: ruleSchema.parse(row.rule),
    mark: markSchema.parse(row.mark),
    urgency: urgencySchema.parse(row.urgency),
    noticeCode: row.code,
    title: row.title,
    body: row.body,
    link: row.link,
    noticeAt: row.at,
    dueAt: row.hold_until ?? row.at,
    isOver: row.episode_state === 'over',
    isTaken: row.acknowledged_at !== null || Boolean(row.is_answered),
  }))
}

const urgencySchema = z.enum(['now', 'soon', 'whenever'])

/** Deliveries of one site to one person by one channel. */
export interface DeliveryGroup {
  siteId: number
  userId: string
  channel: Channel
  noticeIds: readonly number[]
}

const updateGroup = (db: Kysely<Database>, group: DeliveryGroup) =>
  db
    .updateTable('delivery')
    .where('site_id', '=', group.siteId)
    .where('user_id', '=', group.userId)
    .where('channel', '=', group.channel)
    .where((eb) => eb('notice_id', '=', eb.fn.any(sql<number[]>`${group.noticeIds}::int[]`)))

/**
 * Sets down, before it goes, that these go together under one message id. When the process dies after sending, the very
 * same message is sent again under the same id, and what came in between waits for a message of its own.
 */
export async function beginTry(db: Kysely<Database>, group: DeliveryGroup, messageId: string): Promise<void> {
  await updateGroup(db, group)
    .set((eb) => ({ message_id: messageId, tries: eb('tries', '+', 1) }))
    .execute()
}

export type TryOutcome =
  | { state: 'sent'; detail: string }
  | { state: 'waiting'; error: string }
  | { state: 'given-up'; error: string }

const outcomeWords = { sent: 'sent', waiting: 'failed', 'given-up': 'given-up' } as const

/** Sets down how a try went, and adds it to the log. */
export async function endTry(
  db: Kysely<Database>,
  group: DeliveryGroup,
  outcome: TryOutcome,
  now: Date,
): Promise<void> {
  const error = outcome.state === 'sent' ? null : outcome.error.slice(0, 500)
  await updateGroup(db, group)
    .set({ state: outcome.state, sent_at: outcome.state === 'sent' ? now : null, last_error: error })
    .execute()
  const detail = outcome.state === 'sent' ? outcome.detail : (error ?? '')
  await sql`
    insert into delivery_try (site_id, notice_id, user_id, channel, at, outcome, detail)
    select ${group.siteId}, notice_id, ${group.userId}, ${group.channel}, ${now},
      ${outcomeWords[outcome.state]}, ${detail}
    from unnest(${group.noticeIds}::int[]) as notice_id`.execute(db)
}

/** They are not needed any more, and that is nobody's fault. */
export async function letGo(db: Kysely<Database>, group: DeliveryGroup, why: string): Promise<void> {
  await updateGroup(db, group).set({ state: 'let-go', last_error: why }).execute()
}

/** Holds them back until there is room for another message, and sees to it that they go then. */
export async function holdBack(db: Kysely<Database>, group: DeliveryGroup, until: Date): Promise<void> {
  await updateGroup(db, group).set({ state: 'held', hold_until: until }).execute()
  await queueDelivery(db, group.userId, group.channel, until)
}

/** When each message went that a person got from a site since then. */
export async function listSentAt(
  db: Kysely<Database>,
  { siteId, userId, channel }: DeliveryGroup,
  since: Date,
): Promise<Date[]> {
  const rows = await db
    .selectFrom('delivery')
    .where('user_id', '=', userId)
    .where('sent_at', '>', since)
    .where('site_id', '=', siteId)
    .where('channel', '=', channel)
    .select((eb) => ['message_id', eb.fn.max('sent_at').as('sent_at')])
    .groupBy('message_id')
    .execute()
  return rows.flatMap((row) => row.sent_at ?? [])
}

/** Queues the people anew to whom something is due and waits still, so that a long back-off never outlasts an outage for long. */
export async function requeueWaiting(db: Kysely<Database>, now: Date): Promise<number> {
  const people = await db
    .selectFrom('delivery')
    .where('state', 'in', ['held', 'waiting'])
    .where((eb) => eb.or([eb('hold_until', 'is', null), eb('hold_until', '<=', now)]))
    .select(['user_id', 'channel'])
    .distinct()
    .execute()
  for (const { user_id, channel } of people)
    await queueDelivery(db, user_id, channelSchema.parse(channel), null)
  return people.length
}

const channelSchema = z.enum(['mail', 'push'])

/** What could not be sent of a notice is tried again, as if it had only now been due. @returns how many */
export async function retryGivenUp(
  db: Kysely<Database>,
  siteId: number,
  noticeId: number,
  now: Date,
): Promise<number> {
  const rows = await db
    .updateTable('delivery')
    .set({ state: 'waiting', hold_until: now })
    .where('site_id', '=', siteId)
    .where('notice_id', '=', noticeId)
    .where('state', '=', 'given-up')
    .returning(['user_id', 'channel'])
    .execute()
  for (const row of rows) await queueDelivery(db, row.user_id, channelSchema.parse(row.channel), null)
  return rows.length
}

/** What was held until the end of somebody's session, when it ends sooner. */
export async function releaseSession(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  until: Date,
  now: Date,
): Promise<void> {
  const rows = await db
    .updateTable('delivery')
    .set({ state: 'waiting', hold_until: now })
    .where('site_id', '=', siteId)
    .where('user_id', '=', userId)
    .where('state', '=', 'held')
    .where('hold_until', '=', until)
    .returning('channel')
    .execute()
  for (const channel of new Set(rows.map((row) => channelSchema.parse(row.channel))))
    await queueDelivery(db, userId, channel, null)
}
