import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { createFrameMeter, largePublishOf } from './frames'

/** A packet: first byte, length in sevens of bits, body. */
function packet(firstByte: number, body: Uint8Array): Buffer {
  const length: number[] = []
  let left = body.length
  do {
    const seven = left % 128
    left = Math.floor(left / 128)
    length.push(left > 0 ? seven | 0x80 : seven)
  } while (left > 0)
  return Buffer.concat([Buffer.from([firstByte, ...length]), body])
}

describe('packets in a stream', () => {
  it('are all let through however the stream is cut', () => {
    const sizes = fc.array(fc.integer({ min: 0, max: 400 }), { minLength: 1, maxLength: 8 })
    fc.assert(
      fc.property(sizes, fc.array(fc.integer({ min: 1, max: 90 }), { minLength: 1 }), (bodies, cuts) => {
        const stream = Buffer.concat(bodies.map((size) => packet(0x32, new Uint8Array(size))))
        const meter = createFrameMeter(400)
        let at = 0
        for (let i = 0; at < stream.length; i += 1) {
          const chunk = stream.subarray(at, at + (cuts[i % cuts.length] ?? 1))
          expect(meter.feed(chunk)).toEqual({ allowed: chunk.length })
          at += chunk.length
        }
      }),
    )
  })

  it('are seen to be too large at their first bytes', () => {
    const meter = createFrameMeter(65_536)
    const small = packet(0x30, new Uint8Array(10))
    // 256 MB less one byte, the most that MQTT can say; only its header has arrived.
    const huge = Buffer.from([0x32, 0xff, 0xff, 0xff, 0x7f])
    expect(meter.feed(Buffer.concat([small, huge]))).toEqual({
      allowed: small.length + huge.length,
      large: { firstByte: 0x32, bodyBytes: 268_435_455 },
    })
  })

  it('are no packets when a length never ends', () => {
    expect(createFrameMeter(10).feed(Buffer.from([0x30, 0xff, 0xff, 0xff, 0xff, 0x01]))).toMatchObject({
      isGarbage: true,
    })
  })
})

describe('a publish that is too large', () => {
  const body = Buffer.concat([
    Buffer.from([0, 3]),
    Buffer.from('a/b'),
    Buffer.from([1, 2]),
    Buffer.from('{"x":1}'),
  ])

  it('is known by its topic, its id and its first bytes', () => {
    const large = largePublishOf({ firstByte: 0x32, bodyBytes: 100_007 }, body)
    expect(large).toMatchObject({ topic: 'a/b', packetId: 258, qos: 1, payloadBytes: 100_000 })
    expect(Buffer.from(large?.payloadHead ?? []).toString()).toBe('{"x":1}')
  })

  it('is not known from too few bytes, nor from another kind of packet', () => {
    expect(largePublishOf({ firstByte: 0x32, bodyBytes: 100_007 }, body.subarray(0, 6))).toBeUndefined()
    expect(largePublishOf({ firstByte: 0x10, bodyBytes: 100_007 }, body)).toBeUndefined()
  })
})
