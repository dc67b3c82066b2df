import 'server-only'
import type { Kysely } from 'kysely'
import { listOpenCarries, type CarryRecord } from '@/db/queries/carries'
import { notifySite } from '@/db/queries/live'
import { answerLockUp } from '@/db/queries/lock-ups'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { insertAnswer, listAnswers } from '@/db/queries/notice-answers'
import {
  acknowledgeNotice,
  findNotice,
  findNoticeCode,
  insertNoticeSeen,
  type NoticeRecord,
} from '@/db/queries/notices'
import { findPiecesById } from '@/db/queries/pieces'
import { findSiteCode } from '@/db/queries/sites'
import { inTransaction } from '@/db/queries/transaction'
import { isLinkUsed, takeLink } from '@/db/queries/used-links'
import type { Database } from '@/db/schema'
import { type AnswerLink, linkId, readLink } from '@/db/signed-link'
import { dayOfInstant } from '@/lib/climate/days'
import { formatMoment } from '@/lib/format/times'
import { type AnswerVia, answeredWords, answersTo, laterUntil, type NewAnswer } from '@/lib/notices/answers'
import type { Notice } from '@/lib/notices/notice'
import { ok } from '@/lib/result'
import { may } from '@/lib/sites/permissions'
import { bringBack } from './carry-steps'
import { serverConfig } from './env'
import { getNotice } from './notices'
import { viewerOf } from './piece-view'
import { fail, failField, type Failure, notThere, type Outcome } from './problem'

/**
 * Gives one person's answer to what a notice asks. "It's in" brings back what it is about, by the same steps as the
 * page; the others are set down, and the next decision goes by them. Given again, the newest counts.
 */
export async function answerNotice(
  db: Kysely<Database>,
  member: SiteMember,
  noticeCode: string,
  { answer, later }: NewAnswer,
  via: AnswerVia,
  now: Date,
): Promise<Outcome<Notice>> {
  return inTransaction(db, async (trx) => {
    const { siteId, userId } = member
    const notice = await findNotice(trx, siteId, noticeCode, userId)
    if (notice === undefined) return notThere()
    if (!answersTo(notice).includes(answer))
      return failField('not-possible', 'answer', 'not something that this notice asks')
    if (answer === 'in') {
      const back = await bringIn(trx, member, notice, now)
      if (!back.ok) return back
    }
    if (answer === 'nothing')
      await answerLockUp(trx, siteId, dayOfInstant(notice.at, member.site.timeZone), 'nothing-else', {
        userId,
        at: now,
      })
    const until =
      later === undefined ? null : new Date(laterUntil(now.getTime(), later, member.site.timeZone))
    await insertAnswer(trx, siteId, { noticeId: notice.id, userId, answer, until, via }, now)
    await insertNoticeSeen(trx, siteId, notice.id, userId, now)
    if (answer === 'in' || answer === 'nothing') await acknowledgeNotice(trx, siteId, notice.id, userId, now)
    await notifySite(trx, siteId, 'notice', notice.code)
    // The decision that follows an answer is made at once: "can't" must not wait for the clock.
    await notifySite(trx, siteId, 'carry')
    return getNotice(trx, member, noticeCode, now)
  })
}

/** Brings back what a notice is about: its piece, its carry, or at lock-up whatever was out when it asked. */
async function bringIn(
  db: Kysely<Database>,
  member: SiteMember,
  notice: NoticeRecord,
  now: Date,
): Promise<Outcome<undefined>> {
  const out = (await listOpenCarries(db, member.siteId)).filter((carry) => carry.state === 'out')
  for (const carry of out.filter((one) => isAbout(notice, one))) {
    const pieces =
      notice.pieceId === null
        ? undefined
        : await findPiecesById(db, member.siteId, [notice.pieceId], viewerOf(member))
    const back = await bringBack(db, member, carry.code, { pieceIds: pieces?.map(({ code }) => code) }, now)
    if (!back.ok) return back
  }
  return ok(undefined)
}

function isAbout(notice: NoticeRecord, carry: CarryRecord): boolean {
  if (notice.carryId !== null) return carry.id === notice.carryId
  // What went out after the question is not what was asked after. A tub says nothing of what is in it.
  return notice.rule !== 'tub-out' && (carry.startedAt ?? notice.at) <= notice.at
}

/** What the page of a link shows before anything is pressed. */
export interface LinkView {
  state: 'open' | 'done' | 'expired'
  siteName: string
  title: string
  body: string
  answer: AnswerLink['answer']
  later: AnswerLink['later']
  /** What others have answered, and what was done: "Ada said that it is in, 14:05". */
  answered: string[]
}

const askedLink = (token: string): AnswerLink | undefined => {
  const link = readLink(serverConfig().authSecret, token)
  return link?.kind === 'answer' ? link : undefined
}

async function loadLink(db: Kysely<Database>, link: AnswerLink) {
  const siteCode = await findSiteCode(db, link.siteId)
  const member = siteCode === undefined ? undefined : await findSiteMember(db, siteCode, link.userId)
  // Who has left, or may no longer answer, holds a link to nothing.
  if (member === undefined || !may(member.role, 'notices:acknowledge')) return undefined
  const code = await findNoticeCode(db, link.siteId, link.noticeId)
  const notice = code === undefined ? undefined : await findNotice(db, link.siteId, code, link.userId)
  return notice === undefined ? undefined : { member, notice }
}

/** Looks at a link without using it: mail scanners open every link of a mail, so looking must change nothing. */
export async function lookAtAnswerLink(
  db: Kysely<Database>,
  token: string,
  now: Date,
): Promise<LinkView | undefined> {
  const link = askedLink(token)
  const found = link === undefined ? undefined : await loadLink(db, link)
  if (link === undefined || found === undefined) return undefined
  const { member, notice } = found
  const used = await isLinkUsed(db, linkId(token))
  const isOpen = !used && !notice.isOver && notice.acknowledgedAt === null
  return {
    state: link.expiresAt <= now.getTime() ? 'expired' : isOpen ? 'open' : 'done',
    siteName: member.site.name,
    title: notice.title,
    body: notice.body,
    answer: link.answer,
    later: link.later,
    answered: await answeredLines(db, member, notice, now),
  }
}

async function answeredLines(
  db: Kysely<Database>,
  member: SiteMember,
  notice: NoticeRecord,
  now: Date,
): Promise<string[]> {
  const answers = await listAnswers(db, member.siteId, [notice.id])
  const lines = answers.map(({ userId, userName, answer, at }) => {
    const who = userId === member.userId ? 'You' : userName
    return `${who} ${answeredWords[answer]}, ${formatMoment(at, member.timeZone, now)}`
  })
  if (lines.length > 0 || notice.acknowledgedAt === null) return lines
  return [
    `${notice.acknowledgedBy ?? 'Somebody'} has it in hand, ${formatMoment(notice.acknowledgedAt, member.timeZone, now)}`,
  ]
}

/** Undoes a transaction whose work was refused, so that a link that did nothing is not used up. */
class Refused extends Error {
  constructor(readonly failure: Failure) {
    super('refused')
  }
}

/** Does what a link stands for, once, in the name of the person that it was sent to. */
export async function followAnswerLink(
  db: Kysely<Database>,
  token: string,
  now: Date,
): Promise<Outcome<LinkView>> {
  const link = askedLink(token)
  const before = link === undefined ? undefined : await loadLink(db, link)
  if (link === undefined || before === undefined) return notThere()
  if (link.expiresAt <= now.getTime())
    return fail('not-possible', 'This link has run out. Sign in and answer on the page Notices.')
  const look = await lookAtAnswerLink(db, token, now)
  // Used twice, or overtaken by somebody else: what was done stands, and is told.
  if (look?.state === 'done') return ok(look)
  try {
    await db.transaction().execute(async (trx) => {
      if (!(await takeLink(trx, linkId(token), new Date(link.expiresAt)))) return
      const { answer, later, via } = link
      const done = await answerNotice(trx, before.member, before.notice.code, { answer, later }, via, now)
      if (!done.ok) throw new Refused(done.error)
    })
  } catch (error) {
    if (error instanceof Refused) return { ok: false, error: error.failure }
    throw error
  }
  const after = await lookAtAnswerLink(db, token, now)
  return after === undefined ? notThere() : ok(after)
}
