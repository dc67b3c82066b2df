import { sql } from 'kysely'
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import { newTextId } from '@/db/queries/sites'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'
import { freePort } from '@/workers/supervisor/ports'
import { forgetServer, serverEnvironment } from '../support/server-modules'
import { storePerson } from '../support/session'

let database: TestDatabase
let cookie = ''
beforeAll(async () => {
  database = await createTestDatabase()
  const { email, password } = await storePerson(database.db, 'Somebody')
  serverEnvironment({ DATABASE_URL: database.url, AUTH_RATE_LIMIT: '1000' })
  const { answerAuth } = await import('@/app/_server/auth-door')
  const signedIn = await answerAuth(post('/api/auth/sign-in/email', { email, password }))
  cookie = signedIn.headers
    .getSetCookie()
    .map((set) => set.split(';')[0])
    .join('; ')
  // The account library is large, and a machine at work on other tests takes its time to load it.
}, 120_000)
afterEach(forgetServer)
afterAll(() => database.drop())

function post(path: string, body: unknown, headers: Record<string, string> = {}): Request {
  return new Request(`http://127.0.0.1:3000${path}`, {
    method: 'POST',
    headers: { origin: 'http://127.0.0.1:3000', 'content-type': 'application/json', ...headers },
    body: JSON.stringify(body),
  })
}

const context = { params: Promise.resolve({}) }
const made = async () => {
  const row = await database.db
    .selectFrom('stray_count')
    .select(sql<number>`count(*)::int`.as('n'))
    .executeTakeFirst()
  return row?.n
}

async function makingRoute(before: () => Promise<void> = async () => undefined, after = before) {
  serverEnvironment({ DATABASE_URL: database.url })
  await database.db.deleteFrom('stray_count').execute()
  const { signedInRoute } = await import('@/app/_server/route')
  const { answer } = await import('@/app/_server/respond')
  return signedInRoute({ creates: true }, async ({ db, afterwards }) => {
    await before()
    const kind = newTextId()
    await db.insertInto('stray_count').values({ day_on: '2026-01-01', kind, n: 1 }).execute()
    afterwards(after)
    return answer({ kind }, { status: 201 })
  })
}

describe('a route that makes something', () => {
  it('does its work once when a second request comes while the first is at it, and answers both alike', async () => {
    let release = () => undefined as void
    const gate = new Promise<void>((resolve) => (release = resolve))
    const begun = vi.fn()
    const route = await makingRoute(
      () => {
        begun()
        return gate
      },
      async () => undefined,
    )
    const key = { cookie, 'idempotency-key': newTextId() }
    const first = route(post('/x', {}, key), context)
    await eventually('the first has begun', () => begun.mock.calls.length === 1)
    const second = route(post('/x', {}, key), context)
    // The second is held at the key until the first has committed: the database shows it waiting.
    await eventually('the second waits', async () => {
      const { rows } = await sql<{ n: number }>`select count(*)::int as n from pg_stat_activity
        where datname = current_database() and wait_event_type = 'Lock'`.execute(database.db)
      return (rows[0]?.n ?? 0) > 0
    })
    release()
    const replies = await Promise.all([first, second])
    const texts = await Promise.all(replies.map((reply) => reply.text()))
    expect(replies.map((reply) => reply.status)).toEqual([201, 201])
    expect(texts[0]).toBe(texts[1])
    expect(begun).toHaveBeenCalledTimes(1)
    expect(await made()).toBe(1)
  })

  it('leaves nothing behind when it fails, and does the work when it is asked again', async () => {
    let fails = true
    const route = await makingRoute(async () => {
      if (fails) throw new Error('half-way')
    })
    const key = { cookie, 'idempotency-key': newTextId() }
    serverEnvironment({ LOG_LEVEL: 'error' })
    expect((await route(post('/x', {}, key), context)).status).toBe(500)
    expect(await made()).toBe(0)
    fails = false
    expect((await route(post('/x', {}, key), context)).status).toBe(201)
    expect(await made()).toBe(1)
  })

  it('stands by what it made when the mail afterwards can not be sent', async () => {
    const route = await makingRoute(
      async () => undefined,
      async () => {
        throw new Error('no mail server')
      },
    )
    const reply = await route(post('/x', {}, { cookie, 'idempotency-key': newTextId() }), context)
    expect(reply.status).toBe(201)
    expect(await made()).toBe(1)
  })
})

describe('while the database is away', () => {
  const away = async () =>
    serverEnvironment({ DATABASE_URL: `postgres://a:b@127.0.0.1:${await freePort()}/c` })

  it('a signed-in request gets a 503 that says to try again, and not that nobody is signed in', async () => {
    await away()
    const { signedInRoute } = await import('@/app/_server/route')
    const { answer } = await import('@/app/_server/respond')
    const route = signedInRoute({}, () => answer({}))
    const reply = await route(new Request('http://127.0.0.1:3000/x', { headers: { cookie } }), context)
    expect(reply.status).toBe(503)
    expect(reply.headers.get('retry-after')).toBe('10')
    const text = await reply.text()
    expect(JSON.parse(text)).toMatchObject({ type: '/problems/database-away' })
    expect(text).not.toMatch(/127\.0\.0\.1|ECONN|postgres/)
  })

  it('signing in gets a 503 too', async () => {
    await away()
    const { answerAuth } = await import('@/app/_server/auth-door')
    const body = { email: 'a@example.org', password: 'whatever it is' }
    expect((await answerAuth(post('/api/auth/sign-in/email', body))).status).toBe(503)
    const session = new Request('http://127.0.0.1:3000/api/auth/get-session', { headers: { cookie } })
    expect((await answerAuth(session)).status).toBe(503)
  })
})
