import { createHash, timingSafeEqual } from 'node:crypto'
import type { Kysely } from 'kysely'
import { findSensorCredential, type SensorCredential } from '@/db/queries/sensor-secrets'
import type { Database } from '@/db/schema'
import { isSensorSecret } from '@/db/sensor-secret'
import { type SensorAddress, signInNameOf } from '@/lib/readings/topic'
import type { Identity } from './judge'

export type SignIn =
  | { as: 'welcome'; identity: Identity; secretHash: string }
  /** The right secret of a sensor that was removed from its site. */
  | { as: 'removed'; identity: Identity }
  | { as: 'wrong' }
  /** The database is away and nothing is known of this sensor. */
  | { as: 'away' }

export type Door = (address: SensorAddress, secret: Uint8Array) => Promise<SignIn>

/** Sensors whose last right secret is remembered, as a digest only. */
const remembered = 10_000

/** The stored form of a secret that nobody has, so that an unknown name takes as long as a wrong secret. */
const nobody = `$7$101$${Buffer.alloc(12).toString('base64')}$${Buffer.alloc(64).toString('base64')}`

interface Known {
  credential: SensorCredential
  digest: Buffer
}

/**
 * Checks sign-in names and secrets. A secret that was right is remembered, so that a thousand sensors that come back
 * at once cost a thousand look-ups and no key stretching, and so that they may come back while the database is away.
 */
export function createDoor(db: Kysely<Database>): Door {
  const known = new Map<string, Known>()

  const remember = (name: string, entry: Known) => {
    known.delete(name)
    known.set(name, entry)
    const [oldest] = known.keys()
    if (known.size > remembered && oldest !== undefined) known.delete(oldest)
  }

  return async (address, secret) => {
    const name = signInNameOf(address.siteCode, address.sensorCode)
    const digest = createHash('sha256').update(secret).digest()
    const before = known.get(name)
    const isSame = before !== undefined && timingSafeEqual(before.digest, digest)
    let credential: SensorCredential | undefined
    try {
      credential = await findSensorCredential(db, address)
    } catch {
      // Away: whoever was let in last time is let in again; the check of live sessions follows when it is back.
      return isSame ? welcome(address, before.credential) : { as: 'away' }
    }
    const stored = credential?.secretHash ?? nobody
    const isRight =
      (isSame && before.credential.secretHash === stored) || (await isSensorSecret(secret, stored))
    if (!credential || !isRight) return { as: 'wrong' }
    if (credential.isArchived) return { as: 'removed', identity: identityOf(address, credential) }
    remember(name, { credential, digest })
    return welcome(address, credential)
  }
}

const identityOf = (address: SensorAddress, { siteId, sensorId }: SensorCredential): Identity => ({
  ...address,
  siteId,
  sensorId,
})

const welcome = (address: SensorAddress, credential: SensorCredential): SignIn => ({
  as: 'welcome',
  identity: identityOf(address, credential),
  secretHash: credential.secretHash,
})
