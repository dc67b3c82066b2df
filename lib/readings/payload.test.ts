import { describe, expect, it } from 'vitest'
import { MAX_PAYLOAD_BYTES, parsePayload, parsePresence, type Arrival } from './payload'
import { refusalReasonSchema, refusalWords } from './refusal'

const arrivedAt = new Date('2026-03-04T05:06:07.000Z')
const live: Arrival = { arrivedAt, isRetained: false, isResent: false }
const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text)

/** The single refusal of a message, whether of the whole or of its one reading. */
function refusalFor(message: string | Uint8Array, arrival: Arrival = live) {
  const parsed = parsePayload(typeof message === 'string' ? bytesOf(message) : message, arrival)
  if (!parsed.ok) return parsed.error
  expect(parsed.value.readings).toEqual([])
  expect(parsed.value.refusals).toHaveLength(1)
  return parsed.value.refusals[0]
}

const reading = (temperatureC: string, humidityPct: string, more = ''): string =>
  `{"temperatureC":${temperatureC},"humidityPct":${humidityPct}${more}}`

describe('a good reading', () => {
  it('is taken at its own time, with its battery', () => {
    const message = '{"at":"2026-03-04T05:00:00Z","temperatureC":19.4,"humidityPct":51.2,"batteryPct":87}'
    expect(parsePayload(bytesOf(message), live)).toEqual({
      ok: true,
      value: {
        readings: [
          { at: new Date('2026-03-04T05:00:00Z'), temperatureC: 19.4, humidityPct: 51.2, batteryPct: 87 },
        ],
        refusals: [],
      },
    })
  })

  it('counts at its arrival when it is live and has no time', () => {
    const parsed = parsePayload(bytesOf(reading('19.4', '51.2')), live)
    expect(parsed.ok && parsed.value.readings[0]?.at).toEqual(arrivedAt)
  })

  it('may bring keys that we do not know', () => {
    const parsed = parsePayload(bytesOf(reading('1', '2', ',"rssi":-60,"extra":{"a":[1]}')), live)
    expect(parsed.ok && parsed.value.refusals).toEqual([])
  })

  it('is kept in whole thousandths', () => {
    const parsed = parsePayload(bytesOf(reading('19.41249', '-0.0000')), live)
    expect(parsed.ok && parsed.value.refusals[0]?.reason).toBe('negative-zero')
    const fine = parsePayload(bytesOf(reading('-0.0002', '51.99951')), live)
    expect(fine.ok && fine.value.readings[0]).toMatchObject({ temperatureC: 0, humidityPct: 52 })
  })

  it.each(['Z', '+00:00'])('may end its time with %s', (zone) => {
    const parsed = parsePayload(bytesOf(reading('1', '2', `,"at":"2026-03-04T05:00:00.250${zone}"`)), live)
    expect(parsed.ok && parsed.value.readings[0]?.at).toEqual(new Date('2026-03-04T05:00:00.250Z'))
  })
})

describe('a value that can not be used is refused by name', () => {
  it.each([
    ['NaN', 'not-a-number'],
    ['Infinity', 'not-a-number'],
    ['-Infinity', 'not-a-number'],
    ['1e999', 'not-a-number'],
    ['-0', 'negative-zero'],
    ['null', 'wrong-type'],
    ['true', 'wrong-type'],
    ['"21.5"', 'wrong-type'],
    ['[]', 'wrong-type'],
    ['0x10', 'not-a-number'],
    ['1_000', 'not-a-number'],
    ['21,5', 'not-a-number'],
    ['9'.repeat(400), 'not-a-number'],
    [`21.${'5'.repeat(400)}`, 'not-a-number'],
    ['-41', 'out-of-range'],
    ['80.1', 'out-of-range'],
    ['85', 'sensor-fault'],
    ['85.0', 'sensor-fault'],
    ['125', 'sensor-fault'],
    ['-127', 'sensor-fault'],
    ['-40', 'sensor-fault'],
  ])('temperature %s', (value, reason) => {
    expect(refusalFor(reading(value, '50'))).toMatchObject({ reason, field: 'temperatureC' })
  })

  it.each([
    ['100.4', 'out-of-range'],
    ['101', 'out-of-range'],
    ['-0.1', 'out-of-range'],
    ['"50"', 'wrong-type'],
    ['-0', 'negative-zero'],
  ])('humidity %s', (value, reason) => {
    expect(refusalFor(reading('20', value))).toMatchObject({ reason, field: 'humidityPct' })
  })

  it('a missing one', () => {
    expect(refusalFor('{"temperatureC":20}')).toMatchObject({ reason: 'missing-value', field: 'humidityPct' })
    expect(refusalFor('{}')).toMatchObject({ reason: 'missing-value', field: 'temperatureC' })
  })

  it.each([
    ['-39.999', '0'],
    ['80', '100'],
    ['-3.2', '100.0'],
  ])('but the ends of the range are in it: %s °C, %s RH', (temperature, humidity) => {
    const parsed = parsePayload(bytesOf(reading(temperature, humidity)), live)
    expect(parsed.ok && parsed.value.readings).toHaveLength(1)
  })

  it.each(['101', '"87"', 'true'])('a battery level of %s costs the level, not the reading', (value) => {
    const parsed = parsePayload(bytesOf(reading('20', '50', `,"batteryPct":${value}`)), live)
    expect(parsed.ok && parsed.value.readings[0]?.batteryPct).toBeNull()
    expect(parsed.ok && parsed.value.refusals[0]?.field).toBe('batteryPct')
  })
})

describe('the time', () => {
  const at = (text: string) => refusalFor(reading('20', '50', `,"at":${JSON.stringify(text)}`))

  it.each([
    ['2026-03-04T06:06:07Z', 'clock-ahead'],
    ['2036-03-04T05:06:07Z', 'clock-ahead'],
    ['9999-12-31T23:59:59Z', 'clock-ahead'],
    ['2026-03-04T05:11:07.001Z', 'clock-ahead'],
    ['1970-01-01T00:00:00Z', 'clock-not-set'],
    ['2000-01-01T00:00:00Z', 'clock-not-set'],
    ['2019-12-31T23:59:59Z', 'clock-not-set'],
    ['2026-03-04T05:06:07', 'bad-time'],
    ['2026-03-04T05:06:07+02:00', 'bad-time'],
    ['2026-02-30T05:06:07Z', 'bad-time'],
    ['2026-03-04 05:06:07Z', 'bad-time'],
    ['today', 'bad-time'],
    ['', 'bad-time'],
  ])('%s is refused as %s', (text, reason) => {
    expect(at(text)).toMatchObject({ reason, field: 'at' })
  })

  it('as a number is of the wrong kind', () => {
    expect(refusalFor(reading('20', '50', ',"at":1700000000'))).toMatchObject({ reason: 'wrong-type' })
  })

  it('may be five minutes ahead', () => {
    const parsed = parsePayload(bytesOf(reading('20', '50', ',"at":"2026-03-04T05:11:07Z"')), live)
    expect(parsed.ok && parsed.value.readings).toHaveLength(1)
  })

  it.each([
    { ...live, isRetained: true },
    { ...live, isResent: true },
  ])('may not be missing from a reading that is not live', (arrival) => {
    expect(refusalFor(reading('20', '50'), arrival)).toMatchObject({ reason: 'no-time', field: 'at' })
  })
})

describe('several readings', () => {
  const many = (n: number, bad?: number) =>
    JSON.stringify({
      readings: Array.from({ length: n }, (_, i) => ({
        at: new Date(Date.UTC(2026, 0, 1) + i * 60_000).toISOString(),
        temperatureC: i === bad ? '21.5' : 20,
        humidityPct: 50,
      })),
    })

  it('lose only the bad one of 500', () => {
    const parsed = parsePayload(bytesOf(many(500, 123)), live)
    expect(parsed.ok && parsed.value.readings).toHaveLength(499)
    expect(parsed.ok && parsed.value.refusals).toEqual([
      { reason: 'wrong-type', field: 'readings[123].temperatureC', detail: '"21.5"' },
    ])
  })

  it('need a time each', () => {
    expect(refusalFor(`{"readings":[${reading('20', '50')}]}`)).toMatchObject({
      reason: 'no-time',
      field: 'readings[0].at',
    })
  })

  it('may be 500 at most, and one at least', () => {
    expect(refusalFor(many(501))).toMatchObject({ reason: 'too-many-readings' })
    expect(refusalFor('{"readings":[]}')).toMatchObject({ reason: 'wrong-shape', field: 'readings' })
    expect(refusalFor('{"readings":{"0":1}}')).toMatchObject({ reason: 'wrong-shape', field: 'readings' })
  })
})

describe('a message that is no JSON of ours', () => {
  it.each([
    ['empty', new Uint8Array()],
    ['not-json', bytesOf('x')],
    ['not-json', bytesOf('{"temperatureC":20,"humidityPct":50,}')],
    ['not-json', bytesOf('{"temperatureC":20')],
    ['byte-order-mark', bytesOf(`\ufeff${reading('20', '50')}`)],
    ['not-utf-8', new Uint8Array(Buffer.from(`\ufeff${reading('20', '50')}`, 'utf16le'))],
    ['nul', new Uint8Array(Buffer.from(reading('20', '50'), 'utf16le'))],
    ['nul', bytesOf(`${reading('20', '50')}\u0000`)],
    ['not-utf-8', new Uint8Array([0x7b, 0xc3, 0x28, 0x7d])],
    ['wrong-shape', bytesOf('[1,2]')],
    ['wrong-shape', bytesOf('"text"')],
    ['wrong-shape', bytesOf('null')],
    ['wrong-shape', bytesOf('21.5')],
    ['too-deep', bytesOf('['.repeat(10_000) + ']'.repeat(10_000))],
    ['too-deep', bytesOf('{"a":'.repeat(10_000))],
    ['too-large', bytesOf(`{"a":"${'x'.repeat(1_000_000)}"}`)],
    ['too-many-keys', bytesOf(`{${Array.from({ length: 5000 }, (_, i) => `"k${i}":1`).join(',')}}`)],
    ['forbidden-key', bytesOf('{"__proto__":{"temperatureC":20,"humidityPct":50}}')],
  ])('is refused as %s', (reason, message) => {
    expect(refusalFor(message)).toMatchObject({ reason })
  })

  it('leaves the prototype of all objects alone', () => {
    refusalFor('{"__proto__":{"temperatureC":20,"humidityPct":50}}')
    expect(Object.hasOwn(Object.prototype, 'temperatureC')).toBe(false)
  })

  it('is judged in a few milliseconds at the largest size, whatever it holds', () => {
    const full = MAX_PAYLOAD_BYTES - 20
    const hard = [
      '"a":'.repeat(full / 4),
      `{"a"${' '.repeat(full)}`,
      '['.repeat(full),
      `{"a":"${'\\"'.repeat(full / 2 - 8)}"}`,
      `{"a":${'1'.repeat(full - 10)}}`,
    ]
    for (const message of hard) {
      // The best of five: other work on the machine must not decide.
      const tries = Array.from({ length: 5 }, () => {
        const startedAt = performance.now()
        parsePayload(bytesOf(message), live)
        return performance.now() - startedAt
      })
      expect(Math.min(...tries)).toBeLessThan(50)
    }
  })

  it('shows what stood there in letters that every table and log can hold', () => {
    const refused = refusalFor('{"temperatureC":"\\u0000\\u202e<b>\\n","humidityPct":50}')
    expect(refused?.detail).toMatch(/^[\x20-\x7e·…]*$/)
  })
})

describe('presence', () => {
  it('says yes or no and nothing else', () => {
    expect(parsePresence(bytesOf('{"here":true}'))).toEqual({ ok: true, value: { here: true } })
    expect(parsePresence(bytesOf('{"here":"yes"}'))).toMatchObject({
      error: { reason: 'wrong-type', field: 'here' },
    })
    expect(parsePresence(bytesOf('{}'))).toMatchObject({ error: { reason: 'missing-value', field: 'here' } })
    expect(parsePresence(bytesOf('[]'))).toMatchObject({ error: { reason: 'wrong-shape' } })
  })
})

it('has words for every reason', () => {
  for (const reason of refusalReasonSchema.options) expect(refusalWords[reason]).toMatch(/\.$/)
})
