/** What a sensor may say: a reading (or several), or whether it is here. */
export const topicKinds = ['reading', 'presence'] as const
export type TopicKind = (typeof topicKinds)[number]

export interface SensorAddress {
  readonly siteCode: string
  readonly sensorCode: string
}

export interface ParsedTopic extends SensorAddress {
  readonly kind: TopicKind
}

const root = 'lidfast/v1'
// The letters of `lib/sites/code.ts`. No wildcard, separator or `$` is among them, so a code can't widen a topic.
const code = '[23456789abcdefghjkmnpqrstvwxyz]{10}'
const topicPattern = new RegExp(`^${root}/(${code})/(${code})/(${topicKinds.join('|')})$`)
const signInPattern = new RegExp(`^(${code})/(${code})$`)

/** Where a sensor publishes. */
export const topicOf = (siteCode: string, sensorCode: string, kind: TopicKind): string =>
  `${topicPrefixOf({ siteCode, sensorCode })}${kind}`

/** Everything that a sensor may publish stands under this. */
export const topicPrefixOf = ({ siteCode, sensorCode }: SensorAddress): string =>
  `${root}/${siteCode}/${sensorCode}/`

/** The address in a topic, or `undefined` for one that no sensor of ours uses. */
export function parseTopic(topic: string): ParsedTopic | undefined {
  const [, siteCode, sensorCode, kind] = topicPattern.exec(topic) ?? []
  if (siteCode === undefined || sensorCode === undefined || kind === undefined) return undefined
  return { siteCode, sensorCode, kind: kind as TopicKind }
}

/** The name with which a sensor signs in to the broker. */
export const signInNameOf = (siteCode: string, sensorCode: string): string => `${siteCode}/${sensorCode}`

export function parseSignInName(name: string): SensorAddress | undefined {
  const [, siteCode, sensorCode] = signInPattern.exec(name) ?? []
  return siteCode === undefined || sensorCode === undefined ? undefined : { siteCode, sensorCode }
}

/** MQTT 3.1.1 asks brokers to take at least 23 letters; ours takes this many. */
export const CLIENT_ID_MAX_LENGTH = 128

/**
 * Whether a client id is one that can be logged and kept without harm: printable ASCII without MQTT's own signs.
 * An id that reverses text, hides letters or looks like a wildcard is a mistake or a trick; neither signs in.
 */
export const isUsableClientId = (clientId: string): boolean =>
  clientId.length > 0 &&
  clientId.length <= CLIENT_ID_MAX_LENGTH &&
  /^[!-~]+$/.test(clientId) &&
  !/[+#$]/.test(clientId)
