import { execFile } from 'node:child_process'
import { promisify } from 'node:util'
import mqtt from 'mqtt'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { listRefused } from '@/db/queries/refused'
import type { RunningBroker } from '@/workers/broker/broker'
import { rebuild } from '@/workers/rollups/rebuild'
import { startTestBroker } from '../support/broker'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { listFigures, makeRoom, makeSensor, makeSite, type TestSensor } from '../support/place'

let database: TestDatabase
let broker: RunningBroker
let sensor: TestSensor

beforeAll(async () => {
  database = await createTestDatabase()
  broker = await startTestBroker(database)
  const site = await makeSite(database.db)
  sensor = await makeSensor(database.db, site, await makeRoom(database.db, site))
})
afterAll(async () => {
  await broker.stop()
  await database.drop()
})

const reading = '{"temperatureC":19.4,"humidityPct":51.2,"batteryPct":87}'
const countReadings = async (): Promise<number> =>
  (await database.db.selectFrom('reading').where('site_id', '=', sensor.siteId).select('at').execute()).length

describe('the clients that people use', () => {
  it('mosquitto_pub publishes a reading, and is told of a wrong secret', async () => {
    const before = await countReadings()
    const publish = (secret: string) =>
      promisify(execFile)('mosquitto_pub', [
        ...['-h', '127.0.0.1', '-p', String(broker.port), '-q', '1'],
        ...['-u', sensor.name, '-P', secret, '-t', sensor.topic, '-m', reading],
      ])
    await publish(sensor.secret)
    expect(await countReadings()).toBe(before + 1)
    await expect(publish('wrong')).rejects.toThrow(/bad user name or password/)
    expect(await countReadings()).toBe(before + 1)
  })

  it('mqtt.js goes on after a refused publish, without a loop of new connections', async () => {
    const before = await countReadings()
    let connections = 0
    const client = mqtt.connect({
      ...{ host: '127.0.0.1', port: broker.port, reconnectPeriod: 20 },
      ...{ username: sensor.name, password: sensor.secret, clean: false, clientId: 'kept-session' },
    })
    client.on('connect', () => (connections += 1))
    await client.publishAsync('lidfast/v1/23456789ab/23456789ab/reading', reading, { qos: 1 })
    await client.publishAsync('$SYS/anything', reading, { qos: 1 })
    await client.publishAsync(sensor.topic, 'no reading', { qos: 1 })
    await client.publishAsync(sensor.topic, reading, { qos: 1 })
    expect(connections).toBe(1)
    await client.endAsync()
    expect(await countReadings()).toBe(before + 1)
    const refused = await listRefused(database.db, sensor.siteId, { limit: 10 })
    expect(refused.map((one) => one.reason)).toEqual(['not-json', 'system-topic', 'foreign-topic'])
  })
})

it('figures can be made again by hand, for one site or all', async () => {
  const grown = await listFigures(database.db, sensor.siteId)
  expect(grown.hours.length).toBeGreaterThan(0)
  await database.db.deleteFrom('room_hour').execute()
  expect(await rebuild(database.db, 'nosuchsite', () => undefined)).toBe(0)
  expect(await rebuild(database.db, undefined, () => undefined)).toBe(1)
  expect(await listFigures(database.db, sensor.siteId)).toEqual(grown)
})
