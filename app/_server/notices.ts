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
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
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

function noticeView(record: NoticeRecord, member: SiteMember, now: Date): Notice {
  const { code, id: _id, deliveries, ...shown } = record
  return {
    id: code,
    ...shown,
    at: record.at.toISOString(),
    acknowledgedAt: record.acknowledgedAt?.toISOString() ?? null,
    delivery: deliveryWords(deliveries, { timeZone: member.timeZone, now }),
  }
}

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
  return ok({
    items: page.items.map((record) => noticeView(record, member, now)),
    nextCursor: page.nextCursor,
  })
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
    const changed = await findNotice(trx, member.siteId, noticeCode, member.userId)
    return changed === undefined ? notThere() : ok(noticeView(changed, member, now))
  })
}

export const seeAllNotices = (db: Kysely<Database>, member: SiteMember, now: Date): Promise<void> =>
  insertAllSeen(db, member.siteId, member.userId, now)
