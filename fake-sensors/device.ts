import mqtt, { type MqttClient } from 'mqtt'
import { MAX_READINGS_PER_MESSAGE, type ReadingMessage } from '@/lib/readings/payload'
import { signInNameOf, topicOf } from '@/lib/readings/topic'

export interface DeviceOptions {
  brokerUrl: string
  siteCode: string
  sensorCode: string
  secret: string
  everyMs: number
  /** How far into each turn it measures: sensors were not all switched on at the same second. */
  phaseMs: number
  measure: (atMs: number) => ReadingMessage
  /** What is sent instead of the reading of an instant; undefined: nothing is wrong with it. */
  spoiled?: (atMs: number) => string | undefined
  /** Whether the network is lost at that instant. */
  isAway: (atMs: number) => boolean
  /** Instants that it measured before this program ran and has not sent yet, oldest first. */
  missed: readonly number[]
  /** Told when the broker has taken everything up to this instant. */
  onAcknowledged: (atMs: number) => void
  onTrouble: (sentence: string) => void
  now?: () => number
}

export interface Device {
  stop(): Promise<void>
}

/** What a small sensor's flash may hold. The oldest go first. */
const KEPT_MOST = 3_000
const RECONNECT_MS = 5_000
const RECONNECT_REFUSED_MS = 60_000

/**
 * One simulated sensor: it measures by its clock whatever the network does, keeps what is not acknowledged, and
 * sends a single reading as one and kept ones together. Only one message is under way at a time.
 */
export function startDevice(options: DeviceOptions): Device {
  const { siteCode, sensorCode, everyMs, phaseMs, measure, now = Date.now } = options
  const readingTopic = topicOf(siteCode, sensorCode, 'reading')
  const presenceTopic = topicOf(siteCode, sensorCode, 'presence')
  const kept: number[] = [...options.missed]
  let client: MqttClient | undefined
  let sending = false
  let timer: NodeJS.Timeout | undefined

  function connect(): MqttClient {
    const made = mqtt.connect(options.brokerUrl, {
      username: signInNameOf(siteCode, sensorCode),
      password: options.secret,
      clientId: sensorCode,
      clean: true,
      keepalive: 60,
      reconnectPeriod: RECONNECT_MS,
      will: { topic: presenceTopic, payload: Buffer.from('{"here":false}'), qos: 1, retain: false },
    })
    made.on('connect', () => {
      made.options.reconnectPeriod = RECONNECT_MS
      made.publish(presenceTopic, '{"here":true}', { qos: 1 })
      flush()
    })
    made.on('error', (error) => {
      // A sensor that was taken off its site goes on trying, but does not hammer the door.
      if ('code' in error && (error.code === 4 || error.code === 5))
        made.options.reconnectPeriod = RECONNECT_REFUSED_MS
      options.onTrouble(`Sensor ${sensorCode}: ${error.message}`)
    })
    return made
  }

  /** The network goes without a goodbye, so that the broker tells the last will. */
  function loseNetwork(): void {
    client?.end(true)
    client = undefined
    sending = false
  }

  const spoiledOf = (batch: readonly number[]): string | undefined =>
    batch.map((atMs) => options.spoiled?.(atMs)).find((text) => text !== undefined)

  function flush(): void {
    const by = client
    if (by === undefined || !by.connected || sending || kept.length === 0) return
    const batch = kept.slice(0, MAX_READINGS_PER_MESSAGE)
    const readings = batch.map(measure)
    sending = true
    by.publish(
      readingTopic,
      spoiledOf(batch) ?? JSON.stringify(readings.length === 1 ? readings[0] : { readings }),
      { qos: 1 },
      (error) => {
        // What was sent on a network that is lost by now stays kept; the same reading twice does no harm.
        if (client !== by) return
        sending = false
        if (error) return
        const last = batch.at(-1) ?? 0
        while ((kept[0] ?? Infinity) <= last) kept.shift()
        options.onAcknowledged(last)
        flush()
      },
    )
  }

  function turn(): void {
    const atMs = Math.floor(now() / 1000) * 1000
    kept.push(atMs)
    if (kept.length > KEPT_MOST) kept.shift()
    if (options.isAway(atMs)) loseNetwork()
    else client ??= connect()
    flush()
    // The next full turn of the clock, so that a slow turn does not shift all that follow.
    timer = setTimeout(turn, everyMs - ((now() - phaseMs) % everyMs))
  }
  turn()

  return {
    /** As when the power goes: the broker tells the last will, and what is kept is sent after the next start. */
    async stop() {
      clearTimeout(timer)
      const last = client
      client = undefined
      await last?.endAsync(true)
    },
  }
}
