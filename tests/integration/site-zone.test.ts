import { afterAll, beforeAll, expect, it } from 'vitest'
import { findSiteMember } from '@/db/queries/members'
import { changeSite } from '@/app/_server/sites'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { houseAir, seedRoom } from '../support/seed-rooms'
import { seedSite } from '../support/seed-site'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

it('puts every reading under the days of the new zone when a site changes its zone', async () => {
  const { db } = database
  const since = new Date('2026-03-01T00:00:00Z')
  const site = await seedSite(db, since, 'Moving Yard', 'Europe/London')
  const room = await seedRoom(db, site.siteId, 'Cupboard', 'cupboard', since)
  // 20:00 in London is 09:00 of the next day in Auckland.
  await room.read(houseAir, new Date('2026-03-10T08:00:00Z'), new Date('2026-03-10T20:00:00Z'))
  const days = async () =>
    (
      await db
        .selectFrom('room_day')
        .where('site_id', '=', site.siteId)
        .select(['day_on', 'n'])
        .orderBy('day_on')
        .execute()
    ).map((row) => `${row.day_on}: ${row.n}`)
  expect(await days()).toEqual(['2026-03-10: 2'])

  const owner = await findSiteMember(db, site.siteCode, site.ownerId)
  if (owner === undefined) throw new Error('the owner is missing')
  const changed = await changeSite(db, owner, { timeZone: 'Pacific/Auckland' }, owner.site.version)
  expect(changed.ok).toBe(true)
  expect(await days()).toEqual(['2026-03-10: 1', '2026-03-11: 1'])

  const stale = await changeSite(db, owner, { timeZone: 'Europe/London' }, owner.site.version)
  expect(stale.ok).toBe(false)
  expect(await days()).toEqual(['2026-03-10: 1', '2026-03-11: 1'])
})
