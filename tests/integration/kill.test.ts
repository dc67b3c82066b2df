import { afterAll, beforeAll, expect, it } from 'vitest'
import { rebuildSiteFigures } from '@/db/queries/rollups'
import { freePort } from '@/workers/supervisor/ports'
import { bundleBroker, endBroker, prepareBroker, serve } from '../support/broker-child'
import type { Bundle } from '../support/bundle'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'
import { listFigures, makeRoom, makeSensor, makeSite } from '../support/place'
import { manyReadings, StrictPublisher } from '../support/publisher'

const kills = 20
const sensorCount = 4
const readingsEach = 12_500
const total = sensorCount * readingsEach
const from = new Date('2026-03-28T22:00:00Z')

let database: TestDatabase
let program: Bundle
beforeAll(async () => {
  database = await createTestDatabase()
  program = await bundleBroker()
})
afterAll(async () => {
  await program.remove()
  await database.drop()
})

/** Chance that is the same in every run. */
function createChance(seed: number): () => number {
  let state = seed
  return () => {
    state = (state * 1_103_515_245 + 12_345) % 2_147_483_648
    return state / 2_147_483_648
  }
}

it('loses nothing and counts nothing twice when the broker is killed 20 times under 50,000 readings (F01)', async () => {
  // Its clocks go forward in the middle of the readings.
  const site = await makeSite(database.db, 'Europe/London')
  const rooms = [await makeRoom(database.db, site), await makeRoom(database.db, site)]
  const sensors = await Promise.all(
    Array.from({ length: sensorCount }, (_, n) => makeSensor(database.db, site, rooms[n % rooms.length])),
  )
  const port = await freePort()
  const readings = sensors.map((_, n) => manyReadings(readingsEach, from, n))
  const publishers = sensors.map((sensor, n) => new StrictPublisher(sensor, readings[n] ?? [], port))
  const acknowledged = () => publishers.reduce((sum, one) => sum + one.acknowledged.size, 0)
  const chance = createChance(20_261_201)

  /** Every reading that was acknowledged until now is in the table. */
  async function expectAcknowledgedStored(): Promise<void> {
    const before = publishers.map((one) => [...one.acknowledged])
    const rows = await database.db
      .selectFrom('reading')
      .where('site_id', '=', site.id)
      .select(['sensor_id', 'at'])
      .execute()
    const stored = new Set(rows.map((row) => `${row.sensor_id} ${row.at.getTime()}`))
    const missing = before.flatMap((indices, n) =>
      indices.filter((index) => !stored.has(`${sensors[n]?.id} ${readings[n]?.[index]?.at.getTime()}`)),
    )
    expect(missing).toEqual([])
  }

  for (const one of publishers) one.sendUpTo(0)
  const published = Promise.all(publishers.map((one) => one.run()))
  let broker = await prepareBroker(program, database.url, port)
  await serve(broker)
  const slice = total / kills
  for (let kill = 1; kill <= kills; kill += 1) {
    const next = await prepareBroker(program, database.url, port)
    // The next one is ready: from here to the kill the sensors never pause, so it comes in the middle of the work.
    for (const one of publishers) one.sendUpTo((readingsEach / kills) * kill)
    const due = Math.floor(slice * (kill - 1 + 0.7 * chance()))
    await eventually(`${due} acknowledgements`, () => acknowledged() > due, 60_000)
    await endBroker(broker)
    expect(acknowledged()).toBeLessThan(slice * kill)
    if (kill % 5 === 0) await expectAcknowledgedStored()
    broker = next
    await serve(broker)
  }
  await published
  await endBroker(broker)

  const { n } = await database.db
    .selectFrom('reading')
    .where('site_id', '=', site.id)
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  expect(n).toBe(total)
  await expectAcknowledgedStored()
  expect(publishers.every((one) => one.connections > kills / 2)).toBe(true)
  const grown = await listFigures(database.db, site.id)
  expect(grown.hours.reduce((sum, hour) => sum + hour.n, 0)).toBe(n)
  expect(grown.days.reduce((sum, day) => sum + day.n, 0)).toBe(n)
  await rebuildSiteFigures(database.db, site.id)
  expect(await listFigures(database.db, site.id)).toEqual(grown)
}, 400_000)
