import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { archiveRoom, changeRoom, createRoom, getRoom, listRooms } from '@/app/_server/rooms'
import { getRoomSeries } from '@/app/_server/series'
import type { SiteMember } from '@/db/queries/members'
import { type NewRoom, newRoomSchema } from '@/lib/rooms/room'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { houseAir, seedRoom, shopAir } from '../support/seed-rooms'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let onlooker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
  onlooker = await yard.member('onlooker')
})
afterAll(() => database.drop())

const room = (name: string, more: Partial<NewRoom> = {}) =>
  newRoomSchema.parse({ name, kind: 'house', ...more })
const make = async (name: string, more?: Partial<NewRoom>) =>
  valueOf(await createRoom(database.db, maker, room(name, more), now))

describe('the air of a room', () => {
  it('is the mean over its sensors, each counted once', async () => {
    const since = hoursBefore(now, 5)
    const study = await seedRoom(database.db, yard.siteId, 'Study', 'house', since)
    const second = await seedRoom(database.db, yard.siteId, 'Lobby', 'house', since)
    await database.db
      .updateTable('placement')
      .set({ room_id: study.roomId })
      .where('site_id', '=', yard.siteId)
      .where('sensor_id', '=', second.sensorId)
      .execute()
    await study.readSpan({ temperatureC: 20, humidityPct: 40 }, hoursBefore(now, 2), now)
    await second.read({ temperatureC: 22, humidityPct: 60 }, hoursBefore(now, 0.2))
    const { air } = valueOf(await getRoom(database.db, maker, study.code, now))
    expect(air).toMatchObject({ kind: 'fresh', isTyped: false })
    expect(air.kind === 'fresh' && air.humidityPct).toBeCloseTo(50, 5)
    // The figure of the record too: twelve readings of one sensor do not outvote one of the other.
    const hour = valueOf(
      await getRoomSeries(
        database.db,
        maker,
        study.code,
        { from: hoursBefore(now, 3).toISOString(), to: now.toISOString(), points: 4 },
        now,
      ),
    )
    expect(hour.grain).toBe('hour')
    expect(hour.humidityPct[2]).toBeCloseTo(50, 5)
  })

  it('is stale after the time for its kind of room, and says since when', async () => {
    const shop = async (at: Date) =>
      (await listRooms(database.db, maker, at)).find((one) => one.name === 'Shop')
    expect((await shop(hoursAfter(now, 0.4)))?.air.kind).toBe('fresh')
    expect((await shop(hoursAfter(now, 0.6)))?.air.kind).toBe('stale')
    const cupboard = valueOf(await getRoom(database.db, maker, yard.cupboard.code, hoursAfter(now, 5)))
    expect(cupboard.air.kind).toBe('fresh')
    const late = valueOf(await getRoom(database.db, maker, yard.cupboard.code, hoursAfter(now, 7)))
    expect(late.headline).toMatch(/^No reading from Landing cupboard since 10:00/)
  })

  it('does not bring along what a sensor read in another room', async () => {
    const since = hoursBefore(now, 5)
    const moved = await seedRoom(database.db, yard.siteId, 'Pantry', 'house', since)
    await moved.read(houseAir, hoursBefore(now, 1))
    const target = await make('Larder')
    await database.db
      .updateTable('placement')
      .set({ to_at: hoursBefore(now, 0.5) })
      .where('site_id', '=', yard.siteId)
      .where('sensor_id', '=', moved.sensorId)
      .execute()
    const { id } = await database.db
      .selectFrom('room')
      .where('code', '=', target.id)
      .select('id')
      .executeTakeFirstOrThrow()
    await database.db
      .insertInto('placement')
      .values({
        site_id: yard.siteId,
        sensor_id: moved.sensorId,
        from_at: hoursBefore(now, 0.5),
        to_at: null,
        room_id: id,
      })
      .execute()
    expect(valueOf(await getRoom(database.db, maker, target.id, now)).air).toEqual({ kind: 'never' })
  })

  it('says how a room stands against the keep room, in points', async () => {
    const shop = valueOf(await getRoom(database.db, maker, yard.shop.code, now))
    expect(shop.headline).toMatch(/^Shop is 5\.\d\spoints damper than Landing cupboard/)
  })
})

describe('onlookers', () => {
  it('see shared rooms only, by the last whole day and never by the hour', async () => {
    const shared = await make('Gallery', { isShared: true })
    const seen = await listRooms(database.db, onlooker, now)
    expect(seen.map((one) => one.name)).toEqual(['Gallery'])
    expect(seen[0]?.note).toBe('')
    expect(await getRoom(database.db, onlooker, yard.shop.code, now)).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
    await database.db
      .updateTable('room')
      .set({ is_shared: true })
      .where('site_id', '=', yard.siteId)
      .where('id', '=', yard.shop.roomId)
      .execute()
    const [, shop] = (await listRooms(database.db, onlooker, now)).toSorted((a, b) =>
      a.name.localeCompare(b.name),
    )
    expect(shop?.air).toMatchObject({ kind: 'fresh', at: '2026-02-10T00:00:00.000Z' })
    const query = { from: hoursBefore(now, 30).toISOString(), to: now.toISOString() }
    const series = valueOf(await getRoomSeries(database.db, onlooker, yard.shop.code, query, now))
    expect(series.grain).toBe('day')
    expect(series.at).toEqual(['2026-02-09T00:00:00.000Z'])
    const full = valueOf(await getRoomSeries(database.db, maker, yard.shop.code, query, now))
    expect(full.grain).toBe('raw')
    await database.db
      .updateTable('room')
      .set({ is_shared: false })
      .where('site_id', '=', yard.siteId)
      .where('id', '=', yard.shop.roomId)
      .execute()
    expect(shared.isShared).toBe(true)
  })
})

describe('changes', () => {
  it('keeps names apart, whatever their letters, for two at once as well', async () => {
    await make('Loft')
    const again = await createRoom(database.db, maker, room('LOFT'), now)
    expect(again).toMatchObject({ ok: false, error: { code: 'name-taken', errors: [{ path: 'name' }] } })
    const both = await Promise.all([1, 2].map(() => createRoom(database.db, maker, room('Cellar'), now)))
    expect(both.filter((one) => one.ok)).toHaveLength(1)
    expect(both.find((one) => !one.ok)).toMatchObject({ error: { code: 'name-taken' } })
  })

  it('gives the second of two writers the room as it is now', async () => {
    const attic = await make('Attic')
    valueOf(await changeRoom(database.db, maker, attic.id, attic.version, { note: 'first' }, now))
    const second = await changeRoom(database.db, maker, attic.id, attic.version, { note: 'second' }, now)
    expect(second).toMatchObject({
      ok: false,
      error: { code: 'changed-meanwhile', version: attic.version + 1, current: { note: 'first' } },
    })
    const [change] = await database.db
      .selectFrom('change')
      .where('subject_code', '=', attic.id)
      .where('action', '=', 'change')
      .select(['before', 'after', 'user_id'])
      .execute()
    expect(change).toEqual({ before: { note: '' }, after: { note: 'first' }, user_id: maker.userId })
  })

  it('puts no room away that something needs, and says what', async () => {
    await yard.box('77')
    const cupboard = valueOf(await getRoom(database.db, maker, yard.cupboard.code, now))
    const refused = await archiveRoom(database.db, maker, cupboard.id, cupboard.version, now)
    expect(refused).toMatchObject({ ok: false, error: { code: 'conflict' } })
    expect(refused.ok ? '' : refused.error.detail).toBe(
      'Landing cupboard is still needed: 1 piece is in it, 1 sensor hangs in it, 1 piece is kept to match it. Change that first.',
    )
    const barn = await make('Barn')
    valueOf(await archiveRoom(database.db, maker, barn.id, barn.version, now))
    expect((await listRooms(database.db, maker, now)).map((one) => one.name)).not.toContain('Barn')
    await make('Barn')
  })
})

describe("a room's own year", () => {
  it('is left out below 20 days and is nineteen in twenty of its days above', async () => {
    const long = hoursBefore(now, 24 * 30)
    const store = await seedRoom(database.db, yard.siteId, 'Timber store', 'store', long)
    await store.read(shopAir, hoursBefore(now, 24 * 10), hoursBefore(now, 24 * 9))
    const yearOf = async () => valueOf(await getRoom(database.db, maker, store.code, now)).year
    expect(await yearOf()).toBeNull()
    for (let day = 2; day <= 26; day += 1)
      await store.read({ temperatureC: 10, humidityPct: 40 + day }, hoursBefore(now, 24 * day - 1))
    const year = await yearOf()
    expect(year?.days).toBeGreaterThanOrEqual(25)
    expect(year?.emcPctLow).toBeLessThan(year?.emcPctMiddle ?? 0)
    expect(year?.emcPctHigh).toBeGreaterThan(year?.emcPctMiddle ?? 99)
  })
})
