import 'server-only'
import type { Kysely } from 'kysely'
import { deletePhone, savePhone } from '@/db/queries/push-subscriptions'
import type { Database } from '@/db/schema'
import type { NewPhone } from '@/lib/notices/delivery'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { fail, type Outcome } from './problem'

/** A browser is signed up to be told; whoever is signed in there is told, whatever the site. */
export async function signPhoneUp(
  db: Kysely<Database>,
  userId: string,
  { endpoint, keys, device }: NewPhone,
  now: Date,
): Promise<Outcome<undefined>> {
  if (serverConfig().vapid === undefined)
    return fail('not-possible', 'Nothing can be sent to phones from here: its keys are not set.')
  await savePhone(db, { userId, endpoint, ...keys, device }, now)
  return ok(undefined)
}

/** Taken back twice, it is gone all the same. */
export async function takePhoneBack(db: Kysely<Database>, userId: string, endpoint: string): Promise<void> {
  await deletePhone(db, userId, endpoint)
}
