import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { migrateJobs } from '@/db/jobs'
import { listNoticeSites } from '@/db/queries/notice-state'
import { listRuleChanges, listRuleRecords, upsertRule } from '@/db/queries/rules'
import { insertWeighing } from '@/db/queries/weighings'
import type { RuleValue, ToldRule } from '@/lib/notices/rule-settings'
import { evaluateSite } from '@/workers/notices/evaluate'
import type { CostlyFacts } from '@/workers/notices/surroundings'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { type Air, houseAir, seedPiece, seedRoom, type SeededRoom, shopAir } from '../support/seed-rooms'
import { seedSite, type SeededSite } from '../support/seed-site'

const hourMs = 3_600_000
const start = new Date('2026-03-05T09:00:00Z')
const after = (hours: number) => new Date(start.getTime() + hours * hourMs)
const baseUrl = 'http://127.0.0.1:3000'

let database: TestDatabase
let site: SeededSite
let maker: string
let house: SeededRoom

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
})
afterAll(() => database.drop())
beforeEach(async () => {
  site = await seedSite(database.db, after(-24 * 40))
  maker = await site.join('maker')
  house = await seedRoom(database.db, site.siteId, 'Cupboard', 'cupboard', after(-24 * 40))
  // Readings that stop at midnight are not what these are about.
  await choose('sensor-silent', false)
})

/** A reading an hour over days before `start`, each day with its own air. */
async function days(room: SeededRoom, ...airs: Air[]): Promise<void> {
  const midnight = Date.parse('2026-03-05T00:00:00Z')
  for (const [n, air] of airs.entries()) {
    const from = midnight - (airs.length - n) * 24 * hourMs
    await room.read(air, ...Array.from({ length: 24 }, (_, hour) => new Date(from + hour * hourMs)))
  }
}

async function look(now: Date, costly?: CostlyFacts): Promise<string[]> {
  const before = (await told()).length
  const own = (await listNoticeSites(database.db)).find(({ siteId }) => siteId === site.siteId)
  if (own === undefined) throw new Error('the site is gone')
  await evaluateSite(database.db, own, now, baseUrl, costly)
  return (await told()).slice(before)
}

const told = async (): Promise<string[]> =>
  (
    await database.db
      .selectFrom('notice')
      .where('site_id', '=', site.siteId)
      .select(['rule', 'key'])
      .orderBy('id')
      .execute()
  ).map(({ rule, key }) => (key.endsWith('/over') ? `${rule} over` : rule))

const episodes = (rule: string) =>
  database.db
    .selectFrom('episode')
    .where('site_id', '=', site.siteId)
    .where('rule', '=', rule)
    .select(['state', 'began_at', 'told_at', 'ended_at'])
    .orderBy('began_at')
    .execute()

const choose = (rule: ToldRule, isOn: boolean, settings: Record<string, RuleValue> = {}, version = 1) =>
  upsertRule(database.db, site.siteId, { rule, isOn, settings, version, userId: maker }, start)

const damp: Air = { temperatureC: 20, humidityPct: 75 }

describe('a room out of its band', () => {
  it('is told once, by whichever of many workers, and never again after a restart', async () => {
    await days(house, houseAir, houseAir, damp, damp, damp)
    const all = await Promise.all([look(start), look(start), look(start)])
    expect([...new Set(all.flat())]).toEqual(['keep-room-band'])
    expect(await told()).toEqual(['keep-room-band'])
    expect(await look(after(1))).toEqual([])
    expect((await episodes('keep-room-band')).map(({ state }) => state)).toEqual(['telling'])
  })

  it('is told with its true beginning, and once more when it is back to normal', async () => {
    await days(house, houseAir, houseAir, damp, damp, damp)
    await look(start)
    expect((await episodes('keep-room-band'))[0]?.began_at).toEqual(new Date('2026-03-02T00:00:00Z'))
    await house.read(houseAir, ...Array.from({ length: 24 }, (_, n) => after(n - 9)))
    expect(await look(after(24))).toEqual(['keep-room-band over'])
    expect(await look(after(25))).toEqual([])
    expect((await episodes('keep-room-band'))[0]).toMatchObject({
      state: 'over',
      ended_at: new Date('2026-03-06T00:00:00Z'),
    })
  })

  it('opens in the history without a word when nobody saw it', async () => {
    await days(house, houseAir, damp, damp, damp, houseAir, houseAir)
    expect(await look(start)).toEqual([])
    const [episode, ...others] = await episodes('keep-room-band')
    expect(others).toEqual([])
    expect(episode).toMatchObject({
      state: 'over',
      told_at: null,
      ended_at: new Date('2026-03-04T00:00:00Z'),
    })
    await look(after(1))
    expect(await episodes('keep-room-band')).toHaveLength(1)
  })

  it('is not told of with the rule off, nor under a limit that the site has set wider', async () => {
    await days(house, houseAir, damp, damp, damp)
    await choose('keep-room-band', false)
    expect(await look(start)).toEqual([])
    await choose('keep-room-band', true, { highPct: 20 }, 2)
    expect(await look(start)).toEqual([])
    await choose('keep-room-band', true, {}, 3)
    expect(await look(start)).toEqual(['keep-room-band'])
  })
})

describe('blanks', () => {
  it('that are due to be weighed are told together, until they have been', async () => {
    await days(house, houseAir, houseAir)
    const { db } = database
    const blank = await seedPiece(db, site.siteId, maker, house, after(-24 * 35), {
      number: '88',
      stage: 'roughed',
    })
    await seedPiece(db, site.siteId, maker, house, after(-24 * 35), { number: '91', stage: 'roughed' })
    expect(await look(start)).toEqual(['weighing-due'])
    const title = await db
      .selectFrom('notice')
      .where('site_id', '=', site.siteId)
      .select('title')
      .executeTakeFirstOrThrow()
    expect(title.title).toBe('88 and 91 are due to be weighed.')
    const weighing = { pieceId: blank.id, at: start, grams: 412, stepG: 1, note: '', userId: maker }
    await insertWeighing(db, site.siteId, weighing, start)
    await look(after(0.1))
    expect((await episodes('weighing-due')).map(({ state }) => state).toSorted()).toEqual(['over', 'telling'])
  })
})

describe('a tub', () => {
  it('that turns cold with no carry logged is asked after once', async () => {
    const { db } = database
    const tub = await seedRoom(db, site.siteId, 'Lidded tub', 'tub', after(-24 * 5))
    const shop = await seedRoom(db, site.siteId, 'Shop', 'shop', after(-24 * 5))
    await house.read(houseAir, after(-0.1))
    await shop.read(shopAir, after(-0.1))
    await tub.read({ temperatureC: 19, humidityPct: 50 }, after(-30), after(-1), after(-0.5))
    expect(await look(start)).toEqual([])
    await tub.read({ temperatureC: 14, humidityPct: 60 }, after(0.1))
    expect(await look(after(0.2))).toEqual(['tub-out'])
    await tub.read({ temperatureC: 10, humidityPct: 65 }, after(0.4))
    expect(await look(after(0.5))).toEqual([])
  })
})

describe('the evening question with nothing logged', () => {
  it('is asked on a day on which the shop was warmed, and not on another', async () => {
    const shop = await seedRoom(database.db, site.siteId, 'Shop', 'shop', after(-24 * 5))
    const evening = new Date('2026-03-05T18:01:00Z')
    await house.read(houseAir, evening)
    await shop.read(shopAir, start, after(1), after(2), evening)
    expect(await look(evening)).toEqual([])
    await shop.read({ temperatureC: 16, humidityPct: 50 }, after(3), after(4))
    expect(await look(evening)).toEqual(['lock-up'])
  })
})

describe('a rule’s row', () => {
  it('is changed by one of two who saw the same version', async () => {
    expect(await choose('too-dry', false)).toBe(2)
    expect(await choose('too-dry', true, { rh: 30 })).toBeUndefined()
    expect(await choose('too-dry', true, { rh: 30 }, 2)).toBe(3)
    expect(await listRuleRecords(database.db, site.siteId)).toContainEqual({
      rule: 'too-dry',
      isOn: true,
      settings: { rh: 30 },
      version: 3,
    })
    expect(await listRuleChanges(database.db, site.siteId)).toEqual([])
  })
})

describe('one look', () => {
  it('goes by what was worked out within the hour, and works it out anew when a piece moves', async () => {
    await days(house, houseAir, houseAir)
    const costly: CostlyFacts = new Map()
    await look(start, costly)
    const first = costly.get(site.siteId)?.facts
    await look(after(0.5), costly)
    expect(costly.get(site.siteId)?.facts).toBe(first)
    await seedPiece(database.db, site.siteId, maker, house, start, { number: '207' })
    await look(after(0.6), costly)
    expect(costly.get(site.siteId)?.facts).not.toBe(first)
  })
})
