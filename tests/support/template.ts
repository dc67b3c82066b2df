import { migrateToLatest } from '@/db/migrate'
import { createMissingDatabase } from '@/workers/supervisor/cluster'

export const templateName = 'lidfast_template'

export function databaseUrlOf(adminUrl: string, name: string): string {
  const url = new URL(adminUrl)
  url.pathname = `/${name}`
  return url.href
}

/** A migrated database that the tests clone instead of migrating each their own. */
export async function makeTemplate(adminUrl: string): Promise<void> {
  await createMissingDatabase(adminUrl, templateName)
  await migrateToLatest(databaseUrlOf(adminUrl, templateName))
}
