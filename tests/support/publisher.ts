import { setTimeout as delay } from 'node:timers/promises'
import type { TestSensor } from './place'
import { publishPacket, RawMqtt } from './raw-mqtt'

export interface KeptReading {
  at: Date
  temperatureC: number
  humidityPct: number
}

/** Readings that differ from one another, one a second. */
export const manyReadings = (count: number, from: Date, seed: number): KeptReading[] =>
  Array.from({ length: count }, (_, i) => ({
    at: new Date(from.getTime() + i * 1_000),
    temperatureC: Math.round(15_000 + 9_000 * Math.sin(i / 300 + seed)) / 1000,
    humidityPct: Math.round(55_000 + 30_000 * Math.cos(i / 700 + seed)) / 1000,
  }))

const reconnectMs = 50

/**
 * A sensor as it should be: it sends each reading with QoS 1, keeps it until it is acknowledged, and after every lost
 * connection sends again all that was not. It never takes an acknowledgement for granted.
 */
export class StrictPublisher {
  /** The readings that the broker has acknowledged, by their place in the list. */
  readonly acknowledged = new Set<number>()
  /** Acknowledgements for what was already acknowledged: none, unless the sensor had to send twice. */
  sentAgain = 0
  connections = 0
  /** Sent on this connection and not answered yet. */
  underWay = 0
  private isStopped = false
  private limit = Infinity
  private goOn: () => void = () => undefined
  private readonly wasSent = new Set<number>()

  constructor(
    private readonly sensor: TestSensor,
    private readonly readings: readonly KeptReading[],
    private readonly port: number,
    private readonly underWayMax = 300,
  ) {}

  /** Ends when every reading is acknowledged, or when it is stopped. */
  async run(): Promise<void> {
    while (!this.isStopped && this.acknowledged.size < this.readings.length) {
      const client = await this.signIn()
      if (client) await this.sendAll(client)
      else await delay(reconnectMs)
    }
  }

  stop(): void {
    this.isStopped = true
  }

  /** Sends only the first so many readings until it is told of more. */
  sendUpTo(limit: number): void {
    this.limit = limit
    this.goOn()
  }

  private async signIn(): Promise<RawMqtt | undefined> {
    try {
      const { client, code } = await RawMqtt.signIn({ port: this.port, ...this.sensor })
      if (code === 0) return client
      client.cut()
    } catch (error) {
      // Nobody listens there now, or no longer: that is what this sensor is for.
      if (!(error instanceof Error && 'code' in error)) throw error
    }
    return undefined
  }

  private async sendAll(client: RawMqtt): Promise<void> {
    this.connections += 1
    const left = this.readings.map((_, index) => index).filter((index) => !this.acknowledged.has(index))
    const underWay = new Set<number>()
    let next = 0
    const send = () => {
      while (!client.isClosed && !this.isStopped && underWay.size < this.underWayMax && next < left.length) {
        const index = left[next] ?? 0
        if (index >= this.limit) return
        next += 1
        underWay.add(index)
        this.underWay = underWay.size
        this.sendOne(client, index)
      }
    }
    const ended = new Promise<void>((resolve) => client.socket.once('close', () => resolve()))
    const done = new Promise<void>((resolve) => {
      client.onPacket = ({ kind, body }) => {
        if (kind !== 4) return
        const index = body.readUInt16BE(0) - 1
        if (this.acknowledged.has(index)) this.sentAgain += 1
        this.acknowledged.add(index)
        underWay.delete(index)
        this.underWay = underWay.size
        if (this.acknowledged.size === this.readings.length || this.isStopped) resolve()
        else send()
      }
    })
    this.goOn = send
    send()
    await Promise.race([ended, done])
    client.cut()
  }

  private sendOne(client: RawMqtt, index: number): void {
    const reading = this.readings[index]
    if (!reading) return
    const dup = this.wasSent.has(index)
    this.wasSent.add(index)
    client.send(publishPacket(this.sensor.topic, JSON.stringify(reading), { id: index + 1, dup }))
  }
}
