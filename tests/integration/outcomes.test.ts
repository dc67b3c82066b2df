import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { checkCarry } from '@/app/_server/carry-check'
import { createCarry } from '@/app/_server/carries'
import { bringBack } from '@/app/_server/carry-steps'
import { createOutcome, getOutcomes, setOutcomeUndone } from '@/app/_server/outcomes'
import { createPieceEvent } from '@/app/_server/piece-events'
import type { SiteMember } from '@/db/queries/members'
import { findPaces } from '@/db/queries/moisture'
import { PACE_LOG_SPREAD } from '@/lib/doubt/causes'
import { newCarrySchema } from '@/lib/carry/carry'
import { newEventSchema } from '@/lib/pieces/event'
import { type NewOutcome, newOutcomeSchema } from '@/lib/pieces/outcome'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let hand: SiteMember
let stranger: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('owner')
  hand = await yard.member('hand')
  stranger = await (await makeYard(database.db, now)).member('owner')
})
afterAll(() => database.drop())

/** A box cut in the cupboard, that was out in the shop from 8 hours ago for a while. */
async function carried(number: string, hoursOut: number) {
  const box = await yard.box(number, { fitGrade: 'easy' })
  const cutAt = hoursBefore(now, 9)
  const fit = newEventSchema.parse({ kind: 'final-fit', fitGrade: 'easy' })
  valueOf(await createPieceEvent(database.db, maker, box.code, fit, cutAt))
  const out = newCarrySchema.parse({
    ...{ pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open' },
    ...{ stayMinutes: 60, startsNow: true, againstAdvice: true },
  })
  const carry = valueOf(await createCarry(database.db, maker, out, hoursBefore(now, 8)))
  if (hoursOut < 8) valueOf(await bringBack(database.db, maker, carry.id, {}, hoursBefore(now, 8 - hoursOut)))
  return { ...box, carryId: carry.id }
}

const tell = (code: string, outcome: Partial<NewOutcome> & { turned: NewOutcome['turned'] }, as = maker) =>
  createOutcome(database.db, as, code, newOutcomeSchema.parse(outcome), now)
const rowOf = async (pieceId: number) =>
  database.db
    .selectFrom('outcome')
    .where('site_id', '=', yard.siteId)
    .where('piece_id', '=', pieceId)
    .select(['used_slow', 'used_middle', 'used_fast', 'movement_class'])
    .executeTakeFirstOrThrow()

describe('how a lid turned', () => {
  it('is stored beside what the model had for that carry at its end', async () => {
    const box = await carried('A1', 3)
    const outcome = valueOf(await tell(box.code, { turned: 'tighter', carryId: box.carryId }, hand))
    expect(outcome).toMatchObject({ turned: 'tighter', carryId: box.carryId, isUndone: false })
    const row = await rowOf(box.id)
    expect(row.used_slow).toBeGreaterThan(0)
    expect(row.used_slow).toBeLessThan(row.used_middle ?? 0)
    expect(row.used_middle).toBeLessThan(row.used_fast ?? 0)
    const longer = await carried('A2', 6)
    valueOf(await tell(longer.code, { turned: 'binds', carryId: longer.carryId }))
    expect((await rowOf(longer.id)).used_middle).toBeGreaterThan(row.used_middle ?? Infinity)
  })

  it('is told once for a carry, and anew after that was undone', async () => {
    const box = await carried('A3', 2)
    const first = valueOf(await tell(box.code, { turned: 'tighter', carryId: box.carryId }))
    const again = { turned: 'as-before', carryId: box.carryId } as const
    expect(await tell(box.code, again)).toMatchObject({ ok: false, error: { code: 'already-done' } })
    const undo = (isUndone: boolean) =>
      setOutcomeUndone(database.db, maker, { piece: box.code, outcome: first.id }, isUndone, now)
    valueOf(await undo(true))
    valueOf(await tell(box.code, again))
    expect(await undo(false)).toMatchObject({ ok: false, error: { code: 'already-done' } })
    const { items } = valueOf(await getOutcomes(database.db, maker, box.code))
    expect(items.map(({ turned, isUndone }) => [turned, isUndone]).toSorted()).toEqual([
      ['as-before', false],
      ['tighter', true],
    ])
  })

  it('is not told of a carry that it has not come back from, nor of one that it was not on', async () => {
    const out = await carried('A4', 8)
    expect(await tell(out.code, { turned: 'binds', carryId: out.carryId })).toMatchObject({
      ok: false,
      error: { code: 'not-possible', errors: [{ path: 'carryId' }] },
    })
    const other = await carried('A5', 1)
    expect(await tell(out.code, { turned: 'binds', carryId: other.carryId })).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
  })

  it('at rest says nothing of the pace', async () => {
    const box = await yard.box('A6')
    const before = await findPaces(database.db, yard.siteId)
    valueOf(await tell(box.code, { turned: 'binds' }))
    expect(await rowOf(box.id)).toMatchObject({ used_slow: null, used_fast: null })
    expect(await findPaces(database.db, yard.siteId)).toEqual(before)
  })

  it('is not to be told or seen from another site', async () => {
    const box = await carried('A7', 1)
    const outcome = valueOf(await tell(box.code, { turned: 'looser', carryId: box.carryId }))
    const gone = { ok: false, error: { code: 'not-found' } }
    expect(await tell(box.code, { turned: 'binds' }, stranger)).toMatchObject(gone)
    expect(await getOutcomes(database.db, stranger, box.code)).toMatchObject(gone)
    const asked = { piece: box.code, outcome: outcome.id }
    expect(await setOutcomeUndone(database.db, stranger, asked, true, now)).toMatchObject(gone)
  })

  it('is not told of a blank, which has no lid', async () => {
    const blank = await yard.box('A8', { stage: 'blank' })
    expect(await tell(blank.code, { turned: 'binds' })).toMatchObject({
      ok: false,
      error: { code: 'not-possible' },
    })
  })
})

describe('what a site has learned', () => {
  it('from lids that bind early: its wood is quicker, better known, and pieces are to be back sooner; undone, it is forgotten', async () => {
    const own = await makeYard(database.db, now)
    ;[yard, maker] = [own, await own.member('owner')]
    const box = await yard.box('L1', { fitGrade: 'easy' })
    const fit = newEventSchema.parse({ kind: 'final-fit', fitGrade: 'easy' })
    valueOf(await createPieceEvent(database.db, maker, box.code, fit, now))
    const early = async () => {
      const answer = valueOf(
        await checkCarry(
          database.db,
          maker,
          { pieceIds: [box.code], toRoomId: yard.shop.code, stayMinutes: 60, cover: 'open' },
          now,
        ),
      )
      const check = answer.pieces[0]?.check
      if (check?.kind !== 'verdict' || check.earlyAt === null) throw new Error('no early edge')
      return new Date(check.earlyAt).getTime()
    }
    const before = await early()
    expect(valueOf(await getOutcomes(database.db, maker, box.code)).learned).toBeNull()

    const told: { piece: string; outcome: string }[] = []
    for (let n = 0; n < 6; n += 1) {
      const one = await carried(`L2-${String(n)}`, 2)
      const outcome = valueOf(await tell(one.code, { turned: 'binds', carryId: one.carryId }))
      told.push({ piece: one.code, outcome: outcome.id })
    }
    const { learned } = valueOf(await getOutcomes(database.db, maker, box.code))
    expect(learned).toMatchObject({ outcomes: 6 })
    expect(learned?.factor).toBeGreaterThan(1.1)
    const [pace] = (await findPaces(database.db, yard.siteId)).values()
    expect(pace?.logSpread).toBeLessThan(PACE_LOG_SPREAD)
    expect(await early()).toBeLessThan(before)

    for (const asked of told) valueOf(await setOutcomeUndone(database.db, maker, asked, true, now))
    expect(valueOf(await getOutcomes(database.db, maker, box.code)).learned).toBeNull()
    expect(await early()).toBe(before)
  })
})
