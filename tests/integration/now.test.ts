import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { bringBack } from '@/app/_server/carry-steps'
import { changeNotice, listNotices, noticesQuerySchema, seeAllNotices } from '@/app/_server/notices'
import { getNow } from '@/app/_server/now'
import type { SiteMember } from '@/db/queries/members'
import { newCode, takeIds } from '@/db/queries/counters'
import { newCarrySchema } from '@/lib/carry/carry'
import { nowViewSchema } from '@/lib/now/now-view'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { shopAir } from '../support/seed-rooms'
import { hoursAfter, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
const minutesAfter = (minutes: number) => new Date(now.getTime() + minutes * 60_000)
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let hand: SiteMember
let onlooker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
  hand = await yard.member('hand')
  onlooker = await yard.member('onlooker')
})
afterAll(() => database.drop())

const headline = async (at: Date, as = maker) =>
  (await getNow(database.db, as, at)).headline.map((part) => part.text).join('')

const carry = (pieceIds: string[], more: object) =>
  createCarry(
    database.db,
    maker,
    newCarrySchema.parse({
      pieceIds,
      toRoomId: yard.shop.code,
      cover: 'open',
      stayMinutes: 60,
      againstAdvice: true,
      ...more,
    }),
    now,
  )

describe('Now', () => {
  it('says that nothing is logged out, and how far apart the rooms are', async () => {
    expect(await headline(now)).toMatch(
      /^Nothing is logged out\. Shop is 5\.\d\spoints of % MC damper than Landing cupboard\.$/,
    )
  })

  it('shows what is out first, with its bracket, and the undo line once it is back', async () => {
    const box = await yard.box('601')
    const out = valueOf(await carry([box.code], { startsNow: true }))
    const view = await getNow(database.db, maker, minutesAfter(1))
    expect(nowViewSchema.safeParse(view).error).toBeUndefined()
    expect(await headline(minutesAfter(1))).toMatch(/^Bring 601 in from Shop by \d\d:\d\d\.$/)
    expect(view.rule.brackets).toMatchObject([{ number: '601', isOut: true }])
    expect(view.rule.shelf.find((group) => group.isOut)).toMatchObject({ label: '601' })
    expect(view.rule.rooms.find((room) => room.isFocus)?.name).toBe('Landing cupboard')

    valueOf(await bringBack(database.db, hand, out.id, {}, minutesAfter(20)))
    const after = await getNow(database.db, maker, minutesAfter(21))
    expect(after.out).toEqual([])
    expect(after.justBack).toEqual([
      {
        ...{ carryId: out.id, pieceId: box.code, number: '601', hasLid: true, isAskSkipped: false },
        ...{ roomName: 'Landing cupboard', at: minutesAfter(20).toISOString() },
      },
    ])
    expect((await getNow(database.db, maker, minutesAfter(31))).justBack).toEqual([])
  })

  it('gives a planned carry no green light when the shop has gone quiet, and names the sensor', async () => {
    const box = await yard.box('602')
    const planned = valueOf(await carry([box.code], { plannedAt: hoursAfter(now, 5).toISOString() }))
    const quiet = hoursAfter(now, 3)
    const view = await getNow(database.db, maker, quiet)
    expect(view.planned.find((one) => one.id === planned.id)).toMatchObject({
      worst: 'unknown',
      pieces: [{ check: { kind: 'unknown', reason: 'no-reading' } }],
    })
    expect(await headline(quiet)).toMatch(/^No verdict for 602, planned for Shop at 15:00/)
    expect(view.silent.map((sensor) => sensor.name)).toContain('Shop sensor')
    expect(view.needs.find((need) => need.mark === 'silent')?.body).toMatch(/Coin cells/)
  })

  it('judges a piece that is out from when it went, as its air is read', async () => {
    const box = await yard.box('603')
    valueOf(await carry([box.code], { startsNow: true }))
    const used = async (at: Date) => {
      const view = await getNow(database.db, maker, at)
      return view.rule.brackets.find((bracket) => bracket.number === '603')?.mcPct ?? NaN
    }
    const first = await used(minutesAfter(1))
    await yard.shop.readSpan(shopAir, minutesAfter(10), minutesAfter(120))
    expect(await used(minutesAfter(120))).toBeGreaterThan(first + 0.3)
  })

  it('keeps a private piece private on its carry too', async () => {
    const box = await yard.box('604', { isPrivate: true, wood: 'taxus-baccata' })
    valueOf(await carry([box.code], { startsNow: true }))
    const view = await getNow(database.db, hand, minutesAfter(1))
    const piece = view.out.flatMap((one) => one.pieces).find((one) => one.number === '604')
    expect(piece).toMatchObject({ title: 'Private piece', check: { reason: '', assumed: [] } })
    expect(piece?.check).toMatchObject({ ringMcPct: null, cutMcPct: null, lossMm: null, curve: null })
    expect(view.rule.brackets.map(({ number }) => number)).not.toContain('604')
    expect(JSON.stringify(view)).not.toMatch(/yew|taxus/i)
  })

  it('shows onlookers neither what is out nor which sensors there are', async () => {
    const view = await getNow(database.db, onlooker, now)
    expect(view).toMatchObject({ out: [], planned: [], justBack: [], silent: [], needs: [] })
    expect(view.rule).toEqual({ rooms: [], brackets: [], shelf: [] })
    expect(view.counts).toEqual({ rooms: 0, sensors: 0, pieces: 0 })
  })
})

describe('notices', () => {
  async function notice(title: string, minutes: number): Promise<string> {
    const code = newCode()
    await database.db
      .insertInto('notice')
      .values({
        site_id: yard.siteId,
        id: await takeIds(database.db, yard.siteId, 'notice'),
        code,
        key: code,
        rule: 'lock-up',
        urgency: 'soon',
        mark: 'leave',
        title,
        at: minutesAfter(minutes),
      })
      .execute()
    return code
  }
  const titles = async (query: Record<string, string>, as = maker) =>
    valueOf(await listNotices(database.db, as, noticesQuerySchema.parse(query), now)).items.map(
      (one) => one.title,
    )

  it('come newest first, page by page, each once', async () => {
    for (const minutes of [1, 2, 2, 3]) await notice(`n${String(minutes)}`, minutes)
    const seen: string[] = []
    let cursor: string | undefined
    do {
      const query = noticesQuerySchema.parse({ limit: '1', ...(cursor === undefined ? {} : { cursor }) })
      const page = valueOf(await listNotices(database.db, maker, query, now))
      seen.push(...page.items.map((one) => one.title))
      cursor = page.nextCursor ?? undefined
    } while (cursor !== undefined)
    expect(seen).toEqual(['n3', 'n2', 'n2', 'n1'])
  })

  it('are seen by each person for themselves, and acknowledged for everybody', async () => {
    const code = await notice('acknowledged', 10)
    const done = valueOf(await changeNotice(database.db, hand, code, { isAcknowledged: true }, now))
    expect(done).toMatchObject({ isSeen: true, acknowledgedBy: 'hand', delivery: 'on this page only' })
    const [mine] = valueOf(await listNotices(database.db, maker, noticesQuerySchema.parse({}), now)).items
    expect(mine).toMatchObject({ title: 'acknowledged', isSeen: false, acknowledgedBy: 'hand' })
    // The first to do so stands.
    valueOf(await changeNotice(database.db, maker, code, { isAcknowledged: true }, minutesAfter(5)))
    const [still] = valueOf(await listNotices(database.db, maker, noticesQuerySchema.parse({}), now)).items
    expect(still).toMatchObject({ acknowledgedBy: 'hand', acknowledgedAt: now.toISOString() })
  })

  it('are all seen with one press, by the one who pressed', async () => {
    await seeAllNotices(database.db, maker, now)
    expect(await titles({ unseen: 'yes' })).toEqual([])
    expect((await titles({ unseen: 'yes' }, hand)).length).toBeGreaterThan(0)
  })
})
