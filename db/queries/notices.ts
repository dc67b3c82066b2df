import { type Kysely, sql } from 'kysely'
import { z } from 'zod'
import { questionRules } from '@/lib/notices/answers'
import { type DeliveryFact } from '@/lib/notices/delivery-words'
import { type Mark, markSchema, type Rule, ruleSchema } from '@/lib/notices/notice'
import type { Database } from '../schema'

export interface NoticeRecord {
  id: number
  code: string
  at: Date
  rule: Rule
  urgency: 'now' | 'soon' | 'whenever'
  mark: Mark
  title: string
  body: string
  link: string
  isSeen: boolean
  acknowledgedAt: Date | null
  acknowledgedBy: string | null
  /** Of its episode, which may have ended since; null where it has none. */
  episodeId: number | null
  isOver: boolean
  carryId: number | null
  pieceId: number | null
  deliveries: (DeliveryFact & { userId: string; state: DeliveryState })[]
}

const deliveryStateSchema = z.enum(['held', 'waiting', 'sent', 'given-up', 'let-go'])
export type DeliveryState = z.infer<typeof deliveryStateSchema>

export interface NoticeListQuery {
  isUnseen?: boolean
  rule?: Rule
  /** Only of rules that ask something. */
  isQuestion?: boolean
  since?: Date
  isDescending: boolean
  limit: number
  after?: { at: string; id: number }
}

/** How the keys of one person's tests begin. Ids are letters and digits, so none holds a sign of LIKE. */
export const testKey = (userId: string): string => `test/${userId}/`

const noticeQuery = (db: Kysely<Database>, siteId: number, userId: string) =>
  db
    .selectFrom('notice')
    .leftJoin('notice_seen as seen', (join) =>
      join
        .onRef('seen.site_id', '=', 'notice.site_id')
        .onRef('seen.notice_id', '=', 'notice.id')
        .on('seen.user_id', '=', userId),
    )
    .leftJoin('user', 'user.id', 'notice.acknowledged_by')
    .leftJoin('episode', (join) =>
      join.onRef('episode.site_id', '=', 'notice.site_id').onRef('episode.id', '=', 'notice.episode_id'),
    )
    .where('notice.site_id', '=', siteId)
    // A test is for whoever asked for it.
    .where((eb) => eb.or([eb('notice.rule', '<>', 'test'), eb('notice.key', 'like', `${testKey(userId)}%`)]))
    .select([
      'notice.id',
      'notice.code',
      'notice.at',
      'notice.rule',
      'notice.urgency',
      'notice.mark',
      'notice.title',
      'notice.body',
      'notice.link',
      'notice.acknowledged_at',
      'seen.seen_at',
      'user.name as acknowledged_by_name',
      'notice.episode_id',
      'notice.carry_id',
      'notice.piece_id',
      'episode.state as episode_state',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof noticeQuery>['executeTakeFirstOrThrow']>>

async function withDeliveries(
  db: Kysely<Database>,
  siteId: number,
  rows: readonly Row[],
): Promise<NoticeRecord[]> {
  if (rows.length === 0) return []
  const deliveries = await db
    .selectFrom('delivery')
    .innerJoin('user', 'user.id', 'delivery.user_id')
    .where('delivery.site_id', '=', siteId)
    .where(
      'delivery.notice_id',
      'in',
      rows.map((row) => row.id),
    )
    .select([
      'delivery.notice_id',
      'delivery.user_id',
      'user.name',
      'delivery.channel',
      'delivery.state',
      'delivery.last_error',
      'delivery.hold_until',
      'delivery.tries',
      'delivery.sent_at',
    ])
    .orderBy('user.name')
    .orderBy('delivery.channel')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    at: row.at,
    rule: ruleSchema.parse(row.rule),
    urgency: row.urgency === 'now' ? 'now' : row.urgency === 'soon' ? 'soon' : 'whenever',
    mark: markSchema.parse(row.mark),
    title: row.title,
    body: row.body,
    link: row.link,
    isSeen: row.seen_at !== null,
    acknowledgedAt: row.acknowledged_at,
    acknowledgedBy: row.acknowledged_by_name,
    episodeId: row.episode_id,
    isOver: row.episode_state === 'over',
    carryId: row.carry_id,
    pieceId: row.piece_id,
    deliveries: deliveries
      .filter((one) => one.notice_id === row.id)
      .map((one) => ({
        to: one.name,
        userId: one.user_id,
        state: deliveryStateSchema.parse(one.state),
        channel: one.channel === 'push' ? 'push' : 'mail',
        why: one.last_error,
        holdUntil: one.hold_until,
        tries: one.tries,
        sentAt: one.sent_at,
      })),
  }))
}

/** The notices of a site, with what one person has seen of them. One more than asked for says that there is more. */
export async function listNoticeRecords(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  asked: NoticeListQuery,
): Promise<NoticeRecord[]> {
  const { after, rule } = asked
  const way = asked.isDescending ? 'desc' : 'asc'
  const rows = await noticeQuery(db, siteId, userId)
    .$if(asked.isUnseen === true, (query) => query.where('seen.seen_at', 'is', null))
    .$if(asked.isUnseen === false, (query) => query.where('seen.seen_at', 'is not', null))
    .$if(asked.isQuestion === true, (query) => query.where('notice.rule', 'in', [...questionRules]))
    .$if(asked.since !== undefined, (query) => query.where('notice.at', '>=', asked.since ?? null))
    .$if(rule !== undefined, (query) => query.where('notice.rule', '=', rule ?? ''))
    .$if(after !== undefined, (query) =>
      query.where(
        asked.isDescending
          ? sql<boolean>`(notice.at, notice.id) < (${after?.at}::timestamptz, ${after?.id}::int)`
          : sql<boolean>`(notice.at, notice.id) > (${after?.at}::timestamptz, ${after?.id}::int)`,
      ),
    )
    .orderBy('notice.at', way)
    .orderBy('notice.id', way)
    .limit(asked.limit + 1)
    .execute()
  return withDeliveries(db, siteId, rows)
}

export async function findNotice(
  db: Kysely<Database>,
  siteId: number,
  code: string,
  userId: string,
): Promise<NoticeRecord | undefined> {
  const row = await noticeQuery(db, siteId, userId).where('notice.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : (await withDeliveries(db, siteId, [row]))[0]
}

/** One person has seen a notice; the first time counts. */
export async function insertNoticeSeen(
  db: Kysely<Database>,
  siteId: number,
  noticeId: number,
  userId: string,
  now: Date,
): Promise<void> {
  await db
    .insertInto('notice_seen')
    .values({ site_id: siteId, notice_id: noticeId, user_id: userId, seen_at: now })
    .onConflict((clash) => clash.doNothing())
    .execute()
}

/** One person has seen every notice of a site that there is now. */
export async function insertAllSeen(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  now: Date,
): Promise<void> {
  await sql`
    insert into notice_seen (site_id, notice_id, user_id, seen_at)
    select site_id, id, ${userId}, ${now} from notice where site_id = ${siteId}
    on conflict do nothing`.execute(db)
}

/** Somebody has taken care of it: told once, for everybody. Its episode is not told of again while it lasts. */
export async function acknowledgeNotice(
  db: Kysely<Database>,
  siteId: number,
  noticeId: number,
  userId: string,
  now: Date,
): Promise<void> {
  const row = await db
    .updateTable('notice')
    .set({ acknowledged_at: now, acknowledged_by: userId })
    .where('site_id', '=', siteId)
    .where('id', '=', noticeId)
    .where('acknowledged_at', 'is', null)
    .returning('episode_id')
    .executeTakeFirst()
  if (row === undefined || row.episode_id === null) return
  await db
    .updateTable('episode')
    .set({ state: 'acknowledged' })
    .where('site_id', '=', siteId)
    .where('id', '=', row.episode_id)
    .where('state', 'in', ['pending', 'telling'])
    .execute()
}

/** The notice of a link, by its number within the site. */
export async function findNoticeCode(
  db: Kysely<Database>,
  siteId: number,
  noticeId: number,
): Promise<string | undefined> {
  const row = await db
    .selectFrom('notice')
    .where('site_id', '=', siteId)
    .where('id', '=', noticeId)
    .select('code')
    .executeTakeFirst()
  return row?.code
}

/** How many notices of late could not be sent to somebody. */
export async function countLost(db: Kysely<Database>, siteId: number, since: Date): Promise<number> {
  const row = await db
    .selectFrom('notice')
    .where('notice.site_id', '=', siteId)
    .where('notice.at', '>=', since)
    .where('notice.rule', '<>', 'test')
    .where((eb) =>
      eb.exists(
        eb
          .selectFrom('delivery')
          .whereRef('delivery.site_id', '=', 'notice.site_id')
          .whereRef('delivery.notice_id', '=', 'notice.id')
          .where('delivery.state', '=', 'given-up')
          .select('delivery.notice_id'),
      ),
    )
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return row.n
}
