import { hashPassword } from 'better-auth/crypto'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { newTextId } from '@/db/queries/sites'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { forgetServer, serverEnvironment } from '../support/server-modules'

let database: TestDatabase
let hash: string
beforeAll(async () => {
  database = await createTestDatabase()
  hash = await hashPassword('the right password')
})
afterAll(() => database.drop())

// Limits count by the clock, so it stands still: no try falls into the next ten seconds by chance.
beforeEach(() => void vi.useFakeTimers({ toFake: ['Date'] }))
afterEach(async () => {
  vi.useRealTimers()
  await forgetServer()
})

async function door(more: Record<string, string> = {}) {
  serverEnvironment({ DATABASE_URL: database.url, AUTH_RATE_LIMIT: '3', ...more })
  await database.db.deleteFrom('rate_count').execute()
  const { answerAuth } = await import('@/app/_server/auth-door')
  return (path: string, body: unknown, headers: Record<string, string> = {}) =>
    answerAuth(
      new Request(`http://127.0.0.1:3000/api/auth/${path}`, {
        method: 'POST',
        headers: { origin: 'http://127.0.0.1:3000', 'content-type': 'application/json', ...headers },
        body: JSON.stringify(body),
      }),
    )
}

async function storeAccount(): Promise<string> {
  const id = newTextId()
  const email = `${id.slice(0, 16).toLowerCase()}@example.org`
  const now = new Date()
  const user = {
    id,
    name: 'Somebody',
    email,
    emailVerified: true,
    image: null,
    createdAt: now,
    updatedAt: now,
  }
  await database.db.insertInto('user').values(user).execute()
  await database.db
    .insertInto('account')
    .values({
      id: newTextId(),
      accountId: id,
      providerId: 'credential',
      userId: id,
      password: hash,
      createdAt: now,
      updatedAt: now,
    })
    .execute()
  return email
}

const right = 'the right password'
const cookiesOf = (response: Response) =>
  response.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ')

describe('guessing at one account', () => {
  it('is stopped after three tries in ten seconds, whatever address the guesser claims to have', async () => {
    const ask = await door()
    const email = await storeAccount()
    const statuses: number[] = []
    for (let n = 1; n <= 5; n += 1) {
      const claim = {
        'x-forwarded-for': `203.0.113.${n}`,
        'x-real-ip': `203.0.113.${n}`,
        forwarded: `for=10.0.0.${n}`,
      }
      statuses.push((await ask('sign-in/email', { email, password: `guess ${n}` }, claim)).status)
    }
    expect(statuses).toEqual([401, 401, 401, 429, 429])
    const refused = await ask('sign-in/email', { email: email.toUpperCase(), password: right })
    expect(refused.status).toBe(429)
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0)
    vi.setSystemTime(Date.now() + 10_000)
    expect((await ask('sign-in/email', { email, password: right })).status).toBe(200)
  })

  it('is stopped for longer after thirty tries in an hour', async () => {
    const ask = await door()
    vi.setSystemTime(Math.ceil(Date.now() / 3_600_000) * 3_600_000)
    const email = await storeAccount()
    for (let n = 0; n < 30; n += 1) {
      expect((await ask('sign-in/email', { email, password: 'guess' })).status).toBe(401)
      if (n % 3 === 2) vi.setSystemTime(Date.now() + 10_000)
    }
    const refused = await ask('sign-in/email', { email, password: 'guess' })
    expect(refused.status).toBe(429)
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(3_000)
  })

  it('does not lock the owner out of a browser in which they have signed in before', async () => {
    const ask = await door()
    const email = await storeAccount()
    const cookie = cookiesOf(await ask('sign-in/email', { email, password: right }))
    for (let n = 0; n < 6; n += 1) await ask('sign-in/email', { email, password: 'guess' })
    expect((await ask('sign-in/email', { email, password: right })).status).toBe(429)
    expect((await ask('sign-in/email', { email, password: right }, { cookie })).status).toBe(200)
  })

  it('gains nothing by the mark of another account’s browser, or a made-up one', async () => {
    const ask = await door()
    const [own, victim] = [await storeAccount(), await storeAccount()]
    const cookie = cookiesOf(await ask('sign-in/email', { email: own, password: right }))
    const made = { cookie: 'lidfast.device=AAAAAAAAAAAAAAAAAAAAAA.AAAA' }
    const tries = [{ cookie }, made, { cookie }, made, { cookie }]
    const statuses: number[] = []
    for (const headers of tries) {
      statuses.push((await ask('sign-in/email', { email: victim, password: 'guess' }, headers)).status)
    }
    expect(statuses).toEqual([401, 401, 401, 429, 429])
  })

  it('in many requests at the same moment gets no more tries', async () => {
    const ask = await door()
    const email = await storeAccount()
    const replies = await Promise.all(
      Array.from({ length: 12 }, (_, n) => ask('sign-in/email', { email, password: `guess ${n}` })),
    )
    expect(replies.filter((reply) => reply.status === 401).length).toBe(3)
  })
})

describe('guessing at many accounts', () => {
  it('is stopped in total, also for accounts that do not exist', async () => {
    const ask = await door({ AUTH_RATE_LIMIT: '1' })
    const statuses: number[] = []
    for (let n = 0; n < 22; n += 1) {
      const email = `nobody.${newTextId().slice(0, 10).toLowerCase()}@example.org`
      statuses.push((await ask('sign-in/email', { email, password: 'guess' })).status)
    }
    expect(statuses.slice(0, 20).every((status) => status === 401)).toBe(true)
    expect(statuses.slice(20)).toEqual([429, 429])
  })

  it('is stopped by peer where the configuration names the header that the proxy writes', async () => {
    const ask = await door({ PEER_ADDRESS_HEADER: 'x-true-peer' })
    const guess = (peer: string) =>
      ask(
        'sign-in/email',
        { email: `${newTextId().slice(0, 10).toLowerCase()}@example.org`, password: 'guess' },
        { 'x-true-peer': peer, 'x-forwarded-for': newTextId() },
      )
    for (let n = 0; n < 9; n += 1) expect((await guess('198.51.100.7')).status).toBe(401)
    expect((await guess('198.51.100.7')).status).toBe(429)
    expect((await guess('198.51.100.8')).status).toBe(401)
  })
})

it('sends one address only so many mails, whether or not it has an account', async () => {
  const ask = await door()
  const known = await storeAccount()
  for (const email of [known, 'nobody.at.all@example.org']) {
    const statuses: number[] = []
    for (let n = 0; n < 4; n += 1) statuses.push((await ask('request-password-reset', { email })).status)
    expect(statuses).toEqual([200, 200, 200, 429])
  }
  vi.setSystemTime(Math.ceil(Date.now() / 3_600_000) * 3_600_000)
  for (let n = 0; n < 6; n += 1) {
    expect((await ask('request-password-reset', { email: known })).status).toBe(200)
    if (n === 2) vi.setSystemTime(Date.now() + 10_000)
  }
  vi.setSystemTime(Date.now() + 10_000)
  expect((await ask('request-password-reset', { email: known })).status).toBe(429)
})

it('stores no address of a person in its counts', async () => {
  const ask = await door()
  const email = await storeAccount()
  await ask('sign-in/email', { email, password: 'guess' })
  const rows = await database.db.selectFrom('rate_count').selectAll().execute()
  expect(rows.length).toBeGreaterThan(0)
  expect(JSON.stringify(rows)).not.toContain(email)
})
