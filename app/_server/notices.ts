import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import {
  acknowledgeNotice,
  findNotice,
  insertAllSeen,
  insertNoticeSeen,
  listNoticeRecords,
  type NoticeRecord,
} from '@/db/queries/notices'
import { type AnswerRecord, listAnswers } from '@/db/queries/notice-answers'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { answerLinkMs, answersTo } from '@/lib/notices/answers'
import { deliveryWords } from '@/lib/notices/delivery-words'
import { type Notice, type noticeChangeSchema, noticeListQuerySchema } from '@/lib/notices/notice'
import { ok } from '@/lib/result'
import { decodeCursor, listQueryShape, type Page, pageOf } from './list'
import { failField, notThere, type Outcome } from './problem'

export const noticesQuerySchema = z.strictObject({
  unseen: noticeListQuerySchema.shape.unseen,
  rule: noticeListQuerySchema.shape.rule,
  ...listQueryShape(['-at', 'at']),
})
export type NoticesQuery = z.output<typeof noticesQuerySchema>

const cursorSchema = z.strictObject({ at: z.iso.datetime(), id: z.int() })

export function noticeView(
  record: NoticeRecord,
  answers: readonly AnswerRecord[],
  member: SiteMember,
  now: Date,
): Notice {
  const own = answers.filter(({ noticeId }) => noticeId === record.id)
  const isSettled =
    record.isOver ||
    record.acknowledgedAt !== null ||
    now.getTime() - record.at.getTime() > answerLinkMs ||
    own.some(({ answer }) => answer === 'in' || answer === 'nothing')
  return {
    id: record.code,
    at: record.at.toISOString(),
    rule: record.rule,
    urgency: record.urgency,
    mark: record.mark,
    title: record.title,
    body: record.body,
    link: record.link,
    isSeen: record.isSeen,
    acknowledgedAt: record.acknowledgedAt?.toISOString() ?? null,
    acknowledgedBy: record.acknowledgedBy,
    delivery: deliveryWords(record.deliveries, { timeZone: member.timeZone, now }),
    isLost: record.deliveries.some(({ state }) => state === 'given-up'),
    asks: isSettled ? [] : answersTo(record),
    answered: own.map(({ userName, answer, at, until }) => ({
      by: userName,
      answer,
      at: at.toISOString(),
      until: until?.toISOString() ?? null,
    })),
  }
}

export const answersOfRecords = (
  db: Kysely<Database>,
  member: SiteMember,
  records: readonly NoticeRecord[],
): Promise<AnswerRecord[]> =>
  listAnswers(
    db,
    member.siteId,
    records.map(({ id }) => id),
  )

export async function listNotices(
  db: Kysely<Database>,
  member: SiteMember,
  query: NoticesQuery,
  now: Date,
): Promise<Outcome<Page<Notice>>> {
  const after = query.cursor === undefined ? undefined : decodeCursor(query.cursor, cursorSchema)
  if (query.cursor !== undefined && after === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const records = await listNoticeRecords(db, member.siteId, member.userId, {
    isUnseen: query.unseen === undefined ? undefined : query.unseen === 'yes',
    rule: query.rule,
    isDescending: query.sort === '-at',
    limit: query.limit,
    after,
  })
  const page = pageOf(records, query.limit, (record) => ({ at: record.at.toISOString(), id: record.id }))
  const answers = await answersOfRecords(db, member, page.items)
  return ok({
    items: page.items.map((record) => noticeView(record, answers, member, now)),
    nextCursor: page.nextCursor,
  })
}

export async function getNotice(
  db: Kysely<Database>,
  member: SiteMember,
  noticeCode: string,
  now: Date,
): Promise<Outcome<Notice>> {
  const record = await findNotice(db, member.siteId, noticeCode, member.userId)
  if (record === undefined) return notThere()
  return ok(noticeView(record, await answersOfRecords(db, member, [record]), member, now))
}

/** Seen is each person's own; acknowledged holds for everybody, and says by whom. Both once and for good. */
export async function changeNotice(
  db: Kysely<Database>,
  member: SiteMember,
  noticeCode: string,
  change: z.output<typeof noticeChangeSchema>,
  now: Date,
): Promise<Outcome<Notice>> {
  return inTransaction(db, async (trx) => {
    const notice = await findNotice(trx, member.siteId, noticeCode, member.userId)
    if (notice === undefined) return notThere()
    if (change.isSeen === true || change.isAcknowledged === true)
      await insertNoticeSeen(trx, member.siteId, notice.id, member.userId, now)
    if (change.isAcknowledged === true) {
      await acknowledgeNotice(trx, member.siteId, notice.id, member.userId, now)
      await notifySite(trx, member.siteId, 'notice', notice.code)
    }
    return getNotice(trx, member, noticeCode, now)
  })
}

export const seeAllNotices = (db: Kysely<Database>, member: SiteMember, now: Date): Promise<void> =>
  insertAllSeen(db, member.siteId, member.userId, now)
