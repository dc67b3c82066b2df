import 'server-only'
import type { Kysely } from 'kysely'
import { listOpenCarries } from '@/db/queries/carries'
import { notifySite } from '@/db/queries/live'
import { answerLockUp, findEveningNotice, findLockUp } from '@/db/queries/lock-ups'
import type { SiteMember } from '@/db/queries/members'
import { findShopUse } from '@/db/queries/shop-use'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { eveningOf } from '@/lib/lock-up/evening'
import type { CloseDay, LockUp } from '@/lib/lock-up/lock-up'
import { notYetClosable } from '@/lib/lock-up/words'
import { ok } from '@/lib/result'
import { viewCarries } from './carry-view'
import { fail, type Outcome } from './problem'

const eveningFor = (member: SiteMember, now: Date) =>
  eveningOf(now, { ...member.site, timeZone: member.timeZone })

/** What is asked at lock-up, and what was answered so far. */
export async function getLockUp(db: Kysely<Database>, member: SiteMember, now: Date): Promise<LockUp> {
  const { siteId } = member
  const evening = eveningFor(member, now)
  const lockUpAt = new Date(evening.lockUpAt)
  const [open, use, answers, noticeId] = await Promise.all([
    listOpenCarries(db, siteId),
    findShopUse(db, member, evening.dayOn, now),
    findLockUp(db, siteId, evening.dayOn),
    findEveningNotice(db, siteId, lockUpAt),
  ])
  const out = open.filter((carry) => carry.state === 'out')
  const told = (answer: { at: Date; by: string | null } | null) =>
    answer === null ? null : { at: answer.at.toISOString(), by: answer.by }
  return {
    at: now.toISOString(),
    dayOn: evening.dayOn,
    lockUpAt: lockUpAt.toISOString(),
    lastCallAt: evening.lastCallAt === null ? null : new Date(evening.lastCallAt).toISOString(),
    morningAt: new Date(evening.morningAt).toISOString(),
    out: await viewCarries(db, member, out, now),
    used: use.why,
    nothingElse: told(answers.nothingElse),
    closed: told(answers.closed),
    noticeId: noticeId ?? null,
  }
}

/** Whether it is evening and the day is not closed yet. */
export async function isLockUpOpen(db: Kysely<Database>, member: SiteMember, now: Date): Promise<boolean> {
  const { isEvening, dayOn } = eveningFor(member, now)
  return isEvening && (await findLockUp(db, member.siteId, dayOn)).closed === null
}

/** "Anything out that isn't logged?" "No, nothing", or that answer taken back. */
export async function answerNothingElse(
  db: Kysely<Database>,
  member: SiteMember,
  isNothing: boolean,
  now: Date,
): Promise<LockUp> {
  return inTransaction(db, async (trx) => {
    const { dayOn } = eveningFor(member, now)
    const answer = { userId: member.userId, at: isNothing ? now : null }
    await answerLockUp(trx, member.siteId, dayOn, 'nothing-else', answer)
    await notifySite(trx, member.siteId, 'carry')
    return getLockUp(trx, member, now)
  })
}

/** Closes the day once every question is answered, or opens it again. */
export async function closeDay(
  db: Kysely<Database>,
  member: SiteMember,
  { isClosed, stayOutIds }: CloseDay,
  now: Date,
): Promise<Outcome<LockUp>> {
  return inTransaction(db, async (trx) => {
    const before = await getLockUp(trx, member, now)
    const reason =
      isClosed && before.closed === null ? notYetClosable(before, new Set(stayOutIds)) : undefined
    if (reason !== undefined) return fail('not-possible', reason)
    const answer = { userId: member.userId, at: isClosed ? now : null }
    await answerLockUp(trx, member.siteId, before.dayOn, 'closed', answer)
    await notifySite(trx, member.siteId, 'carry')
    return ok(await getLockUp(trx, member, now))
  })
}
