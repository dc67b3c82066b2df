import type { SensorMessage } from '@/db/queries/messages'
import { type ParsedReading, parsePayload, parsePresence } from '@/lib/readings/payload'
import type { Refusal, RefusalReason } from '@/lib/readings/refusal'
import { parseTopic, type SensorAddress, topicPrefixOf } from '@/lib/readings/topic'

/** A sensor that has signed in. */
export interface Identity extends SensorAddress {
  siteId: number
  sensorId: number
}

export interface Publish {
  topic: string
  payload: Buffer
  isRetained: boolean
  isResent: boolean
  /** Sent by the broker in the sensor's name, because the connection was lost. */
  isWill: boolean
}

/** A kept reading that is this young still shows that its sensor is alive. Status: guess. */
const freshMs = 10 * 60_000
const topicShownMax = 200
const headBytes = 64

/** Whether a sensor may publish there: under its own prefix and nowhere else. */
export const mayPublish = (identity: SensorAddress, topic: string): boolean =>
  topic.startsWith(topicPrefixOf(identity)) && parseTopic(topic) !== undefined

/** What a publish says, with everything that was wrong about it. It never throws, whatever the bytes are. */
export function judgePublish(identity: Identity, publish: Publish, arrivedAt: Date): SensorMessage {
  const base = messageOf(identity, publish.topic, publish.payload, arrivedAt)
  const wrong = wrongTopic(identity, publish)
  if (wrong) return { ...base, refusals: [refusal(wrong)] }
  if (parseTopic(publish.topic)?.kind === 'presence') {
    const presence = parsePresence(publish.payload)
    if (!presence.ok) return { ...base, refusals: [presence.error] }
    return { ...base, isHere: presence.value.here, isFresh: !publish.isWill }
  }
  const { isRetained, isResent } = publish
  const parsed = parsePayload(publish.payload, { arrivedAt, isRetained, isResent })
  if (!parsed.ok) return { ...base, refusals: [parsed.error] }
  const { readings, refusals } = parsed.value
  return { ...base, readings, refusals, isFresh: !isRetained || isYoung(readings, arrivedAt) }
}

/** A message that is refused for what it is, not for what it says. */
export function refusedMessage(
  identity: Identity,
  topic: string,
  payload: Uint8Array,
  arrivedAt: Date,
  reason: RefusalReason,
  sizeBytes = payload.length,
): SensorMessage {
  return { ...messageOf(identity, topic, payload, arrivedAt), sizeBytes, refusals: [refusal(reason)] }
}

const refusal = (reason: RefusalReason): Refusal => ({ reason, field: null, detail: '' })

const messageOf = (
  identity: Identity,
  topic: string,
  payload: Uint8Array,
  arrivedAt: Date,
): SensorMessage => ({
  siteId: identity.siteId,
  sensorId: identity.sensorId,
  arrivedAt,
  // A topic may hold anything; what is kept of it must suit every table, log and page.
  topic: topic.slice(0, topicShownMax).replace(/[^\x20-\x7e]/g, '·'),
  sizeBytes: payload.length,
  headHex: Buffer.from(payload.subarray(0, headBytes)).toString('hex'),
  readings: [],
  refusals: [],
  isFresh: false,
})

function wrongTopic(identity: Identity, publish: Publish): RefusalReason | undefined {
  if (publish.topic.startsWith('$')) return 'system-topic'
  if (!publish.topic.startsWith(topicPrefixOf(identity)))
    return publish.isWill ? 'foreign-will' : 'foreign-topic'
  return parseTopic(publish.topic) === undefined ? 'unknown-topic' : undefined
}

const isYoung = (readings: readonly ParsedReading[], arrivedAt: Date): boolean =>
  readings.some((reading) => arrivedAt.getTime() - reading.at.getTime() < freshMs)
