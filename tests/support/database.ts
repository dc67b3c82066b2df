import { randomBytes } from 'node:crypto'
import type { Kysely } from 'kysely'
import { Client } from 'pg'
import { inject } from 'vitest'
import { createDatabase } from '@/db/client'
import type { Database } from '@/db/schema'
import { databaseUrlOf, templateName } from './template'

export interface TestDatabase {
  url: string
  db: Kysely<Database>
  /** Closes the connections and removes the database. */
  drop(): Promise<void>
}

/**
 * A migrated, empty database of its own, cloned from the run's template in well under a second.
 * Use: `beforeAll(async () => { database = await createTestDatabase() })` and `afterAll(() => database.drop())`.
 * Only in the project `integration`, which starts the server; elsewhere hand in the `adminUrl` of a `startTestCluster()`
 * whose template was made by `makeTemplate(adminUrl)`.
 */
export async function createTestDatabase(
  adminUrl: string = inject('databaseAdminUrl'),
): Promise<TestDatabase> {
  const name = `test_${randomBytes(6).toString('hex')}`
  await asAdmin(adminUrl, (admin) => admin.query(`create database ${name} template ${templateName}`))
  const url = databaseUrlOf(adminUrl, name)
  const db = createDatabase(url, { name })
  return {
    url,
    db,
    async drop() {
      await db.destroy()
      await asAdmin(adminUrl, (admin) => admin.query(`drop database ${name} with (force)`))
    },
  }
}

/** An empty database that has not been migrated. */
export async function createBareDatabase(adminUrl: string = inject('databaseAdminUrl')): Promise<string> {
  const name = `bare_${randomBytes(6).toString('hex')}`
  await asAdmin(adminUrl, (admin) => admin.query(`create database ${name}`))
  return databaseUrlOf(adminUrl, name)
}

async function asAdmin(adminUrl: string, work: (admin: Client) => Promise<unknown>): Promise<void> {
  const admin = new Client({ connectionString: adminUrl })
  await admin.connect()
  try {
    await work(admin)
  } finally {
    await admin.end()
  }
}
