import type { Kysely } from 'kysely'
import type { Database } from '../schema'

/** A browser on one device that takes pushes for a person. */
export interface PushPhone {
  id: number
  userId: string
  endpoint: string
  p256dh: string
  auth: string
  device: string
  createdAt: Date
  lastSentAt: Date | null
  goneAt: Date | null
}

const columns = [
  'id',
  'user_id',
  'endpoint',
  'p256dh',
  'auth',
  'device',
  'created_at',
  'last_sent_at',
  'gone_at',
] as const

/** A person's phones, those that are gone included, in the order in which they were signed up. */
export async function listPhones(db: Kysely<Database>, userId: string): Promise<PushPhone[]> {
  const rows = await db
    .selectFrom('push_subscription')
    .where('user_id', '=', userId)
    .select(columns)
    .orderBy('id')
    .execute()
  return rows.map((row) => ({
    id: Number(row.id),
    userId: row.user_id,
    endpoint: row.endpoint,
    p256dh: row.p256dh,
    auth: row.auth,
    device: row.device,
    createdAt: row.created_at,
    lastSentAt: row.last_sent_at,
    goneAt: row.gone_at,
  }))
}

export type NewPhone = Pick<PushPhone, 'userId' | 'endpoint' | 'p256dh' | 'auth' | 'device'>

/** A person keeps this many; the oldest make room. */
const phonesMost = 10

/**
 * Signs a phone up, once for each address. Whoever is signed in on it now is the one it tells: a browser that changed
 * hands must not show the notices of the person before.
 */
export async function savePhone(db: Kysely<Database>, phone: NewPhone, now: Date): Promise<void> {
  const { userId: user_id, endpoint, p256dh, auth, device } = phone
  await db
    .insertInto('push_subscription')
    .values({ user_id, endpoint, p256dh, auth, device, created_at: now })
    .onConflict((clash) =>
      clash.column('endpoint').doUpdateSet({ user_id, p256dh, auth, device, gone_at: null }),
    )
    .execute()
  const oldest = db
    .selectFrom('push_subscription')
    .where('user_id', '=', user_id)
    .orderBy('id', 'desc')
    .offset(phonesMost)
    .select('id')
  await db.deleteFrom('push_subscription').where('id', 'in', oldest).execute()
}

/** @returns whether there was one of theirs */
export async function deletePhone(db: Kysely<Database>, userId: string, endpoint: string): Promise<boolean> {
  const gone = await db
    .deleteFrom('push_subscription')
    .where('user_id', '=', userId)
    .where('endpoint', '=', endpoint)
    .executeTakeFirst()
  return gone.numDeletedRows > 0n
}

/** The push service has said that nobody takes it there any more. */
export async function notePhoneGone(db: Kysely<Database>, id: number, now: Date): Promise<void> {
  await db.updateTable('push_subscription').set({ gone_at: now }).where('id', '=', id).execute()
}

export async function notePhoneSent(db: Kysely<Database>, id: number, now: Date): Promise<void> {
  await db.updateTable('push_subscription').set({ last_sent_at: now }).where('id', '=', id).execute()
}
