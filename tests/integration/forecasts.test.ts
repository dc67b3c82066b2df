import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { deleteOldForecasts, findForecasts, findLeadScores } from '@/db/queries/forecasts'
import { insertReadings } from '@/db/queries/readings'
import type { SiteMember } from '@/db/queries/members'
import { airOfHour } from '@/lib/carry/material'
import { HOUR_MS } from '@/lib/forecast/record'
import type { RoomForecast } from '@/lib/forecast/room-forecast'
import { forecastSite } from '@/workers/forecast/forecast-site'
import { createTestDatabase, type TestDatabase } from '../support/database'
import type { SeededRoom } from '../support/seed-rooms'
import { hoursAfter, hoursBefore, makeYard, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:05:00Z')
const readDays = 24
let database: TestDatabase
let yard: Yard
let maker: SiteMember

/** A day's swing, on a level that wanders over the week. */
const airAt = (at: Date) => {
  const days = at.getTime() / (24 * HOUR_MS)
  const swing = Math.cos(2 * Math.PI * (days - 0.6))
  return { temperatureC: 9 + 2.5 * swing, humidityPct: 70 - 7 * swing + 4 * Math.sin(days / 1.7) }
}

async function read(room: SeededRoom, from: Date, to: Date) {
  const rows = []
  for (let at = from.getTime(); at < to.getTime(); at += HOUR_MS / 2)
    rows.push({ siteId: yard.siteId, sensorId: room.sensorId, at: new Date(at), ...airAt(new Date(at)) })
  await insertReadings(database.db, rows)
}

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, hoursBefore(now, readDays * 24), { readHours: 1 })
  maker = await yard.member('maker')
  await read(yard.shop, hoursBefore(now, readDays * 24 - 1), now)
})
afterAll(() => database.drop())

const newest = async (at: Date): Promise<RoomForecast | undefined> =>
  (await findForecasts(database.db, maker.siteId, new Set([yard.shop.roomId]), at)).get(yard.shop.roomId)
const scores = async (at: Date, since = 0) =>
  (await findLeadScores(database.db, maker.siteId, new Date(since), at)).get(yard.shop.roomId) ?? []
const rowsOfScores = () =>
  database.db
    .selectFrom('forecast_score')
    .where('site_id', '=', maker.siteId)
    .where('made_at', '>=', new Date('2026-02-10T10:00:00Z'))
    .select(['made_at', 'lead_h', 'emc_pct', 'record_pct'])
    .orderBy('made_at')
    .orderBy('lead_h')
    .execute()

describe('the forecast of a room', () => {
  it('is made once for the hour, and not for a room that has not enough on record', async () => {
    const first = await forecastSite(database.db, maker, now)
    expect(first.made).toBe(1)
    const forecast = await newest(now)
    expect(forecast?.madeAt).toBe(Date.parse('2026-02-10T10:00:00Z'))
    expect((await forecastSite(database.db, maker, now)).made).toBe(0)
    expect(await newest(now)).toEqual(forecast)
    const cupboard = new Set([yard.cupboard.roomId])
    expect((await findForecasts(database.db, maker.siteId, cupboard, now)).size).toBe(0)
  })

  it('is scored over past days at once, and beats "same as now" by the day’s swing', async () => {
    const six = (await scores(now)).find((score) => score.leadH === 6)
    expect(six?.n).toBeGreaterThan(20)
    expect(six?.recordPct).toBeLessThan(0.5 * (six?.sameAsNowPct ?? 0))
  })

  it('is what a carry is judged on, blended from what is read now', async () => {
    const material = await loadCarryMaterial(database.db, maker, [], [yard.shop.roomId], now)
    const forecast = await newest(now)
    const ahead = hoursAfter(now, 20)
    const n = Math.floor((ahead.getTime() - (forecast?.madeAt ?? 0)) / HOUR_MS)
    const told = airOfHour(material, yard.shop.roomId, ahead.getTime())
    expect(told?.emcPct).toBeCloseTo(forecast?.emcPct[n] ?? NaN, 6)
    const present = material.rooms.get(yard.shop.roomId)?.air
    expect(present?.kind === 'fresh' && present.emcPct).toBeCloseTo(
      airOfHour(material, yard.shop.roomId, now.getTime())?.emcPct ?? NaN,
      6,
    )
  })

  it('is held against what came once that is over, and again when a late reading changes it', async () => {
    // Long enough past the hour that a fire would have shown by then.
    const later = hoursAfter(now, 7)
    await read(yard.shop, now, later)
    await forecastSite(database.db, maker, later)
    const before = await rowsOfScores()
    const leads = before.filter((row) => row.made_at.getTime() === Date.parse('2026-02-10T10:00:00Z'))
    expect(leads.map((row) => row.lead_h)).toEqual([1, 3])
    await insertReadings(database.db, [
      {
        siteId: yard.siteId,
        sensorId: yard.shop.sensorId,
        at: new Date('2026-02-10T10:50:00Z'),
        temperatureC: 9,
        humidityPct: 90,
      },
    ])
    await forecastSite(database.db, maker, later)
    const after = await rowsOfScores()
    expect(after).toHaveLength(before.length)
    expect(after[0]?.emc_pct).toBeGreaterThan((before[0]?.emc_pct ?? NaN) + 0.3)
    expect(after[0]?.record_pct).toBe(before[0]?.record_pct)
  })

  it('is not used once it is old, nor kept for ever', async () => {
    expect(await newest(hoursAfter(now, 20))).toBeUndefined()
    await deleteOldForecasts(database.db, hoursAfter(now, 24 * 100))
    expect(await rowsOfScores()).toEqual([])
    expect(await newest(now)).toBeUndefined()
  })
})
