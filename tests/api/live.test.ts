import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeSite, type WorldSite } from '../support/api-world'
import { eventually } from '../support/eventually'
import { openStream } from '../support/event-stream'
import { call, openStackDatabase, type Person, signedInPerson } from '../support/session'

const db = openStackDatabase()
let owner: Person
let hand: Person
let onlooker: Person
let stranger: Person
let site: WorldSite
let foreign: WorldSite

beforeAll(async () => {
  owner = await signedInPerson(db, 'live-owner')
  hand = await signedInPerson(db, 'live-hand')
  onlooker = await signedInPerson(db, 'live-onlooker')
  stranger = await signedInPerson(db, 'live-stranger')
  const team = { owner: owner.userId, maker: stranger.userId, hand: hand.userId, onlooker: onlooker.userId }
  site = await makeSite(db, team)
  foreign = await makeSite(db, { ...team, owner: stranger.userId, maker: owner.userId })
})
afterAll(() => db.destroy())

let readings = 0
const type = (of: WorldSite, person: Person) =>
  call('POST', `/api/v1/sites/${of.things.site}/rooms/${of.things.room}/readings`, {
    cookie: person.cookie,
    body: { temperatureC: 19, humidityPct: 50 + (readings += 0.1) },
  })

describe('the stream of changes', () => {
  it('says within two seconds that a reading came, and what kind of thing changed', async () => {
    const stream = await openStream(site.things.site, owner.cookie)
    expect([stream.status, stream.contentType]).toEqual([200, 'text/event-stream; charset=utf-8'])
    expect((await type(site, owner)).status).toBe(201)
    await eventually(
      'a reading is told',
      () => stream.events.some((event) => event.kind === 'reading'),
      2_000,
    )
    await call('PATCH', `/api/v1/sites/${site.things.site}/rooms/${site.things.room}`, {
      cookie: owner.cookie,
      body: { note: 'by the window' },
      ifMatch: 1,
    })
    await eventually(
      'the room is told',
      () => stream.events.some((event) => event.kind === 'room' && event.id === site.things.room),
      2_000,
    )
    stream.close()
  })

  it('says nothing of another site', async () => {
    const stream = await openStream(site.things.site, owner.cookie)
    await type(foreign, stranger)
    await type(site, owner)
    await eventually('its own reading is told', () => stream.events.length > 0, 2_000)
    expect(stream.events).toHaveLength(1)
    stream.close()
  })

  it('does not tell onlookers when a room was read or a piece went out', async () => {
    const stream = await openStream(site.things.site, onlooker.cookie)
    await type(site, owner)
    await call('POST', `/api/v1/sites/${site.things.site}/carries/${site.things.carry}/call-off`, {
      cookie: owner.cookie,
    })
    await call('POST', `/api/v1/sites/${site.things.site}/rooms`, {
      cookie: owner.cookie,
      body: { name: 'Annexe', kind: 'house' },
    })
    await eventually('that some room changed is told', () => stream.events.length > 0, 2_000)
    expect(stream.events).toEqual([{ kind: 'room', id: null }])
    stream.close()
  })

  it('ends for somebody who is no member any more, and is not opened again', async () => {
    const stream = await openStream(site.things.site, hand.cookie)
    await db
      .deleteFrom('member')
      .where('organizationId', '=', site.organizationId)
      .where('userId', '=', hand.userId)
      .execute()
    let isOver = false
    void stream.ended.then(() => (isOver = true))
    await eventually('the stream ends at the next beat', () => isOver, 20_000)
    expect((await openStream(site.things.site, hand.cookie)).status).toBe(404)
  })
})
