import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { listDemoMail } from '@/db/queries/demo-mail'
import { findDemoSiteCode } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import { demoPassword, demoVisitor, type DemoMail } from '@/lib/sites/demo'
import { auth } from './auth'
import { serverConfig } from './env'
import { decodeCursor, pageOf, type Page } from './list'
import { fail, notThere, type Outcome } from './problem'
import { overLimit } from './rate-limit'

/** Whether the demo runs and is there to be tried; pages show its doors by this. */
export async function findDemoSite(db: Kysely<Database>): Promise<string | undefined> {
  return serverConfig().demo ? findDemoSiteCode(db) : undefined
}

/** The mails that nobody was sent, because no mail server is set. Not there when the demo is off. */
export async function readDemoInbox(
  db: Kysely<Database>,
  query: { limit: number; cursor?: string },
): Promise<Outcome<Page<DemoMail>>> {
  if (!serverConfig().demo) return notThere()
  const beforeId = query.cursor === undefined ? undefined : decodeCursor(query.cursor, z.int().positive())
  if (query.cursor !== undefined && beforeId === undefined) return fail('malformed', 'cursor: not known here')
  const mails = await listDemoMail(db, { limit: query.limit + 1, beforeId })
  return ok(pageOf(mails, query.limit, (mail) => Number(mail.id)))
}

/** Signs a visitor in as the demo's maker. @returns the site's code and the cookies to hand on */
export async function signInToDemo(
  db: Kysely<Database>,
  now: Date,
): Promise<Outcome<{ site: string; setCookies: string[] }>> {
  const site = await findDemoSite(db)
  if (site === undefined) return notThere()
  const retryAfterS = await overLimit(db, [{ key: 'demo', most: 60, windowS: 10 }], now)
  if (retryAfterS !== undefined) {
    return fail('too-many', 'Many people are trying the demo just now. Wait a little.', { retryAfterS })
  }
  const signedIn = await auth().api.signInEmail({
    body: { email: demoVisitor, password: demoPassword },
    returnHeaders: true,
  })
  return ok({ site, setCookies: signedIn.headers.getSetCookie() })
}
