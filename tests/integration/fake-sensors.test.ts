import { mkdtemp, rm } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { pino } from 'pino'
import { createInstruments } from '@/fake-sensors/climates/instruments'
import { plainWeather } from '@/fake-sensors/climates/outdoor'
import { KeptState } from '@/fake-sensors/kept-state'
import { startPlace, type Place } from '@/fake-sensors/place'
import type { Scenario } from '@/fake-sensors/scenarios/scenario'
import { demoRosterSchema, type DemoRoster } from '@/lib/sensors/demo-roster'
import { startBroker, type RunningBroker } from '@/workers/broker/broker'
import { makePlace, type MadePlace } from '@/workers/demo/make-place'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { eventually } from '../support/eventually'

const minuteMs = 60_000

describe('simulated sensors', () => {
  let database: TestDatabase
  let broker: RunningBroker
  let folder: string
  let made: MadePlace
  let running: Place | undefined
  /** Models whose network is lost just now. */
  const away = new Set<string>()
  const seed = 7
  const startedAt = new Date()
  const lastAt = new Date(startedAt.getTime() - 65 * minuteMs)

  beforeAll(async () => {
    database = await createTestDatabase()
    folder = await mkdtemp(path.join(os.tmpdir(), 'lidfast-fake-'))
    made = await makePlace(database.db, startedAt, 1)
    broker = await startBroker({
      db: database.db,
      logger: pino({ level: 'silent' }),
      host: '127.0.0.1',
      port: 0,
    })
  })
  afterAll(async () => {
    await running?.stop()
    await broker.stop()
    await database.drop()
    await rm(folder, { recursive: true, force: true })
  })

  const sensorOf = (model: string) => made.sensors.get(model) ?? { id: 0, code: '', secret: '' }
  const rosterOf = (...models: string[]): DemoRoster =>
    demoRosterSchema.parse({
      siteCode: made.siteCode,
      seed,
      sensors: models.map((model) => ({
        code: sensorOf(model).code,
        secret: sensorOf(model).secret,
        model,
        everyS: 1,
        habit: 'steady',
        lastAt: lastAt.toISOString(),
        batteryPct: 70,
      })),
    })
  const start = async (roster: DemoRoster, onTrouble: (sentence: string) => void = () => undefined) => {
    const scenario: Scenario = {
      name: 'test',
      weatherFrom: () => plainWeather,
      isAway: (sensor) => away.has(roster.sensors.find((one) => one === sensor)?.model ?? ''),
    }
    running = startPlace({
      brokerUrl: `mqtt://127.0.0.1:${String(broker.port)}`,
      roster,
      scenario,
      state: await KeptState.open(path.join(folder, 'state.json')),
      onTrouble,
    })
  }
  const readings = (model: string) =>
    database.db
      .selectFrom('reading')
      .where('sensor_id', '=', sensorOf(model).id)
      .select(['at', 'temperature_c', 'humidity_pct'])
      .orderBy('at')
      .execute()
  const stateOf = (model: string) =>
    database.db
      .selectFrom('sensor_state')
      .where('sensor_id', '=', sensorOf(model).id)
      .select(['is_here', 'battery_pct'])
      .executeTakeFirst()

  test('send what they measured while they were off, and go on live', async () => {
    await start(rosterOf('shop-bench', 'study'))
    const stored = await eventually('kept readings and three live ones', async () => {
      const rows = await readings('shop-bench')
      return rows.length >= 9 && rows
    })
    // Six of the 65 minutes before, ten minutes apart; then one a second.
    const before = stored.filter((row) => row.at < startedAt)
    expect(before).toHaveLength(6)
    const live = createInstruments(seed)
    for (const row of stored) {
      const measured = live('shop-bench', row.at.getTime())
      expect(row.temperature_c).toBeCloseTo(measured.temperatureC, 4)
      expect(row.humidity_pct).toBeCloseTo(measured.humidityPct, 4)
    }
    expect(await stateOf('shop-bench')).toMatchObject({ is_here: true, battery_pct: 70 })
  })

  test('keep their readings while the network is lost, and lose none', async () => {
    const lostAt = new Date()
    away.add('study')
    await eventually('the last will', async () => (await stateOf('study'))?.is_here === false)
    const count = (await readings('study')).length
    const steady = (await readings('shop-bench')).length
    await eventually('the other going on', async () => (await readings('shop-bench')).length >= steady + 3)
    expect((await readings('study')).length).toBe(count)
    away.clear()
    await eventually('catching up', async () => (await readings('study')).length >= count + 3)
    expect((await stateOf('study'))?.is_here).toBe(true)
    const seconds = (await readings('study'))
      .filter((row) => row.at >= lostAt)
      .map((row) => Math.round(row.at.getTime() / 1000))
    // Every second of the outage is there, give or take the turn of a timer.
    for (const [index, second] of seconds.entries())
      expect(second - (seconds[index - 1] ?? second - 1)).toBeLessThanOrEqual(2)
  })

  test('remember over a restart what was acknowledged, and are told of as gone meanwhile', async () => {
    await running?.stop()
    await eventually('the last will', async () => (await stateOf('shop-bench'))?.is_here === false)
    const kept = await KeptState.open(path.join(folder, 'state.json'))
    const lastMs = (await readings('shop-bench')).at(-1)?.at.getTime() ?? 0
    // The last one may have been stored without its answer having come back: it is sent again, which does no harm.
    const keptMs = kept.lastAtMs(sensorOf('shop-bench').code) ?? 0
    expect(keptMs).toBeLessThanOrEqual(lastMs)
    expect(keptMs).toBeGreaterThan(lastMs - 3_000)
    const count = (await readings('shop-bench')).length
    await start(rosterOf('shop-bench'))
    await eventually('going on', async () => (await readings('shop-bench')).length > count)
    // Nothing of the hour before came twice or anew.
    expect((await readings('shop-bench')).filter((row) => row.at < startedAt)).toHaveLength(6)
    await running?.stop()
  })

  test('with a wrong secret send nothing and say so', async () => {
    const roster = rosterOf('kitchen')
    const [sensor] = roster.sensors
    if (sensor) sensor.secret = 'not-the-secret'
    const troubles: string[] = []
    await start(roster, (sentence) => troubles.push(sentence))
    await eventually('the refusal', () => troubles.length > 0)
    expect(await readings('kitchen')).toEqual([])
  })
})
