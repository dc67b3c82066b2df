import { createTransport } from 'nodemailer'
import { sql } from 'kysely'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { migrateJobs } from '@/db/jobs'
import { listWaitingMail, requeueWaitingMail } from '@/db/queries/deliveries'
import { storeEpisodes, storeNotices, takeSiteForNotices } from '@/db/queries/notice-state'
import type { Episode, RoutedNotice } from '@/lib/notices/inputs'
import { mailPerson, type MailRoute } from '@/workers/delivery/mail-person'
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

const store = (at: Date, notices: RoutedNotice[]) =>
  database.db.transaction().execute(async (trx) => {
    if (!(await takeSiteForNotices(trx, site.siteId))) return 0
    const ids = await storeEpisodes(
      trx,
      site.siteId,
      at,
      notices.map(({ episode }) => episodeOf(episode.key)),
    )
    return storeNotices(trx, site.siteId, at, notices, ids, (code, user) => `<${code}.${user}@example.org>`)
  })

describe('telling', () => {
  it('stores a notice once when two workers decide the same at once', async () => {
    const stored = await Promise.all([1, 2, 3, 4].map(() => store(now, [noticeOf('a', 'Bring 207 in now.')])))
    expect(stored.reduce((sum, n) => sum + n, 0)).toBe(1)
    expect(await listWaitingMail(database.db, maker, now)).toHaveLength(1)
  })

  it('queues one job for all the mail of a person', async () => {
    await store(now, [noticeOf('a', 'First.')])
    await store(now, [noticeOf('a', 'First.'), noticeOf('b', 'Second.')])
    expect(await listWaitingMail(database.db, maker, now)).toHaveLength(2)
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

  it('waits while the mail server is away, then comes once and in order', async () => {
    await store(now, [noticeOf('a', 'First.')])
    await store(later(1), [noticeOf('a', 'First.'), noticeOf('b', 'Second.')])
    server.refuseWith = 'try later'
    await expect(mailPerson(database.db, route, maker, later(2))).rejects.toThrow('try later')
    await expect(mailPerson(database.db, route, maker, later(20))).rejects.toThrow('try later')
    expect((await listWaitingMail(database.db, maker, later(21))).map(({ tries }) => tries)).toEqual([2, 0])
    server.refuseWith = undefined
    expect(await requeueWaitingMail(database.db, later(60))).toBeGreaterThan(0)
    await mailPerson(database.db, route, maker, later(60))
    expect(server.mails.map(({ subject }) => subject)).toEqual(['First.', 'Second.'])
  })

  it('repeats at most the message that was under way, under the same id, when the worker dies after sending', async () => {
    await store(now, [noticeOf('a', 'Bring 207 in now.')])
    const [waiting] = await listWaitingMail(database.db, maker, now)
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
