import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { listReadings, sensorReadingsQuerySchema, typeReading } from '@/app/_server/readings'
import { getRoom } from '@/app/_server/rooms'
import {
  createSensor,
  moveSensor,
  renameSensor,
  renewCredential,
  retireSensor,
} from '@/app/_server/sensor-changes'
import { getSensor, listSensors } from '@/app/_server/sensors'
import type { SiteMember } from '@/db/queries/members'
import { insertReadings } from '@/db/queries/readings'
import { rebuildSiteFigures } from '@/db/queries/rollups'
import { findSensorCredential } from '@/db/queries/sensor-secrets'
import { isSensorSecret } from '@/db/sensor-secret'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { listFigures } from '../support/place'
import { houseAir, shopAir } from '../support/seed-rooms'
import { forgetServer, serverEnvironment } from '../support/server-modules'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  serverEnvironment({ DATABASE_URL: database.url })
  yard = await makeYard(database.db, now, { readHours: 6, timeZone: 'Asia/Kolkata' })
  maker = await yard.member('maker')
})
afterAll(async () => {
  await forgetServer()
  await database.drop()
})

const make = async (name: string) =>
  valueOf(
    await createSensor(database.db, maker, { name, roomId: yard.cupboard.code, spot: 'top shelf' }, now),
  )

async function secretOpens(secret: string, sensorCode: string): Promise<boolean> {
  const stored = await findSensorCredential(database.db, { siteCode: maker.siteCode, sensorCode })
  return stored !== undefined && !stored.isArchived && (await isSensorSecret(secret, stored.secretHash))
}

describe('a sensor', () => {
  it('comes with a secret that opens the door and is stored nowhere', async () => {
    const made = await make('Shelf')
    const { credential } = made
    expect(credential.signInName).toBe(`${maker.siteCode}/${made.id}`)
    expect(credential.topic).toBe(`lidfast/v1/${maker.siteCode}/${made.id}/reading`)
    expect(await secretOpens(credential.secret, made.id)).toBe(true)
    const { rows } = await sql<{
      everything: string
    }>`select to_jsonb(sensor)::text as everything from sensor`.execute(database.db)
    expect(rows.map((row) => row.everything).join()).not.toContain(credential.secret)
    expect(made.state).toBe('never-heard')
  })

  it('counts a first reading whose clock is a little behind for its room', async () => {
    const made = await make('Behind')
    const { id } = await database.db
      .selectFrom('sensor')
      .where('code', '=', made.id)
      .select('id')
      .executeTakeFirstOrThrow()
    await insertReadings(database.db, [
      { siteId: yard.siteId, sensorId: id, at: new Date(now.getTime() - 30_000), ...shopAir },
    ])
    const figures = await listFigures(database.db, yard.siteId)
    expect(figures.hours.some((hour) => hour.sensor_id === id && hour.room_id === yard.cupboard.roomId)).toBe(
      true,
    )
  })

  it('gets a new secret, and the old one opens nothing', async () => {
    const made = await make('Renewed')
    const fresh = valueOf(await renewCredential(database.db, maker, made.id, now))
    expect(await secretOpens(fresh.secret, made.id)).toBe(true)
    expect(await secretOpens(made.credential.secret, made.id)).toBe(false)
  })

  it('is retired with its secret, keeps its readings, and frees its name', async () => {
    const made = await make('Old one')
    valueOf(await retireSensor(database.db, maker, made.id, made.version, now))
    expect(await secretOpens(made.credential.secret, made.id)).toBe(false)
    expect(valueOf(await getSensor(database.db, maker, made.id, now)).state).toBe('retired')
    const again = await make('Old one')
    expect(again.id).not.toBe(made.id)
    expect(await renewCredential(database.db, maker, made.id, now)).toMatchObject({
      ok: false,
      error: { code: 'already-done' },
    })
  })

  it('has a name of its own, and one writer at a time', async () => {
    const made = await make('Window')
    expect(
      await renameSensor(database.db, maker, made.id, made.version, { name: 'SHELF' }, now),
    ).toMatchObject({
      ok: false,
      error: { code: 'name-taken' },
    })
    valueOf(await renameSensor(database.db, maker, made.id, made.version, { name: 'Sill' }, now))
    expect(
      await renameSensor(database.db, maker, made.id, made.version, { name: 'Door' }, now),
    ).toMatchObject({
      ok: false,
      error: { code: 'changed-meanwhile', current: { name: 'Sill' } },
    })
  })

  it('says late, then silent, and that it was never heard', async () => {
    const stateAt = async (at: Date, name: string) =>
      (await listSensors(database.db, maker, at)).find((one) => one.name === name)?.state
    expect(await stateAt(now, 'Shop sensor')).toBe('alive')
    expect(await stateAt(hoursAfter(now, 1), 'Shop sensor')).toBe('late')
    expect(await stateAt(hoursAfter(now, 3), 'Shop sensor')).toBe('silent')
    expect(await stateAt(hoursAfter(now, 3), 'Shelf')).toBe('never-heard')
  })

  it('lists its readings newest first, page by page', async () => {
    const query = (more: Record<string, string>) => sensorReadingsQuerySchema.parse({ limit: '20', ...more })
    const first = valueOf(await listReadings(database.db, maker, yard.shop.sensorCode, query({}), now))
    expect(first.items[0]).toMatchObject({ at: now.toISOString(), humidityPct: 71 })
    const second = valueOf(
      await listReadings(
        database.db,
        maker,
        yard.shop.sensorCode,
        query({ cursor: first.nextCursor ?? '' }),
        now,
      ),
    )
    expect(first.items).toHaveLength(20)
    expect(second.items).toHaveLength(17)
    expect(second.nextCursor).toBeNull()
  })
})

describe('moving a sensor', () => {
  it('takes along the readings since the time that is given, in every figure', async () => {
    const since = hoursBefore(now, 2)
    const moved = valueOf(
      await moveSensor(
        database.db,
        maker,
        yard.shop.sensorCode,
        { roomId: yard.cupboard.code, fromAt: since.toISOString(), spot: 'by the hinge' },
        now,
      ),
    )
    expect(moved.placements.map((place) => [place.room.name, place.fromAt, place.toAt])).toEqual([
      ['Landing cupboard', since.toISOString(), null],
      ['Shop', hoursBefore(now, 6).toISOString(), since.toISOString()],
    ])
    const figures = await listFigures(database.db, yard.siteId)
    const ofShopSensor = figures.hours.filter((hour) => hour.sensor_id === yard.shop.sensorId)
    for (const hour of ofShopSensor)
      expect(hour.room_id).toBe(hour.hour_at < since ? yard.shop.roomId : yard.cupboard.roomId)
    expect(new Set(ofShopSensor.map((hour) => hour.room_id)).size).toBe(2)
    await rebuildSiteFigures(database.db, yard.siteId)
    expect(await listFigures(database.db, yard.siteId)).toEqual(figures)
    expect(valueOf(await getRoom(database.db, maker, yard.shop.code, now)).air).toEqual({ kind: 'never' })
  })

  it('back again as of the same time leaves everything as it was', async () => {
    const back = { roomId: yard.shop.code, fromAt: hoursBefore(now, 6).toISOString(), spot: '' }
    const moved = valueOf(await moveSensor(database.db, maker, yard.shop.sensorCode, back, now))
    expect(moved.placements).toHaveLength(1)
    const figures = await listFigures(database.db, yard.siteId)
    const rooms = figures.hours
      .filter((hour) => hour.sensor_id === yard.shop.sensorId)
      .map((hour) => hour.room_id)
    expect(new Set(rooms)).toEqual(new Set([yard.shop.roomId]))
  })

  it('is refused for a time to come', async () => {
    const outcome = await moveSensor(
      database.db,
      maker,
      yard.shop.sensorCode,
      { roomId: yard.cupboard.code, fromAt: hoursAfter(now, 1).toISOString(), spot: '' },
      now,
    )
    expect(outcome).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })
})

describe('typed readings', () => {
  it('make one row for a room, for two who type at once as well', async () => {
    const type = (minutes: number) =>
      typeReading(
        database.db,
        maker,
        yard.shop.code,
        { ...houseAir, at: new Date(now.getTime() + minutes * 60_000).toISOString() },
        hoursAfter(now, 1),
      )
    const both = await Promise.all([type(1), type(2)])
    expect(both.every((one) => one.ok)).toBe(true)
    const typed = (await listSensors(database.db, maker, now)).filter((one) => one.kind === 'typed')
    expect(typed.map((one) => one.name)).toEqual(['Typed in Shop'])
  })

  it('stand for a room that no sensor speaks for, marked and with a wider doubt', async () => {
    const later = hoursAfter(now, 1.5)
    const { air } = valueOf(await getRoom(database.db, maker, yard.shop.code, later))
    expect(air).toMatchObject({ kind: 'fresh', isTyped: true, humidityPct: houseAir.humidityPct })
    await yard.shop.read(houseAir, later)
    const measured = valueOf(await getRoom(database.db, maker, yard.shop.code, later)).air
    expect(measured).toMatchObject({ kind: 'fresh', isTyped: false })
    if (air.kind === 'never' || measured.kind === 'never') throw new Error('no air')
    expect(air.emcDoubtPct).toBeGreaterThan(measured.emcDoubtPct)
  })

  it('are refused for a time to come, and for another value at the same moment', async () => {
    const at = hoursBefore(now, 1)
    const type = (humidityPct: number, when: Date) =>
      typeReading(
        database.db,
        maker,
        yard.cupboard.code,
        { temperatureC: 20, humidityPct, at: when.toISOString() },
        now,
      )
    expect((await type(50, at)).ok).toBe(true)
    expect((await type(50, at)).ok).toBe(true)
    expect(await type(51, at)).toMatchObject({ ok: false, error: { code: 'conflict' } })
    expect(await type(50, hoursAfter(now, 1))).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })
})
