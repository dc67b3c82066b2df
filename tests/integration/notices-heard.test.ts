import { afterAll, beforeAll, expect, it } from 'vitest'
import { migrateJobs } from '@/db/jobs'
import { takeSiteForNotices } from '@/db/queries/notice-state'
import { evaluateHeard } from '@/workers/notices/evaluate-heard'
import { seedWaitingSite } from '../measure/year/latency-site'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { shopAir } from '../support/seed-rooms'

const now = new Date('2026-03-05T13:00:00Z')
let database: TestDatabase

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
})
afterAll(() => database.drop())

const decide = (heard: Set<number>) =>
  evaluateHeard(database.db, heard, now, 'http://127.0.0.1:3000', (_site, error) => {
    throw error
  })

const rulesOf = async (siteId: number): Promise<string[]> =>
  (await database.db.selectFrom('notice').where('site_id', '=', siteId).select('rule').execute()).map(
    ({ rule }) => rule,
  )

it('tells of a reading at a site that was heard, and looks at no other', async () => {
  const read = await seedWaitingSite(database.db, now)
  const other = await seedWaitingSite(database.db, now)
  for (const site of [read, other]) await site.readShop(shopAir, now)
  const heard = new Set([read.siteId])
  expect(await decide(heard)).toBeGreaterThan(0)
  expect(await rulesOf(read.siteId)).toContain('time-out')
  expect(await rulesOf(other.siteId)).toEqual([])
  expect(heard).toEqual(new Set())
})

it('keeps a site for the next time while somebody else is deciding for it', async () => {
  const site = await seedWaitingSite(database.db, now)
  await site.readShop(shopAir, now)
  const heard = new Set([site.siteId])
  await database.db.transaction().execute(async (trx) => {
    await takeSiteForNotices(trx, site.siteId)
    expect(await decide(heard)).toBe(0)
  })
  expect(heard).toEqual(new Set([site.siteId]))
  expect(await decide(heard)).toBeGreaterThan(0)
})
