import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { putBackCarry, putOffCarry } from '@/app/_server/carry-put-off'
import { startCarry } from '@/app/_server/carry-steps'
import { getNow } from '@/app/_server/now'
import type { SiteMember } from '@/db/queries/members'
import { insertForecast } from '@/db/queries/forecasts'
import { listNoticeSites } from '@/db/queries/notice-state'
import { newCarrySchema } from '@/lib/carry/carry'
import { FORECAST_HOURS } from '@/lib/forecast/room-forecast'
import { loadNoticeInputs } from '@/workers/notices/inputs'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursAfter, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
const at = (hours: number) => hoursAfter(now, hours).toISOString()

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

interface Place {
  yard: Yard
  maker: SiteMember
}
async function newPlace(): Promise<Place> {
  const yard = await makeYard(database.db, now)
  return { yard, maker: await yard.member('maker') }
}
const planWhatever = async ({ yard, maker }: Place, over: Record<string, unknown> = {}) =>
  valueOf(
    await createCarry(
      database.db,
      maker,
      newCarrySchema.parse({
        ...{ takesWhatever: true, toRoomId: yard.shop.code, cover: 'open', stayMinutes: 240 },
        plannedAt: at(4),
        ...over,
      }),
      now,
    ),
  )

describe('a plan for whatever is taken', () => {
  it('is judged by the least forgiving box that stands where it is kept, and says which', async () => {
    const place = await newPlace()
    await place.yard.box('401', { fitGrade: 'loose', wallMm: 6 })
    await place.yard.box('402', { fitGrade: 'snap', jointDiameterMm: 90, wallMm: 2 })
    await place.yard.box('403', { fitGrade: 'easy', wallMm: 4 })
    const carry = await planWhatever(place)
    expect(carry).toMatchObject({ takesWhatever: true, worst: 'leave' })
    expect(carry.pieces[0]?.number).toBe('402')
    expect(carry.headline).toMatch(/Whatever you take: .*leave 402\.$/)
    const judge = carry.pieces.at(-1)
    expect(judge?.check).not.toMatchObject({ verdict: 'leave' })
    expect(carry.headline).toContain(`judged by ${judge?.number ?? ''}`)
  })

  it('has no box to go by where none stands in its keep room', async () => {
    const place = await newPlace()
    const carry = await planWhatever(place)
    expect(carry.pieces).toEqual([])
    expect(carry.headline).toMatch(/no finished box stands in its keep room/)
    expect((await getNow(database.db, place.maker, now)).planned).toHaveLength(1)
  })

  it('asks what is taken when it goes, and is then a carry of those pieces', async () => {
    const place = await newPlace()
    const box = await place.yard.box('411', { fitGrade: 'loose' })
    await place.yard.box('412', { fitGrade: 'snap' })
    const carry = await planWhatever(place)
    const unnamed = await startCarry(database.db, place.maker, carry.id, { againstAdvice: true }, now)
    expect(unnamed).toMatchObject({ ok: false, error: { code: 'not-possible' } })
    const asked = { againstAdvice: true, pieceIds: [box.code] }
    const out = valueOf(await startCarry(database.db, place.maker, carry.id, asked, now))
    expect(out).toMatchObject({ state: 'out', takesWhatever: false })
    expect(out.pieces.map((piece) => piece.number)).toEqual(['411'])
    expect(out.pieces[0]?.fromRoom?.id).toBe(place.yard.cupboard.code)
  })

  it('is told to the notices by the pieces that it is judged by', async () => {
    const place = await newPlace()
    await place.yard.box('421', { fitGrade: 'snap', jointDiameterMm: 90, wallMm: 2 })
    const carry = await planWhatever(place)
    const site = (await listNoticeSites(database.db)).find(({ siteId }) => siteId === place.yard.siteId)
    if (site === undefined) throw new Error('no site')
    const inputs = await loadNoticeInputs(database.db, site, now)
    const told = inputs.carries.find(({ code }) => code === carry.id)
    expect(told).toMatchObject({ takesWhatever: true, state: 'planned' })
    expect(told?.pieces.map(({ number, outAt }) => [number, outAt])).toEqual([['421', null]])
  })

  it('can not go now without a name', () => {
    const asked = { takesWhatever: true, toRoomId: 'x', cover: 'open', stayMinutes: 60 }
    expect(newCarrySchema.safeParse({ ...asked, startsNow: true }).success).toBe(false)
    expect(newCarrySchema.safeParse(asked).success).toBe(false)
  })
})

function forecastDryFrom({ yard }: Place, hour: number): Promise<void> {
  const all = <Value>(value: Value) => Array.from({ length: FORECAST_HOURS }, () => value)
  const emcPct = all(14).map((damp, n) => (n < hour ? damp : 8.5))
  return insertForecast(database.db, yard.siteId, yard.shop.roomId, {
    madeAt: now.getTime(),
    temperatureC: all(9),
    humidityPct: all(60),
    emcPct,
    emcPctLow: emcPct.map((value) => value - 0.3),
    emcPctHigh: emcPct.map((value) => value + 0.3),
    method: all('record' as const),
    recordPct: emcPct,
    sameAsNowPct: 14,
    yesterdayPct: all(null),
    usesOutdoors: false,
    usesLastYear: false,
    warmed: null,
  })
}

describe('putting a plan off', () => {
  const from = at(4)
  const plan = async (place: Place) => {
    await place.yard.box('431')
    return planWhatever(place)
  }

  it('happens once when pressed twice, and keeps the hour it was put off from', async () => {
    const place = await newPlace()
    const carry = await plan(place)
    const press = (to: string) => putOffCarry(database.db, place.maker, carry.id, { from, to }, now)
    const off = valueOf(await press(at(20)))
    expect(off).toMatchObject({ plannedAt: at(20), putOffFrom: from, canPutBack: true })
    const again = valueOf(await press(at(30)))
    expect(again).toMatchObject({ plannedAt: at(20), putOffFrom: from, version: off.version })
  })

  it('is refused to whoever looks at an older plan', async () => {
    const place = await newPlace()
    const carry = await plan(place)
    const stale = await putOffCarry(database.db, place.maker, carry.id, { from: at(3), to: at(9) }, now)
    expect(stale).toMatchObject({ ok: false, error: { code: 'changed-meanwhile' } })
    const past = await putOffCarry(database.db, place.maker, carry.id, { from, to: at(-1) }, now)
    expect(past).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })

  it('says so where no forecast knows of a better hour', async () => {
    const place = await newPlace()
    const carry = await plan(place)
    const none = await putOffCarry(database.db, place.maker, carry.id, { from }, now)
    expect(none).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })

  it('goes to the best hour that the forecast knows of, where none was named', async () => {
    const place = await newPlace()
    const box = await place.yard.box('432', { fitGrade: 'snap', jointDiameterMm: 90, wallMm: 2 })
    // The shop is to be as dry as the house from hour 24 of the forecast on.
    await forecastDryFrom(place, 24)
    const asked = { takesWhatever: false, pieceIds: [box.code], stayMinutes: 120 }
    const carry = await planWhatever(place, asked)
    expect(carry.worst).toBe('leave')
    const off = valueOf(await putOffCarry(database.db, place.maker, carry.id, { from }, now))
    // The button names the very hour that a press goes to.
    expect(off.plannedAt).toBe(carry.betterAt)
    expect(Date.parse(off.plannedAt)).toBeGreaterThanOrEqual(Date.parse(at(24)))
    expect(Date.parse(off.plannedAt)).toBeLessThan(Date.parse(at(48)))
    expect(off.putOffFrom).toBe(from)
    expect(off.worst).not.toBe('leave')
  })

  it('can be taken back for ten minutes', async () => {
    const place = await newPlace()
    const carry = await plan(place)
    valueOf(await putOffCarry(database.db, place.maker, carry.id, { from, to: at(20) }, now))
    const late = await putBackCarry(database.db, place.maker, carry.id, hoursAfter(now, 0.2))
    expect(late).toMatchObject({ ok: false, error: { code: 'not-possible' } })
    const back = valueOf(await putBackCarry(database.db, place.maker, carry.id, hoursAfter(now, 0.1)))
    expect(back).toMatchObject({ plannedAt: from, putOffFrom: null, canPutBack: false })
    const twice = valueOf(await putBackCarry(database.db, place.maker, carry.id, hoursAfter(now, 0.1)))
    expect(twice.version).toBe(back.version)
  })
})
