import 'server-only'
import type { Kysely } from 'kysely'
import { z } from 'zod'
import { takeIds } from '@/db/queries/counters'
import type { SiteMember } from '@/db/queries/members'
import { insertTypedReading } from '@/db/queries/readings'
import { listRefused } from '@/db/queries/refused'
import { findRoom, type RoomRecord } from '@/db/queries/rooms'
import { listSensorReadings } from '@/db/queries/sensor-readings'
import { findSensor, findTypedSensor, insertSensor, isSensorNameTaken } from '@/db/queries/sensors'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import {
  CLOCK_AHEAD_MAX_MS,
  implausibleTemperature,
  implausibleTime,
  OLDEST_READING_MS,
  toStored,
} from '@/lib/readings/plausible'
import { refusalWords } from '@/lib/readings/refusal'
import { ok } from '@/lib/result'
import type { TypedReading } from '@/lib/rooms/room'
import type { Refused, SensorReading } from '@/lib/sensors/sensor'
import { emcOfReadingPct } from '@/lib/wood/emc'
import { decodeCursor, listQueryShape, type Page, pageOf } from './list'
import { failField, notThere, type Outcome } from './problem'

const viewOf = (reading: { at: Date; temperatureC: number; humidityPct: number }): SensorReading => ({
  at: reading.at.toISOString(),
  temperatureC: reading.temperatureC,
  humidityPct: reading.humidityPct,
  emcPct: emcOfReadingPct(reading.temperatureC, reading.humidityPct),
})

/** Somebody read a dial in a room. The row that such readings belong to is made with the first of them. */
export async function typeReading(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  input: TypedReading,
  now: Date,
): Promise<Outcome<SensorReading>> {
  const at = input.at === undefined ? now : new Date(input.at)
  const badTime = implausibleTime(at, now)
  if (badTime !== undefined)
    return failField(
      'not-possible',
      'at',
      badTime === 'clock-ahead' ? 'that time is still to come' : 'nothing older than 2020 can be kept',
    )
  if (implausibleTemperature(input.temperatureC + 0) !== undefined)
    return failField('not-possible', 'temperatureC', 'no room is that cold or hot: read it again')
  return inTransaction(db, async (trx) => {
    const room = await findRoom(trx, member.siteId, roomCode)
    if (room === undefined) return notThere()
    const reading = {
      siteId: member.siteId,
      sensorId: await typedSensorId(trx, member.siteId, room, now),
      at,
      temperatureC: toStored(input.temperatureC),
      humidityPct: toStored(input.humidityPct),
    }
    const stored = await insertTypedReading(trx, reading, now)
    if (stored.as === 'conflict')
      return failField('conflict', 'at', 'another reading of the same moment is kept already')
    return ok(viewOf(reading))
  })
}

async function typedSensorId(
  db: Kysely<Database>,
  siteId: number,
  room: RoomRecord,
  now: Date,
): Promise<number> {
  // Held first, so that two who type at once make one row and not two.
  await takeIds(db, siteId, 'sensor', 0)
  const known = await findTypedSensor(db, siteId, room.id)
  if (known !== undefined) return known.id
  const plain = `Typed in ${room.name}`.slice(0, 60)
  const name = (await isSensorNameTaken(db, siteId, plain)) ? `Typed in ${room.code}` : plain
  const fromAt = new Date(OLDEST_READING_MS - CLOCK_AHEAD_MAX_MS)
  const sensor = { name, kind: 'typed' as const, secretHash: null, roomId: room.id, spot: '', fromAt }
  return (await insertSensor(db, siteId, sensor, now)).id
}

const instant = z.iso.datetime({ offset: true })
export const sensorReadingsQuerySchema = z.strictObject({
  from: instant.optional(),
  to: instant.optional(),
  ...listQueryShape(['-at']),
})

/** A sensor's readings as they were taken, newest first. */
export async function listReadings(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  query: z.output<typeof sensorReadingsQuerySchema>,
  now: Date,
): Promise<Outcome<Page<SensorReading>>> {
  const sensor = await findSensor(db, member.siteId, sensorCode)
  if (sensor === undefined) return notThere()
  const before = query.cursor === undefined ? undefined : decodeCursor(query.cursor, z.iso.datetime())
  if (query.cursor !== undefined && before === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const rows = await listSensorReadings(db, member.siteId, sensor.id, {
    from: query.from === undefined ? new Date(OLDEST_READING_MS) : new Date(query.from),
    to: query.to === undefined ? new Date(now.getTime() + CLOCK_AHEAD_MAX_MS) : new Date(query.to),
    limit: query.limit,
    before: before === undefined ? undefined : new Date(before),
  })
  const page = pageOf(rows, query.limit, (row) => row.at.toISOString())
  return ok({ items: page.items.map(viewOf), nextCursor: page.nextCursor })
}

export const refusedQuerySchema = z.strictObject({
  sensor: z.string().max(40).optional(),
  ...listQueryShape(['-at']),
})

/** Messages that could not be used, newest first, each with what was wrong and what to do. */
export async function listRefusedMessages(
  db: Kysely<Database>,
  member: SiteMember,
  query: z.output<typeof refusedQuerySchema>,
): Promise<Outcome<Page<Refused>>> {
  const sensor = query.sensor === undefined ? undefined : await findSensor(db, member.siteId, query.sensor)
  if (query.sensor !== undefined && sensor === undefined) return notThere()
  const beforeId = query.cursor === undefined ? undefined : decodeCursor(query.cursor, z.int().positive())
  if (query.cursor !== undefined && beforeId === undefined)
    return failField('malformed', 'cursor', 'was not given out here')
  const rows = await listRefused(db, member.siteId, {
    limit: query.limit + 1,
    sensorId: sensor?.id,
    beforeId,
  })
  const page = pageOf(rows, query.limit, (row) => row.id)
  const items = page.items.map((row) => ({
    id: String(row.id),
    at: row.at.toISOString(),
    sensor:
      row.sensorCode === null || row.sensorName === null
        ? null
        : { id: row.sensorCode, name: row.sensorName },
    topic: row.topic,
    reason: row.reason,
    words: refusalWords[row.reason],
    field: row.field,
    detail: row.detail,
    sizeBytes: row.sizeBytes,
    headHex: row.headHex,
  }))
  return ok({ items, nextCursor: page.nextCursor })
}
