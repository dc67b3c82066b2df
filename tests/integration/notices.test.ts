import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { migrateJobs } from '@/db/jobs'
import { insertCarry, updateCarry, updateCarryPiece } from '@/db/queries/carry-changes'
import { listNoticeSites } from '@/db/queries/notice-state'
import { movePiece } from '@/db/queries/places'
import { evaluateAll, evaluateSite } from '@/workers/notices/evaluate'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { houseAir, seedPiece, seedRoom, type SeededRoom, shopAir } from '../support/seed-rooms'
import { seedSite, type SeededSite } from '../support/seed-site'

const minuteMs = 60_000
/** Just before a working afternoon. */
const start = new Date('2026-03-05T12:00:00Z')
const after = (minutes: number) => new Date(start.getTime() + minutes * minuteMs)
const daysBefore = (days: number) => after(-days * 24 * 60)

let database: TestDatabase
let site: SeededSite
let maker: string
let house: SeededRoom
let shop: SeededRoom
let box: { id: number; code: string }

beforeAll(async () => {
  database = await createTestDatabase()
  await migrateJobs(database.url)
})
afterAll(() => database.drop())
beforeEach(async () => {
  const { db } = database
  site = await seedSite(db, daysBefore(5))
  maker = await site.join('maker')
  house = await seedRoom(db, site.siteId, 'Cupboard', 'cupboard', daysBefore(5))
  shop = await seedRoom(db, site.siteId, 'Shop', 'shop', daysBefore(5))
  await house.readSpan(houseAir, daysBefore(4), start)
  await shop.readSpan(shopAir, daysBefore(4), start)
  box = await seedPiece(db, site.siteId, maker, house, daysBefore(4), { number: '207' })
})

async function evaluate(now: Date): Promise<string[]> {
  const before = await rules()
  const [own] = (await listNoticeSites(database.db)).filter(({ siteId }) => siteId === site.siteId)
  if (own === undefined) throw new Error('the site is gone')
  await evaluateSite(database.db, own, now, 'http://127.0.0.1:3000')
  return (await rules()).slice(before.length)
}

const rules = async (): Promise<string[]> =>
  (
    await database.db
      .selectFrom('notice')
      .where('site_id', '=', site.siteId)
      .select('rule')
      .orderBy('id')
      .execute()
  ).map(({ rule }) => rule)

const noticeTitles = async (): Promise<string[]> =>
  (
    await database.db
      .selectFrom('notice')
      .where('site_id', '=', site.siteId)
      .select('title')
      .orderBy('id')
      .execute()
  ).map(({ title }) => title)

const plan = (plannedAt: Date, stayMinutes = 600) =>
  insertCarry(
    database.db,
    site.siteId,
    {
      toRoomId: shop.roomId,
      cover: 'open',
      plannedAt,
      stayMinutes,
      note: '',
      userId: maker,
      pieces: [{ pieceId: box.id, fromRoomId: house.roomId }],
    },
    start,
  )

/** Out since `outAt`, by the same steps that starting a carry takes. */
async function carryOut(outAt: Date): Promise<number> {
  const { db } = database
  const { id } = await plan(outAt)
  await updateCarry(db, site.siteId, id, { state: 'out', startedAt: outAt })
  await updateCarryPiece(db, site.siteId, id, box.id, { outAt })
  await movePiece(db, site.siteId, box.id, {
    roomId: shop.roomId,
    cover: 'open',
    at: outAt,
    carryId: id,
    userId: maker,
  })
  return id
}

describe('a planned carry that should not be made', () => {
  it('is told of at once, and again an hour before, each once, with a mail to whoever planned it', async () => {
    await plan(after(90))
    expect(await evaluate(start)).toEqual(['planned-carry'])
    expect(await evaluate(after(20))).toEqual([])
    await shop.read(shopAir, after(30))
    expect(await evaluate(after(30))).toEqual(['planned-carry'])
    await shop.read(shopAir, after(31))
    expect(await evaluate(after(31))).toEqual([])
    const mail = await database.db
      .selectFrom('delivery')
      .where('site_id', '=', site.siteId)
      .select(['user_id', 'state'])
      .execute()
    expect(mail).toEqual([
      { user_id: maker, state: 'waiting' },
      { user_id: maker, state: 'waiting' },
    ])
  })

  it('says that the shop is not known when its sensor has gone silent, never that it is fine', async () => {
    await plan(after(90))
    expect(await evaluate(after(45))).toEqual(['planned-carry'])
    expect(await noticeTitles()).toEqual([
      '207 is down to go to Shop at 13:30, and its humidity is not known: no reading since 12:00.',
    ])
  })

  it('is not told of twice by two workers at once, nor after a restart', async () => {
    await plan(after(60))
    const tellAll = () =>
      evaluateAll(database.db, start, 'http://127.0.0.1:3000', (_site, error) => {
        throw error
      })
    await Promise.all([tellAll(), tellAll(), tellAll()])
    expect(await rules()).toEqual(['planned-carry'])
    expect(await evaluate(start)).toEqual([])
  })
})

describe('a box that is out', () => {
  /** When its early edge is, by the check that the worker itself makes. */
  const told = async (rule: string): Promise<{ began_at: Date; ended_at: Date | null }[]> =>
    database.db
      .selectFrom('episode')
      .where('site_id', '=', site.siteId)
      .where('rule', '=', rule)
      .select(['began_at', 'ended_at'])
      .execute()

  it('is told of before its early edge and at it, each once', async () => {
    await carryOut(start)
    const seen: string[] = []
    for (let minute = 10; minute <= 400; minute += 10) {
      await shop.read(shopAir, after(minute))
      seen.push(...(await evaluate(after(minute))))
    }
    expect(seen.filter((rule) => rule.startsWith('time-'))).toEqual(['time-nearly-out', 'time-out'])
    expect(seen.filter((rule) => rule === 'lock-up')).toEqual(['lock-up'])
  })

  it('is told of once, with the true beginning, when the worker was down at its early edge', async () => {
    await carryOut(start)
    await shop.readSpan(shopAir, after(10), after(300))
    await house.read(houseAir, after(300))
    expect(await evaluate(after(300))).toEqual(['time-out'])
    const [episode] = await told('time-out')
    expect(episode?.began_at.getTime()).toBeGreaterThan(after(30).getTime())
    expect(episode?.began_at.getTime()).toBeLessThan(after(290).getTime())
  })

  it('is not told of late when it came in while the worker was down', async () => {
    const id = await carryOut(start)
    await shop.readSpan(shopAir, after(10), after(300))
    await house.read(houseAir, after(300))
    const { db } = database
    await updateCarryPiece(db, site.siteId, id, box.id, { backAt: after(290), backRoomId: house.roomId })
    await updateCarry(db, site.siteId, id, { state: 'back', endedAt: after(290) })
    expect(await evaluate(after(300))).toEqual([])
  })

  it('is told of at once when nobody knows the air any more, and the episode ends when it is heard again', async () => {
    await carryOut(start)
    expect(await evaluate(after(35))).toContain('sensor-silent')
    expect((await told('sensor-silent')).map(({ ended_at }) => ended_at)).toEqual([null])
    await shop.read(shopAir, after(40))
    await evaluate(after(41))
    expect((await told('sensor-silent')).map(({ ended_at }) => ended_at)).toEqual([after(41)])
  })
})

describe('late readings', () => {
  it('open the history but tell nothing for the past', async () => {
    await shop.readSpan({ temperatureC: 8, humidityPct: 95 }, daysBefore(3), daysBefore(2))
    await shop.read(shopAir, start)
    expect(await evaluate(start)).toEqual([])
  })
})
