import { afterAll, beforeAll, expect, it } from 'vitest'
import { removeSite } from '@/app/_server/sites'
import { findSiteMember, insertMember } from '@/db/queries/members'
import { demoAccounts } from '@/lib/sites/demo'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { seedSite, seedUser } from '../support/seed-site'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

it('takes the demo’s accounts away with it, whose password everybody knows, and leaves real people alone', async () => {
  const { db } = database
  const now = new Date()
  const demo = await seedSite(db, now, 'Demo Yard')
  await db.updateTable('site').set({ is_demo: true }).where('id', '=', demo.siteId).execute()
  for (const { email, role } of demoAccounts) {
    const userId = await seedUser(db, 'demo', now)
    await db.updateTable('user').set({ email }).where('id', '=', userId).execute()
    await insertMember(db, { organizationId: demo.organizationId, userId, role }, now)
  }
  const real = await seedSite(db, now, 'Real Yard')
  const member = await findSiteMember(db, demo.siteCode, demo.ownerId)
  if (member === undefined) throw new Error('the owner is missing')

  expect(await removeSite(db, member, undefined, now)).toEqual({ ok: true, value: undefined })
  const emails = (await db.selectFrom('user').select('email').execute()).map((user) => user.email)
  expect(emails.filter((email) => demoAccounts.some((account) => account.email === email))).toEqual([])
  expect(await findSiteMember(db, real.siteCode, real.ownerId)).toBeDefined()
  expect(emails.length).toBe(2)
})
