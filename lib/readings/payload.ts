import { z } from 'zod'
import { err, ok, type Result } from '@/lib/result'
import { decodeJson, isRecord, shown } from './json'
import { implausibleHumidity, implausibleTemperature, implausibleTime, toStored } from './plausible'
import type { Refusal, RefusalReason } from './refusal'

export const MAX_PAYLOAD_BYTES = 64 * 1024
export const MAX_READINGS_PER_MESSAGE = 500
/** Far more than a reading needs; a sensor of another make may send a few of its own. */
const MAX_KEYS = 64

/** One reading as a sensor sends it. Keys that we don't know are left aside. */
export const readingMessageSchema = z.object({
  at: z.string().optional(),
  temperatureC: z.number(),
  humidityPct: z.number(),
  batteryPct: z.number().nullish(),
})
export type ReadingMessage = z.infer<typeof readingMessageSchema>

/** Readings that a sensor kept while it was away: each with its own time. */
export const readingsMessageSchema = z.object({
  readings: z.array(z.unknown()).min(1).max(MAX_READINGS_PER_MESSAGE),
})
export interface ReadingsMessage {
  readings: (ReadingMessage & { at: string })[]
}

export const presenceMessageSchema = z.object({ here: z.boolean() })
export type PresenceMessage = z.infer<typeof presenceMessageSchema>

export interface ParsedReading {
  readonly at: Date
  readonly temperatureC: number
  readonly humidityPct: number
  readonly batteryPct: number | null
}

export interface ParsedPayload {
  readonly readings: readonly ParsedReading[]
  /** What was wrong with some of it; the readings above are good all the same. */
  readonly refusals: readonly Refusal[]
}

export interface Arrival {
  readonly arrivedAt: Date
  /** The broker kept the message: it says nothing about now. */
  readonly isRetained: boolean
  /** The sensor sent it before and got no answer, so it was measured some time ago. */
  readonly isResent: boolean
}

const refusal = (reason: RefusalReason, field: string | null, detail = ''): Refusal => ({
  reason,
  field,
  detail,
})

// RFC 3339 in UTC. zod's pattern also checks that the day exists; `+00:00` is what some languages write for Z.
const instant = z.iso.datetime({ offset: true, local: false }).refine((text) => /(Z|[+-]00:00)$/.test(text))

/**
 * The readings in a message. One bad reading among good ones is refused by itself; only a message that
 * can't be read at all is an error as a whole.
 */
export function parsePayload(bytes: Uint8Array, arrival: Arrival): Result<ParsedPayload, Refusal> {
  if (bytes.length > MAX_PAYLOAD_BYTES) return err(refusal('too-large', null, `${bytes.length} bytes`))
  const decoded = decodeJson(bytes)
  if (!decoded.ok) return decoded
  const message = decoded.value
  if (!isRecord(message)) return err(refusal('wrong-shape', null, shown(message)))
  const unfit = unfitObject(message, null)
  if (unfit) return err(unfit)
  if (!Object.hasOwn(message, 'readings')) return ok(collect([message], arrival, false))
  return parseBatch(message.readings, arrival)
}

/** Whether the sensor says that it is here. */
export function parsePresence(bytes: Uint8Array): Result<PresenceMessage, Refusal> {
  if (bytes.length > MAX_PAYLOAD_BYTES) return err(refusal('too-large', null, `${bytes.length} bytes`))
  const decoded = decodeJson(bytes)
  if (!decoded.ok) return decoded
  const parsed = presenceMessageSchema.safeParse(decoded.value)
  if (parsed.success) return ok(parsed.data)
  return err(isRecord(decoded.value) ? refusalOf(decoded.value, 'here', '') : refusal('wrong-shape', null))
}

function parseBatch(readings: unknown, arrival: Arrival): Result<ParsedPayload, Refusal> {
  if (Array.isArray(readings) && readings.length > MAX_READINGS_PER_MESSAGE)
    return err(refusal('too-many-readings', 'readings', `${readings.length} readings`))
  const parsed = readingsMessageSchema.safeParse({ readings })
  if (!parsed.success) return err(refusal('wrong-shape', 'readings', shown(readings)))
  return ok(collect(parsed.data.readings, arrival, true))
}

function collect(entries: readonly unknown[], arrival: Arrival, isBatch: boolean): ParsedPayload {
  const readings: ParsedReading[] = []
  const refusals: Refusal[] = []
  entries.forEach((entry, index) => {
    const prefix = isBatch ? `readings[${index}]` : ''
    const parsed = parseOne(entry, arrival, prefix, isBatch)
    if (!parsed.ok) return void refusals.push(parsed.error)
    readings.push(parsed.value.reading)
    if (parsed.value.battery) refusals.push(parsed.value.battery)
  })
  return { readings, refusals }
}

interface One {
  reading: ParsedReading
  /** A battery level that could not be used costs the level, never the reading. */
  battery?: Refusal
}

function parseOne(entry: unknown, arrival: Arrival, prefix: string, isBatch: boolean): Result<One, Refusal> {
  if (!isRecord(entry)) return err(refusal('wrong-shape', prefix || null, shown(entry)))
  const unfit = unfitObject(entry, prefix || null)
  if (unfit) return err(unfit)
  const battery = batteryOf(entry, prefix)
  const parsed = readingMessageSchema.safeParse({ ...entry, batteryPct: undefined })
  if (!parsed.success) {
    const key = String(parsed.error.issues[0]?.path[0] ?? '')
    return err(refusalOf(entry, key, prefix))
  }
  const { temperatureC, humidityPct } = parsed.data
  const hot = implausibleTemperature(temperatureC)
  if (hot) return err(refusal(hot, fieldName(prefix, 'temperatureC'), shown(temperatureC)))
  const damp = implausibleHumidity(humidityPct)
  if (damp) return err(refusal(damp, fieldName(prefix, 'humidityPct'), shown(humidityPct)))
  const at = timeOf(parsed.data.at, arrival, prefix, isBatch)
  if (!at.ok) return at
  return ok({
    reading: {
      at: at.value,
      temperatureC: toStored(temperatureC),
      humidityPct: toStored(humidityPct),
      batteryPct: battery.ok ? battery.value : null,
    },
    battery: battery.ok ? undefined : battery.error,
  })
}

function timeOf(
  text: string | undefined,
  arrival: Arrival,
  prefix: string,
  isBatch: boolean,
): Result<Date, Refusal> {
  const field = fieldName(prefix, 'at')
  if (text === undefined) {
    if (isBatch || arrival.isRetained || arrival.isResent) return err(refusal('no-time', field))
    return ok(arrival.arrivedAt)
  }
  if (!instant.safeParse(text).success) return err(refusal('bad-time', field, shown(text)))
  const at = new Date(text)
  if (Number.isNaN(at.getTime())) return err(refusal('bad-time', field, shown(text)))
  const implausible = implausibleTime(at, arrival.arrivedAt)
  return implausible ? err(refusal(implausible, field, shown(text))) : ok(at)
}

function batteryOf(entry: Record<string, unknown>, prefix: string): Result<number | null, Refusal> {
  const value = Object.hasOwn(entry, 'batteryPct') ? entry.batteryPct : undefined
  if (value === undefined || value === null) return ok(null)
  if (typeof value !== 'number' || !Number.isFinite(value)) return err(refusalOf(entry, 'batteryPct', prefix))
  if (value < 0 || value > 100)
    return err(refusal('out-of-range', fieldName(prefix, 'batteryPct'), shown(value)))
  return ok(toStored(value))
}

/** Names what was wrong with a value that is missing or of the wrong kind. */
function refusalOf(entry: Record<string, unknown>, key: string, prefix: string): Refusal {
  const field = fieldName(prefix, key)
  if (!Object.hasOwn(entry, key)) return refusal('missing-value', field)
  const value = entry[key]
  if (value === Infinity || value === -Infinity) return refusal('not-a-number', field, shown(value))
  return refusal(key === 'at' && typeof value === 'string' ? 'bad-time' : 'wrong-type', field, shown(value))
}

/** JSON makes `__proto__` an ordinary key of its own; no sensor sends it in good faith. */
function unfitObject(entry: Record<string, unknown>, field: string | null): Refusal | undefined {
  if (Object.hasOwn(entry, '__proto__')) return refusal('forbidden-key', field, '__proto__')
  const keys = Object.keys(entry).length
  return keys > MAX_KEYS ? refusal('too-many-keys', field, `${keys} keys`) : undefined
}

const fieldName = (prefix: string, key: string): string => (prefix === '' ? key : `${prefix}.${key}`)
