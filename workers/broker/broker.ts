import { type EventEmitter, once } from 'node:events'
import { type AddressInfo, createServer, type Socket } from 'node:net'
import { setTimeout as delay } from 'node:timers/promises'
import { Aedes, type Client, type PublishPacket, type Subscription } from 'aedes'
import type { Kysely } from 'kysely'
import type { SensorMessage } from '@/db/queries/messages'
import type { Database } from '@/db/schema'
import { MAX_PAYLOAD_BYTES } from '@/lib/readings/payload'
import { topicPrefixOf } from '@/lib/readings/topic'
import { every } from '../_shared/every'
import type { Logger } from '../_shared/logger'
import { createIngest, type Ingest } from '../ingest/ingest'
import { createConnectHandlers } from './connect'
import type { LargePublish } from './frames'
import { GuardedSocket } from './guarded-socket'
import { judgePublish, mayPublish, refusedMessage } from './judge'
import { createPulse } from './pulse'
import { createSessions, type Session } from './sessions'
import { createDoor } from './sign-in'

export interface BrokerOptions {
  db: Kysely<Database>
  logger: Logger
  host: string
  /** 0 for any free one. */
  port: number
  now?: () => Date
  /** How often live sessions are held against the credentials; a removed sensor is cut off within this time. */
  checkSessionsMs?: number
  /** Runs between the commit and the acknowledgements, for tests of what happens when the process ends there. */
  afterCommit?: () => Promise<void>
}

export interface RunningBroker {
  port: number
  /** Reads no more, stores and acknowledges what it has read, and closes. */
  stop(): Promise<void>
}

const connectionsMax = 5_000
const signInMs = 10_000
/** A packet holds a payload, a topic of ours and a few bytes of its own. */
const packetBytesMax = MAX_PAYLOAD_BYTES + 1_024
/** Messages of one connection that may be under way; beyond this it is read again when half of them are answered. */
const underWayMax = 1_000
/** Time to store what was read before the stop; the rest of the five seconds is for saying good-bye. */
const stopMs = 3_500
/** A database that hangs must not keep the last steps from ending. */
const goodByeMs = 500
/** Nobody may listen there, so nothing comes of what is sent to it. */
const nowhere = 'dropped'

/** The broker that sensors speak to. It takes what they publish into the database and forwards next to nothing. */
export async function startBroker(options: BrokerOptions): Promise<RunningBroker> {
  const { db, logger, now = () => new Date(), checkSessionsMs = 20_000, afterCommit } = options
  const ingest = createIngest({ db, logger, now, afterCommit })
  const sessions = createSessions()
  const guards = new Map<Client, GuardedSocket>()
  const underWay = new Map<Client, number>()
  let isStopping = false

  const pulse = createPulse(db, now, () => ({
    connections: guards.size,
    sessions: sessions.count(),
    pendingRows: ingest.pendingRows(),
  }))
  const { preConnect, authenticate } = createConnectHandlers({
    ...{ door: createDoor(db), sessions, ingest, now },
    count: pulse.count,
  })
  const aedes = await Aedes.createBroker({
    connectTimeout: signInMs,
    // Client ids are set apart by the sign-in name, which makes them longer than old clients may choose.
    maxClientsIdLength: 512,
    preConnect,
    authenticate: (...args) => void authenticate(...args).catch((error: unknown) => fail(args[0], error)),
    authorizePublish: (client, packet, done) => void take(client, packet).then(() => done(null), done),
    authorizeSubscribe: (client, subscription, done) => done(null, allowed(client, subscription)),
  })

  const fail = (client: Client, error: unknown) => {
    logger.error({ err: error }, 'connection failed')
    client.close()
  }

  /** Ends when the message may be acknowledged. Of a message that could not be stored the connection is closed instead. */
  async function take(client: Client | null, packet: PublishPacket): Promise<void> {
    const session = client ? sessions.of(client) : undefined
    if (!client || !session) return void (packet.topic = nowhere)
    const isWill = client.closed
    // Sensors are not gone because we stop.
    if (isWill && isStopping) return void (packet.topic = nowhere)
    const message = judge(session, packet, isWill)
    // The answer to a refused message is the same, or the sensor would send it again for ever.
    if (isWill || !mayPublish(session.identity, packet.topic)) packet.topic = nowhere
    packet.retain = false
    // Who waits for an answer sends again; who doesn't has only this one.
    const isWanted = () => isWill || packet.qos === 0 || !client.closed
    await hold(client, () => store(client, message, isWanted))
  }

  const judge = (session: Session, packet: PublishPacket, isWill: boolean): SensorMessage => {
    const { topic, payload, retain: isRetained, dup: isResent } = packet
    const publish = { topic, payload: Buffer.from(payload), isRetained, isResent, isWill }
    return judgePublish(session.identity, publish, now())
  }

  async function store(client: Client, message: SensorMessage, isWanted: () => boolean): Promise<void> {
    try {
      if ((await ingest.add(message, isWanted)) === 'unstorable') pulse.count('unstorable')
    } catch (error) {
      client.close()
      throw error
    }
  }

  async function hold(client: Client, work: () => Promise<void>): Promise<void> {
    const count = (underWay.get(client) ?? 0) + 1
    underWay.set(client, count)
    if (count === underWayMax) guards.get(client)?.hold(true)
    try {
      await work()
    } finally {
      const left = (underWay.get(client) ?? 1) - 1
      if (left > 0) underWay.set(client, left)
      else underWay.delete(client)
      if (left === underWayMax / 2 && !isStopping) guards.get(client)?.hold(false)
    }
  }

  /** Nothing is ever sent to sensors but an echo of what they say themselves, never kept for later. */
  const allowed = (client: Client, subscription: Subscription): Subscription | null => {
    const session = sessions.of(client)
    if (!session || !subscription.topic.startsWith(topicPrefixOf(session.identity))) return null
    subscription.qos = 0
    return subscription
  }

  const server = createServer(
    { noDelay: true, keepAlive: true, keepAliveInitialDelay: 60_000 },
    (socket: Socket) => {
      const guard = new GuardedSocket(socket, {
        maxBodyBytes: packetBytesMax,
        onLarge: (publish) =>
          void tooLarge(client, guard, publish).catch((error: unknown) => fail(client, error)),
      })
      const client = aedes.handle(guard)
      guards.set(client, guard)
      guard.once('close', () => {
        guards.delete(client)
        // The last message is published when the connection is closed, and needs to know whose it is.
        setImmediate(() => sessions.end(client))
      })
    },
  )
  server.maxConnections = connectionsMax
  server.on('drop', () => pulse.count('too-many'))

  /** Recorded first, then acknowledged so that it is not sent for ever, then the connection is closed. */
  async function tooLarge(client: Client, guard: GuardedSocket, publish?: LargePublish): Promise<void> {
    const session = sessions.of(client)
    if (!session || !publish) {
      pulse.count('too-large')
      return client.close()
    }
    const { topic, payloadHead, payloadBytes, packetId, qos } = publish
    const reason = mayPublish(session.identity, topic) ? 'too-large' : 'foreign-topic'
    await ingest.add(refusedMessage(session.identity, topic, payloadHead, now(), reason, payloadBytes))
    const isWaiting = qos === 1 && packetId !== undefined
    await guard.endGently(isWaiting ? Buffer.from([0x40, 2, packetId >> 8, packetId & 0xff]) : undefined)
    client.close()
  }

  // A client that breaks the protocol or vanishes is everyday life; without these listeners it would end the process.
  aedes.on('clientError', (client, error) => logger.debug({ client: client.id, err: error }, 'client error'))
  aedes.on('connectionError', (_client, error) => logger.debug({ err: error }, 'connection error'))
  const emitter: EventEmitter = aedes
  emitter.on('error', (error) => logger.error({ err: error }, 'broker error'))

  server.listen(options.port, options.host)
  await once(server, 'listening')
  const onError = (error: unknown) => logger.warn({ err: error }, 'upkeep of the broker failed')
  const beats = every({ intervalMs: 5_000, onError }, () => pulse.beat())
  const checks = every({ intervalMs: checkSessionsMs, onError }, async () => {
    const closed = await sessions.closeInvalid(db)
    if (closed > 0) logger.info({ closed }, 'sessions of removed sensors closed')
  })

  return {
    port: (server.address() as AddressInfo).port,
    stop: () => {
      isStopping = true
      return stop({ server, aedes, guards, ingest, loops: [beats, checks] })
    },
  }
}

interface Parts {
  server: ReturnType<typeof createServer>
  aedes: Aedes
  guards: ReadonlyMap<Client, GuardedSocket>
  ingest: Ingest
  loops: readonly { stop(): Promise<void> }[]
}

async function stop({ server, aedes, guards, ingest, loops }: Parts): Promise<void> {
  server.close()
  for (const guard of guards.values()) guard.hold(true)
  await ingest.stop(stopMs)
  // The acknowledgements are written in the turn after the last commit.
  await new Promise(setImmediate)
  await Promise.all([...guards.values()].map((guard) => guard.endGently()))
  await new Promise<void>((resolve) => aedes.close(resolve))
  await Promise.race([
    Promise.all(loops.map((loop) => loop.stop())),
    delay(goodByeMs, undefined, { ref: false }),
  ])
}
