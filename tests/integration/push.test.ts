import { X509Certificate } from 'node:crypto'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import webPush from 'web-push'
import { migrateJobs } from '@/db/jobs'
import { listDue } from '@/db/queries/deliveries'
import { listTries } from '@/db/queries/delivery-tries'
import { listNoticePeople, storeNotices } from '@/db/queries/notice-state'
import { saveSettings } from '@/db/queries/own-settings'
import { listPhones, savePhone } from '@/db/queries/push-subscriptions'
import { readLink } from '@/db/signed-link'
import type { RoutedNotice } from '@/lib/notices/inputs'
import { type PushMessage, pushMessageSchema } from '@/lib/notices/push'
import { pushPerson, type PushRoute } from '@/workers/delivery/push-person'
import { createPushService, type PushService } from '@/workers/delivery/push-service'
import { makeCertificate } from '@/workers/push-trap/certificate'
import { makePhone, type Phone } from '@/workers/push-trap/phone'
import { type PushRequest, type PushTrap, startPushTrap } from '@/workers/push-trap/server'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { seedSite, type SeededSite } from '../support/seed-site'

const now = new Date('2026-03-05T14:00:00Z')
const later = (minutes: number) => new Date(now.getTime() + minutes * 60_000)
const identity = makeCertificate(new Date())
const vapid = webPush.generateVAPIDKeys()

let database: TestDatabase
let trap: PushTrap
let service: PushService
let route: PushRoute
let site: SeededSite
let maker: string
let phone: Phone
let requests: PushRequest[]
let status: number

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
  trap = await startPushTrap({
    port: 0,
    identity,
    keep: (request) => {
      requests.push(request)
      return Promise.resolve(status)
    },
  })
  const inside = { origin: trap.origin, certificate: identity.certificate }
  service = createPushService({ contact: 'mailto:lidfast@example.org', vapid, trap: inside })
  route = { service, baseUrl: 'http://127.0.0.1:3000', authSecret: 'a secret of the tests, long enough' }
})
afterAll(async () => {
  service.close()
  await trap.close()
  await database.drop()
})
beforeEach(async () => {
  requests = []
  status = 201
  phone = makePhone()
  site = await seedSite(database.db, now)
  maker = await site.join('maker')
  await signUp(`${trap.origin}/push/one`)
})
afterEach(() => database.db.deleteFrom('push_subscription').execute())

const signUp = (endpoint: string) =>
  savePhone(database.db, { userId: maker, endpoint, ...phone.keys, device: 'the phone' }, now)

function tell(...titles: string[]): Promise<number> {
  const notices = titles.map((title): RoutedNotice => ({
    key: title,
    rule: 'time-out',
    urgency: 'now',
    mark: 'leave',
    title,
    body: 'Never force a tight lid.',
    link: '/carry',
    episode: { rule: 'time-out', subject: title, key: title },
    to: [{ userId: maker, wakes: false }],
    deliveries: [{ userId: maker, channel: 'push', holdUntil: null }],
  }))
  return database.db
    .transaction()
    .execute((trx) =>
      storeNotices(
        trx,
        site.siteId,
        now,
        notices,
        new Map(),
        (code, user) => `<${code}.${user}@example.org>`,
      ),
    )
}

const shown = (): PushMessage[] =>
  requests.map(({ body }) => pushMessageSchema.parse(JSON.parse(phone.read(body))))
const outcomes = async () =>
  (await listTries(database.db, site.siteId, [1])).map(({ outcome, detail }) => `${outcome}: ${detail}`)

describe('a push', () => {
  it('arrives once, readable by that phone alone, signed with our key, with answers that are signed links', async () => {
    await tell('Bring 207 in now.')
    expect(await pushPerson(database.db, route, maker, now)).toBe(1)
    expect(await pushPerson(database.db, route, maker, now)).toBe(0)
    const [message] = shown()
    expect(message).toMatchObject({ title: 'Bring 207 in now.', silent: false })
    expect(message?.url).toBe(`/sites/${site.siteCode}/carry`)
    expect(message?.actions.map(({ action, token }) => [action, readLink(route.authSecret, token)])).toEqual([
      ['in', expect.objectContaining({ kind: 'answer', answer: 'in', userId: maker, via: 'push' })],
      ['going', expect.objectContaining({ kind: 'answer', answer: 'going', userId: maker, via: 'push' })],
    ])
    const headers = requests[0]?.headers
    expect(headers?.authorization).toContain(`k=${vapid.publicKey}`)
    expect([headers?.urgency, headers?.['content-encoding']]).toEqual(['high', 'aes128gcm'])
    const body = requests[0]?.body ?? Buffer.alloc(0)
    expect(body.length).toBeLessThanOrEqual(4_096)
    expect(() => makePhone().read(body)).toThrow()
    expect(await outcomes()).toEqual(['sent: the phone: taken'])
  })

  it('stays below what push services take, whatever is told', async () => {
    await tell('ß'.repeat(400))
    await pushPerson(database.db, route, maker, now)
    expect(requests[0]?.body.length).toBeLessThanOrEqual(4_096)
  })

  it('of many notices is one that says how many', async () => {
    await tell('One.', 'Two.', 'Three.', 'Four.')
    expect(await pushPerson(database.db, route, maker, now)).toBe(1)
    expect(shown()).toMatchObject([{ title: 'One.', body: 'And 3 more, on the page Notices.' }])
  })

  it('reaches the other phone where one gave a key that nothing can be sealed to, and asks that one no more', async () => {
    const broken = { p256dh: 'B'.repeat(87), auth: phone.keys.auth }
    const endpoint = `${trap.origin}/push/broken`
    await savePhone(database.db, { userId: maker, endpoint, ...broken, device: 'a tablet' }, now)
    await tell('Bring 207 in now.')
    expect(await pushPerson(database.db, route, maker, now)).toBe(1)
    expect(shown()).toHaveLength(1)
    const phones = await listPhones(database.db, maker)
    expect(phones.find((one) => one.endpoint === endpoint)?.goneAt).not.toBeNull()
    expect(phones.find((one) => one.endpoint !== endpoint)?.goneAt).toBeNull()
  })

  it('makes no sound during a session at work', async () => {
    await saveSettings(database.db, site.siteId, maker, { sessionUntil: later(60) })
    await tell('Bring 207 in now.')
    await pushPerson(database.db, route, maker, now)
    expect(shown()).toMatchObject([{ silent: true }])
  })

  it('waits while the service is away, and comes once it is back', async () => {
    await tell('Bring 207 in now.')
    status = 503
    await expect(pushPerson(database.db, route, maker, now)).rejects.toThrow('503')
    status = 201
    expect(await pushPerson(database.db, route, maker, later(5))).toBe(1)
    expect(await outcomes()).toEqual([
      'failed: the phone: the push service answered 503',
      'sent: the phone: taken',
    ])
  })

  it.each([404, 410])(
    'to a phone that is gone (%i) is given up, and the phone is asked no more',
    async (gone) => {
      await tell('Bring 207 in now.')
      status = gone
      expect(await pushPerson(database.db, route, maker, now)).toBe(0)
      expect((await listPhones(database.db, maker)).map(({ goneAt }) => goneAt)).toEqual([now])
      expect(await outcomes()).toEqual(['given-up: the phone: not signed up any more'])
      const people = await listNoticePeople(database.db, site.siteId)
      expect(people.find(({ userId }) => userId === maker)?.wishes?.pushOn).toBe(false)
      expect(await listDue(database.db, maker, 'push', later(1))).toEqual([])
    },
  )

  it('counts as told when one of two phones takes it', async () => {
    await signUp(`${trap.origin.replace('127.0.0.1', '127.0.0.2')}/push/two`)
    await tell('Bring 207 in now.')
    expect(await pushPerson(database.db, route, maker, now)).toBe(1)
    expect((await outcomes())[0]).toMatch(
      /^sent: the phone: taken; the phone: not the address of a push service$/,
    )
  })

  it('never goes to an address of our own network', async () => {
    await database.db.deleteFrom('push_subscription').execute()
    for (const host of ['10.0.0.1', '[::1]', '[::ffff:127.0.0.1]', 'localhost'])
      await signUp(`https://${host}:${new URL(trap.origin).port}/push/one`)
    await tell('Bring 207 in now.')
    await pushPerson(database.db, route, maker, now).catch(() => 0)
    expect(requests).toEqual([])
  })
})

describe('the demo’s certificate', () => {
  it('is for this machine alone and signed by itself', () => {
    const certificate = new X509Certificate(identity.certificate)
    expect(certificate.checkIP('127.0.0.1')).toBe('127.0.0.1')
    expect(certificate.checkHost('example.org')).toBeUndefined()
    expect(certificate.verify(certificate.publicKey)).toBe(true)
  })

  it('is trusted for nothing that others send', async () => {
    await expect(fetch(`${trap.origin}/push/one`, { method: 'POST' })).rejects.toThrow()
  })
})
