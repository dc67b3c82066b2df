import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newCode } from '@/db/queries/counters'
import { may, roleSchema, type Role } from '@/lib/sites/permissions'
import { fingerprintOf, makeSite, type Team, type Things, type WorldSite } from '../support/api-world'
import { findRoutes, nameOf, type Route } from '../support/route-files'
import {
  call,
  openStackDatabase,
  signedInPerson,
  type CallOptions,
  type Person,
  type Reply,
} from '../support/session'
import type { Row } from './route-row'
import { routeTable } from './route-table'

const routes = await findRoutes()
const rows = routes.flatMap((route) => {
  const row = routeTable[nameOf(route)]
  return row === undefined ? [] : [{ route, row, name: nameOf(route) }]
})
const ofSites = rows.filter(({ row }) => !isOpen(row))
const changes = rows.filter(({ route, row }) => route.method !== 'GET' && row.isPressedByServers !== true)
const roles = roleSchema.options

type Entry = (typeof rows)[number]

function isOpen({ action }: Row): boolean {
  return action === 'anyone' || action === 'signed-in'
}

const db = openStackDatabase()
const people = {} as Record<Role | 'stranger', Person>
let foreign: WorldSite

const freshSite = (): Promise<WorldSite> => makeSite(db, teamOf(people))
const teamOf = (of: Record<Role, Person>): Team => ({
  owner: of.owner.userId,
  maker: of.maker.userId,
  hand: of.hand.userId,
  onlooker: of.onlooker.userId,
})

beforeAll(async () => {
  for (const name of [...roles, 'stranger'] as const) people[name] = await signedInPerson(db, name)
  // The stranger runs a site of their own, so they are somebody, only not here.
  const helpers = await Promise.all(roles.slice(1).map((role) => signedInPerson(db, `other-${role}`)))
  const [maker, hand, onlooker] = helpers
  if (!maker || !hand || !onlooker) throw new Error('people are missing')
  foreign = await makeSite(db, teamOf({ owner: people.stranger, maker, hand, onlooker }))
})
afterAll(() => db.destroy())

interface Asking {
  cookie?: string
  address?: Things
  body?: Things
  more?: CallOptions
}

/** Asks a route with its sample, on a site; the ids in the address and in the body may each come from elsewhere. */
function ask(
  { route, row }: { route: Route; row: Row },
  site: WorldSite,
  asking: Asking = {},
): Promise<Reply> {
  const inAddress = asking.address ?? site.things
  const inBody = asking.body ?? site.things
  const path = route.address.replace(/\[(\w+)\]/g, (_, name: string) => {
    const id = inAddress[name as keyof Things]
    if (id === undefined) throw new Error(`api-world.ts has nothing called "${name}"`)
    return id
  })
  const query = row.query === undefined ? '' : `?${new URLSearchParams(row.query(inBody)).toString()}`
  return call(route.method, path + query, {
    cookie: asking.cookie,
    body: row.body?.(inBody, site),
    ifMatch: row.ifMatch === true ? 1 : undefined,
    ...asking.more,
  })
}

async function prepare({ row }: Entry, site: WorldSite): Promise<void> {
  await row.prepare?.({
    db,
    site,
    asOwner: async (method, path, body) => {
      const reply = await call(method, `/api/v1/sites/${site.things.site}${path}`, {
        cookie: people.owner.cookie,
        body,
      })
      if (reply.status >= 300) throw new Error(`${method} ${path}: ${reply.status} ${reply.text}`)
      return reply
    },
  })
}

/** What an answer gives away: everything but the moment and the connection. */
const seen = ({ status, text, headers }: Reply) => ({
  status,
  text,
  headers: [...headers].filter(([name]) => !['date', 'connection', 'keep-alive'].includes(name)),
})

const otherThings = (site: WorldSite, from: Things): { name: keyof Things; things: Things }[] =>
  (Object.keys(from) as (keyof Things)[])
    .filter((name) => name !== 'site')
    .map((name) => ({ name, things: { ...site.things, [name]: from[name] } }))

const missing = (): Things =>
  Object.fromEntries(Object.keys(foreign.things).map((name) => [name, newCode()])) as unknown as Things

function each(entries: readonly Entry[], title: string, check: (entry: Entry) => Promise<void>): void {
  for (const entry of entries) it(`${entry.name} ${title}`, () => check(entry))
}

it('has a row for every method of every address, and none for others', () => {
  expect(Object.keys(routeTable).toSorted()).toEqual(routes.map(nameOf).toSorted())
})

describe('without a session', () => {
  each(
    rows.filter(({ row }) => row.action !== 'anyone'),
    'says 401',
    async (entry) => {
      const site = await freshSite()
      expect((await ask(entry, site)).status).toBe(401)
      expect((await ask(entry, site, { cookie: 'lidfast.session_token=made.up' })).status).toBe(401)
      // F54: headers that Next sends to itself.
      const inner = { 'x-middleware-subrequest': 'proxy:proxy:proxy:proxy:proxy', 'x-middleware-next': '1' }
      expect((await ask(entry, site, { more: { headers: inner } })).status).toBe(401)
    },
  )

  each(
    rows.filter(({ row }) => row.action === 'anyone'),
    'is open',
    async (entry) => {
      expect((await ask(entry, await freshSite())).status).toBe(entry.row.status ?? 200)
    },
  )
})

describe('signed in, of no matter which site', () => {
  each(
    rows.filter(({ row }) => row.action === 'signed-in'),
    'answers',
    async (entry) => {
      const reply = await ask(entry, await freshSite(), { cookie: people.stranger.cookie })
      expect(reply.status, reply.text).toBe(entry.row.status ?? 200)
    },
  )
})

describe('a member of another site', () => {
  each(ofSites, 'answers as if there were nothing', async (entry) => {
    const site = await freshSite()
    const before = await fingerprintOf(db, site)
    const theirs = await ask(entry, site, { cookie: people.stranger.cookie })
    const none = await ask(entry, site, {
      cookie: people.stranger.cookie,
      address: { ...site.things, site: newCode() },
    })
    expect(theirs.status).toBe(404)
    expect(seen(theirs)).toEqual(seen(none))
    expect(await fingerprintOf(db, site)).toBe(before)
  })
})

describe('each role', () => {
  each(ofSites, 'does what the table of actions says', async (entry) => {
    const { row } = entry
    for (const role of roles) {
      const site = await freshSite()
      await prepare(entry, site)
      const before = await fingerprintOf(db, site)
      const reply = await ask(entry, site, { cookie: people[role].cookie })
      const allowed = !isOpen(row) && may(role, row.action as Parameters<typeof may>[1])
      expect(reply.status, `${role}: ${reply.text}`).toBe(allowed ? (row.status ?? 200) : 403)
      if (!allowed) expect(await fingerprintOf(db, site)).toBe(before)
    }
  })
})

describe('ids of another site inside a request', () => {
  each(ofSites, 'treats them like ids that are not there, and changes nothing', async (entry) => {
    const { route, row } = entry
    const site = await freshSite()
    await prepare(entry, site)
    const before = [await fingerprintOf(db, site), await fingerprintOf(db, foreign)]
    const { cookie } = people.owner

    for (const { name, things } of otherThings(site, foreign.things)) {
      const never = { ...site.things, [name]: missing()[name] }
      if (route.address.includes(`[${name}]`)) {
        const [theirs, none] = [
          await ask(entry, site, { cookie, address: things }),
          await ask(entry, site, { cookie, address: never }),
        ]
        expect(theirs.status, name).toBe(404)
        expect(seen(theirs), name).toEqual(seen(none))
      }
      const sample = (of: Things) => JSON.stringify([row.body?.(of, site), row.query?.(of)])
      if (sample(things) !== sample(site.things)) {
        const [theirs, none] = [
          await ask(entry, site, { cookie, body: things }),
          await ask(entry, site, { cookie, body: never }),
        ]
        expect([404, 422], `${name}: ${theirs.text}`).toContain(theirs.status)
        const masked = (reply: Reply) =>
          reply.text.replaceAll(things[name], 'ID').replaceAll(never[name], 'ID')
        expect([theirs.status, masked(theirs)], name).toEqual([none.status, masked(none)])
      }
    }
    expect([await fingerprintOf(db, site), await fingerprintOf(db, foreign)]).toEqual(before)
  })
})

describe('a change', () => {
  each(changes, 'is refused from another origin, and in a form', async (entry) => {
    const site = await freshSite()
    await prepare(entry, site)
    const before = await fingerprintOf(db, site)
    const { cookie } = people.owner
    const from = (headers: Record<string, string | null>) => ask(entry, site, { cookie, more: { headers } })
    expect((await from({ origin: 'https://evil.example' })).status).toBe(403)
    expect((await from({ origin: null })).status).toBe(403)
    expect((await from({ origin: 'null' })).status).toBe(403)
    expect((await from({ origin: 'https://evil.example', 'content-type': 'text/plain' })).status).toBe(403)
    if (entry.route.method !== 'DELETE') {
      expect((await from({ 'content-type': 'text/plain' })).status).toBe(415)
      expect((await from({ 'content-type': 'application/x-www-form-urlencoded' })).status).toBe(415)
    }
    expect(await fingerprintOf(db, site)).toBe(before)
  })

  each(changes, 'refuses fields that it does not know', async (entry) => {
    const site = await freshSite()
    await prepare(entry, site)
    const before = await fingerprintOf(db, site)
    const body = {
      ...entry.row.body?.(site.things, site),
      siteId: foreign.siteId,
      site_id: 1,
      createdAt: 'x',
    }
    const reply = await ask(entry, site, { cookie: people.owner.cookie, more: { body } })
    expect(reply.status, reply.text).toBe(400)
    expect(await fingerprintOf(db, site)).toBe(before)
  })
})
