import type { Client } from 'aedes'
import type { Kysely } from 'kysely'
import { type HeldCredential, listValidCredentials } from '@/db/queries/sensor-secrets'
import type { Database } from '@/db/schema'
import type { Identity } from './judge'

export interface Session {
  identity: Identity
  secretHash: string
  client: Client
}

/** Who is signed in, and with which secret. */
export interface Sessions {
  add(session: Session): void
  end(client: Client): void
  of(client: Client): Session | undefined
  count(): number
  /** Closes the sessions whose secret was renewed or whose sensor was removed since they signed in. */
  closeInvalid(db: Kysely<Database>): Promise<number>
}

export function createSessions(): Sessions {
  const live = new Set<Client>()
  // Outlives the connection: its last message is published after the end and needs to know whose it is.
  const byClient = new WeakMap<Client, Session>()
  return {
    add(session) {
      live.add(session.client)
      byClient.set(session.client, session)
    },
    end: (client) => void live.delete(client),
    of: (client) => byClient.get(client),
    count: () => live.size,
    async closeInvalid(db) {
      const sessions = [...live].flatMap((client) => byClient.get(client) ?? [])
      const held = new Map(sessions.map((session) => [keyOf(session), heldBy(session)]))
      const valid = await listValidCredentials(db, [...held.values()])
      const validKeys = new Set(valid.map(keyOfHeld))
      const invalid = sessions.filter((session) => !validKeys.has(keyOf(session)))
      for (const session of invalid) session.client.close()
      return invalid.length
    },
  }
}

const heldBy = ({ identity, secretHash }: Session): HeldCredential => ({
  siteId: identity.siteId,
  sensorId: identity.sensorId,
  secretHash,
})
const keyOfHeld = (held: HeldCredential): string => `${held.siteId} ${held.sensorId} ${held.secretHash}`
const keyOf = (session: Session): string => keyOfHeld(heldBy(session))
