import { randomUUID } from 'node:crypto'
import type { AuthenticateError, Client, ConnectPacket } from 'aedes'
import type { StrayKind } from '@/db/queries/ingest-counts'
import { isUsableClientId, parseSignInName } from '@/lib/readings/topic'
import type { SensorMessage } from '@/db/queries/messages'
import type { Ingest } from '../ingest/ingest'
import { mayPublish, refusedMessage } from './judge'
import type { Sessions } from './sessions'
import type { Door } from './sign-in'

/** Return codes of CONNACK (MQTT 3.1.1, 3.2.2.3). */
const IDENTIFIER_REJECTED = 2
const BAD_NAME_OR_SECRET = 4
const NOT_AUTHORIZED = 5

export interface ConnectOptions {
  door: Door
  sessions: Sessions
  ingest: Ingest
  now: () => Date
  count: (kind: StrayKind) => void
}

interface Intent {
  isClientIdUsable: boolean
  /** A last message for where the sensor may not publish; it was taken out of the connect. */
  foreignWill?: { topic: string; payload: Buffer }
}

/**
 * The two steps of signing in. Before it, the connect is made harmless: the client id is set apart by the sign-in
 * name, so that nobody can push another's connection out by using its id; no session is kept, as nothing is ever
 * queued for a sensor; and a foreign last message is taken out.
 */
export function createConnectHandlers(options: ConnectOptions) {
  const { door, sessions, ingest, now, count } = options
  const intents = new WeakMap<Client, Intent>()

  function preConnect(
    client: Client,
    packet: ConnectPacket,
    done: (error: Error | null, isOk: boolean) => void,
  ): void {
    const name = packet.username ?? ''
    const address = parseSignInName(name)
    const intent: Intent = { isClientIdUsable: packet.clientId === '' || isUsableClientId(packet.clientId) }
    const will = packet.will
    if (will && !(address && mayPublish(address, will.topic))) {
      intent.foreignWill = { topic: will.topic, payload: Buffer.from(will.payload) }
      packet.will = undefined
    }
    intents.set(client, intent)
    packet.clientId = `${address ? name : 'nobody'} ${packet.clientId || randomUUID()}`
    packet.clean = true
    done(null, true)
  }

  async function authenticate(
    client: Client,
    name: string | undefined,
    secret: Buffer | undefined,
    done: (error: AuthenticateError | null, isOk: boolean | null) => void,
  ): Promise<void> {
    const refuse = (returnCode: number, kind: StrayKind) => {
      count(kind)
      done(Object.assign(new Error(kind), { returnCode }), null)
    }
    const intent = intents.get(client)
    if (!intent?.isClientIdUsable) return refuse(IDENTIFIER_REJECTED, 'bad-client-id')
    const address = parseSignInName(name ?? '')
    if (!address || !secret) return refuse(BAD_NAME_OR_SECRET, 'bad-sign-in')
    const signIn = await door(address, secret)
    switch (signIn.as) {
      case 'wrong':
        return refuse(BAD_NAME_OR_SECRET, 'bad-sign-in')
      case 'away':
        // Without an answer the sensor tries again; a refusal would make some give up for good.
        return client.close()
      case 'removed':
        record(refusedMessage(signIn.identity, '', Buffer.alloc(0), now(), 'sensor-removed'))
        return refuse(NOT_AUTHORIZED, 'bad-sign-in')
      case 'welcome': {
        const { identity, secretHash } = signIn
        const { foreignWill } = intent
        if (foreignWill)
          record(refusedMessage(identity, foreignWill.topic, foreignWill.payload, now(), 'foreign-will'))
        if (client.closed) return
        sessions.add({ identity, secretHash, client })
        return done(null, true)
      }
    }
  }

  /** A record that can't be kept now is no reason to hold up who wants to sign in. */
  const record = (message: SensorMessage): void => {
    void ingest.add(message).catch(() => count('unstorable'))
  }

  return { preConnect, authenticate }
}
