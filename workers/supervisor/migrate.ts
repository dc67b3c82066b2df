import { Client } from 'pg'
import { migrateToLatest } from '@/db/migrate'

/** Brings the database up to date, or throws a sentence for the person at the terminal. */
export async function migrate(url: string, say: (sentence: string) => void): Promise<void> {
  const client = new Client({ connectionString: url, connectionTimeoutMillis: 10_000 })
  try {
    await client.connect()
  } catch (error) {
    const reason = error instanceof Error ? error.message || String(error) : String(error)
    throw new Error(`The database that DATABASE_URL names can't be reached: ${reason}.`)
  } finally {
    await client.end().catch(() => undefined)
  }
  const ran = await migrateToLatest(url)
  if (ran.length > 0) say(`The database was brought up to date: ${ran.length} steps`)
}
