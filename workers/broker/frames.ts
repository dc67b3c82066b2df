/** The beginning of an MQTT packet that is larger than allowed: enough to say what it was. */
export interface LargeFrame {
  /** The first byte: kind and flags. */
  firstByte: number
  /** Bytes after the fixed header, by the packet's own word. */
  bodyBytes: number
}

export interface Fed {
  /** How many bytes of the chunk belong to packets that are allowed. */
  allowed: number
  /** Set when the next packet is too large: the rest of the chunk belongs to it. */
  large?: LargeFrame
  /** Set when the bytes are no MQTT: a length that goes on for more than four bytes. */
  isGarbage?: boolean
}

export interface FrameMeter {
  feed(chunk: Uint8Array): Fed
}

type State = 'first-byte' | 'length' | 'body'

/**
 * Follows the packets in a stream by their fixed headers alone (MQTT 3.1.1, 2.2), keeping nothing, so that a packet
 * that is too large is seen at its beginning, before anybody gathers it in memory.
 */
export function createFrameMeter(maxBodyBytes: number): FrameMeter {
  let state: State = 'first-byte'
  let firstByte = 0
  let bodyBytes = 0
  let shift = 0

  return {
    feed(chunk) {
      let at = 0
      while (at < chunk.length) {
        if (state === 'body') {
          const skipped = Math.min(bodyBytes, chunk.length - at)
          bodyBytes -= skipped
          at += skipped
          if (bodyBytes === 0) state = 'first-byte'
          continue
        }
        const byte = chunk[at] ?? 0
        at += 1
        if (state === 'first-byte') {
          firstByte = byte
          bodyBytes = 0
          shift = 0
          state = 'length'
          continue
        }
        if (shift > 21) return { allowed: at, isGarbage: true }
        bodyBytes += (byte & 0x7f) << shift
        shift += 7
        if (byte >= 0x80) continue
        if (bodyBytes > maxBodyBytes) return { allowed: at, large: { firstByte, bodyBytes } }
        state = bodyBytes === 0 ? 'first-byte' : 'body'
      }
      return { allowed: at }
    },
  }
}

const PUBLISH = 3

/** A publish that is too large, as far as its first bytes tell. */
export interface LargePublish {
  topic: string
  /** Set when the sender waits for an answer. */
  packetId?: number
  qos: number
  payloadBytes: number
  payloadHead: Uint8Array
}

/** Reads topic and packet id from the first bytes of a large packet's body; `undefined` for another kind or too few. */
export function largePublishOf(frame: LargeFrame, body: Uint8Array): LargePublish | undefined {
  if (frame.firstByte >> 4 !== PUBLISH || body.length < 2) return undefined
  const topicBytes = ((body[0] ?? 0) << 8) | (body[1] ?? 0)
  const qos = (frame.firstByte >> 1) & 3
  const idBytes = qos === 0 ? 0 : 2
  const payloadFrom = 2 + topicBytes + idBytes
  if (body.length < payloadFrom) return undefined
  const id = ((body[2 + topicBytes] ?? 0) << 8) | (body[3 + topicBytes] ?? 0)
  return {
    topic: new TextDecoder().decode(body.subarray(2, 2 + topicBytes)),
    packetId: qos === 0 ? undefined : id,
    qos,
    payloadBytes: frame.bodyBytes - payloadFrom,
    payloadHead: body.subarray(payloadFrom, payloadFrom + 64),
  }
}
