import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { getRoomFelt } from '@/app/_server/felt'
import { createWood } from '@/app/_server/wood-changes'
import type { SiteMember } from '@/db/queries/members'
import { feltQuerySchema, roomFeltSchema } from '@/lib/rooms/felt'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { seedRoom, type SeededRoom } from '../support/seed-rooms'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-04-20T10:20:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
/** Dry for eighty days, then damp for the last two. */
let study: SeededRoom

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now, { readHours: 30 })
  maker = await yard.member('maker')
  study = await seedRoom(database.db, yard.siteId, 'Study', 'house', hoursBefore(now, 2000))
  await hourly(study, { temperatureC: 20, humidityPct: 40 }, 1968, 48)
  await hourly(study, { temperatureC: 20, humidityPct: 70 }, 48, 0)
})
afterAll(() => database.drop())

const hourly = (
  room: SeededRoom,
  air: { temperatureC: number; humidityPct: number },
  from: number,
  to: number,
) => room.read(air, ...Array.from({ length: from - to }, (_, n) => hoursBefore(now, from - n - 0.5)))

const ask = (query: Record<string, string> = {}, room = study.code, at = now, member = maker) =>
  getRoomFelt(database.db, member, room, feltQuerySchema.parse(query), at)
const felt = async (...asked: Parameters<typeof ask>) => valueOf(await ask(...asked))
const mcPct = async (query: Record<string, string>) => (await felt(query)).felt[0]?.mcPct ?? NaN

describe('what wood has felt of a room', () => {
  it('comes for 4, 10 and 25 mm unless others are asked for, thin wood nearest to the air of now', async () => {
    const answer = roomFeltSchema.parse(await felt())
    expect(answer.felt.map((one) => one.thicknessMm)).toEqual([4, 10, 25])
    const [thin, middling, thick] = answer.felt.map((one) => one.mcPct)
    // 40 and 70 % RH at 20 °C are 7.7 and 13.1 % MC (Wood Handbook, Table 4-2).
    expect(thin).toBeGreaterThan((middling ?? NaN) + 0.5)
    expect(middling).toBeGreaterThan((thick ?? NaN) + 0.3)
    expect(thin).toBeLessThan(13.1)
    expect(thick).toBeGreaterThan(7.6)
    expect(answer.completeTo).toBe('2026-04-20T09:50:00.000Z')
    expect(answer.at).toBe(answer.completeTo)
    expect(answer.age).toBe(1800)
    expect(answer.wood).toEqual({ id: null, commonName: null, densityKgM3: 650, isDensityAssumed: true })
    expect((await felt({ thicknessMm: '7,0.5,7' })).felt.map((one) => one.thicknessMm)).toEqual([0.5, 7])
  })

  it('hangs on the wood: dense wood follows more slowly, and the site’s own counts', async () => {
    const light = await mcPct({ thicknessMm: '10', wood: 'prunus-serotina' })
    const dense = await mcPct({ thicknessMm: '10', wood: 'dalbergia-melanoxylon' })
    expect(light).toBeGreaterThan(dense + 0.5)
    const own = valueOf(
      await createWood(
        database.db,
        maker,
        {
          overrides: 'prunus-serotina',
          radialPerPct: null,
          tangentialPerPct: null,
          densityKgM3: 1200,
          source: '',
          note: '',
        },
        now,
      ),
    )
    expect(own.densityKgM3).toBe(1200)
    expect(await mcPct({ thicknessMm: '10', wood: 'prunus-serotina' })).toBeLessThan(light - 0.5)
    expect(await ask({ wood: 'no-such-wood' })).toMatchObject({
      ok: false,
      error: { code: 'malformed', errors: [{ path: 'wood' }] },
    })
  })

  it('has a course of 200 points at most, of which the last is the figure of now', async () => {
    const { course, felt: last, at } = await felt({ thicknessMm: '4,25', days: '30' })
    expect(course.at.length).toBeLessThanOrEqual(200)
    expect(course.at.at(-1)).toBe(at)
    course.felt.forEach((one, n) => {
      expect(one.mcPct).toHaveLength(course.at.length)
      expect(one.mcPct.at(-1)).toBe(last[n]?.mcPct)
    })
    expect(course.emcPct[0]).toBeLessThan(8)
    expect(course.emcPct.at(-1)).toBeGreaterThan(12.5)
  })

  it('once the room is no longer heard, each hour since widens the doubt and shows as a gap', async () => {
    const heard = await felt({ thicknessMm: '10', days: '2' })
    const later = hoursAfter(now, 30)
    const silent = await felt({ thicknessMm: '10', days: '2' }, study.code, later)
    expect(silent.at).toBe(later.toISOString())
    expect(silent.completeTo).toBe(heard.completeTo)
    expect(silent.felt[0]?.unknownShare).toBeGreaterThan((heard.felt[0]?.unknownShare ?? NaN) + 0.05)
    expect(silent.felt[0]?.doubtPct).toBeGreaterThan((heard.felt[0]?.doubtPct ?? NaN) + 0.02)
    expect(silent.course.emcPct.at(-1)).toBeNull()
    expect(silent.course.felt[0]?.mcPct.at(-1)).not.toBeNull()
  })

  it('says what rests on the time before a short record, and nothing of a room that was never read', async () => {
    const cupboard = await felt({}, yard.cupboard.code)
    expect(cupboard.recordFrom).toBe('2026-04-19T04:00:00.000Z')
    expect(cupboard.felt[2]?.unknownShare).toBeGreaterThan(0.8)
    expect(cupboard.course.felt[0]?.mcPct[0]).toBeNull()
    const never = await seedRoom(database.db, yard.siteId, 'Loft', 'house', now)
    expect(await felt({}, never.code)).toMatchObject({
      at: null,
      recordFrom: null,
      felt: [],
      completeTo: null,
      age: null,
    })
  })

  it('gives onlookers shared rooms only, from whole days, with the woods of the table', async () => {
    const onlooker = await yard.member('onlooker')
    const asOnlooker = (query: Record<string, string> = {}) => ask(query, study.code, now, onlooker)
    expect(await asOnlooker()).toMatchObject({ ok: false, error: { code: 'not-found' } })
    await database.db
      .updateTable('room')
      .set({ is_shared: true })
      .where('site_id', '=', yard.siteId)
      .where('id', '=', study.roomId)
      .execute()
    const before = valueOf(await asOnlooker({ thicknessMm: '1' }))
    expect(before.completeTo).toBe('2026-04-19T23:00:00.000Z')
    expect(before.at).toBe(before.completeTo)
    // Nothing of today is in it.
    await study.read({ temperatureC: 20, humidityPct: 95 }, hoursBefore(now, 0.2), hoursBefore(now, 2.2))
    expect(valueOf(await asOnlooker({ thicknessMm: '1' })).felt).toEqual(before.felt)
    // The site's own figures for a wood are not theirs to see.
    const light = valueOf(await asOnlooker({ wood: 'prunus-serotina' }))
    expect(light.wood.densityKgM3).toBeLessThan(600)
  })
})

describe('the query', () => {
  it.each([
    [{ thicknessMm: '0.4' }],
    [{ thicknessMm: '4,101' }],
    [{ thicknessMm: '4,,25' }],
    [{ thicknessMm: '' }],
    [{ thicknessMm: '1,2,3,4,5,6,7' }],
    [{ days: '0' }],
    [{ days: '401' }],
    [{ wood: 'Not A Wood' }],
    [{ species: 'fraxinus-excelsior' }],
  ])('%o is refused', (query) => {
    expect(feltQuerySchema.safeParse(query).success).toBe(false)
  })
})
