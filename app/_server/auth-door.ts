import 'server-only'
import { sql } from 'kysely'
import { z } from 'zod'
import { safeNextPath } from '@/lib/sites/next-path'
import { auth } from './auth'
import { database, isDatabaseAway } from './database'
import { serverConfig } from './env'
import { log } from './log'
import { fail, notThere, type Failure } from './problem'
import { deviceCookie, doorLimits, overLimit } from './rate-limit'
import { checkOrigin, readBody, readQuery } from './request'
import { problemResponse } from './respond'

const email = z.email('not an e-mail address').max(254)
// Bounds of length are the library's to check, so that its own codes come back; these keep the work small.
const password = z.string().max(1000)
/** Where a link in a mail leads in the end. Anything that isn't one of our pages becomes the start page. */
const ownPage = z
  .string()
  .max(2000)
  .transform((path) => safeNextPath(path) ?? '/')
const name = z
  .string()
  .trim()
  .min(1, 'what others here may call you')
  .max(80, '80 letters at most')
  .regex(/^\P{Cc}+$/u, 'no line breaks')

interface Door {
  method: 'GET' | 'POST'
  body?: z.ZodType
  query?: z.ZodType
  limit?: 'sign-in' | 'mail'
}

/** Every address of the library that is open. It has some fifty more that would bypass our use cases. */
const doors: Record<string, Door> = {
  'sign-in/email': { method: 'POST', body: z.strictObject({ email, password }), limit: 'sign-in' },
  'sign-up/email': {
    method: 'POST',
    body: z.strictObject({ name, email, password, callbackURL: ownPage.default('/verify') }),
    limit: 'mail',
  },
  'sign-out': { method: 'POST', body: z.strictObject({}) },
  'get-session': { method: 'GET' },
  'verify-email': {
    method: 'GET',
    query: z.strictObject({ token: z.string().max(2000), callbackURL: ownPage.default('/verify') }),
  },
  'send-verification-email': {
    method: 'POST',
    body: z.strictObject({ email, callbackURL: ownPage.default('/verify') }),
    limit: 'mail',
  },
  'request-password-reset': {
    method: 'POST',
    body: z.strictObject({ email, redirectTo: ownPage.optional() }),
    limit: 'mail',
  },
  'reset-password': {
    method: 'POST',
    body: z.strictObject({ token: z.string().max(200), newPassword: password }),
  },
}

/** Answers `/api/auth/…`: checks what our own routes check, and hands on to the library what is open. */
export async function answerAuth(request: Request): Promise<Response> {
  try {
    return await throughDoor(request)
  } catch (error) {
    const away = isDatabaseAway(error)
    log()[away ? 'warn' : 'error']({ err: error }, 'a request to the account failed')
    return problemResponse(away ? databaseAway : fail('went-wrong').error)
  }
}

const databaseAway: Failure = fail(
  'database-away',
  'The database can not be reached just now. Try again in a minute.',
  { retryAfterS: 10 },
).error

async function throughDoor(request: Request): Promise<Response> {
  const url = new URL(request.url)
  const path = url.pathname.replace(/^\/api\/auth\//, '')
  const door = Object.hasOwn(doors, path) ? doors[path] : undefined
  if (door === undefined || door.method !== request.method) return problemResponse(notThere().error)
  const origin = checkOrigin(request)
  if (!origin.ok) return problemResponse(origin.error)
  const query = readQuery(request, door.query)
  if (!query.ok) return problemResponse(query.error)
  const body = await readBody(request, door.body)
  if (!body.ok) return problemResponse(body.error)

  const account = z.object({ email }).safeParse(body.value.value)
  if (door.limit !== undefined && account.success) {
    const limits = doorLimits(request, door.limit, account.data.email)
    const retryAfterS = await overLimit(database(), limits, new Date())
    if (retryAfterS !== undefined) {
      return problemResponse(
        fail('too-many', 'Too many tries in a short time. Wait a little, then try again.', { retryAfterS })
          .error,
      )
    }
  }
  const inner = await auth().handler(innerRequest(request, path, query.value, body.value.value))
  // The library answers 500 whatever went wrong; a look at the database says whether waiting helps.
  if (inner.status >= 500) await sql`select 1`.execute(database())
  const answered = await withoutToken(inner)
  if (path === 'sign-in/email' && inner.ok && account.success) {
    answered.headers.append('set-cookie', deviceCookie(account.data.email))
  }
  answered.headers.set('cache-control', 'no-store')
  return answered
}

/** The request as the library gets it: at the configured address, with what was checked and nothing else. */
function innerRequest(request: Request, path: string, query: unknown, body: unknown): Request {
  const { baseUrl } = serverConfig()
  const url = new URL(`/api/auth/${path}`, baseUrl)
  for (const [key, value] of Object.entries(query ?? {})) url.searchParams.set(key, String(value))
  const headers = new Headers()
  for (const kept of ['cookie', 'origin', 'user-agent']) {
    const value = request.headers.get(kept)
    if (value !== null) headers.set(kept, value)
  }
  if (request.method === 'GET') return new Request(url, { headers })
  headers.set('content-type', 'application/json')
  return new Request(url, { method: 'POST', headers, body: JSON.stringify(body ?? {}) })
}

const signedIn = z.object({ user: z.object({ id: z.string(), name: z.string(), email: z.string() }) })

/** The library repeats the session's token in its answer, where a script could read it. The cookie is enough. */
async function withoutToken(inner: Response): Promise<Response> {
  const headers = new Headers(inner.headers)
  if (!inner.ok || headers.get('content-type')?.startsWith('application/json') !== true) {
    return new Response(inner.body, { status: inner.status, headers })
  }
  const parsed = signedIn.safeParse(await inner.json())
  headers.delete('content-length')
  return new Response(JSON.stringify(parsed.success ? parsed.data : { user: null }), {
    status: inner.status,
    headers,
  })
}
