import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createCarry, getCarry } from '@/app/_server/carries'
import type * as Answers from '@/app/_server/notice-answers'
import type * as Deliveries from '@/app/_server/notice-deliveries'
import type * as Settings from '@/app/_server/own-settings'
import type * as Unsubscribe from '@/app/_server/unsubscribe'
import { migrateJobs } from '@/db/jobs'
import { listDue } from '@/db/queries/deliveries'
import type { SiteMember } from '@/db/queries/members'
import { storeEpisodes, storeNotices } from '@/db/queries/notice-state'
import { findSettings } from '@/db/queries/own-settings'
import { signLink } from '@/db/signed-link'
import { newCarrySchema } from '@/lib/carry/carry'
import type { Answer } from '@/lib/notices/answer'
import type { RoutedNotice } from '@/lib/notices/inputs'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { forgetServer, serverEnvironment } from '../support/server-modules'
import { makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
const after = (minutes: number) => new Date(now.getTime() + minutes * 60_000)
const authSecret = 'a secret of the tests, long enough'

let database: TestDatabase
let yard: Yard
let maker: SiteMember
let hand: SiteMember
let answers: typeof Answers
let deliveries: typeof Deliveries
let settings: typeof Settings
let ending: typeof Unsubscribe
let carryId: string
let noticeCode: string
let noticeId: number
let count = 0

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
  serverEnvironment({ DATABASE_URL: database.url, AUTH_SECRET: authSecret })
  answers = await import('@/app/_server/notice-answers')
  deliveries = await import('@/app/_server/notice-deliveries')
  settings = await import('@/app/_server/own-settings')
  ending = await import('@/app/_server/unsubscribe')
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
  hand = await yard.member('hand')
})
afterAll(async () => {
  await forgetServer()
  await database.drop()
})
beforeEach(async () => {
  count += 1
  const box = await yard.box(`9${String(count).padStart(2, '0')}`)
  const input = { pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 60 }
  const asked = newCarrySchema.parse({ ...input, startsNow: true, againstAdvice: true })
  carryId = valueOf(await createCarry(database.db, maker, asked, now)).id
  const key = `time-out/${String(count)}`
  const episode = { rule: 'time-out', subject: `piece ${box.code}`, key } as const
  const notice: RoutedNotice = {
    ...{ key, rule: 'time-out', urgency: 'now', mark: 'leave', title: 'Bring it in.', body: '' },
    ...{ link: `/carry/${carryId}`, episode, carryCode: carryId, pieceCode: box.code },
    to: [{ userId: hand.userId, wakes: false }],
    deliveries: [{ userId: hand.userId, channel: 'mail', holdUntil: null }],
  }
  await database.db.transaction().execute(async (trx) => {
    const lasting = { ...episode, state: 'telling', beganAt: now.getTime() } as const
    const ids = await storeEpisodes(trx, maker.siteId, now, [lasting])
    await storeNotices(trx, maker.siteId, now, [notice], ids, (code, user) => `<${code}.${user}@example.org>`)
  })
  const row = await database.db
    .selectFrom('notice')
    .where('site_id', '=', maker.siteId)
    .where('key', '=', key)
    .select(['id', 'code'])
    .executeTakeFirstOrThrow()
  noticeCode = row.code
  noticeId = row.id
})

const linkFor = (answer: Answer, userId = hand.userId, more: object = {}) =>
  signLink(authSecret, {
    ...{ kind: 'answer', siteId: maker.siteId, noticeId, userId, answer, via: 'mail' },
    expiresAt: after(60).getTime(),
    ...more,
  })
const carryState = async () => valueOf(await getCarry(database.db, maker, carryId, after(20))).state

describe('an answer', () => {
  it('"it is in" brings the piece back, acknowledges, and asks no more', async () => {
    const given = await answers.answerNotice(
      database.db,
      hand,
      noticeCode,
      { answer: 'in' },
      'page',
      after(10),
    )
    expect(valueOf(given)).toMatchObject({ asks: [], acknowledgedBy: 'hand', answered: [{ answer: 'in' }] })
    expect(await carryState()).toBe('back')
    const asks = await deliveries.getAsks(database.db, maker, after(11))
    expect(asks.items.map(({ id }) => id)).not.toContain(noticeCode)
  })

  it('"later" says until when, and leaves the piece out', async () => {
    const later = { answer: 'later', later: 'morning' } as const
    const given = await answers.answerNotice(database.db, hand, noticeCode, later, 'page', after(10))
    expect(valueOf(given).answered).toMatchObject([{ answer: 'later', until: '2026-02-11T07:00:00.000Z' }])
    expect(await carryState()).toBe('out')
  })

  it('that a notice does not ask for is refused', async () => {
    const given = await answers.answerNotice(
      database.db,
      hand,
      noticeCode,
      { answer: 'nothing' },
      'page',
      after(10),
    )
    expect(given).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })
})

describe('a link in a mail', () => {
  it('does nothing by being looked at, and what it says by being pressed, once', async () => {
    const token = linkFor('in')
    expect(await answers.lookAtAnswerLink(database.db, token, after(5))).toMatchObject({ state: 'open' })
    expect(await carryState()).toBe('out')
    const [first, second] = await Promise.all([
      answers.followAnswerLink(database.db, token, after(6)),
      answers.followAnswerLink(database.db, token, after(6)),
    ])
    expect([valueOf(first).state, valueOf(second).state]).toEqual(['done', 'done'])
    expect(await carryState()).toBe('back')
    const rows = await database.db
      .selectFrom('notice_answer')
      .where('site_id', '=', maker.siteId)
      .where('notice_id', '=', noticeId)
      .select(['answer', 'via'])
      .execute()
    expect(rows).toEqual([{ answer: 'in', via: 'mail' }])
  })

  it('pressed after somebody else was quicker, says who', async () => {
    await answers.answerNotice(database.db, maker, noticeCode, { answer: 'in' }, 'page', after(4))
    const late = valueOf(await answers.followAnswerLink(database.db, linkFor('going'), after(5)))
    expect(late).toMatchObject({ state: 'done', answered: ['maker said that it is in, 10:04'] })
  })

  it('that has run out, was made up, or belongs to somebody who left does nothing', async () => {
    const old = linkFor('in', hand.userId, { expiresAt: after(1).getTime() })
    expect(await answers.followAnswerLink(database.db, old, after(2))).toMatchObject({ ok: false })
    const forged = signLink('another secret, which is as long as that', {
      ...{ kind: 'answer', siteId: maker.siteId, noticeId, userId: hand.userId, answer: 'in', via: 'mail' },
      expiresAt: after(60).getTime(),
    })
    for (const token of [forged, `${old}x`, 'x', '', linkFor('in', 'nobody')])
      expect(await answers.followAnswerLink(database.db, token, after(2))).toMatchObject({
        ok: false,
        error: { code: 'not-found' },
      })
    expect(await carryState()).toBe('out')
  })

  it('whose work is refused is not used up', async () => {
    const token = linkFor('in')
    await database.db
      .updateTable('carry_piece')
      .set({ from_room_id: null })
      .where('site_id', '=', maker.siteId)
      .execute()
    expect(await answers.followAnswerLink(database.db, token, after(5))).toMatchObject({ ok: false })
    expect(await answers.lookAtAnswerLink(database.db, token, after(6))).toMatchObject({ state: 'open' })
  })
})

describe('one’s own choices', () => {
  it('"no more of these" ends the mails of that rule, for that person alone', async () => {
    const link = { kind: 'unsubscribe', siteId: maker.siteId, userId: hand.userId } as const
    const token = signLink(authSecret, { ...link, rule: 'time-out' })
    expect(await ending.lookAtUnsubscribe(database.db, token)).toMatchObject({ isOff: false })
    for (const _ of [1, 2]) expect(await ending.unsubscribe(database.db, token)).toMatchObject({ ok: true })
    const own = await findSettings(database.db, maker.siteId, hand.userId)
    expect([own.mailOn, own.rules['time-out']]).toEqual([true, { mailOn: false, pushOn: true }])
    await ending.unsubscribe(database.db, signLink(authSecret, { ...link, rule: null }))
    expect((await findSettings(database.db, maker.siteId, hand.userId)).mailOn).toBe(false)
    expect((await findSettings(database.db, maker.siteId, maker.userId)).mailOn).toBe(true)
  })

  it('a stale change is refused, and a session that ends lets go of what it held', async () => {
    const before = await settings.getOwnSettings(database.db, maker, now)
    const until = after(120).toISOString()
    const at = (version: number, change: object, when = now) =>
      settings.changeOwnSettings(database.db, maker, version, change, when)
    const kept = valueOf(
      await at(before.version, { sessionUntil: until, quiet: { from: '21:00', to: '06:00' } }),
    )
    expect(kept).toMatchObject({ sessionUntil: until, quiet: { from: '21:00', to: '06:00' } })
    expect(await at(before.version, { mailOn: false })).toMatchObject({
      error: { code: 'changed-meanwhile' },
    })
    const values = { site_id: maker.siteId, notice_id: noticeId, user_id: maker.userId, channel: 'mail' }
    const held = { ...values, message_id: '<held@example.org>', state: 'held', hold_until: new Date(until) }
    await database.db
      .insertInto('delivery')
      .values({ ...held, sent_at: null, last_error: null })
      .execute()
    expect(await listDue(database.db, maker.userId, 'mail', after(30))).toEqual([])
    await at(kept.version, { sessionUntil: null }, after(30))
    expect(await listDue(database.db, maker.userId, 'mail', after(30))).toHaveLength(1)
    expect(await at(kept.version + 1, { sessionUntil: after(24 * 60).toISOString() })).toMatchObject({
      ok: false,
    })
  })

  it('a test goes to whoever asked for it, at once, by what they have on', async () => {
    const sent = valueOf(await deliveries.sendTest(database.db, maker, after(1)))
    expect(sent).toMatchObject({ rule: 'test', delivery: 'on its way to maker' })
    const log = valueOf(await deliveries.getDeliveryLog(database.db, maker, sent.id))
    expect(log.items.map(({ to, channel, state }) => [to, channel, state])).toEqual([
      ['maker', 'mail', 'waiting'],
    ])
    expect(await deliveries.getDeliveryLog(database.db, hand, sent.id)).toMatchObject({ ok: false })
  })
})
