import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { getRoomSeries } from '@/app/_server/series'
import type { SiteMember } from '@/db/queries/members'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { seedRoom, type SeededRoom } from '../support/seed-rooms'
import { hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-04-02T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let room: SeededRoom

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now, { readHours: 1 })
  maker = await yard.member('maker')
  room = await seedRoom(database.db, yard.siteId, 'Loft', 'house', new Date('2025-01-01T00:00:00Z'))
})
afterAll(() => database.drop())

const ask = (from: string, to: string, points?: number) =>
  getRoomSeries(database.db, maker, room.code, { from, to, points }, now)
const series = async (from: string, to: string, points?: number) => valueOf(await ask(from, to, points))
const air = (humidityPct: number) => ({ temperatureC: 20, humidityPct })

describe('a series', () => {
  it('draws nothing across a time without a reading', async () => {
    await room.readSpan(air(40), new Date('2026-03-01T00:00:00Z'), new Date('2026-03-01T02:00:00Z'))
    await room.readSpan(air(50), new Date('2026-03-01T06:00:00Z'), new Date('2026-03-01T08:00:00Z'))
    const raw = await series('2026-03-01T00:00:00Z', '2026-03-01T09:00:00Z')
    expect(raw.grain).toBe('raw')
    const gaps = raw.at.filter((_, n) => raw.emcPct[n] === null)
    expect(gaps).toEqual(['2026-03-01T04:00:00.000Z'])
    expect(raw.temperatureC[raw.at.indexOf(gaps[0] ?? '')]).toBeNull()

    const hours = await series('2026-03-01T00:00:00Z', '2026-03-04T00:00:00Z')
    expect(hours.grain).toBe('hour')
    expect(hours.at).toHaveLength(72)
    expect(hours.emcPct.slice(3, 6)).toEqual([null, null, null])
    expect(hours.emcPct[2]).not.toBeNull()
  })

  it('averages EMC from readings and never from their averaged humidity', async () => {
    const at = new Date('2026-03-05T00:00:00Z')
    await room.read(air(10), at)
    await room.read(air(90), new Date(at.getTime() + 60_000))
    const raw = await series('2026-03-05T00:00:00Z', '2026-03-06T00:00:00Z', 50)
    // The Wood Handbook's table gives 2.6 % at 10 % RH and 20.9 % at 90 % RH and 20 °C, but 9.3 % at 50 %.
    expect(raw.humidityPct[0]).toBeCloseTo(50, 3)
    expect(raw.emcPct[0]).toBeGreaterThan(11)
    expect(raw.emcPctMin[0]).toBeLessThan(3)
    expect(raw.emcPctMax[0]).toBeGreaterThan(20)
  })

  it('cuts days by the calendar of the site, with 23 hours when the clocks go forward', async () => {
    // In London the 29th of March 2026 began at 00:00Z and ended at 23:00Z.
    await room.read(air(30), new Date('2026-03-28T23:30:00Z'))
    await room.read(air(50), new Date('2026-03-29T00:30:00Z'))
    await room.read(air(70), new Date('2026-03-29T23:30:00Z'))
    const days = await series('2026-03-28T00:00:00Z', '2026-03-31T00:00:00Z', 5)
    expect(days.grain).toBe('day')
    expect(days.at).toEqual([
      '2026-03-28T00:00:00.000Z',
      '2026-03-29T00:00:00.000Z',
      '2026-03-29T23:00:00.000Z',
      '2026-03-30T23:00:00.000Z',
    ])
    expect(days.humidityPct).toEqual([30, 50, 70, null])
  })

  it('changes when a reading of 400 days ago arrives', async () => {
    const from = '2025-02-20T00:00:00Z'
    const to = '2026-04-01T00:00:00Z'
    const before = await series(from, to)
    expect(before.emcPct[5]).toBeNull()
    await room.read(air(60), new Date('2025-02-25T12:00:00Z'))
    const after = await series(from, to)
    expect(after.humidityPct[5]).toBe(60)
  })

  it('never has more points than asked for', async () => {
    for (const [from, to, points] of [
      ['2026-03-31T00:00:00Z', '2026-04-01T00:00:00Z', 2],
      ['2026-03-31T00:30:00Z', '2026-04-01T00:10:00Z', 100],
      ['2026-03-01T00:30:00Z', '2026-04-01T00:10:00Z', 500],
      ['2026-03-01T00:30:00Z', '2026-04-01T00:10:00Z', 10],
      ['1926-05-01T00:30:00Z', '2026-04-01T00:10:00Z', 2000],
      ['1926-05-01T00:30:00Z', '2026-04-01T00:10:00Z', 7],
    ] as const)
      expect(
        (await series(from, to, points)).at.length,
        `${from} ${to} ${String(points)}`,
      ).toBeLessThanOrEqual(points)
  })

  it('refuses ranges that nothing was ever measured over, and ranges that end before they begin', async () => {
    const long = await ask('1900-01-01T00:00:00Z', '2026-01-01T00:00:00Z')
    expect(long).toMatchObject({ ok: false, error: { code: 'malformed', errors: [{ path: 'from' }] } })
    const back = await ask('2026-01-02T00:00:00Z', '2026-01-01T00:00:00Z')
    expect(back).toMatchObject({ ok: false, error: { code: 'malformed' } })
  })

  it('says up to when its figures are settled, and how old the newest is', async () => {
    const shop = valueOf(await getRoomSeries(database.db, maker, yard.shop.code, {}, now))
    expect(shop.completeTo).toBe(now.toISOString())
    expect(shop.age).toBe(0)
    const never = valueOf(
      await getRoomSeries(database.db, maker, room.code, { from: hoursBefore(now, 2).toISOString() }, now),
    )
    expect(never.at).toEqual([])
    expect(never.completeTo).toBe('2026-03-29T23:30:00.000Z')
  })
})
