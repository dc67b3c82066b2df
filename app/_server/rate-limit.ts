import 'server-only'
import { createHash, createHmac, randomBytes, timingSafeEqual } from 'node:crypto'
import type { Kysely } from 'kysely'
import { countTry } from '@/db/queries/rate-counts'
import type { Database } from '@/db/schema'
import { serverConfig } from './env'

interface Limit {
  key: string
  most: number
  windowS: number
}

/**
 * Counts one try against several limits.
 * @returns the seconds to wait when one of them is passed, else `undefined`
 */
export async function overLimit(
  db: Kysely<Database>,
  limits: readonly Limit[],
  now: Date,
): Promise<number | undefined> {
  let waitS: number | undefined
  for (const { key, most, windowS } of limits) {
    const windowMs = windowS * 1000
    const startMs = Math.floor(now.getTime() / windowMs) * windowMs
    // Keys hold addresses of people: what is stored can't be read back.
    const hashed = createHash('sha256').update(`${windowS}:${key}`).digest('base64url')
    if ((await countTry(db, hashed, new Date(startMs))) > most) {
      waitS = Math.max(waitS ?? 0, (startMs + windowMs - now.getTime()) / 1000)
    }
  }
  return waitS
}

/**
 * The limits of one try at the account's door.
 *
 * Tries from anywhere share a count per account, so guessing gets slow; they share one for everybody, so guessing at
 * many accounts gets slow as well. A browser that has signed in to that account before has a count of its own, or else
 * anybody could lock a person out by trying in their name (the idea is known as device cookies, OWASP). The peer's
 * address counts only where a proxy in front is known to state it truly: any other header can be forged.
 */
export function doorLimits(request: Request, kind: 'sign-in' | 'mail', email: string): Limit[] {
  const { authRateLimit, peerAddressHeader } = serverConfig()
  const account = email.trim().toLowerCase()
  const device = kind === 'sign-in' ? knownDevice(request, account) : undefined
  const scope = device === undefined ? `${kind}:account:${account}` : `${kind}:device:${device}`
  const limits = [
    { key: scope, most: authRateLimit, windowS: 10 },
    // Six mails an hour are plenty for somebody who waits for one, and few for somebody who gets them unasked.
    { key: scope, most: authRateLimit * (kind === 'mail' ? 2 : 10), windowS: 3_600 },
  ]
  if (device === undefined) limits.push({ key: `${kind}:all`, most: authRateLimit * 20, windowS: 10 })
  const peer = peerAddressHeader === undefined ? null : request.headers.get(peerAddressHeader)
  if (peer !== null && device === undefined) {
    limits.push({ key: `${kind}:peer:${peer}`, most: authRateLimit * 3, windowS: 10 })
    limits.push({ key: `${kind}:peer:${peer}`, most: authRateLimit * 30, windowS: 3_600 })
  }
  return limits
}

const cookieName = 'lidfast.device'

/** The cookie that marks this browser as one where the account's owner has signed in. It opens nothing by itself. */
export function deviceCookie(email: string): string {
  const nonce = randomBytes(16).toString('base64url')
  const value = `${nonce}.${deviceMark(nonce, email.trim().toLowerCase())}`
  const secure = serverConfig().baseUrl.startsWith('https:') ? '; Secure' : ''
  return `${cookieName}=${value}; Path=/api; Max-Age=${180 * 86_400}; HttpOnly; SameSite=Lax${secure}`
}

function knownDevice(request: Request, account: string): string | undefined {
  const pair = request.headers
    .get('cookie')
    ?.split(';')
    .map((part) => part.trim())
    .find((part) => part.startsWith(`${cookieName}=`))
  const [nonce, mark] = pair?.slice(cookieName.length + 1).split('.') ?? []
  if (nonce === undefined || mark === undefined) return undefined
  const expected = Buffer.from(deviceMark(nonce, account))
  const given = Buffer.from(mark)
  return expected.length === given.length && timingSafeEqual(expected, given) ? nonce : undefined
}

const deviceMark = (nonce: string, account: string): string =>
  createHmac('sha256', serverConfig().authSecret).update(`device\n${nonce}\n${account}`).digest('base64url')

const memory = new Map<string, number>()
let memoryWindow = 0

/**
 * A limit for open addresses that need no database, counted in this process by the minute.
 * @returns the seconds to wait when it is passed, else `undefined`
 */
export function overOpenLimit(
  request: Request,
  scope: string,
  mostPerMinute: number,
  now: Date,
): number | undefined {
  const window = Math.floor(now.getTime() / 60_000)
  if (window !== memoryWindow) {
    memory.clear()
    memoryWindow = window
  }
  const { peerAddressHeader } = serverConfig()
  const peer = peerAddressHeader === undefined ? '' : (request.headers.get(peerAddressHeader) ?? '')
  const key = `${scope} ${peer}`
  const n = (memory.get(key) ?? 0) + 1
  // Peers beyond these share one count, so that made-up ones can't fill the memory.
  memory.set(memory.size < 10_000 || memory.has(key) ? key : scope, n)
  return n > mostPerMinute ? ((window + 1) * 60_000 - now.getTime()) / 1000 : undefined
}
