import { hashPassword } from 'better-auth/crypto'
import type { Kysely } from 'kysely'
import { inject } from 'vitest'
import { createDatabase } from '@/db/client'
import { newTextId } from '@/db/queries/sites'
import type { Database } from '@/db/schema'

/** Direct access to the database of the running installation, for arranging and for looking. Call `destroy` afterwards. */
export const openStackDatabase = (): Kysely<Database> =>
  createDatabase(inject('stack').databaseUrl, { max: 3, name: 'api test' })

export interface Person {
  userId: string
  name: string
  email: string
  password: string
  /** The `Cookie` header of a session that was opened by signing in. */
  cookie: string
}

const password = 'a test password of length'
let hashed: Promise<string> | undefined

/** Somebody with a confirmed address, stored directly. */
export async function storePerson(db: Kysely<Database>, name: string): Promise<Omit<Person, 'cookie'>> {
  const userId = newTextId()
  const email = `${name.toLowerCase()}.${userId.slice(0, 12).toLowerCase()}@example.org`
  const now = new Date()
  hashed ??= hashPassword(password)
  await db
    .insertInto('user')
    .values({ id: userId, name, email, emailVerified: true, image: null, createdAt: now, updatedAt: now })
    .execute()
  await db
    .insertInto('account')
    .values({
      id: newTextId(),
      accountId: userId,
      providerId: 'credential',
      userId,
      password: await hashed,
      createdAt: now,
      updatedAt: now,
    })
    .execute()
  return { userId, name, email, password }
}

/** Somebody who has signed in by the real address. */
export async function signedInPerson(db: Kysely<Database>, name: string): Promise<Person> {
  const person = await storePerson(db, name)
  return { ...person, cookie: await cookieOf(person.email, person.password) }
}

export async function cookieOf(email: string, password: string): Promise<string> {
  const reply = await call('POST', '/api/auth/sign-in/email', { body: { email, password } })
  if (reply.status !== 200) throw new Error(`${email} could not sign in: ${reply.status} ${reply.text}`)
  return reply.cookie
}

export interface CallOptions {
  cookie?: string
  body?: unknown
  /** Sent as it is, instead of `body`. */
  rawBody?: string
  /** Set to `null` to leave a header out that would be sent by itself. */
  headers?: Record<string, string | null>
  ifMatch?: number
}

export interface Reply {
  status: number
  headers: Headers
  text: string
  /** The cookies that were set, as a `Cookie` header. */
  cookie: string
  json: <T = unknown>() => T
}

/** One request as a page would send it: with its origin, as JSON, and with a fresh key where it makes something. */
export async function call(method: string, path: string, options: CallOptions = {}): Promise<Reply> {
  const { webUrl } = inject('stack')
  const headers = new Headers()
  if (method !== 'GET') {
    headers.set('origin', webUrl)
    headers.set('content-type', 'application/json')
  }
  if (method === 'POST') headers.set('idempotency-key', newTextId())
  if (options.cookie !== undefined) headers.set('cookie', options.cookie)
  if (options.ifMatch !== undefined) headers.set('if-match', `"${options.ifMatch}"`)
  for (const [name, value] of Object.entries(options.headers ?? {})) {
    if (value === null) headers.delete(name)
    else headers.set(name, value)
  }
  const body = options.rawBody ?? (options.body === undefined ? undefined : JSON.stringify(options.body))
  const response = await fetch(webUrl + path, { method, headers, body, redirect: 'manual' })
  const isStream = response.headers.get('content-type')?.startsWith('text/event-stream') === true
  if (isStream) await response.body?.cancel()
  const text = isStream ? '' : await response.text()
  return {
    status: response.status,
    headers: response.headers,
    text,
    cookie: response.headers
      .getSetCookie()
      .map((cookie) => cookie.split(';')[0])
      .join('; '),
    json: <T>() => JSON.parse(text) as T,
  }
}
