import { createTransport } from 'nodemailer'
import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { migrateJobs } from '@/db/jobs'
import { listDue, requeueWaiting, retryGivenUp } from '@/db/queries/deliveries'
import { storeEpisodes, storeNotices, takeSiteForNotices } from '@/db/queries/notice-state'
import { deliveryWords } from '@/lib/notices/delivery-words'
import type { Episode, RoutedNotice } from '@/lib/notices/inputs'
import { mailPerson, type MailRoute } from '@/workers/delivery/mail-person'
import { listTries } from '@/db/queries/delivery-tries'
import { insertAnswer } from '@/db/queries/notice-answers'
import { listNoticeRecords } from '@/db/queries/notices'
import { newTextId } from '@/db/queries/sites'
import { readLink } from '@/db/signed-link'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { startMailServer, type TestMailServer } from '../support/mail-server'
import { seedSite, type SeededSite } from '../support/seed-site'

const now = new Date('2026-03-05T14:00:00Z')
const later = (minutes: number) => new Date(now.getTime() + minutes * 60_000)

let database: TestDatabase
let server: TestMailServer
let route: MailRoute
let site: SeededSite
let maker: string

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
  server = await startMailServer()
  route = {
    transport: createTransport({ url: server.url }),
    from: 'Lidfast <lidfast@example.org>',
    authSecret: 'a secret of the tests, long enough',
    baseUrl: 'http://127.0.0.1:3000',
  }
})
afterAll(async () => {
  route.transport?.close()
  await server.close()
  await database.drop()
})
beforeEach(async () => {
  server.mails.length = 0
  server.refuseWith = undefined
  server.refuseCode = undefined
  site = await seedSite(database.db, now)
  maker = await site.join('maker')
})

const episodeOf = (key: string): Episode => ({
  rule: 'time-out',
  subject: `piece ${key}`,
  key,
  state: 'telling',
  beganAt: now.getTime(),
})
const noticeOf = (key: string, title: string, holdUntil: Date | null = null): RoutedNotice => ({
  key,
  rule: 'time-out',
  urgency: 'now',
  mark: 'leave',
  title,
  body: 'Never force a tight lid.',
  link: '/carry',
  episode: episodeOf(key),
  to: [{ userId: maker, wakes: false }],
  deliveries: [{ userId: maker, channel: 'mail', holdUntil: holdUntil?.getTime() ?? null }],
})

const store = (at: Date, notices: RoutedNotice[], siteId = site.siteId) =>
  database.db.transaction().execute(async (trx) => {
    if (!(await takeSiteForNotices(trx, siteId))) return 0
    const ids = await storeEpisodes(
      trx,
      siteId,
      at,
      notices.map(({ episode }) => episodeOf(episode.key)),
    )
    return storeNotices(trx, siteId, at, notices, ids, (code, user) => `<${code}.${user}@example.org>`)
  })

const idOf = async (key: string): Promise<number> =>
  (
    await database.db
      .selectFrom('notice')
      .where('site_id', '=', site.siteId)
      .where('key', '=', key)
      .select('id')
      .executeTakeFirstOrThrow()
  ).id
const triesOf = async (key: string): Promise<string[]> =>
  (await listTries(database.db, site.siteId, [await idOf(key)])).map(({ outcome }) => outcome)
async function words(key: string, at: Date): Promise<string> {
  const records = await listNoticeRecords(database.db, site.siteId, maker, { isDescending: true, limit: 50 })
  const id = await idOf(key)
  const deliveries = records.find((record) => record.id === id)?.deliveries ?? []
  return deliveryWords(deliveries, { timeZone: 'Europe/London', now: at })
}

describe('telling', () => {
  it('stores a notice once when two workers decide the same at once', async () => {
    const stored = await Promise.all([1, 2, 3, 4].map(() => store(now, [noticeOf('a', 'Bring 207 in now.')])))
    expect(stored.reduce((sum, n) => sum + n, 0)).toBe(1)
    expect(await listDue(database.db, maker, 'mail', now)).toHaveLength(1)
  })

  it('queues one job for all the mail of a person', async () => {
    await store(now, [noticeOf('a', 'First.')])
    await store(now, [noticeOf('a', 'First.'), noticeOf('b', 'Second.')])
    expect(await listDue(database.db, maker, 'mail', now)).toHaveLength(2)
    const jobs = await sql<{ n: number }>`
      select count(*)::int as n from graphile_worker.jobs where key like ${`mail ${maker}%`}`.execute(
      database.db,
    )
    expect(jobs.rows[0]?.n).toBe(1)
  })

  it('keeps the beginning of an episode and ends it when its condition no longer holds', async () => {
    const at = async () =>
      database.db
        .selectFrom('episode')
        .where('site_id', '=', site.siteId)
        .select(['state', 'began_at', 'ended_at'])
        .execute()
    await store(now, [noticeOf('a', 'First.')])
    await store(later(5), [noticeOf('a', 'First.')])
    expect(await at()).toEqual([{ state: 'telling', began_at: now, ended_at: null }])
    await store(later(10), [])
    expect(await at()).toEqual([{ state: 'over', began_at: now, ended_at: later(10) }])
  })
})

describe('mail', () => {
  it('goes out once, with a steady id, and names its site', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    expect(await mailPerson(database.db, route, maker, now)).toBe(1)
    expect(await mailPerson(database.db, route, maker, now)).toBe(0)
    expect(server.mails.map(({ subject, text }) => [subject, text?.includes('Test Yard')])).toEqual([
      ['Bring 207 in now.', true],
    ])
    expect(server.mails[0]?.messageId).toMatch(/^<[2-9a-z]{10}\..+@example\.org>$/)
  })

  it('waits while the mail server is away, is shown as delayed, then comes once and in order', async () => {
    await store(now, [noticeOf('a', 'First.')])
    server.refuseWith = 'try later'
    await expect(mailPerson(database.db, route, maker, later(2))).rejects.toThrow('try later')
    await store(later(3), [noticeOf('a', 'First.'), noticeOf('b', 'Second.'), noticeOf('c', 'Third.')])
    await expect(mailPerson(database.db, route, maker, later(20))).rejects.toThrow('try later')
    const due = await listDue(database.db, maker, 'mail', later(21))
    expect(due.map(({ tries }) => tries)).toEqual([2, 0, 0])
    expect(await words('a', later(21))).toMatch(/^delayed for maker/)
    server.refuseWith = undefined
    expect(await requeueWaiting(database.db, later(60))).toBeGreaterThan(0)
    await mailPerson(database.db, route, maker, later(60))
    expect(server.mails.map(({ subject }) => subject)).toEqual(['First.', 'Second. (and 1 more)'])
    expect(await triesOf('a')).toEqual(['failed', 'failed', 'sent'])
  })

  it('goes as one for all that is due, with a paragraph for each and one line about the rest', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in.'), noticeOf('b', 'Bring 208 in.')])
    expect(await mailPerson(database.db, route, maker, now)).toBe(1)
    expect(server.mails[0]?.subject).toBe('Bring 207 in. (and 1 more)')
    expect(server.mails[0]?.text).toMatch(/Bring 207 in\.[\s\S]*Bring 208 in\./)
    expect(await triesOf('b')).toEqual(['sent'])
  })

  it('of several sites is one for each', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in.')])
    const other = await seedSite(database.db, now, 'Other Yard')
    await database.db
      .insertInto('member')
      .values({
        id: newTextId(),
        organizationId: other.organizationId,
        userId: maker,
        role: 'maker',
        createdAt: now,
      })
      .execute()
    await store(now, [noticeOf('a', 'Bring 9 in.')], other.siteId)
    expect(await mailPerson(database.db, route, maker, now)).toBe(2)
    expect(server.mails.map(({ subject }) => subject)).toEqual(['Bring 207 in.', 'Bring 9 in.'])
  })

  it('is capped by the hour however much is told; nothing of it is lost (F70)', async () => {
    for (let minute = 0; minute < 60; minute += 1) {
      const fresh = [0, 1, 2].map((n): RoutedNotice => {
        const name = `${String(minute)}-${String(n)}`
        return { ...noticeOf(name, `Told ${name}.`), rule: 'sensor-silent' }
      })
      await store(later(minute), fresh)
      await mailPerson(database.db, route, maker, later(minute))
    }
    expect(server.mails).toHaveLength(12)
    await mailPerson(database.db, route, maker, later(60))
    expect(server.mails).toHaveLength(13)
    expect(server.mails[12]?.text).toContain('And 44 more, on the page Notices')
    const left = await database.db
      .selectFrom('delivery')
      .where('site_id', '=', site.siteId)
      .where('state', '<>', 'sent')
      .select('notice_id')
      .execute()
    expect(left).toEqual([])
    const jobs = await sql<{ n: number }>`
      select count(*)::int as n from graphile_worker.jobs
      where key like ${`mail ${maker}%`} and run_at = ${later(60)}`.execute(database.db)
    expect(jobs.rows[0]?.n).toBe(1)
  })

  it('holds no header of a name’s making (F70)', async () => {
    await database.db
      .updateTable('site')
      .set({ name: 'Yard\r\nBcc: all@example.org' })
      .where('id', '=', site.siteId)
      .execute()
    await store(now, [noticeOf('a', 'Bring 207\r\nBcc: all@example.org\r\n\r\nin now.')])
    await mailPerson(database.db, route, maker, now)
    const [mail] = server.mails
    expect(mail?.headers.has('bcc')).toBe(false)
    expect(mail?.subject).toBe('Bring 207 Bcc: all@example.org in now.')
  })

  it('that is refused for good is given up at once, says why, and goes when tried again', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    server.refuseWith = 'no such mailbox'
    server.refuseCode = 550
    expect(await mailPerson(database.db, route, maker, now)).toBe(0)
    expect(await listDue(database.db, maker, 'mail', later(1))).toEqual([])
    expect(await triesOf('a')).toEqual(['given-up'])
    const log = await listTries(database.db, site.siteId, [await idOf('a')])
    expect(log.map(({ detail }) => detail)).toEqual([expect.stringContaining('no such mailbox')])
    server.refuseWith = undefined
    // Two days later it would be too old, but whoever presses "try again" wants it now.
    const muchLater = later(48 * 60)
    expect(await retryGivenUp(database.db, site.siteId, await idOf('a'), muchLater)).toBe(1)
    expect(await mailPerson(database.db, route, maker, muchLater)).toBe(1)
    expect(await triesOf('a')).toEqual(['given-up', 'sent'])
  })

  it('is given up after half a day without a mail server, and is shown', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    expect(await mailPerson(database.db, route, maker, later(13 * 60))).toBe(0)
    expect(await words('a', later(13 * 60))).toBe(
      'could not be sent to maker by e-mail: could not be sent in time',
    )
  })

  it('is let go, without a fault, once somebody has it in hand', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.', later(60))])
    const given = {
      noticeId: await idOf('a'),
      userId: maker,
      answer: 'going',
      until: null,
      via: 'page',
    } as const
    await insertAnswer(database.db, site.siteId, given, later(5))
    expect(await mailPerson(database.db, route, maker, later(60))).toBe(0)
    expect(await triesOf('a')).toEqual([])
    expect(server.mails).toEqual([])
  })

  it('is not sent to somebody who has left', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    await database.db.deleteFrom('member').where('userId', '=', maker).execute()
    expect(await mailPerson(database.db, route, maker, now)).toBe(0)
  })

  it('offers its answers and its own end as links that were signed here', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    await mailPerson(database.db, route, maker, now)
    const [mail] = server.mails
    const links = [...(mail?.text ?? '').matchAll(/\/answer\/(\S+)/g)].map(([, token]) =>
      readLink(route.authSecret, token ?? ''),
    )
    expect(links.map((link) => link?.kind === 'answer' && [link.answer, link.userId])).toEqual([
      ['in', maker],
      ['going', maker],
      ['cant', maker],
      ['later', maker],
    ])
    const list = mail?.headers.get('list')
    expect(JSON.stringify(list)).toContain('/api/v1/unsubscribe/')
    expect(mail?.headerLines.map(({ line }) => line)).toContain(
      'List-Unsubscribe-Post: List-Unsubscribe=One-Click',
    )
    const token = /\/unsubscribe\/(\S+)/.exec(mail?.text ?? '')?.[1] ?? ''
    expect(readLink(route.authSecret, token)).toEqual({
      kind: 'unsubscribe',
      siteId: site.siteId,
      userId: maker,
      rule: 'time-out',
    })
    const changed = `${token.startsWith('a') ? 'b' : 'a'}${token.slice(1)}`
    expect(readLink(route.authSecret, changed)).toBeUndefined()
    expect(readLink('another secret, which is as long as that', token)).toBeUndefined()
  })

  it('repeats at most the message that was under way, under the same id, when the worker dies after sending', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    const [waiting] = await listDue(database.db, maker, 'mail', now)
    await mailPerson(database.db, route, maker, now)
    // As if the process had died before it could set the sending down.
    await database.db
      .updateTable('delivery')
      .set({ state: 'waiting', sent_at: null })
      .where('site_id', '=', site.siteId)
      .execute()
    await mailPerson(database.db, route, maker, later(1))
    expect(server.mails.map(({ messageId }) => messageId)).toEqual([waiting?.messageId, waiting?.messageId])
  })

  it('is held over quiet hours', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.', later(60))])
    expect(await mailPerson(database.db, route, maker, later(59))).toBe(0)
    expect(await mailPerson(database.db, route, maker, later(60))).toBe(1)
  })

  it('does not say "bring it in" of a piece that came in while the mail waited', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.', later(60))])
    await store(later(30), [])
    expect(await mailPerson(database.db, route, maker, later(60))).toBe(0)
    expect(server.mails).toEqual([])
  })
})
