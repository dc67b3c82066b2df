import 'server-only'
import { createPublicKey } from 'node:crypto'
import type { Kysely } from 'kysely'
import { deletePhone, savePhone } from '@/db/queries/push-subscriptions'
import type { Database } from '@/db/schema'
import type { NewPhone } from '@/lib/notices/delivery'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { fail, failField, type Outcome } from './problem'

/** A browser is signed up to be told; whoever is signed in there is told, whatever the site. */
export async function signPhoneUp(
  db: Kysely<Database>,
  userId: string,
  { endpoint, keys, device }: NewPhone,
  now: Date,
): Promise<Outcome<undefined>> {
  if (serverConfig().vapid === undefined)
    return fail('not-possible', 'Nothing can be sent to phones from here: its keys are not set.')
  if (!isPointOfP256(keys.p256dh))
    return failField('not-possible', 'keys.p256dh', 'is no key that a browser would give')
  await savePhone(db, { userId, endpoint, ...keys, device }, now)
  return ok(undefined)
}

/** Whether it is an uncompressed point of the curve (RFC 8291, section 3.2): to nothing else can a message be sealed. */
function isPointOfP256(text: string): boolean {
  const bytes = Buffer.from(text, 'base64url')
  if (bytes.length !== 65 || bytes[0] !== 4) return false
  const coordinate = (from: number) => bytes.subarray(from, from + 32).toString('base64url')
  try {
    createPublicKey({
      key: { kty: 'EC', crv: 'P-256', x: coordinate(1), y: coordinate(33) },
      format: 'jwk',
    })
    return true
  } catch {
    // Not on the curve.
    return false
  }
}

/** Taken back twice, it is gone all the same. */
export async function takePhoneBack(db: Kysely<Database>, userId: string, endpoint: string): Promise<void> {
  await deletePhone(db, userId, endpoint)
}
