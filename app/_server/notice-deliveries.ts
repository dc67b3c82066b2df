import 'server-only'
import type { Kysely } from 'kysely'
import { retryGivenUp } from '@/db/queries/deliveries'
import { listTries } from '@/db/queries/delivery-tries'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { storeNotices } from '@/db/queries/notice-state'
import { countLost, findNotice, listNoticeRecords, testKey } from '@/db/queries/notices'
import { findSettings, listPeopleSettings } from '@/db/queries/own-settings'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import type { AsksView, DeliveryLog } from '@/lib/notices/delivery'
import type { PlannedDelivery, RoutedNotice } from '@/lib/notices/inputs'
import type { Notice, Rule } from '@/lib/notices/notice'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { answersOfRecords, getNotice, noticeView } from './notices'
import { fail, notThere, type Outcome } from './problem'
import { overLimit } from './rate-limit'

/** Every way by which a notice went to anybody, with each try. */
export async function getDeliveryLog(
  db: Kysely<Database>,
  member: SiteMember,
  noticeCode: string,
): Promise<Outcome<DeliveryLog>> {
  const notice = await findNotice(db, member.siteId, noticeCode, member.userId)
  if (notice === undefined) return notThere()
  const tries = await listTries(db, member.siteId, [notice.id])
  return ok({
    items: notice.deliveries.map(({ to, userId, channel, state, holdUntil, why }) => ({
      to,
      channel,
      state,
      holdUntil: holdUntil?.toISOString() ?? null,
      why,
      tries: tries
        .filter((one) => one.userId === userId && one.channel === channel)
        .map(({ at, outcome, detail }) => ({ at: at.toISOString(), outcome, detail })),
    })),
  })
}

/** What could not be sent of a notice is tried again. Pressed twice, it is under way already. */
export async function retryDeliveries(
  db: Kysely<Database>,
  member: SiteMember,
  noticeCode: string,
  now: Date,
): Promise<Outcome<Notice>> {
  return inTransaction(db, async (trx) => {
    const notice = await findNotice(trx, member.siteId, noticeCode, member.userId)
    if (notice === undefined) return notThere()
    await retryGivenUp(trx, member.siteId, notice.id, now)
    await notifySite(trx, member.siteId, 'notice', notice.code)
    return getNotice(trx, member, noticeCode, now)
  })
}

const hourMs = 3_600_000
/** A question of before is no question of today. A guess. */
const asksForMs = 24 * hourMs
const lostForMs = 7 * 24 * hourMs

/** A piece whose time is up, then one whose time nearly is, then the evening's questions and the rest. */
const pressingFirst: readonly Rule[] = ['time-out', 'time-nearly-out', 'last-call', 'lock-up']
const pressing = ({ rule }: Notice): number =>
  pressingFirst.includes(rule) ? pressingFirst.indexOf(rule) : pressingFirst.length

/** What is asked now, one question for each occasion, the newest of it, what presses most first; and whether this person is at work. */
export async function getAsks(db: Kysely<Database>, member: SiteMember, now: Date): Promise<AsksView> {
  const records = await listNoticeRecords(db, member.siteId, member.userId, {
    isDescending: true,
    limit: 60,
    since: new Date(now.getTime() - asksForMs),
    isQuestion: true,
  })
  const answers = await answersOfRecords(db, member, records)
  const seen = new Set<number>()
  const items = records.flatMap((record) => {
    const view = noticeView(record, answers, member, now)
    if (view.asks.length === 0 || (record.episodeId !== null && seen.has(record.episodeId))) return []
    if (record.episodeId !== null) seen.add(record.episodeId)
    return [view]
  })
  const settings = await findSettings(db, member.siteId, member.userId)
  const { sessionUntil } = settings
  return {
    items: items.toSorted((one, other) => pressing(one) - pressing(other)),
    lost: await countLost(db, member.siteId, new Date(now.getTime() - lostForMs)),
    sessionUntil: sessionUntil !== null && sessionUntil > now ? sessionUntil.toISOString() : null,
    settingsVersion: settings.version,
  }
}

/** Sends a person something to see whether it arrives, by every channel that they have on, quiet hours or not. */
export async function sendTest(
  db: Kysely<Database>,
  member: SiteMember,
  now: Date,
): Promise<Outcome<Notice>> {
  return inTransaction(db, async (trx) => {
    const { siteId, userId } = member
    const retryAfterS = await overLimit(trx, [{ key: `test notice ${userId}`, most: 6, windowS: 3_600 }], now)
    if (retryAfterS !== undefined)
      return fail('too-many', 'Six tests an hour are plenty. Wait a little.', { retryAfterS })
    const person = (await listPeopleSettings(trx, siteId)).find((one) => one.userId === userId)
    const deliveries: PlannedDelivery[] = [
      ...(person?.mailOn === true ? [{ userId, channel: 'mail' as const, holdUntil: null }] : []),
      ...(person?.wishes.pushOn === true ? [{ userId, channel: 'push' as const, holdUntil: null }] : []),
    ]
    if (deliveries.length === 0)
      return fail('not-possible', 'Neither e-mail nor a phone is on, so a test would go nowhere.')
    const key = `${testKey(userId)}${now.toISOString()}`
    const host = new URL(serverConfig().baseUrl).hostname
    await storeNotices(trx, siteId, now, [testNotice(key, member, deliveries)], new Map(), (code) => {
      return `<${code}.${userId.toLowerCase()}@${host}>`
    })
    const [record] = await listNoticeRecords(trx, siteId, userId, {
      isDescending: true,
      limit: 1,
      rule: 'test',
    })
    return record === undefined ? notThere() : ok(noticeView(record, [], member, now))
  })
}

const testNotice = (key: string, member: SiteMember, deliveries: PlannedDelivery[]): RoutedNotice => ({
  key,
  rule: 'test',
  urgency: 'now',
  mark: 'fine',
  title: `This is a test from ${member.site.name}.`,
  body: 'It asks for nothing. When it has arrived, so will the others, by the same way.',
  link: '/notices',
  episode: { rule: 'test', subject: member.userId, key },
  to: [{ userId: member.userId, wakes: true }],
  deliveries,
})
