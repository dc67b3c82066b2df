import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createPiece } from '@/app/_server/piece-changes'
import { getPiece } from '@/app/_server/pieces'
import {
  createWeighing,
  getWeighings,
  restoreWeighing,
  undoWeighing,
  weighingsQuerySchema,
} from '@/app/_server/weighings'
import { newCode, takeIds } from '@/db/queries/counters'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { newWeighingSchema } from '@/lib/pieces/event'
import { type NewPiece, newPieceSchema } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-05-20T10:00:00Z')
const recordDays = 130
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let hand: SiteMember
let neighbour: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now, { readHours: 24 * recordDays })
  maker = await yard.member('maker')
  hand = await yard.member('hand')
  neighbour = await (await makeYard(database.db, now, { readHours: 1 })).member('owner')
})
afterAll(() => database.drop())

const daysBefore = (days: number) => hoursBefore(now, 24 * days)
const blank = async (number: string, more: Partial<NewPiece> = {}) => {
  const piece = newPieceSchema.parse({
    ...{ number, stage: 'roughed', wood: 'fraxinus-excelsior', bodyWallMm: 14 },
    ...{ jointDiameterMm: null, fitGrade: null, roomId: yard.cupboard.code },
    ...{ roughedOn: '2026-01-15', ...more },
  })
  return valueOf(await createPiece(database.db, maker, piece, daysBefore(recordDays - 1)))
}
const weigh = (piece: { id: string }, days: number, grams: number, more: object = {}, as = maker) =>
  createWeighing(
    database.db,
    as,
    piece.id,
    newWeighingSchema.parse({ grams, at: daysBefore(days).toISOString(), ...more }),
    now,
  )
const weighAll = async (piece: { id: string }, weights: readonly (readonly [number, number])[]) => {
  for (const [days, grams] of weights) valueOf(await weigh(piece, days, grams))
}
const ask = (piece: { id: string }, as = maker, query: object = {}) =>
  getWeighings(database.db, as, piece.id, weighingsQuerySchema.parse(query), now)
const restOf = async (piece: { id: string }) => {
  const { rest } = valueOf(await ask(piece))
  if (rest === null) throw new Error('no rest')
  return rest
}
/** An entry in the piece's record, as the page of its events makes it. */
async function happened(piece: { id: string }, kind: string, days: number, data: object = {}) {
  const { db } = database
  const row = await db
    .selectFrom('piece')
    .where('code', '=', piece.id)
    .select(['id', 'site_id'])
    .executeTakeFirstOrThrow()
  await db
    .insertInto('piece_event')
    .values({
      site_id: row.site_id,
      id: await takeIds(db, row.site_id, 'event'),
      code: newCode(),
      piece_id: row.id,
      kind,
      at: daysBefore(days),
      room_id: null,
      data: JSON.stringify(data),
      user_id: null,
      undone_at: null,
    })
    .execute()
}
const codes = (rest: { missing: readonly { code: string }[] }) => rest.missing.map(({ code }) => code)

describe('weighings of a piece', () => {
  it('are listed from the newest on, page by page, with who weighed', async () => {
    const piece = await blank('W1')
    await weighAll(piece, [
      [20, 402],
      [50, 404],
    ])
    valueOf(await weigh(piece, 1, 401, { note: 'after the rain' }, hand))
    const first = valueOf(await ask(piece, maker, { limit: '2' }))
    expect(first.items.map(({ grams }) => grams)).toEqual([401, 402])
    expect(first.items[0]).toMatchObject({ note: 'after the rain', isUndone: false, by: expect.any(String) })
    const second = valueOf(await ask(piece, maker, { limit: '2', cursor: first.nextCursor }))
    expect(second.items.map(({ grams }) => grams)).toEqual([404])
    expect(second.nextCursor).toBeNull()
    expect(first.completeTo).toBe(now.toISOString())
    expect(first.age).toBe(0)
  })

  it('are kept once however often the same one comes, and clash with another at that moment', async () => {
    const piece = await blank('W2')
    const first = valueOf(await weigh(piece, 3, 183.3))
    expect(valueOf(await weigh(piece, 3, 183.3))).toEqual(first)
    expect(await weigh(piece, 3, 190)).toMatchObject({ ok: false, error: { code: 'conflict' } })
    expect(valueOf(await ask(piece)).items).toHaveLength(1)
    const both = await Promise.all([1, 2].map(() => weigh(piece, 2, 183)))
    expect(both.every((one) => one.ok)).toBe(true)
    expect(valueOf(await ask(piece)).items).toHaveLength(2)
  })

  it('are undone and brought back, and count only while they are not undone', async () => {
    const piece = await blank('W3')
    await weighAll(piece, [
      [40, 183],
      [20, 182],
    ])
    const slip = valueOf(await weigh(piece, 2, 1830))
    expect((await restOf(piece)).weighings.grams).toEqual([183, 182, 1830])
    expect(valueOf(await undoWeighing(database.db, hand, piece.id, slip.id, now)).isUndone).toBe(true)
    valueOf(await undoWeighing(database.db, hand, piece.id, slip.id, now))
    expect((await restOf(piece)).weighings.grams).toEqual([183, 182])
    expect(valueOf(await ask(piece)).items.map(({ isUndone }) => isUndone)).toEqual([true, false, false])
    const right = valueOf(await weigh(piece, 2, 182))
    expect(await restoreWeighing(database.db, maker, piece.id, slip.id, now)).toMatchObject({
      ok: false,
      error: { code: 'conflict' },
    })
    valueOf(await undoWeighing(database.db, maker, piece.id, right.id, now))
    expect(valueOf(await restoreWeighing(database.db, maker, piece.id, slip.id, now)).isUndone).toBe(false)
  })

  it('are not of a time to come', async () => {
    const piece = await blank('W4')
    const input = newWeighingSchema.parse({ grams: 100, at: hoursAfter(now, 1).toISOString() })
    expect(await createWeighing(database.db, maker, piece.id, input, now)).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'at' }] },
    })
  })

  it('tell the step of the scale once, and it is the site’s from then on', async () => {
    const piece = await blank('W5')
    expect((await restOf(piece)).isStepAssumed).toBe(true)
    valueOf(await weigh(piece, 5, 183, { stepG: 0.5 }, hand))
    valueOf(await weigh(piece, 4, 183, { stepG: 0.1 }))
    const { db } = database
    const again = await findSiteMember(db, maker.siteCode, maker.userId)
    expect(again?.site).toMatchObject({ scaleStepG: 0.5, version: maker.site.version + 1 })
    expect(await restOf(piece)).toMatchObject({ stepG: 0.5, isStepAssumed: false })
    await db.updateTable('site').set({ scale_step_g: null }).where('id', '=', maker.siteId).execute()
  })

  it('are not there for another site, and closed of a piece that is private to its maker', async () => {
    const piece = await blank('W6', { isPrivate: true })
    const weighing = valueOf(await weigh(piece, 5, 183))
    const foreign = [
      await ask(piece, neighbour),
      await weigh(piece, 1, 180, {}, neighbour),
      await undoWeighing(database.db, neighbour, piece.id, weighing.id, now),
      await restoreWeighing(database.db, neighbour, piece.id, weighing.id, now),
    ]
    for (const one of foreign) expect(one).toMatchObject({ ok: false, error: { code: 'not-found' } })
    const closed = [await ask(piece, hand), await weigh(piece, 1, 180, {}, hand)]
    for (const one of closed) expect(one).toMatchObject({ ok: false, error: { code: 'not-yours-to-do' } })
    const other = await blank('W7')
    expect(await undoWeighing(database.db, maker, other.id, weighing.id, now)).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
    expect(valueOf(await ask(piece)).items).toHaveLength(1)
    expect(may('hand', 'pieces:weigh')).toBe(true)
    expect(may('onlooker', 'pieces:weigh')).toBe(false)
  })
})

/** What ash of 368 g oven-dry weighs at the cupboard's 8.5 % MC and a little more. */
const ovenDryG = 368
const atRest = [
  [100, 399],
  [70, 400],
  [40, 399],
  [5, 399],
] as const

describe('a resting piece', () => {
  it('is ready when it weighs the same, matches its keep room and has rested', async () => {
    const piece = await blank('R1')
    await happened(piece, 'oven-dry', 101, { ovenDryG })
    await weighAll(piece, atRest)
    const rest = await restOf(piece)
    expect(rest).toMatchObject({ state: 'ready', missing: [], readyFromAt: null })
    expect(rest.mc).toMatchObject({ from: 'oven-dry' })
    expect(rest.mc?.pct).toBeCloseTo(8.42, 1)
    expect(rest.target?.pct).toBeCloseTo(8.5, 0)
    expect(rest.target?.room).toBe('Landing cupboard')
    expect(rest.met).toHaveLength(3)
    const detail = valueOf(await getPiece(database.db, maker, piece.id, now))
    expect(detail.headline).toMatch(/R1 rests in Landing cupboard\. Ready: it weighs the same/)
  })

  it('looks ready and is not, when its weight holds and its moisture is off', async () => {
    const piece = await blank('R2')
    await happened(piece, 'oven-dry', 101, { ovenDryG: 355 })
    await weighAll(piece, atRest)
    const rest = await restOf(piece)
    expect(rest.state).toBe('not-ready')
    expect(codes(rest)).toEqual(['mc-off'])
    expect(rest.words).toMatch(
      /^Not ready: at about 12\.4.*damper than the middle of its keep room’s year\.$/,
    )
    expect(rest.next).toBe('Weigh it again on 14 June.')
  })

  it('names everything that is missing of a piece that came in lately', async () => {
    const piece = await blank('R3', { roughedOn: '2026-04-20' })
    await weighAll(piece, [
      [28, 440],
      [2, 431],
    ])
    expect(codes(await restOf(piece))).toEqual(
      expect.arrayContaining(['too-few-weights', 'rest-after-roughing']),
    )
    expect((await restOf(piece)).noForecast?.code).toBe('too-few-weights')
  })

  it('tells a range, and where the weight is heading, once the loss has slowed', async () => {
    const piece = await blank('R4')
    const at = [120, 106, 92, 78, 64, 50, 36, 22, 8] as const
    await weighAll(
      piece,
      at.map((days) => [days, Math.round(10 * (400 + 40 * Math.exp(-(120 - days) / 30))) / 10]),
    )
    const rest = await restOf(piece)
    expect(rest.forecast).toMatchObject({ direction: 'drying' })
    expect(rest.forecast?.finalG).toBeGreaterThan(397)
    expect(rest.forecast?.finalG).toBeLessThan(402)
    expect(rest.forecast?.timeConstantDays).toBeCloseTo(30, -1)
    expect(rest.forecastCurve?.lowG.length).toBe(rest.forecastCurve?.at.length)
    expect(rest.fit?.grams[0]).toBeGreaterThan(430)
  })

  it('begins another series where something adds or takes mass, and starts again when that is undone', async () => {
    const piece = await blank('R5')
    await happened(piece, 'oven-dry', 101, { ovenDryG })
    await weighAll(piece, atRest)
    await happened(piece, 'cut', 20)
    const rest = await restOf(piece)
    expect(rest.series).toEqual({
      openedBy: { kind: 'cut', at: daysBefore(20).toISOString() },
      weights: 1,
      earlierWeights: 3,
    })
    // The oven-dry mass was that of the piece before the cut.
    expect(rest.mc?.from).toBe('model')
    expect(codes(rest)).toContain('too-few-weights')
    await database.db.updateTable('piece_event').set({ undone_at: now }).where('kind', '=', 'cut').execute()
    expect((await restOf(piece)).state).toBe('ready')
  })

  it('is ready by weight alone where its maker says so, and is marked as such', async () => {
    const piece = await blank('R6', { isReadyByWeight: true })
    await happened(piece, 'oven-dry', 101, { ovenDryG: 355 })
    await weighAll(piece, atRest)
    expect(await restOf(piece)).toMatchObject({ state: 'ready-by-weight', missing: [] })
  })

  it('corrects the wood as followed by what it weighs', async () => {
    const piece = await blank('R7')
    const before = valueOf(await getPiece(database.db, maker, piece.id, now)).mc?.ringMcPct ?? NaN
    await happened(piece, 'oven-dry', 2, { ovenDryG: 350 })
    valueOf(await weigh(piece, 1, 400))
    const after = valueOf(await getPiece(database.db, maker, piece.id, now)).mc?.ringMcPct ?? NaN
    expect(after).toBeGreaterThan(before + 2)
  })
})

describe('weights through a damp spell', () => {
  it('are freed of what the room did', async () => {
    // A month of damp air in the shop, which is weighed through: its own middle is that of the whole record.
    const study = await makeYard(database.db, now, { readHours: 1 })
    const owner = await study.member('owner')
    const hours = Array.from({ length: 120 * 4 }, (_, n) => hoursBefore(now, 6 * n + 2))
    const isDamp = (at: Date) => at > daysBefore(40) && at < daysBefore(10)
    await database.db
      .updateTable('placement')
      .set({ from_at: daysBefore(125) })
      .where('site_id', '=', study.siteId)
      .execute()
    await study.cupboard.read({ temperatureC: 20, humidityPct: 45 }, ...hours.filter((at) => !isDamp(at)))
    await study.cupboard.read({ temperatureC: 20, humidityPct: 60 }, ...hours.filter(isDamp))
    const piece = valueOf(
      await createPiece(
        database.db,
        owner,
        newPieceSchema.parse({
          ...{ number: 'D1', stage: 'roughed', wood: 'fraxinus-excelsior', bodyWallMm: 12 },
          ...{ jointDiameterMm: null, fitGrade: null, roomId: study.cupboard.code },
        }),
        daysBefore(120),
      ),
    )
    for (const [days, grams] of [
      [90, 400],
      [60, 400],
      [12, 408],
    ] as const)
      valueOf(await weigh(piece, days, grams, {}, owner))
    const { rest } = valueOf(await ask(piece, owner))
    const corrected = rest?.weighings.correctedG ?? []
    expect(corrected[0]).toBeCloseTo(400, 0)
    expect(corrected[2]).toBeLessThan(403)
    expect(corrected[2]).toBeGreaterThan(396)
  })
})
