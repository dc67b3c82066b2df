import { parseConfig } from '@/lib/config'

/** The address of the database, for `db/migrate.ts` when it runs by itself. */
export function readDatabaseUrl(): string {
  const parsed = parseConfig(process.env)
  if (!parsed.ok) throw new Error(parsed.error.sentence)
  if (parsed.value.databaseUrl === undefined) throw new Error('DATABASE_URL is not set.')
  return parsed.value.databaseUrl
}
