import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sql } from 'kysely'
import { findIngestCounts } from '@/db/queries/ingest-counts'
import { listRefused } from '@/db/queries/refused'
import { hashSensorSecret } from '@/db/sensor-secret'
import { topicOf } from '@/lib/readings/topic'
import type { RunningBroker } from '@/workers/broker/broker'
import { startTestBroker } from '../support/broker'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'
import { makeRoom, makeSensor, makeSite, type TestSensor, type TestSite } from '../support/place'
import { RawMqtt, type SignInAs } from '../support/raw-mqtt'

let database: TestDatabase
let broker: RunningBroker
let site: TestSite
let roomId: number
let other: TestSensor

beforeAll(async () => {
  database = await createTestDatabase()
  broker = await startTestBroker(database, { checkSessionsMs: 200 })
  site = await makeSite(database.db)
  roomId = await makeRoom(database.db, site)
  const otherSite = await makeSite(database.db)
  other = await makeSensor(database.db, otherSite, await makeRoom(database.db, otherSite))
})
afterAll(async () => {
  await broker.stop()
  await database.drop()
})

const newSensor = () => makeSensor(database.db, site, roomId)
const as = (sensor: TestSensor, more: Partial<SignInAs> = {}): SignInAs => ({
  ...{ port: broker.port, name: sensor.name, secret: sensor.secret },
  ...more,
})
async function signedIn(sensor: TestSensor, more: Partial<SignInAs> = {}): Promise<RawMqtt> {
  const { client, code } = await RawMqtt.signIn(as(sensor, more))
  expect(code).toBe(0)
  return client
}

const minuteAgo = () => new Date(Math.floor(Date.now() / 1000) * 1000 - 60_000)
const readingAt = (at: Date, temperatureC = 20): string =>
  JSON.stringify({ at: at.toISOString(), temperatureC, humidityPct: 50 })

const countReadings = async (sensor: TestSensor): Promise<number> => {
  const { n } = await database.db
    .selectFrom('reading')
    .where('site_id', '=', sensor.siteId)
    .where('sensor_id', '=', sensor.id)
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return n
}
const refusalsOf = async (sensor: TestSensor) =>
  listRefused(database.db, sensor.siteId, { sensorId: sensor.id, limit: 200 })
const stateOf = (sensor: TestSensor) =>
  database.db
    .selectFrom('sensor_state')
    .where('site_id', '=', sensor.siteId)
    .where('sensor_id', '=', sensor.id)
    .selectAll()
    .executeTakeFirst()

describe('the acknowledgement of a reading', () => {
  it('leaves only after the row is committed and seen by others', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    let seenAtAck: Promise<number> | undefined
    client.socket.on('data', () => {
      if (client.isAcknowledged(7)) seenAtAck ??= countReadings(sensor)
    })
    client.publish(sensor.topic, readingAt(minuteAgo()), { id: 7 })
    await client.acknowledged(7)
    expect(await seenAtAck).toBe(1)
    client.cut()
  })

  it('waits as long as the commit is held up, and comes when it is let go', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    await client.say(sensor.topic, readingAt(minuteAgo()))
    let letGo: () => void = () => undefined
    const held = new Promise<void>((resolve) => (letGo = resolve))
    let isLocked: () => void = () => undefined
    const locked = new Promise<void>((resolve) => (isLocked = resolve))
    const lock = database.db.transaction().execute(async (trx) => {
      // The batch has done all its work but the last value when it comes to this row.
      await sql`select from sensor_state where site_id = ${site.id} and sensor_id = ${sensor.id} for update`.execute(
        trx,
      )
      isLocked()
      await held
    })
    await locked
    client.publish(sensor.topic, readingAt(new Date(minuteAgo().getTime() + 5_000)), { id: 99 })
    await eventually('the batch to wait for the row', async () => {
      const { rows } = await sql<{ n: number }>`
        select count(*)::int as n from pg_stat_activity
        where datname = current_database() and wait_event_type = 'Lock'`.execute(database.db)
      return (rows[0]?.n ?? 0) > 0
    })
    expect(client.isAcknowledged(99)).toBe(false)
    expect(await countReadings(sensor)).toBe(1)
    letGo()
    await lock
    await client.acknowledged(99)
    expect(await countReadings(sensor)).toBe(2)
    client.cut()
  })

  it('comes for QoS 2 as PUBREC, likewise after the commit', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    client.publish(sensor.topic, readingAt(minuteAgo()), { qos: 2, id: 5 })
    await eventually('PUBREC', () => client.packets.some((packet) => packet.kind === 5))
    expect(await countReadings(sensor)).toBe(1)
    client.cut()
  })

  it('comes for a refused one too, so that it is not sent for ever', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    await client.say(sensor.topic, '{"temperatureC":"21.5","humidityPct":50}')
    const [refused] = await refusalsOf(sensor)
    expect(refused).toMatchObject({ reason: 'wrong-type', field: 'temperatureC', sizeBytes: 40 })
    expect(Buffer.from(refused?.headHex ?? '', 'hex').toString()).toBe(
      '{"temperatureC":"21.5","humidityPct":50}',
    )
    client.cut()
  })
})

describe('signing in', () => {
  it('needs the right secret of a sensor that is there', async () => {
    const sensor = await newSensor()
    expect((await RawMqtt.signIn(as(sensor))).code).toBe(0)
    expect((await RawMqtt.signIn(as(sensor, { secret: 'wrong' }))).code).toBe(4)
    expect((await RawMqtt.signIn(as(sensor, { secret: other.secret }))).code).toBe(4)
    expect((await RawMqtt.signIn(as(sensor, { name: `${site.code}/${other.code}` }))).code).toBe(4)
    expect((await RawMqtt.signIn(as(sensor, { name: '' }))).code).toBe(4)
    await database.db
      .updateTable('sensor')
      .set({ secret_hash: await hashSensorSecret('renewed') })
      .where('site_id', '=', site.id)
      .where('id', '=', sensor.id)
      .execute()
    expect((await RawMqtt.signIn(as(sensor))).code).toBe(4)
    expect((await RawMqtt.signIn(as(sensor, { secret: 'renewed' }))).code).toBe(0)
  })

  it.each(['a+b', 'a#b', '$SYS', 'a b', 'a\u0000b', '😀', 'a\u202eb', 'x'.repeat(65_535)])(
    'refuses a client id that no honest sensor has (F37): %#',
    async (clientId) => {
      const sensor = await newSensor()
      const { code } = await RawMqtt.signIn(as(sensor, { clientId }))
      expect([2, undefined]).toContain(code)
    },
  )

  it('by one sensor does not push out another with the same client id (F43)', async () => {
    const one = await newSensor()
    const first = await signedIn(one, { clientId: 'same' })
    const second = await signedIn(other, { clientId: 'same' })
    await second.say(other.topic, readingAt(minuteAgo()))
    await first.say(one.topic, readingAt(minuteAgo()))
    expect(first.isClosed).toBe(false)
    // The same sensor again takes its own connection over, as MQTT says.
    const again = await signedIn(one, { clientId: 'same' })
    await eventually('the older connection to be closed', () => first.isClosed)
    again.cut()
    second.cut()
  })

  it('is over for a removed sensor and for a renewed secret, also while signed in (F41)', async () => {
    const [removed, renewed] = [await newSensor(), await newSensor()]
    const clients = [await signedIn(removed), await signedIn(renewed)]
    const sensors = database.db.updateTable('sensor').where('site_id', '=', site.id)
    await sensors.set({ archived_at: new Date() }).where('id', '=', removed.id).execute()
    await sensors
      .set({ secret_hash: await hashSensorSecret('another') })
      .where('id', '=', renewed.id)
      .execute()
    for (const client of clients) await eventually('the session to be cut', () => client.isClosed)
    expect((await RawMqtt.signIn(as(removed))).code).toBe(5)
    expect((await RawMqtt.signIn(as(renewed))).code).toBe(4)
    await eventually('the try to be recorded', async () =>
      (await refusalsOf(removed)).some((refused) => refused.reason === 'sensor-removed'),
    )
  })
})

describe('rights by prefix', () => {
  it('keep a sensor from publishing for another, and tell its own site (F36, F40)', async () => {
    const sensor = await newSensor()
    const sibling = await newSensor()
    const client = await signedIn(sensor)
    await client.say(other.topic, readingAt(minuteAgo()))
    await client.say(sibling.topic, readingAt(minuteAgo()))
    await client.say('$SYS/broker/new/clients', 'raw')
    await client.say(`${sensor.topic}s`, readingAt(minuteAgo()))
    await client.say('anything', readingAt(minuteAgo()))
    await client.say(`lidfast/v1/${site.code}/\u202e\u0007`, 'x')
    expect(client.isClosed).toBe(false)
    expect((await refusalsOf(sensor)).map((refused) => refused.reason).toReversed()).toEqual([
      ...[
        'foreign-topic',
        'foreign-topic',
        'system-topic',
        'unknown-topic',
        'foreign-topic',
        'foreign-topic',
      ],
    ])
    expect(await refusalsOf(other)).toEqual([])
    expect([await countReadings(other), await countReadings(sibling)]).toEqual([1, 0])
    const today = new Date().toISOString().slice(0, 10)
    expect(await findIngestCounts(database.db, site.id, sensor.id, today)).toEqual(new Map([['refused', 6]]))
    client.cut()
  })

  it('can not be got round to disconnect others by $SYS (F40)', async () => {
    const victim = await signedIn(await newSensor(), { clientId: 'victim' })
    const attacker = await newSensor()
    const client = await signedIn(attacker)
    await client.say('$SYS/other-broker/new/clients', `${attacker.name} victim`)
    await client.say('$SYS/other-broker/new/clients', 'victim')
    victim.send(Buffer.from([0xc0, 0]))
    await eventually('PINGRESP', () => victim.packets.some((packet) => packet.kind === 13))
    victim.cut()
    client.cut()
  })

  it.each(['#', '+/+/+/+/reading', '$SYS/#', '$share/g/#', 'lidfast/v1/#'])(
    'deny a subscription to %s (F38)',
    async (topic) => {
      const client = await signedIn(await newSensor())
      client.subscribe(topic)
      const suback = await eventually('SUBACK', () => client.packets.find((packet) => packet.kind === 9))
      expect(suback.body[2]).toBe(0x80)
      client.cut()
    },
  )

  it('deny a subscription to what another sensor says (F38)', async () => {
    const client = await signedIn(await newSensor())
    client.subscribe(other.topic)
    const suback = await eventually('SUBACK', () => client.packets.find((packet) => packet.kind === 9))
    expect(suback.body[2]).toBe(0x80)
    client.cut()
  })

  it('hold for a last message too (F39)', async () => {
    const sensor = await newSensor()
    const will = { topic: other.topic, payload: readingAt(minuteAgo(), 44), qos: 1 as const }
    const before = await countReadings(other)
    const client = await signedIn(sensor, { will })
    await eventually('the last message to be recorded', async () =>
      (await refusalsOf(sensor)).some((refused) => refused.reason === 'foreign-will'),
    )
    client.cut()
    // What this sensor does next comes after its last message would have come.
    const again = await signedIn(sensor)
    await again.say(sensor.topic, readingAt(minuteAgo()))
    expect(await countReadings(other)).toBe(before)
    again.cut()
  })
})

describe('presence', () => {
  it('is what the sensor says, and what its last message says when it is lost', async () => {
    const sensor = await newSensor()
    const topic = topicOf(sensor.siteCode, sensor.code, 'presence')
    const client = await signedIn(sensor, {
      will: { topic, payload: '{"here":false}', qos: 1, retain: true },
    })
    await client.say(topic, '{"here":true}', { retain: true })
    expect(await stateOf(sensor)).toMatchObject({ is_here: true })
    const heardAt = (await stateOf(sensor))?.heard_at
    client.cut()
    await eventually('the sensor to be gone', async () => (await stateOf(sensor))?.is_here === false)
    expect((await stateOf(sensor))?.heard_at).toEqual(heardAt)
  })
})

describe('what a broker kept', () => {
  it('is stored at its own time and says nothing about now (F33)', async () => {
    const sensor = await newSensor()
    const client = await signedIn(sensor)
    const old = new Date(minuteAgo().getTime() - 3 * 3_600_000)
    await client.say(sensor.topic, readingAt(old), { retain: true })
    expect(await stateOf(sensor)).toMatchObject({ at: old, heard_at: null })
    await client.say(sensor.topic, readingAt(old), { retain: true })
    expect(await countReadings(sensor)).toBe(1)
    await client.say(sensor.topic, '{"temperatureC":20,"humidityPct":50}', { retain: true })
    await client.say(sensor.topic, '{"temperatureC":20,"humidityPct":50}', { dup: true })
    expect((await refusalsOf(sensor)).map((refused) => refused.reason)).toEqual(['no-time', 'no-time'])
    client.cut()
  })
})
