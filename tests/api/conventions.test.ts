import { randomUUID } from 'node:crypto'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { makeSite, type WorldSite } from '../support/api-world'
import { openStackDatabase, type Person, signedInPerson, storePerson } from '../support/session'

const db = openStackDatabase()
let owner: Person
let site: WorldSite

beforeAll(async () => {
  owner = await signedInPerson(db, 'conventions-owner')
  const [maker, hand, onlooker] = await Promise.all([
    storePerson(db, 'conventions-maker'),
    storePerson(db, 'conventions-hand'),
    storePerson(db, 'conventions-onlooker'),
  ])
  site = await makeSite(db, {
    owner: owner.userId,
    maker: maker.userId,
    hand: hand.userId,
    onlooker: onlooker.userId,
  })
})
afterAll(() => db.destroy())

type Method = 'get' | 'post' | 'patch' | 'delete'
function ask(method: Method, path: string) {
  const { webUrl } = inject('stack')
  const asked = request(webUrl)
    [method](`/api/v1/sites/${site.things.site}${path}`)
    .set('cookie', owner.cookie)
  return method === 'get' ? asked : asked.set('origin', webUrl).set('content-type', 'application/json')
}

describe('making something', () => {
  it('twice with one key makes it once and gives the same answer', async () => {
    const key = randomUUID()
    const send = () =>
      ask('post', '/sensors').set('idempotency-key', key).send({ name: 'Twice', roomId: site.things.room })
    const [first, second] = await Promise.all([send(), send()])
    expect([first.status, second.status]).toEqual([201, 201])
    expect(second.body).toEqual(first.body)
    // Even the secret, which is stored nowhere: the kept answer is sealed.
    expect(first.body.credential.secret).toMatch(/^[2-9a-z]{24}$/)
    expect(first.headers.location).toBe(`/api/v1/sites/${site.things.site}/sensors/${first.body.id}`)
    const list = await ask('get', '/sensors')
    expect(list.body.items.filter((sensor: { name: string }) => sensor.name === 'Twice')).toHaveLength(1)
    const kept = await db
      .selectFrom('idempotency')
      .where('key', '=', key)
      .selectAll()
      .executeTakeFirstOrThrow()
    expect(JSON.stringify(kept)).not.toContain(first.body.credential.secret)
  })

  it('needs a key, and a key is for one request', async () => {
    const body = { name: 'Keyless', kind: 'house' }
    expect((await ask('post', '/rooms').send(body)).status).toBe(400)
    const key = randomUUID()
    expect((await ask('post', '/rooms').set('idempotency-key', key).send(body)).status).toBe(201)
    const other = await ask('post', '/rooms')
      .set('idempotency-key', key)
      .send({ ...body, name: 'Other' })
    expect([other.status, other.body.type]).toEqual([422, '/problems/key-reused'])
  })

  it('keeps nothing of what was refused', async () => {
    const key = randomUUID()
    const send = (name: string) =>
      ask('post', '/rooms').set('idempotency-key', key).send({ name, kind: 'house' })
    expect((await send('CUPBOARD')).status).toBe(409)
    expect((await send('A free name')).status).toBe(201)
  })
})

describe('changing something', () => {
  const room = () => `/rooms/${site.things.shop}`

  it('asks for the version, and gives the second writer what is there now', async () => {
    const seen = await ask('get', room())
    expect(seen.headers.etag).toMatch(/^"\d+"$/)
    expect((await ask('patch', room()).send({ note: 'x' })).status).toBe(428)
    const first = await ask('patch', room())
      .set('if-match', seen.headers.etag ?? '')
      .send({ note: 'first' })
    expect(first.status).toBe(200)
    const second = await ask('patch', room())
      .set('if-match', seen.headers.etag ?? '')
      .send({ note: 'second' })
    expect(second.status).toBe(412)
    expect(second.headers['content-type']).toMatch(/^application\/problem\+json/)
    expect(second.headers.etag).toBe(first.headers.etag)
    expect(second.body).toMatchObject({ type: '/problems/changed-meanwhile', current: { note: 'first' } })
  })
})

describe('asking for figures', () => {
  const series = (query: string) => ask('get', `/rooms/${site.things.room}/series?${query}`)

  it('is refused quickly over 100 years, for too many points and for keys that nobody knows', async () => {
    const began = performance.now()
    expect((await series('from=1900-01-01T00:00:00Z&to=2026-01-01T00:00:00Z')).status).toBe(400)
    expect((await series('points=5000')).status).toBe(400)
    expect((await series('points=1e3')).status).toBe(400)
    const many = (count: number) => Array.from({ length: count }, (_, n) => `q${String(n)}=1`).join('&')
    expect((await series(many(1_500))).status).toBe(400)
    // So long an address does not even get past the reading of the request's head.
    expect((await series(many(5_000))).status).toBe(431)
    expect(performance.now() - began).toBeLessThan(15_000)
    const unknown = await series('grain=raw')
    expect(unknown.body.errors).toEqual([{ path: 'grain', message: 'not known here' }])
  })

  it('says up to when the figures are settled', async () => {
    const answer = await series('points=100')
    expect(answer.body).toMatchObject({ grain: 'raw', completeTo: null, age: null, at: [] })
  })

  it('takes no order that is not in its list', async () => {
    expect((await ask('get', '/pieces?sort=note')).status).toBe(400)
    expect((await ask('get', "/pieces?sort=number'--")).status).toBe(400)
    expect((await ask('get', '/carries?sort=-planned&limit=201')).status).toBe(400)
  })
})

describe('starting a carry', () => {
  it('against the advice is a conflict that says why', async () => {
    const { room, shop } = site.things
    const type = (of: string, temperatureC: number, humidityPct: number) =>
      ask('post', `/rooms/${of}/readings`)
        .set('idempotency-key', randomUUID())
        .send({ temperatureC, humidityPct })
    await type(room, 20, 45)
    await type(shop, 8, 85)
    const piece = await ask('post', '/pieces').set('idempotency-key', randomUUID()).send({
      number: 'K1',
      wood: 'fagus-sylvatica',
      jointDiameterMm: 88,
      fitGrade: 'suction',
      roomId: room,
      allowanceMm: 0.01,
      wallMm: 2,
    })
    const send = (againstAdvice: boolean) =>
      ask('post', '/carries')
        .set('idempotency-key', randomUUID())
        .send({
          pieceIds: [piece.body.id],
          toRoomId: shop,
          cover: 'open',
          stayMinutes: 120,
          startsNow: true,
          againstAdvice,
        })
    const refused = await send(false)
    expect([refused.status, refused.body.type]).toEqual([409, '/problems/advised-against'])
    expect(refused.body.errors[0]).toMatchObject({ path: 'K1' })
    const out = await send(true)
    expect([out.status, out.body.state, out.body.againstAdvice]).toEqual([201, 'out', true])
    const now = await ask('get', '/now')
    expect(now.body.out).toHaveLength(1)
    expect(now.body.headline.map((part: { text: string }) => part.text).join('')).toMatch(/^Bring K1 in/)
  })
})
