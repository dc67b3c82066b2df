import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { listRefused } from '@/db/queries/refused'
import { rebuildSiteFigures } from '@/db/queries/rollups'
import { MAX_PAYLOAD_BYTES } from '@/lib/readings/payload'
import type { RunningBroker } from '@/workers/broker/broker'
import { startTestBroker } from '../support/broker'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'
import { listFigures, makeRoom, makeSensor, makeSite, type TestSensor, type TestSite } from '../support/place'
import { packetOf, RawMqtt } from '../support/raw-mqtt'

let database: TestDatabase
let broker: RunningBroker
let site: TestSite
let roomId: number
/** The broker's clock, moved by the tests: it begins in the last minute of a year, in a month that nobody made. */
let clock = new Date('2027-12-31T23:59:00Z')
const pass = (ms: number) => (clock = new Date(clock.getTime() + ms))

beforeAll(async () => {
  database = await createTestDatabase()
  broker = await startTestBroker(database, { now: () => clock })
  site = await makeSite(database.db, 'Asia/Kolkata')
  roomId = await makeRoom(database.db, site)
})
afterAll(async () => {
  await broker.stop()
  await database.drop()
})

const newSensor = () => makeSensor(database.db, site, roomId)
async function signedIn(sensor: TestSensor): Promise<RawMqtt> {
  const { client, code } = await RawMqtt.signIn({ port: broker.port, ...sensor })
  expect(code).toBe(0)
  return client
}
const readingsOf = (sensor: TestSensor) =>
  database.db
    .selectFrom('reading')
    .where('site_id', '=', site.id)
    .where('sensor_id', '=', sensor.id)
    .selectAll()
    .orderBy('at')
    .execute()
const reasonsOf = async (sensor: TestSensor) => {
  const refused = await listRefused(database.db, site.id, { sensorId: sensor.id, limit: 500 })
  return refused.toReversed().map((one) => [one.reason, one.field])
}
const reading = (values: string, at = '2027-12-31T23:58:00Z'): string => `{"at":"${at}",${values}}`
const good = '"temperatureC":20,"humidityPct":50'
const temperature = (value: string): string => reading(`"temperatureC":${value},"humidityPct":50`)
const humidity = (value: string): string => reading(`"temperatureC":20,"humidityPct":${value}`)

/** Every bad message of the list of faults, with what it is refused for. */
const bad: [message: string | Buffer, reason: string, field: string | null][] = [
  // F23, F24: clocks
  [reading(good, '2028-01-01T00:59:00Z'), 'clock-ahead', 'at'],
  [reading(good, '2037-12-31T23:59:00Z'), 'clock-ahead', 'at'],
  [reading(good, '9999-12-31T23:59:59Z'), 'clock-ahead', 'at'],
  [reading(good, '1970-01-01T00:00:00Z'), 'clock-not-set', 'at'],
  [reading(good, '2000-01-01T00:00:00Z'), 'clock-not-set', 'at'],
  // F26: no numbers
  ...['NaN', 'Infinity', '-Infinity', '1e999'].map((value): [string, string, string] => [
    temperature(value),
    'not-a-number',
    'temperatureC',
  ]),
  [temperature('-0'), 'negative-zero', 'temperatureC'],
  ...['null', 'true', '"21.5"', '[]'].map((value): [string, string, string] => [
    temperature(value),
    'wrong-type',
    'temperatureC',
  ]),
  [reading('"humidityPct":50'), 'missing-value', 'temperatureC'],
  // F27: out of range, and the marks of a broken sensor
  ...['100.4', '101', '-0.1'].map((value): [string, string, string] => [
    humidity(value),
    'out-of-range',
    'humidityPct',
  ]),
  ...['-40', '85', '85.0', '125', '-127'].map((value): [string, string, string] => [
    temperature(value),
    'sensor-fault',
    'temperatureC',
  ]),
  // F28: no JSON
  ['{"temperatureC":20,', 'not-json', null],
  ['', 'empty', null],
  ['x', 'not-json', null],
  [`\ufeff${reading(good)}`, 'byte-order-mark', null],
  [Buffer.from(reading(good), 'utf16le'), 'nul', null],
  [reading(`${good},`), 'not-json', null],
  // F29: no text
  [Buffer.from([0xff, 0xd8, 0xff, 0xe0, 0x80]), 'not-utf-8', null],
  [Buffer.from([0x7b, 0xc3, 0x28, 0x7d]), 'not-utf-8', null],
  [`${reading(good)}\u0000`, 'nul', null],
  [reading(`"temperatureC":"\\u0000","humidityPct":50`), 'wrong-type', 'temperatureC'],
  // F30: out of shape
  ['['.repeat(10_000) + ']'.repeat(10_000), 'too-deep', null],
  [`{${Array.from({ length: 5_000 }, (_, i) => `"k${i}":1`).join()}}`, 'too-many-keys', null],
  [`{"__proto__":${reading(good)}}`, 'forbidden-key', null],
  // F32: numbers as other languages write them
  ...['0x10', '1_000', '21,5', '9'.repeat(400)].map((value): [string, string, string] => [
    temperature(value),
    'not-a-number',
    'temperatureC',
  ]),
]

describe('a bad message', () => {
  it('is recorded with its reason, acknowledged, and costs no good one beside it (F23, F24, F26–F30, F32)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    for (const [index, [message]] of bad.entries()) {
      await client.say(sensor.topic, message, { id: index + 1 })
      await client.say(sensor.topic, reading(good, pass(1_000).toISOString()), { id: 1000 + index })
    }
    expect(await reasonsOf(sensor)).toEqual(bad.map(([, reason, field]) => [reason, field]))
    expect(await readingsOf(sensor)).toHaveLength(bad.length)
    expect(client.isClosed).toBe(false)
    client.cut()
  })

  it('flags a sensor whose clock is wrong, makes no month for it, and never moves its last value (F23, F24)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    await client.say(sensor.topic, reading(good, clock.toISOString()))
    await client.say(sensor.topic, reading(good, '1970-01-01T00:00:00Z'))
    await client.say(sensor.topic, reading(good, '9999-12-31T23:59:59Z'))
    const state = await database.db
      .selectFrom('sensor_state')
      .where('sensor_id', '=', sensor.id)
      .selectAll()
      .executeTakeFirstOrThrow()
    expect(state).toMatchObject({ at: clock, clock_not_set_at: clock, clock_ahead_at: clock })
    const { rows } = await sql<{ oldest: string }>`
      select min(inhrelid::regclass::text) as oldest from pg_inherits where inhparent = 'reading'::regclass`.execute(
      database.db,
    )
    expect(rows[0]?.oldest).toBe('reading_2027_12')
    client.cut()
  })

  it('among 500 of a catch-up costs only itself', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    const readings = Array.from({ length: 500 }, (_, i) => ({
      at: new Date(clock.getTime() - (i + 1) * 60_000).toISOString(),
      ...{ temperatureC: i === 77 ? null : 20, humidityPct: 50 },
    }))
    await client.say(sensor.topic, JSON.stringify({ readings }))
    expect(await readingsOf(sensor)).toHaveLength(499)
    expect(await reasonsOf(sensor)).toEqual([['wrong-type', 'readings[77].temperatureC']])
    client.cut()
  })

  it('that comes without end is recorded so often a second and no more, but counted', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    pass(1_000)
    for (let id = 1; id <= 300; id += 1) client.publish(sensor.topic, 'x', { id })
    await client.acknowledged(300)
    expect(await reasonsOf(sensor)).toHaveLength(20)
    const { n } = await database.db
      .selectFrom('ingest_count')
      .where('sensor_id', '=', sensor.id)
      .where('kind', '=', 'refused')
      .select((eb) => eb.fn.sum<number>('n').as('n'))
      .executeTakeFirstOrThrow()
    expect(Number(n)).toBe(300)
    client.cut()
  })
})

describe('a message over 64 KB', () => {
  it('is recorded, acknowledged, and ends the connection before it is read (F30)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    pass(1_000)
    await client.say(sensor.topic, reading(good, clock.toISOString()))
    client.publish(sensor.topic, `{"a":"${'x'.repeat(1_000_000)}"}`, { id: 77 })
    await eventually('the connection to end', () => client.isClosed)
    expect(client.isAcknowledged(77)).toBe(true)
    expect(await reasonsOf(sensor)).toEqual([['too-large', null]])
    const [refused] = await listRefused(database.db, site.id, { sensorId: sensor.id, limit: 1 })
    expect(refused).toMatchObject({ topic: sensor.topic, sizeBytes: 1_000_008 })
    expect(Buffer.from(refused?.headHex ?? '', 'hex').toString()).toBe(`{"a":"${'x'.repeat(58)}`)
  })

  it('of just under 64 KB is read', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    const message = reading(`${good},"note":"`, clock.toISOString()).replace(/}$/, '')
    const padded = `${message}${'x'.repeat(MAX_PAYLOAD_BYTES - message.length - 2)}"}`
    expect(padded).toHaveLength(MAX_PAYLOAD_BYTES)
    await client.say(sensor.topic, padded)
    expect(await readingsOf(sensor)).toHaveLength(1)
    client.cut()
  })

  it('of 256 MB leaves memory flat (F31)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    const before = process.memoryUsage().rss
    const topic = Buffer.from(sensor.topic)
    const head = packetOf(0x30, Buffer.concat([Buffer.from([0, topic.length]), topic]))
    // The same packet, but saying that it is as long as MQTT allows.
    client.send(Buffer.concat([Buffer.from([0x30, 0xff, 0xff, 0xff, 0x7f]), head.subarray(2)]))
    const megabyte = Buffer.alloc(1024 * 1024, 0x61)
    let sent = 0
    while (!client.isClosed && sent < 256) {
      await new Promise((resolve) => client.socket.write(megabyte, resolve))
      sent += 1
    }
    await eventually('the connection to end', () => client.isClosed)
    expect(process.memoryUsage().rss - before).toBeLessThan(64 * 1024 * 1024)
    expect(await reasonsOf(sensor)).toEqual([['too-large', null]])
  })

  it('from somebody who has not signed in is only counted', async () => {
    const client = await RawMqtt.open(broker.port)
    client.send(Buffer.from([0x10, 0xff, 0xff, 0xff, 0x7f]))
    client.send(Buffer.alloc(2_000))
    await eventually('the connection to end', () => client.isClosed)
  })
})

describe('readings of many sensors', () => {
  it('share their commits, and their figures equal those made again', async () => {
    const sensors = await Promise.all(Array.from({ length: 10 }, newSensor))
    const clients = await Promise.all(sensors.map(signedIn))
    pass(60_000)
    const rounds = 40
    for (let round = 1; round <= rounds; round += 1)
      clients.forEach((client, i) => {
        const sensor = sensors[i]
        const at = new Date(clock.getTime() - round * 1_000).toISOString()
        if (sensor)
          client.publish(sensor.topic, reading(`"temperatureC":${round},"humidityPct":${i}`, at), {
            id: round,
          })
      })
    await Promise.all(clients.map((client) => client.acknowledged(rounds)))
    const ids = sensors.map((sensor) => sensor.id)
    // Rows of one transaction bear its number.
    const { rows } = await sql<{ n: number; commits: number }>`
      select count(*)::int as n, count(distinct xmin::text)::int as commits
      from reading where site_id = ${site.id} and sensor_id = any(${ids})`.execute(database.db)
    expect(rows[0]?.n).toBe(400)
    expect(rows[0]?.commits).toBeLessThan(40)
    const grown = await listFigures(database.db, site.id)
    await rebuildSiteFigures(database.db, site.id)
    expect(await listFigures(database.db, site.id)).toEqual(grown)
    for (const client of clients) client.cut()
  })

  it('go into the months that they belong to, made when the first of them comes (F16)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    clock = new Date('2029-12-31T23:59:59.900Z')
    await client.say(sensor.topic, `{${good}}`)
    // Forty days on, without a restart.
    clock = new Date('2030-02-09T23:59:00Z')
    await client.say(sensor.topic, `{${good}}`)
    await client.say(sensor.topic, reading(good, '2020-01-01T00:00:00Z'))
    expect((await readingsOf(sensor)).map((row) => row.at.toISOString())).toEqual([
      '2020-01-01T00:00:00.000Z',
      '2029-12-31T23:59:59.900Z',
      '2030-02-09T23:59:00.000Z',
    ])
    client.cut()
  })
})
