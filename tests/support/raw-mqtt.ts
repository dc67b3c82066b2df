import { connect, type Socket } from 'node:net'
import { eventually } from './eventually'

/** A packet as it came over the wire. */
export interface Packet {
  /** 2 CONNACK, 4 PUBACK, 9 SUBACK, 13 PINGRESP … (MQTT 3.1.1, 2.2.1). */
  kind: number
  body: Buffer
}

export interface Will {
  topic: string
  payload: string
  qos?: 0 | 1
  retain?: boolean
}

export interface SignInAs {
  port: number
  name: string
  secret: string
  clientId?: string
  will?: Will
  keepAliveS?: number
}

export interface PublishOptions {
  qos?: 0 | 1 | 2
  id?: number
  retain?: boolean
  dup?: boolean
}

const two = (n: number): Buffer => Buffer.from([n >> 8, n & 0xff])
const text = (value: string | Buffer): Buffer => {
  const bytes = Buffer.from(value)
  return Buffer.concat([two(bytes.length), bytes])
}

/** A whole packet: first byte, length, body. */
export function packetOf(firstByte: number, body: Buffer): Buffer {
  const length: number[] = []
  let left = body.length
  do {
    const seven = left % 128
    left = Math.floor(left / 128)
    length.push(left > 0 ? seven | 0x80 : seven)
  } while (left > 0)
  return Buffer.concat([Buffer.from([firstByte, ...length]), body])
}

export function connectPacket({ name, secret, clientId = 'raw', will, keepAliveS = 60 }: SignInAs): Buffer {
  const willFlags = will ? 0x04 | ((will.qos ?? 0) << 3) | (will.retain ? 0x20 : 0) : 0
  return packetOf(
    0x10,
    Buffer.concat([
      ...[text('MQTT'), Buffer.from([4, 0xc0 | 0x02 | willFlags]), two(keepAliveS), text(clientId)],
      ...(will ? [text(will.topic), text(will.payload)] : []),
      ...[text(name), text(secret)],
    ]),
  )
}

export function publishPacket(topic: string, payload: string | Buffer, options: PublishOptions = {}): Buffer {
  const { qos = 1, id = 1, retain = false, dup = false } = options
  const first = 0x30 | (qos << 1) | (retain ? 1 : 0) | (dup ? 8 : 0)
  const parts = [text(topic), ...(qos > 0 ? [two(id)] : []), Buffer.from(payload)]
  return packetOf(first, Buffer.concat(parts))
}

/** Speaks MQTT 3.1.1 byte by byte, so that a test sees what really crosses the wire and may break every rule. */
export class RawMqtt {
  readonly packets: Packet[] = []
  isClosed = false
  onPacket: (packet: Packet) => void = () => undefined
  private rest = Buffer.alloc(0)

  private constructor(readonly socket: Socket) {
    socket.on('data', (chunk: Buffer) => this.read(chunk))
    socket.on('close', () => (this.isClosed = true))
    // A reset is one way of being closed.
    socket.on('error', () => (this.isClosed = true))
  }

  static async open(port: number): Promise<RawMqtt> {
    const socket = connect({ host: '127.0.0.1', port, noDelay: true })
    await new Promise<void>((resolve, reject) => {
      socket.once('connect', resolve)
      socket.once('error', reject)
    })
    return new RawMqtt(socket)
  }

  /** Signs in and gives the connection with the return code, or `undefined` when it was closed without an answer. */
  static async signIn(as: SignInAs): Promise<{ client: RawMqtt; code: number | undefined }> {
    const client = await RawMqtt.open(as.port)
    client.send(connectPacket(as))
    await eventually('an answer to CONNECT', () => client.isClosed || client.packets.length > 0)
    return { client, code: client.packets.find((packet) => packet.kind === 2)?.body[1] }
  }

  send(bytes: Buffer): void {
    this.socket.write(bytes)
  }

  publish(topic: string, payload: string | Buffer, options?: PublishOptions): void {
    this.send(publishPacket(topic, payload, options))
  }

  subscribe(topic: string, id = 1): void {
    this.send(packetOf(0x82, Buffer.concat([two(id), text(topic), Buffer.from([1])])))
  }

  isAcknowledged(id = 1): boolean {
    return this.packets.some((packet) => packet.kind === 4 && packet.body.readUInt16BE(0) === id)
  }

  acknowledged(id = 1, deadlineMs?: number): Promise<boolean> {
    return eventually(`PUBACK ${id}`, () => this.isAcknowledged(id), deadlineMs)
  }

  /** Publishes and waits for the answer. */
  async say(topic: string, payload: string | Buffer, options: PublishOptions = {}): Promise<void> {
    const id = options.id ?? this.packets.length + 1
    this.publish(topic, payload, { ...options, id })
    await this.acknowledged(id)
  }

  /** Ends without a good-bye, as when the power fails. */
  cut(): void {
    this.socket.destroy()
  }

  private read(chunk: Buffer): void {
    this.rest = Buffer.concat([this.rest, chunk])
    // All that the broker says to us is shorter than 128 bytes but for echoes, which no test here asks for.
    while (this.rest.length >= 2 && this.rest.length >= 2 + (this.rest[1] ?? 0)) {
      const length = this.rest[1] ?? 0
      const packet = { kind: (this.rest[0] ?? 0) >> 4, body: this.rest.subarray(2, 2 + length) }
      this.packets.push(packet)
      this.onPacket(packet)
      this.rest = this.rest.subarray(2 + length)
    }
  }
}
