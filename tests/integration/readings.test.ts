import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { storeMessages, type SensorMessage } from '@/db/queries/messages'
import { ensurePartitions, monthOf, monthsAhead } from '@/db/queries/partitions'
import { insertReadings, insertTypedReading, type ReadingRow } from '@/db/queries/readings'
import { listRefused, REFUSED_KEPT } from '@/db/queries/refused'
import { holdFiguresAlone, rebuildFigures, rebuildSiteFigures } from '@/db/queries/rollups'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { listFigures, makeRoom, makeSensor, makeSite, type TestSensor, type TestSite } from '../support/place'

let database: TestDatabase
beforeAll(async () => void (database = await createTestDatabase()))
afterAll(() => database.drop())

const minute = 60_000
const start = new Date('2026-03-04T05:00:00Z')
const later = (ms: number): Date => new Date(start.getTime() + ms)

interface Place {
  site: TestSite
  roomId: number
  sensor: TestSensor
}
async function makePlace(timeZone?: string): Promise<Place> {
  const site = await makeSite(database.db, timeZone)
  const roomId = await makeRoom(database.db, site)
  return { site, roomId, sensor: await makeSensor(database.db, site, roomId) }
}

const row = (sensor: TestSensor, at: Date, temperatureC = 20, humidityPct = 50): ReadingRow => ({
  ...{ siteId: sensor.siteId, sensorId: sensor.id },
  ...{ at, temperatureC, humidityPct },
})

/** A message as the broker makes it. */
function message(sensor: TestSensor, arrivedAt: Date, part: Partial<SensorMessage>): SensorMessage {
  return {
    ...{ siteId: sensor.siteId, sensorId: sensor.id, arrivedAt },
    ...{ topic: sensor.topic, sizeBytes: 10, headHex: '7b7d', readings: [], refusals: [], isFresh: true },
    ...part,
  }
}

const reading = (at: Date, temperatureC = 20, humidityPct = 50, batteryPct: number | null = null) => ({
  ...{ at, temperatureC, humidityPct, batteryPct },
})

const store = (messages: SensorMessage[], now = start) =>
  storeMessages(database.db, messages, now, () => true)

const stateOf = (sensor: TestSensor) =>
  database.db
    .selectFrom('sensor_state')
    .where('site_id', '=', sensor.siteId)
    .where('sensor_id', '=', sensor.id)
    .selectAll()
    .executeTakeFirstOrThrow()

async function countsOf(sensor: TestSensor): Promise<Record<string, number>> {
  const rows = await database.db
    .selectFrom('ingest_count')
    .where('site_id', '=', sensor.siteId)
    .where('sensor_id', '=', sensor.id)
    .select(['kind', 'n'])
    .execute()
  return Object.fromEntries(rows.map((one) => [one.kind, one.n]))
}

describe('stored messages', () => {
  beforeAll(async () => void (await ensurePartitions(database.db, monthsAhead(start))))

  it('count a reading once, however often it comes (F20)', async () => {
    const { site, sensor } = await makePlace()
    const once = message(sensor, start, { readings: [reading(start)] })
    expect(await store([once])).toMatchObject({ inserted: 1, duplicates: 0 })
    expect(await store([once, once])).toMatchObject({ inserted: 0, duplicates: 2 })
    const twiceInOne = message(sensor, start, { readings: [reading(later(1)), reading(later(1))] })
    expect(await store([twiceInOne])).toMatchObject({ inserted: 1, duplicates: 1 })
    const { hours, days } = await listFigures(database.db, site.id)
    expect(hours.map((hour) => hour.n)).toEqual([2])
    expect(days.map((day) => day.n)).toEqual([2])
    expect(await countsOf(sensor)).toEqual({ duplicate: 3 })
  })

  it('keep the first of two values of one moment and show both (F21)', async () => {
    const { site, sensor } = await makePlace()
    await store([message(sensor, start, { readings: [reading(start, 20, 50)] })])
    const other = message(sensor, start, { readings: [reading(start, 21, 55)] })
    expect(await store([other])).toMatchObject({ inserted: 0, conflicts: 1 })
    const { hours } = await listFigures(database.db, site.id)
    expect(hours[0]).toMatchObject({ n: 1, temperature_milli_sum: 20_000 })
    const [refused] = await listRefused(database.db, site.id, { limit: 10 })
    expect(refused).toMatchObject({ reason: 'conflict', sensorCode: sensor.code })
    expect(refused?.detail).toContain('kept 20 °C, 50 % RH')
    expect(refused?.detail).toContain('as 21 °C, 55 % RH')
    expect(await countsOf(sensor)).toEqual({ conflict: 1 })
  })

  it('put a late reading at its own time and leave the last value alone (F22)', async () => {
    const { site, sensor } = await makePlace()
    const longAgo = later(-400 * 86_400_000)
    await ensurePartitions(database.db, [monthOf(longAgo)])
    await store([message(sensor, start, { readings: [reading(start, 20, 50, 80)] })])
    const backlog = [
      reading(later(-5 * minute), 19),
      reading(later(-3 * 86_400_000), 5),
      reading(longAgo, 4, 90, 99),
    ]
    expect(await store([message(sensor, later(1000), { readings: backlog })])).toMatchObject({
      inserted: 3,
      late: 2,
    })
    expect(await stateOf(sensor)).toMatchObject({
      ...{ at: start, temperature_c: 20, humidity_pct: 50, battery_pct: 80 },
      heard_at: later(1000),
    })
    const { days } = await listFigures(database.db, site.id)
    expect(days.map((day) => [day.day_on, day.n, day.temperature_milli_sum])).toEqual([
      ['2025-01-28', 1, 4_000],
      ['2026-03-01', 1, 5_000],
      ['2026-03-04', 2, 39_000],
    ])
    expect(await countsOf(sensor)).toEqual({ late: 2 })
  })

  it('take a reading for the room that the sensor hung in then', async () => {
    const { site, roomId, sensor } = await makePlace()
    const nextRoom = await makeRoom(database.db, site)
    await database.db
      .updateTable('placement')
      .set({ to_at: start })
      .where('site_id', '=', site.id)
      .where('sensor_id', '=', sensor.id)
      .execute()
    await database.db
      .insertInto('placement')
      .values({ site_id: site.id, sensor_id: sensor.id, from_at: start, room_id: nextRoom })
      .execute()
    await store([message(sensor, start, { readings: [reading(later(-1)), reading(start)] })])
    const { days } = await listFigures(database.db, site.id)
    expect(days.map((day) => [day.room_id, day.n])).toEqual([
      [roomId, 1],
      [nextRoom, 1],
    ])
  })

  it('learn the usual gap, who is here, and that a clock is wrong until it is right again', async () => {
    const { sensor } = await makePlace()
    const refusals = [{ reason: 'clock-not-set', field: 'at', detail: '' } as const]
    await store([message(sensor, start, { refusals })])
    expect(await stateOf(sensor)).toMatchObject({ clock_not_set_at: start, heard_at: null, is_here: null })
    for (const n of [1, 2, 3])
      await store([message(sensor, later(n * 300_000 + 1), { readings: [reading(later(n * 300_000))] })])
    expect(await stateOf(sensor)).toMatchObject({ clock_not_set_at: null, usual_gap_s: 300, is_here: true })
    await store([message(sensor, later(999_000), { isHere: false })])
    expect(await stateOf(sensor)).toMatchObject({ is_here: false, heard_at: later(900_001) })
  })

  it('say nothing about now when the message is an old one that a broker kept (F33)', async () => {
    const { sensor } = await makePlace()
    await store([message(sensor, later(minute), { readings: [reading(later(minute))] })])
    await store([message(sensor, later(9e6), { readings: [reading(start)], isFresh: false })])
    expect(await stateOf(sensor)).toMatchObject({ at: later(minute), heard_at: later(minute) })
  })

  it('do not fail for a sensor that has just been deleted', async () => {
    const { site, sensor } = await makePlace()
    const gone = await makeSensor(database.db, site, undefined)
    await database.db.deleteFrom('sensor').where('site_id', '=', site.id).where('id', '=', gone.id).execute()
    const refusals = [{ reason: 'not-json', field: null, detail: '' } as const]
    const stored = await store([
      message(gone, start, { readings: [reading(start)], refusals }),
      message(sensor, start, { readings: [reading(start)] }),
    ])
    expect(stored.inserted).toBe(1)
  })

  it('keep no more refused messages of a site than the newest thousand', async () => {
    const { site, sensor } = await makePlace()
    const refusals = Array.from({ length: 600 }, (_, i) => ({
      ...({ reason: 'not-json', field: null, detail: String(i) } as const),
    }))
    await store([message(sensor, start, { refusals })])
    await store([message(sensor, start, { refusals })])
    const kept = await listRefused(database.db, site.id, { limit: 5_000 })
    expect(kept).toHaveLength(REFUSED_KEPT)
    expect(kept[0]?.detail).toBe('599')
    expect(await countsOf(sensor)).toEqual({ refused: 1200 })
  })

  it('from two processes at once come out right and never lock crosswise', async () => {
    const site = await makeSite(database.db)
    const rooms = [await makeRoom(database.db, site), await makeRoom(database.db, site)]
    const sensors = await Promise.all([0, 1, 2, 3].map((n) => makeSensor(database.db, site, rooms[n % 2])))
    const batch = (order: readonly TestSensor[], round: number) =>
      store(
        order.map((sensor) =>
          message(sensor, later(round * 300_000), {
            readings: Array.from({ length: 20 }, (_, i) =>
              reading(later((round * 20 + i) * 1000), i, 40 + i),
            ),
          }),
        ),
      )
    for (let round = 0; round < 25; round += 1)
      await Promise.all([batch(sensors, round), batch(sensors.toReversed(), round), batch(sensors, round)])
    const { n } = await database.db
      .selectFrom('reading')
      .where('site_id', '=', site.id)
      .select((eb) => eb.fn.countAll<number>().as('n'))
      .executeTakeFirstOrThrow()
    const { hours, days } = await listFigures(database.db, site.id)
    expect(n).toBe(2000)
    expect(hours.reduce((sum, hour) => sum + hour.n, 0)).toBe(2000)
    await rebuildSiteFigures(database.db, site.id)
    expect(await listFigures(database.db, site.id)).toEqual({ hours, days })
  })
})

describe('figures made again', () => {
  // Half-hour and quarter-hour zones, and one whose clocks change by half an hour.
  it.each([
    'UTC',
    'Europe/London',
    'Asia/Kolkata',
    'Asia/Kathmandu',
    'Australia/Lord_Howe',
    'America/New_York',
  ])('equal those that grew reading by reading, in %s', async (timeZone) => {
    const { site, sensor } = await makePlace(timeZone)
    // Over the spring and autumn changes of all of them, at times that fall on no round minute.
    const rows = [Date.UTC(2026, 2, 6), Date.UTC(2026, 3, 3), Date.UTC(2026, 9, 1)].flatMap((from) =>
      Array.from({ length: 900 }, (_, i) =>
        row(
          sensor,
          new Date(from + i * 7_654_321 * (0.1 + (i % 3))),
          Math.sin(i) * 30 + 10,
          50 + 49.99 * Math.cos(i * 1.7),
        ),
      ),
    )
    for (let i = 0; i < rows.length; i += 350) await insertReadings(database.db, rows.slice(i, i + 350))
    const before = await listFigures(database.db, site.id)
    expect(before.hours.length).toBeGreaterThan(1000)
    await database.db.deleteFrom('room_hour').where('site_id', '=', site.id).execute()
    await database.db.deleteFrom('room_day').where('site_id', '=', site.id).execute()
    await rebuildSiteFigures(database.db, site.id)
    expect(await listFigures(database.db, site.id)).toEqual(before)

    // A part of them made again leaves the whole as it was.
    const span = { fromAt: new Date('2026-04-04T11:10:00Z'), toAt: new Date('2026-04-06T03:40:00Z') }
    await rebuildFigures(database.db, { siteId: site.id, sensorId: sensor.id, ...span })
    expect(await listFigures(database.db, site.id)).toEqual(before)
  })

  it('follow a changed placement, with readings that arrive meanwhile', async () => {
    const { site, roomId, sensor } = await makePlace()
    const nextRoom = await makeRoom(database.db, site)
    await insertReadings(database.db, [row(sensor, start), row(sensor, later(minute))])
    let arriving: Promise<unknown> = Promise.resolve()
    await database.db.transaction().execute(async (trx) => {
      await holdFiguresAlone(trx, site.id)
      arriving = insertReadings(database.db, [row(sensor, later(2 * minute))])
      await trx.updateTable('placement').set({ room_id: nextRoom }).where('site_id', '=', site.id).execute()
      await rebuildFigures(trx, { siteId: site.id, sensorId: sensor.id, fromAt: start, toAt: null })
    })
    await arriving
    const { hours } = await listFigures(database.db, site.id)
    expect(hours.map((hour) => [hour.room_id, hour.n])).toEqual([[nextRoom, 3]])
    expect(roomId).not.toBe(nextRoom)
  })
})

describe('months of readings', () => {
  it('are made ahead over the end of a year, once, even by several at a time (F16)', async () => {
    const lastMinute = new Date('2031-12-31T23:59:00Z')
    expect(monthsAhead(lastMinute)).toEqual(['2031-12', '2032-01', '2032-02'])
    const all = await Promise.all(
      Array.from({ length: 6 }, () => ensurePartitions(database.db, monthsAhead(lastMinute))),
    )
    expect(all.flat().sort()).toEqual(['2031-12', '2032-01', '2032-02'])
    expect(await ensurePartitions(database.db, monthsAhead(lastMinute))).toEqual([])
    const { sensor } = await makePlace()
    const times = ['2031-12-31T23:59:59.999Z', '2032-01-01T00:00:00.000Z', '2032-02-09T23:59:00.000Z']
    expect(
      await insertReadings(
        database.db,
        times.map((at) => row(sensor, new Date(at))),
      ),
    ).toBe(3)
  })

  it('are made while readings are being stored, without holding them up', async () => {
    const { sensor } = await makePlace()
    await database.db.transaction().execute(async (trx) => {
      await insertReadings(trx, [row(sensor, start)])
      // The transaction above is still open: a month that needed its end would never be made.
      expect(await ensurePartitions(database.db, ['2040-01'])).toEqual(['2040-01'])
    })
  })

  it.each(['2019-12', '1970-01', '2200-01', '2026-13', 'x'])('never %s', async (month) => {
    await expect(ensurePartitions(database.db, [month])).rejects.toThrow(RangeError)
  })
})

describe('a typed reading', () => {
  it('goes the same way', async () => {
    const { site, sensor } = await makePlace()
    const at = new Date('2026-03-04T07:00:00Z')
    expect(await insertTypedReading(database.db, row(sensor, at), later(9e6))).toEqual({ as: 'inserted' })
    expect(await insertTypedReading(database.db, row(sensor, at), later(9e6))).toEqual({ as: 'duplicate' })
    expect(await insertTypedReading(database.db, row(sensor, at, 21), later(9e6))).toEqual({
      ...{ as: 'conflict', keptTemperatureC: 20, keptHumidityPct: 50 },
    })
    expect((await listFigures(database.db, site.id)).hours).toHaveLength(1)
    expect(await stateOf(sensor)).toMatchObject({ at, heard_at: later(9e6) })
  })
})
