import { pbkdf2, randomBytes, randomInt, timingSafeEqual } from 'node:crypto'
import { promisify } from 'node:util'

/**
 * Sensors' secrets, stored in the form of Mosquitto's password file (`$7$iterations$salt$hash`,
 * PBKDF2-HMAC-SHA512), so that the same rows can serve that broker.
 */
const derive = promisify(pbkdf2)
const digest = 'sha512'
const hashBytes = 64
const saltBytes = 12
/**
 * What `mosquitto_passwd` uses. Few are enough: the secrets are drawn here with 117 bits of chance and can't be
 * guessed, so stretching only has to keep a stolen table from being a list of secrets.
 */
const iterations = 101
/** A stored form that asks for more would be a way to keep the broker busy. */
const iterationsMax = 1_000_000

// The letters of public codes: none is misread for another when a secret is typed into a sensor.
const alphabet = '23456789abcdefghjkmnpqrstvwxyz'
const secretLength = 24

export interface SensorSecret {
  /** Shown to the person once, and kept nowhere. */
  secret: string
  /** What is stored. */
  hash: string
}

export async function makeSensorSecret(): Promise<SensorSecret> {
  const secret = Array.from({ length: secretLength }, () => alphabet[randomInt(alphabet.length)]).join('')
  return { secret, hash: await hashSensorSecret(secret) }
}

export async function hashSensorSecret(secret: string | Uint8Array): Promise<string> {
  const salt = randomBytes(saltBytes)
  const hash = await derive(secret, salt, iterations, hashBytes, digest)
  return `$7$${iterations}$${salt.toString('base64')}$${hash.toString('base64')}`
}

/** Whether this is the secret. The work is done off the event loop; a stored form that is not ours is never matched. */
export async function isSensorSecret(secret: string | Uint8Array, stored: string): Promise<boolean> {
  const [empty, scheme, count, salt, hash, ...rest] = stored.split('$')
  if (empty !== '' || scheme !== '7' || rest.length > 0) return false
  if (count === undefined || salt === undefined || hash === undefined) return false
  const rounds = Number(count)
  if (!(Number.isInteger(rounds) && rounds >= 1 && rounds <= iterationsMax)) return false
  const expected = Buffer.from(hash, 'base64')
  if (expected.length !== hashBytes) return false
  const actual = await derive(secret, Buffer.from(salt, 'base64'), rounds, hashBytes, digest)
  return timingSafeEqual(actual, expected)
}
