import { vi } from 'vitest'
import type { Kysely } from 'kysely'
import type { Database } from '@/db/schema'

const held = globalThis as typeof globalThis & {
  lidfastDatabase?: { db: Kysely<Database> }
  lidfastAuth?: unknown
}

/** For tests that call the web server's own functions without a web server: its configuration. Import them afterwards. */
export function serverEnvironment(settings: Record<string, string>): void {
  const all = {
    BASE_URL: 'http://127.0.0.1:3000',
    AUTH_SECRET: 'a secret of the tests, long enough',
    LOG_LEVEL: 'error',
    ...settings,
  }
  for (const [name, value] of Object.entries(all)) vi.stubEnv(name, value)
}

/** Closes what those functions opened, so that the next import begins anew. */
export async function forgetServer(): Promise<void> {
  await held.lidfastDatabase?.db.destroy()
  held.lidfastDatabase = undefined
  held.lidfastAuth = undefined
  vi.unstubAllEnvs()
  vi.resetModules()
}
