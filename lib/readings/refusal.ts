import { z } from 'zod'

/** Why a message, or one reading of it, could not be used. The list is closed; the words stand below. */
export const refusalReasonSchema = z.enum([
  'too-large',
  'empty',
  'not-utf-8',
  'byte-order-mark',
  'nul',
  'not-json',
  'too-deep',
  'too-many-keys',
  'forbidden-key',
  'wrong-shape',
  'too-many-readings',
  'missing-value',
  'wrong-type',
  'not-a-number',
  'negative-zero',
  'out-of-range',
  'sensor-fault',
  'no-time',
  'bad-time',
  'clock-ahead',
  'clock-not-set',
  'conflict',
  'foreign-topic',
  'foreign-will',
  'system-topic',
  'unknown-topic',
  'sensor-removed',
])
export type RefusalReason = z.infer<typeof refusalReasonSchema>

export interface Refusal {
  readonly reason: RefusalReason
  /** The part of the message that was wrong, like `temperatureC` or `readings[3].at`; `null` for the whole. */
  readonly field: string | null
  /** What stood there, shortened, in printable letters. */
  readonly detail: string
}

/** What was wrong and what to do about it, for the person who looks after the sensor. */
export const refusalWords: Readonly<Record<RefusalReason, string>> = {
  'too-large': 'The message was larger than 64 KB. Send fewer readings at a time.',
  empty: 'The message was empty.',
  'not-utf-8': 'The message was not text in UTF-8. Check how the sensor encodes it.',
  'byte-order-mark': 'The message began with a byte order mark. Send plain UTF-8 without it.',
  nul: 'The message held a zero byte. Check the length that the sensor sends.',
  'not-json': 'The message was not valid JSON. Check brackets, quotes and commas.',
  'too-deep': 'The message was nested too deeply. Send one reading, or a list of readings.',
  'too-many-keys': 'The message held far too many keys.',
  'forbidden-key': 'The message held a key that is never accepted.',
  'wrong-shape': 'The message was neither one reading nor a list of readings.',
  'too-many-readings': 'The message held more than 500 readings. Send the rest in another.',
  'missing-value': 'A value was missing. A reading needs a temperature and a humidity.',
  'wrong-type': 'A value was not of the right kind. Numbers are sent without quotes.',
  'not-a-number': 'A value was not a number that can be used. Write it like 21.5, with a point.',
  'negative-zero': 'A value was minus zero, which no sensor measures. Send 0.',
  'out-of-range': 'A value was outside what a room can have: above −40 to 80 °C, 0 to 100 % RH.',
  'sensor-fault':
    'The temperature was one that a sensor gives when it is broken or unplugged. Check its wiring.',
  'no-time': 'The time was missing. Only a single live reading may go without; kept ones need it.',
  'bad-time': 'The time was not written like 2026-03-04T05:06:07Z, in UTC.',
  'clock-ahead': "The sensor's clock is ahead by more than five minutes. Set it.",
  'clock-not-set': "The sensor's clock was not set: the time lay before 2020. Set it.",
  conflict: 'Another reading of the same moment was already kept; the first one stands.',
  'foreign-topic': 'The sensor published where it may not. Check the address in its settings.',
  'foreign-will': 'The sensor left a last message for where it may not publish. Check its settings.',
  'system-topic': "The sensor published to the broker's own addresses, which is never allowed.",
  'unknown-topic': 'The sensor published to an address that nothing reads. Use reading or presence.',
  'sensor-removed': 'The sensor has been removed from this site. Switch it off or add it again.',
}
