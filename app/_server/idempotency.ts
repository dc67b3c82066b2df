import 'server-only'
import { createCipheriv, createDecipheriv, createHash, hkdfSync, randomBytes } from 'node:crypto'
import type { Kysely } from 'kysely'
import { claimKey, keepAnswer } from '@/db/queries/idempotency'
import type { Database } from '@/db/schema'
import { serverConfig } from './env'
import { fail, type Failure } from './problem'
import type { AnswerValue } from './respond'

/** Thrown inside a transaction to undo it, and caught right outside. */
class Undone extends Error {
  constructor(readonly failure: Failure) {
    super('undone')
  }
}

interface Once {
  userId: string
  key: string
  /** Whatever makes two requests the same: method, address and body. */
  request: string
  now: Date
}

type Made = { ok: true; value: AnswerValue } | { ok: false; error: Failure }

/**
 * Does the work of a request at most once. The claim on the key, the work and the kept answer are one transaction:
 * a process that dies half-way leaves neither, and a retry then does the work as if for the first time.
 * A refusal is not kept, as nothing was made.
 */
export async function once(
  db: Kysely<Database>,
  { userId, key, request, now }: Once,
  work: (trx: Kysely<Database>) => Promise<Made>,
): Promise<Made> {
  const requestHash = createHash('sha256').update(request).digest('hex')
  try {
    return await db.transaction().execute(async (trx) => {
      const kept = await claimKey(trx, { userId, key, requestHash }, now)
      if (kept !== undefined) {
        if (kept.requestHash !== requestHash) throw new Undone(keyReused)
        if (kept.status === null) throw new Undone(stillRunning)
        const body: unknown = kept.sealedBody === null ? undefined : JSON.parse(unseal(kept.sealedBody))
        return { ok: true, value: { body, status: kept.status, headers: kept.headers } }
      }
      const made = await work(trx)
      if (!made.ok) throw new Undone(made.error)
      const { body, status, headers } = made.value
      const sealedBody = body === undefined ? null : seal(JSON.stringify(body))
      await keepAnswer(trx, { userId, key }, { status, sealedBody, headers })
      return made
    })
  } catch (error) {
    if (error instanceof Undone) return { ok: false, error: error.failure }
    if (isLockTimeout(error)) return { ok: false, error: stillRunning }
    throw error
  }
}

const keyReused = fail(
  'key-reused',
  'This Idempotency-Key came with another request before. Use a new key for a new request.',
).error
const stillRunning = fail(
  'still-running',
  'The same request is still being worked on. Ask again in a few seconds.',
  { retryAfterS: 5 },
).error

/** PostgreSQL's code 55P03, "lock_not_available". */
const isLockTimeout = (error: unknown): boolean =>
  error instanceof Error && 'code' in error && error.code === '55P03'

// An answer may hold a sensor's secret, which is stored nowhere else in the clear. So kept answers are encrypted,
// and a copy of the database alone gives none away.
const sealingKey = () => Buffer.from(hkdfSync('sha256', serverConfig().authSecret, '', 'kept answers', 32))

function seal(text: string): string {
  const nonce = randomBytes(12)
  const cipher = createCipheriv('aes-256-gcm', sealingKey(), nonce)
  const sealed = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()])
  return Buffer.concat([nonce, cipher.getAuthTag(), sealed]).toString('base64')
}

function unseal(sealed: string): string {
  const bytes = Buffer.from(sealed, 'base64')
  const decipher = createDecipheriv('aes-256-gcm', sealingKey(), bytes.subarray(0, 12))
  decipher.setAuthTag(bytes.subarray(12, 28))
  return decipher.update(bytes.subarray(28), undefined, 'utf8') + decipher.final('utf8')
}
