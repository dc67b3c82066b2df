import { type Kysely, sql, type Transaction } from 'kysely'
import type { ParsedReading } from '@/lib/readings/payload'
import type { Refusal } from '@/lib/readings/refusal'
import { liveChannel, type LiveMessage } from '@/lib/sites/live'
import type { Database } from '../schema'
import { addIngestCounts, type IngestCount, type IngestKind } from './ingest-counts'
import { type SensorNews, updateLastValues } from './last-values'
import { storeReadings, type StoredAs } from './readings'
import { insertRefused, type NewRefused } from './refused'
import { holdFiguresShared } from './rollups'

/** A reading that took longer to arrive counts as late. Status: guess; longer than any usual gap. */
const LATE_AFTER_MS = 10 * 60_000

/** One message of a sensor that signed in, as far as it could be understood. */
export interface SensorMessage {
  siteId: number
  sensorId: number
  arrivedAt: Date
  topic: string
  sizeBytes: number
  /** The first 64 bytes. */
  headHex: string
  readings: readonly ParsedReading[]
  refusals: readonly Refusal[]
  isHere?: boolean
  /** Whether it shows that the sensor is alive now; an old message that a broker kept does not. */
  isFresh: boolean
}

export interface StoredCount {
  inserted: number
  duplicates: number
  conflicts: number
  late: number
  refused: number
}

/**
 * Stores a batch of messages in one transaction, all or nothing: readings, figures, last values, counts, and what was
 * refused. The months of the readings must be there. Whoever awaits this may acknowledge all of them afterwards.
 * @param mayRecord asked before each record of a refused message; one that may not is only counted
 */
export async function storeMessages(
  db: Kysely<Database>,
  messages: readonly SensorMessage[],
  now: Date,
  mayRecord: (siteId: number) => boolean,
): Promise<StoredCount> {
  return db
    .transaction()
    .setIsolationLevel('read committed')
    .execute(async (trx) => {
      await holdFiguresShared(
        trx,
        messages.map((message) => message.siteId),
      )
      const rows = messages.flatMap((message) =>
        message.readings.map((reading) => ({
          ...reading,
          siteId: message.siteId,
          sensorId: message.sensorId,
        })),
      )
      const outcomes = rows.length === 0 ? [] : await storeReadings(trx, rows)
      const results = resultsOf(messages, outcomes)
      await updateLastValues(trx, results.flatMap(newsOf))
      await addIngestCounts(trx, results.flatMap(countsOf), now)
      await insertRefused(
        trx,
        results.flatMap(refusedOf).filter((one) => mayRecord(one.siteId)),
      )
      await tellSites(trx, results)
      return totalOf(results)
    })
}

interface Outcome {
  reading: ParsedReading
  stored: StoredAs
}
interface MessageResult {
  message: SensorMessage
  outcomes: readonly Outcome[]
}

function resultsOf(messages: readonly SensorMessage[], stored: readonly StoredAs[]): MessageResult[] {
  let next = 0
  return messages.map((message) => ({
    message,
    outcomes: message.readings.map((reading) => ({ reading, stored: stored[next++] ?? { as: 'no-sensor' } })),
  }))
}

const isLate = (message: SensorMessage, reading: ParsedReading): boolean =>
  message.arrivedAt.getTime() - reading.at.getTime() > LATE_AFTER_MS

function newsOf({ message, outcomes }: MessageResult): SensorNews[] {
  const readings = outcomes.flatMap(({ reading, stored }) => (stored.as === 'inserted' ? reading : []))
  const isAlive = message.isFresh && (message.readings.length > 0 || message.isHere === true)
  const has = (reason: Refusal['reason']): boolean => message.refusals.some((one) => one.reason === reason)
  // A reading that bears its own time, close to ours, shows a clock that goes right again.
  const isRight = message.readings.some(
    (reading) => reading.at.getTime() !== message.arrivedAt.getTime() && !isLate(message, reading),
  )
  const clock = (isWrong: boolean): Date | null | undefined =>
    isRight ? null : isWrong ? message.arrivedAt : undefined
  const news: SensorNews = {
    siteId: message.siteId,
    sensorId: message.sensorId,
    readings,
    heardAt: isAlive ? message.arrivedAt : null,
    isHere: message.isHere ?? (isAlive ? true : undefined),
    clockNotSetAt: clock(has('clock-not-set')),
    clockAheadAt: clock(has('clock-ahead')),
  }
  const tells =
    readings.length > 0 ||
    isAlive ||
    news.isHere !== undefined ||
    news.clockNotSetAt !== undefined ||
    news.clockAheadAt !== undefined
  return tells ? [news] : []
}

function countsOf({ message, outcomes }: MessageResult): IngestCount[] {
  const n = { duplicate: 0, conflict: 0, late: 0, refused: message.refusals.length }
  for (const { reading, stored } of outcomes) {
    if (stored.as === 'duplicate') n.duplicate += 1
    if (stored.as === 'conflict') n.conflict += 1
    if (stored.as === 'inserted' && isLate(message, reading)) n.late += 1
  }
  const { siteId, sensorId } = message
  const kinds: readonly IngestKind[] = ['duplicate', 'conflict', 'late', 'refused']
  return kinds.flatMap((kind) => (n[kind] > 0 ? { siteId, sensorId, kind, n: n[kind] } : []))
}

function refusedOf({ message, outcomes }: MessageResult): NewRefused[] {
  const { siteId, sensorId, topic, sizeBytes, headHex, arrivedAt: at } = message
  const conflicts = outcomes.flatMap(({ reading, stored }): Refusal[] =>
    stored.as === 'conflict' ? [conflictOf(reading, stored)] : [],
  )
  return [...message.refusals, ...conflicts].map((refusal) => ({
    ...refusal,
    ...{ siteId, sensorId, at, topic, sizeBytes, headHex },
  }))
}

const conflictOf = (reading: ParsedReading, kept: Extract<StoredAs, { as: 'conflict' }>): Refusal => ({
  reason: 'conflict',
  field: null,
  detail:
    `${reading.at.toISOString()}: kept ${kept.keptTemperatureC} °C, ${kept.keptHumidityPct} % RH; ` +
    `came again as ${reading.temperatureC} °C, ${reading.humidityPct} % RH`,
})

/** One message for each site and kind, however many readings: it says only that there is something new. */
async function tellSites(trx: Transaction<Database>, results: readonly MessageResult[]): Promise<void> {
  const told = new Set<string>()
  for (const { message, outcomes } of results) {
    const tell = (kind: LiveMessage['kind']) =>
      told.add(JSON.stringify({ site: message.siteId, kind, id: null } satisfies LiveMessage))
    if (outcomes.some(({ stored }) => stored.as === 'inserted')) tell('reading')
    const isOdd = outcomes.some(({ stored }) => stored.as === 'conflict')
    if (message.isHere !== undefined || message.refusals.length > 0 || isOdd) tell('sensor')
  }
  if (told.size === 0) return
  await sql`select pg_notify(${liveChannel}, payload) from unnest(${[...told]}::text[]) as t (payload)`.execute(
    trx,
  )
}

function totalOf(results: readonly MessageResult[]): StoredCount {
  const total: StoredCount = { inserted: 0, duplicates: 0, conflicts: 0, late: 0, refused: 0 }
  for (const { message, outcomes } of results) {
    total.refused += message.refusals.length
    for (const { reading, stored } of outcomes) {
      if (stored.as === 'inserted') total.inserted += 1
      if (stored.as === 'inserted' && isLate(message, reading)) total.late += 1
      if (stored.as === 'duplicate') total.duplicates += 1
      if (stored.as === 'conflict') total.conflicts += 1
    }
  }
  return total
}
