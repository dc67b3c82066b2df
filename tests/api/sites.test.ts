import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newTextId } from '@/db/queries/sites'
import type { Member, Site, SiteFrame } from '@/lib/sites/site'
import type { Problem } from '@/lib/api/problems'
import { makeSite, type WorldSite } from '../support/api-world'
import { call, openStackDatabase, signedInPerson, storePerson, type Person } from '../support/session'

const db = openStackDatabase()
const people = {} as Record<'owner' | 'maker' | 'hand' | 'onlooker', Person>
beforeAll(async () => {
  for (const role of ['owner', 'maker', 'hand', 'onlooker'] as const)
    people[role] = await signedInPerson(db, role)
})
afterAll(() => db.destroy())

const freshSite = (): Promise<WorldSite> =>
  makeSite(db, {
    owner: people.owner.userId,
    maker: people.maker.userId,
    hand: people.hand.userId,
    onlooker: people.onlooker.userId,
  })
const at = (site: WorldSite, rest = '') => `/api/v1/sites/${site.things.site}${rest}`
const membersOf = async (site: WorldSite) =>
  (await call('GET', at(site, '/members'), { cookie: people.owner.cookie })).json<{ items: Member[] }>().items
const newSite = (name: string) => ({ name, timeZone: 'America/New_York', unitSystem: 'imperial', rooms: [] })

describe('making a site', () => {
  it('makes it with its rooms, and its maker as owner', async () => {
    const { cookie } = await signedInPerson(db, 'Founder')
    const body = {
      ...newSite('Founder’s Yard'),
      rooms: [
        { name: 'Landing cupboard', kind: 'cupboard' },
        { name: 'Shop', kind: 'shop' },
      ],
    }
    const made = await call('POST', '/api/v1/sites', { cookie, body })
    const site = made.json<Site>()
    expect([made.status, made.headers.get('location')]).toEqual([201, `/api/v1/sites/${site.id}`])
    expect(site).toMatchObject({
      name: 'Founder’s Yard',
      timeZone: 'America/New_York',
      role: 'owner',
      version: 1,
    })
    const frame = (await call('GET', `/api/v1/sites/${site.id}/frame`, { cookie })).json<SiteFrame>()
    expect(frame.counts).toMatchObject({ rooms: 2, sensors: 0, pieces: 0 })
    expect(frame.unitSystem).toBe('imperial')
  })

  it('makes nothing when two rooms bear one name', async () => {
    const { cookie } = await signedInPerson(db, 'Founder')
    const rooms = [
      { name: 'Shop', kind: 'shop' },
      { name: 'shop', kind: 'store' },
    ]
    const refused = await call('POST', '/api/v1/sites', { cookie, body: { ...newSite('Twice'), rooms } })
    expect(refused.status).toBe(409)
    expect(refused.json<Problem>().errors?.[0]?.path).toBe('rooms.1.name')
    expect((await call('GET', '/api/v1/sites', { cookie })).json()).toEqual({ items: [], nextCursor: null })
  })

  it('makes one site of a form that was sent many times at once', async () => {
    const { cookie } = await signedInPerson(db, 'Impatient')
    const headers = { 'idempotency-key': newTextId() }
    const send = () => call('POST', '/api/v1/sites', { cookie, body: newSite('Once'), headers })
    const replies = await Promise.all([send(), send(), send(), send()])
    expect(new Set(replies.map((reply) => `${reply.status} ${reply.text}`)).size).toBe(1)
    const later = await send()
    expect([later.status, later.text]).toEqual([201, replies[0]?.text])
    expect(later.headers.get('location')).toBe(replies[0]?.headers.get('location'))
    const { items } = (await call('GET', '/api/v1/sites', { cookie })).json<{ items: Site[] }>()
    expect(items.map((site) => site.name)).toEqual(['Once'])
  })

  it('refuses a key that came with another request, and a POST without one', async () => {
    const { cookie } = await signedInPerson(db, 'Forgetful')
    const headers = { 'idempotency-key': newTextId() }
    await call('POST', '/api/v1/sites', { cookie, body: newSite('First'), headers })
    const other = await call('POST', '/api/v1/sites', { cookie, body: newSite('Second'), headers })
    expect([other.status, other.json<Problem>().type]).toEqual([422, '/problems/key-reused'])
    const without = await call('POST', '/api/v1/sites', {
      cookie,
      body: newSite('Third'),
      headers: { 'idempotency-key': null },
    })
    expect(without.status).toBe(400)
    const { items } = (await call('GET', '/api/v1/sites', { cookie })).json<{ items: Site[] }>()
    expect(items.map((site) => site.name)).toEqual(['First'])
  })

  it('lets another person use the same key for themselves', async () => {
    const headers = { 'idempotency-key': newTextId() }
    const [one, two] = [await signedInPerson(db, 'One'), await signedInPerson(db, 'Two')]
    const made = await Promise.all(
      [one, two].map(({ cookie }) =>
        call('POST', '/api/v1/sites', { cookie, body: newSite('Own'), headers }),
      ),
    )
    expect(made.map((reply) => reply.status)).toEqual([201, 201])
    expect(made[0]?.json<Site>().id).not.toBe(made[1]?.json<Site>().id)
  })

  it('keeps the answer that a retry gets in a form that the database alone does not give away', async () => {
    const { cookie, userId } = await signedInPerson(db, 'Sealed')
    await call('POST', '/api/v1/sites', { cookie, body: newSite('Unreadable Yard') })
    const [kept] = await db.selectFrom('idempotency').where('user_id', '=', userId).selectAll().execute()
    expect(kept?.status).toBe(201)
    expect(JSON.stringify(kept?.body)).not.toContain('Unreadable')
  })

  it('takes every sign of a name literally', async () => {
    const { cookie } = await signedInPerson(db, 'Bobby')
    const name = `'; drop table site; -- %_\\ "<b>`
    const made = await call('POST', '/api/v1/sites', { cookie, body: newSite(name) })
    expect(made.json<Site>().name).toBe(name)
    const { items } = (await call('GET', '/api/v1/sites', { cookie })).json<{ items: Site[] }>()
    expect(items[0]?.name).toBe(name)
  })
})

describe('changing a site', () => {
  it('needs the version that was read, and shows the present one to the second of two writers', async () => {
    const site = await freshSite()
    const { cookie } = people.owner
    const read = await call('GET', at(site), { cookie })
    expect(read.headers.get('etag')).toBe('"1"')
    expect((await call('PATCH', at(site), { cookie, body: { name: 'A' } })).status).toBe(428)
    const odd = { 'if-match': '*' }
    expect((await call('PATCH', at(site), { cookie, body: { name: 'A' }, headers: odd })).status).toBe(400)

    const both = await Promise.all(
      ['First', 'Second'].map((name) => call('PATCH', at(site), { cookie, body: { name }, ifMatch: 1 })),
    )
    const done = both.find((reply) => reply.status === 200)
    const late = both.find((reply) => reply.status === 412)
    expect(done?.json<Site>().version).toBe(2)
    expect(late?.json<Problem>().current).toEqual(done?.json())
    expect(late?.headers.get('etag')).toBe('"2"')
  })

  it('records who changed what, before and after', async () => {
    const site = await freshSite()
    await call('PATCH', at(site), { cookie: people.owner.cookie, body: { quietFrom: '21:30' }, ifMatch: 1 })
    const change = await db
      .selectFrom('change')
      .where('site_id', '=', site.siteId)
      .where('action', '=', 'update')
      .select(['user_id', 'before', 'after'])
      .executeTakeFirstOrThrow()
    expect(change).toEqual({
      user_id: people.owner.userId,
      before: { quietFrom: '22:00' },
      after: { quietFrom: '21:30' },
    })
  })

  it.each([
    { timeZone: 'Mars/Olympus' },
    { name: '' },
    { name: 'x'.repeat(81) },
    { quietFrom: '25:00' },
    { unitSystem: 'cubits' },
    { id: 'another' },
    { isDemo: true },
    { version: 7 },
  ])('refuses %j and names the field', async (body) => {
    const site = await freshSite()
    const reply = await call('PATCH', at(site), { cookie: people.owner.cookie, body, ifMatch: 1 })
    expect(reply.status).toBe(400)
    expect(reply.headers.get('content-type')).toBe('application/problem+json')
    expect(reply.json<Problem>().errors?.[0]?.path).toBe(Object.keys(body)[0])
  })
})

describe('deleting a site', () => {
  it('asks for its name, removes all of it, and never gives its codes out again', async () => {
    const site = await freshSite()
    const { cookie } = people.owner
    const wrong = await call('DELETE', at(site), { cookie, body: { name: 'Another Yard' } })
    expect(wrong.status).toBe(422)
    expect((await call('DELETE', at(site), { cookie })).status).toBe(422)
    expect((await call('DELETE', at(site), { cookie, body: { name: site.siteName } })).status).toBe(204)
    expect((await call('GET', at(site), { cookie })).status).toBe(404)
    for (const table of ['room', 'sensor', 'piece', 'carry', 'notice', 'change', 'member_setting'] as const) {
      const left = await db.selectFrom(table).where('site_id', '=', site.siteId).select('site_id').execute()
      expect(left, table).toEqual([])
    }
    const retired = await db
      .selectFrom('retired_code')
      .where('code', 'in', [site.things.site, site.things.sensor])
      .select('code')
      .execute()
    expect(retired.length).toBe(2)
  })
})

it('removes a demo in one press', async () => {
  const site = await freshSite()
  await db.updateTable('site').set({ is_demo: true }).where('id', '=', site.siteId).execute()
  const gone = await call('DELETE', at(site), { cookie: people.owner.cookie })
  expect(gone.status, gone.text).toBe(204)
  expect((await call('GET', at(site), { cookie: people.owner.cookie })).status).toBe(404)
})

describe('members', () => {
  it('lose what a lower role may not do, and everything once they are out, at their next request', async () => {
    const site = await freshSite()
    const { maker, owner } = people
    const rename = () => call('GET', at(site, '/members'), { cookie: maker.cookie })
    expect((await rename()).status).toBe(200)
    const id = (await membersOf(site)).find((member) => member.name === maker.name)?.id ?? ''
    await call('PATCH', at(site, `/members/${id}`), { cookie: owner.cookie, body: { role: 'onlooker' } })
    expect((await rename()).status).toBe(403)
    expect((await call('GET', at(site), { cookie: maker.cookie })).json<Site>().role).toBe('onlooker')
    await call('DELETE', at(site, `/members/${id}`), { cookie: owner.cookie })
    expect((await rename()).status).toBe(404)
    expect((await call('GET', at(site), { cookie: maker.cookie })).status).toBe(404)
  })

  it('can not leave the site without an owner', async () => {
    const site = await freshSite()
    const { cookie } = people.owner
    const own = (await membersOf(site)).find((member) => member.isYou)
    expect(own?.isOnlyOwner).toBe(true)
    const id = own?.id ?? ''
    const refused = [
      await call('DELETE', at(site, '/members/me'), { cookie }),
      await call('DELETE', at(site, `/members/${id}`), { cookie }),
      await call('PATCH', at(site, `/members/${id}`), { cookie, body: { role: 'hand' } }),
    ]
    expect(refused.map((reply) => [reply.status, reply.json<Problem>().type])).toEqual(
      Array(3).fill([422, '/problems/last-owner']),
    )
    expect((await call('GET', at(site), { cookie })).json<Site>().role).toBe('owner')
  })

  it('keep one owner when two of them put each other down, or both leave, at the same moment', async () => {
    for (const together of ['lower', 'leave'] as const) {
      const site = await freshSite()
      const list = await membersOf(site)
      const idOf = (person: Person) => list.find((member) => member.name === person.name)?.id ?? ''
      const { owner, maker } = people
      const body = { role: 'owner' }
      await call('PATCH', at(site, `/members/${idOf(maker)}`), { cookie: owner.cookie, body })
      const act = (by: Person, on: Person) =>
        together === 'leave'
          ? call('DELETE', at(site, '/members/me'), { cookie: by.cookie })
          : call('PATCH', at(site, `/members/${idOf(on)}`), { cookie: by.cookie, body: { role: 'hand' } })
      const replies = await Promise.all([act(owner, maker), act(maker, owner)])
      expect(replies.filter((reply) => reply.status < 300).length, together).toBe(1)
      const owners = await db
        .selectFrom('member')
        .where('organizationId', '=', site.organizationId)
        .where('role', '=', 'owner')
        .select('id')
        .execute()
      expect(owners.length, together).toBe(1)
    }
  })

  it('keep their own wishes to themselves', async () => {
    const site = await freshSite()
    const body = { unitSystem: 'imperial', onHouseList: true }
    await call('PATCH', at(site, '/members/me'), { cookie: people.hand.cookie, body, ifMatch: 1 })
    const settingsOf = async ({ cookie }: Person) =>
      (await call('GET', at(site, '/members/me'), { cookie })).json()
    expect(await settingsOf(people.hand)).toMatchObject({ unitSystem: 'imperial', onHouseList: true })
    expect(await settingsOf(people.maker)).toMatchObject({ unitSystem: null, onHouseList: false })
    const frame = await call('GET', at(site, '/frame'), { cookie: people.hand.cookie })
    expect(frame.json<SiteFrame>().unitSystem).toBe('imperial')
  })
})

describe('a request that is too much', () => {
  it('is refused quickly: ten megabytes, thousands of query keys, a key twice, a deep nest', async () => {
    const { cookie } = people.owner
    const site = await freshSite()
    const began = performance.now()
    const huge = JSON.stringify({ name: 'x'.repeat(10_000_000) })
    const large = await call('PATCH', at(site), { cookie, rawBody: huge, ifMatch: 1 })
    expect(large.status).toBe(413)
    const keys = Array.from({ length: 600 }, (_, n) => `k${n}=1`).join('&')
    expect((await call('GET', at(site, `?${keys}`), { cookie })).status).toBe(400)
    const deep = '['.repeat(30_000) + ']'.repeat(30_000)
    expect((await call('PATCH', at(site), { cookie, rawBody: deep, ifMatch: 1 })).status).toBe(400)
    const odd = '{"__proto__":{"role":"owner"},"name":"A"}'
    expect((await call('PATCH', at(site), { cookie, rawBody: odd, ifMatch: 1 })).status).toBe(400)
    expect((await call('PATCH', at(site), { cookie, rawBody: '{"name":', ifMatch: 1 })).status).toBe(400)
    const nul = await call('PATCH', at(site), { cookie, body: { name: 'A\0B' }, ifMatch: 1 })
    expect(nul.status).toBe(400)
    expect((await call('GET', '/api/v1/sites/%00%00%00%00%00%00%00%00%00%00', { cookie })).status).toBe(404)
    expect(performance.now() - began).toBeLessThan(5_000)
  })

  it('is refused when a list is asked for by an unknown key, size or place', async () => {
    const ask = (query: string) => call('GET', `/api/v1/demo/inbox?${query}`)
    for (const query of [
      'sort=sender;drop',
      'limit=0',
      'limit=201',
      'limit=1e2',
      'cursor=bm8',
      'limit=5&limit=6',
    ]) {
      expect((await ask(query)).status, query).toBe(400)
    }
    expect((await ask('limit=1')).status).toBe(200)
  })
})

it('says to an unconfirmed person nothing about sites', async () => {
  const site = await freshSite()
  const person = await storePerson(db, 'Unconfirmed')
  await db.updateTable('user').set({ emailVerified: false }).where('id', '=', person.userId).execute()
  const signedIn = await call('POST', '/api/auth/sign-in/email', {
    body: { email: person.email, password: person.password },
  })
  expect([signedIn.status, signedIn.cookie]).toEqual([403, ''])
  expect((await call('GET', at(site))).status).toBe(401)
})
