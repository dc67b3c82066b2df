import type { Kysely } from 'kysely'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { createDatabase } from '@/db/client'
import { rebuildSiteFigures } from '@/db/queries/rollups'
import type { Database } from '@/db/schema'
import { createLogger } from '@/workers/_shared/logger'
import { startBroker } from '@/workers/broker/broker'
import { freePort } from '@/workers/supervisor/ports'
import {
  type BrokerChild,
  bundleBroker,
  endBroker,
  prepareBroker,
  serve,
  startBrokerMain,
} from '../support/broker-child'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'
import { listFigures, makeRoom, makeSensor, makeSite, type TestSensor } from '../support/place'
import { manyReadings, StrictPublisher } from '../support/publisher'
import { makeRestartableCluster, type RestartableCluster } from '../support/restartable-cluster'
import { databaseUrlOf, makeTemplate, templateName } from '../support/template'

const from = new Date('2026-03-04T05:00:00Z')

async function makePlace(db: Kysely<Database>): Promise<TestSensor> {
  const site = await makeSite(db)
  return makeSensor(db, site, await makeRoom(db, site))
}

async function countReadings(db: Kysely<Database>, sensor: TestSensor): Promise<number> {
  const { n } = await db
    .selectFrom('reading')
    .where('site_id', '=', sensor.siteId)
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return n
}

/** All readings are there once, and the figures are those of exactly these. */
async function expectWhole(db: Kysely<Database>, sensor: TestSensor, n: number): Promise<void> {
  expect(await countReadings(db, sensor)).toBe(n)
  const grown = await listFigures(db, sensor.siteId)
  expect(grown.hours.reduce((sum, hour) => sum + hour.n, 0)).toBe(n)
  await rebuildSiteFigures(db, sensor.siteId)
  expect(await listFigures(db, sensor.siteId)).toEqual(grown)
}

describe('the broker process', () => {
  let database: TestDatabase
  const children: BrokerChild[] = []
  beforeAll(async () => void (database = await createTestDatabase()))
  afterEach(async () => {
    for (const child of children.splice(0)) await endBroker(child)
  })
  afterAll(() => database.drop())
  const own = (child: BrokerChild): BrokerChild => {
    children.push(child)
    return child
  }

  it('killed between the commit and the answer gets the readings again and counts them once (F02)', async () => {
    const program = await bundleBroker()
    const sensor = await makePlace(database.db)
    const port = await freePort()
    const publisher = new StrictPublisher(sensor, manyReadings(2_000, from, 1), port)
    const dies = own(await prepareBroker(program, database.url, port, 3))
    await serve(dies)
    const published = publisher.run()
    expect(await dies.exited).toMatchObject({ signal: 'SIGKILL' })
    const stored = await countReadings(database.db, sensor)
    expect(stored).toBeGreaterThan(publisher.acknowledged.size)
    await serve(own(await prepareBroker(program, database.url, port)))
    await published
    await program.remove()
    await expectWhole(database.db, sensor, 2_000)
    const { n } = await database.db
      .selectFrom('ingest_count')
      .where('site_id', '=', sensor.siteId)
      .where('kind', '=', 'duplicate')
      .select((eb) => eb.fn.sum<string>('n').as('n'))
      .executeTakeFirstOrThrow()
    expect(Number(n)).toBeGreaterThan(0)
  })

  it('asked to stop under load stores and acknowledges what it has read, and ends within 5 s (F03)', async () => {
    const sensor = await makePlace(database.db)
    const port = await freePort()
    const publisher = new StrictPublisher(sensor, manyReadings(60_000, from, 2), port)
    const main = own(await startBrokerMain(database.url, port))
    const published = publisher.run()
    await eventually('some readings', () => publisher.acknowledged.size > 1_000, 60_000)
    const askedAt = performance.now()
    await endBroker(main, 'SIGTERM')
    expect(await main.exited).toEqual({ code: 0, signal: null })
    expect(performance.now() - askedAt).toBeLessThan(5_000)
    publisher.stop()
    await published
    // Nothing that was stored has to be sent again.
    expect(await countReadings(database.db, sensor)).toBe(publisher.acknowledged.size)
    expect(publisher.acknowledged.size).toBeLessThan(60_000)
  })
})

describe('the database', () => {
  let cluster: RestartableCluster
  beforeAll(async () => {
    cluster = await makeRestartableCluster()
    await makeTemplate(cluster.adminUrl)
  }, 120_000)
  afterAll(() => cluster.remove())

  it.each([
    ['shut down and started again', 'F04', 'SIGINT'],
    ['crashed and recovered', 'F05', 'SIGKILL'],
  ] as const)('%s under load is waited for, and nothing is lost (%s)', async (_what, _fault, signal) => {
    const db = createDatabase(databaseUrlOf(cluster.adminUrl, templateName), { max: 4 })
    const broker = await startBroker({
      ...{ db, logger: createLogger('test', 'silent'), host: '127.0.0.1', port: 0 },
    })
    const sensor = await makePlace(db)
    const count = 4_000
    const publisher = new StrictPublisher(sensor, manyReadings(count, from, 3), broker.port, 100)
    publisher.sendUpTo(count / 2)
    const published = publisher.run()
    await eventually('a quarter of the readings', () => publisher.acknowledged.size > count / 4, 60_000)
    await cluster.end(signal)
    const acknowledgedBefore = publisher.acknowledged.size
    publisher.sendUpTo(count)
    // Away: what is sent now is held, not answered.
    await eventually('the sensor to wait', () => publisher.underWay >= 100)
    expect(publisher.acknowledged.size).toBeLessThan(count)
    await cluster.start()
    expect(await countReadings(db, sensor)).toBeGreaterThanOrEqual(acknowledgedBefore)
    await published
    await expectWhole(db, sensor, count)
    await broker.stop()
    await db.destroy()
  })
})
