import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { skipAsk } from '@/app/_server/carry-ask'
import { bringBack } from '@/app/_server/carry-steps'
import { getForgotten } from '@/app/_server/forgotten'
import { getNow } from '@/app/_server/now'
import { createOutcome, setOutcomeUndone } from '@/app/_server/outcomes'
import { createPieceEvent } from '@/app/_server/piece-events'
import { getTrackRecord } from '@/app/_server/track-record'
import type { SiteMember } from '@/db/queries/members'
import { newCarrySchema } from '@/lib/carry/carry'
import { newEventSchema } from '@/lib/pieces/event'
import { newOutcomeSchema, type Turned } from '@/lib/pieces/outcome'
import type { NewPiece } from '@/lib/pieces/piece'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')

let database: TestDatabase
let yard: Yard
let owner: SiteMember
let hand: SiteMember
let stranger: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  owner = await yard.member('owner')
  hand = await yard.member('hand')
  stranger = await (await makeYard(database.db, now)).member('owner')
})
afterAll(() => database.drop())

/** A box cut in the cupboard that went to the damp shop so many hours ago, and came back after some of them or not yet. */
async function carried(number: string, goneHours: number, outHours?: number, facts: Partial<NewPiece> = {}) {
  const box = await yard.box(number, { fitGrade: 'easy', ...facts })
  const fit = newEventSchema.parse({ kind: 'final-fit', fitGrade: 'easy' })
  valueOf(await createPieceEvent(database.db, owner, box.code, fit, hoursBefore(now, goneHours + 1)))
  const asked = newCarrySchema.parse({
    ...{ pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open' },
    ...{ stayMinutes: 60, startsNow: true, againstAdvice: true },
  })
  const carry = valueOf(await createCarry(database.db, owner, asked, hoursBefore(now, goneHours)))
  if (outHours !== undefined)
    valueOf(await bringBack(database.db, owner, carry.id, {}, hoursBefore(now, goneHours - outHours)))
  return { ...box, carryId: carry.id }
}

const turned = async (box: { code: string; carryId: string }, how: Turned) =>
  valueOf(
    await createOutcome(
      database.db,
      owner,
      box.code,
      newOutcomeSchema.parse({ turned: how, carryId: box.carryId }),
      now,
    ),
  )

describe('a box that was forgotten', () => {
  const forgotten = async (carryId: string, as = owner) =>
    valueOf(await getForgotten(database.db, as, carryId, now)).items

  it('is told how bad it is, worse after a night than after two hours, and is to come in', async () => {
    const short = await carried('501', 2)
    const night = await carried('502', 16)
    const [a] = await forgotten(short.carryId)
    const [b] = await forgotten(night.carryId)
    expect(a?.usedNow?.middle).toBeGreaterThan(0)
    expect(b?.usedNow?.middle).toBeGreaterThan(a?.usedNow?.middle ?? Infinity)
    expect(b?.usedNow?.low).toBeLessThan(b?.usedNow?.high ?? 0)
    expect(b?.usedMost?.middle).toBeGreaterThanOrEqual(b?.usedNow?.middle ?? Infinity)
    expect(b).toMatchObject({ isOut: true, number: '502' })
    expect(b?.tonight[0]).toMatch(/^Bring it in now\./)
    expect(b?.tryIt).toMatch(/four quarters, with no force/)
  })

  it('that is in again is not told to come in', async () => {
    const box = await carried('503', 16, 14)
    const [told] = await forgotten(box.carryId)
    expect(told?.isOut).toBe(false)
    expect(told?.tonight.join(' ')).not.toMatch(/Bring it in/)
    expect(told?.usedNow?.middle).toBeGreaterThan(0)
  })

  it('shows no figure of a piece that is private to another, and is not there for another site', async () => {
    const box = await carried('504', 5, undefined, { isPrivate: true })
    const [told] = await forgotten(box.carryId, hand)
    expect(told).toMatchObject({ usedNow: null, usedMost: null, tryAt: null })
    expect(await getForgotten(database.db, stranger, box.carryId, now)).toMatchObject({ ok: false })
  })
})

describe('how good the verdicts were', () => {
  it('is told from lids that were tried after their carries, undone ones left out', async () => {
    const before = await getTrackRecord(database.db, owner)
    const bound = await carried('511', 8, 6)
    const held = await carried('512', 8, 0.2)
    await turned(bound, 'binds')
    const undone = await turned(held, 'as-before')
    const record = await getTrackRecord(database.db, owner)
    expect(record.points).toHaveLength(before.points.length + 2)
    const point = record.points.find(({ number }) => number === '511')
    expect(point).toMatchObject({ turned: 'binds', carryId: bound.carryId, isAgainstAdvice: false })
    expect(point?.usedSlow).toBeLessThan(point?.usedFast ?? 0)
    // It stayed far past the time told, so nothing was promised any more.
    expect(record.late.binds).toBe(before.late.binds + 1)
    expect(record.kept.binds).toBe(before.kept.binds)
    const asked = { piece: held.code, outcome: undone.id }
    valueOf(await setOutcomeUndone(database.db, owner, asked, true, now))
    const after = await getTrackRecord(database.db, owner)
    expect(after.points.map(({ number }) => number)).not.toContain('512')
  })

  it('leaves out pieces that are private to another, and says nothing to another site', async () => {
    const box = await carried('513', 8, 3, { isPrivate: true })
    await turned(box, 'tighter')
    const numbers = async (as: SiteMember) =>
      (await getTrackRecord(database.db, as)).points.map(({ number }) => number)
    expect(await numbers(owner)).toContain('513')
    expect(await numbers(hand)).not.toContain('513')
    expect(await numbers(stranger)).toEqual([])
  })
})

describe('the question how a lid turned', () => {
  it('once skipped is skipped for everybody and on every screen, however often it is pressed', async () => {
    const box = await carried('521', 2, 1.95)
    const asked = async (as: SiteMember) =>
      (await getNow(database.db, as, now)).justBack.find(({ number }) => number === '521')?.isAskSkipped
    expect(await asked(hand)).toBe(false)
    const press = () => skipAsk(database.db, owner, box.carryId, box.code, now)
    const first = valueOf(await press())
    const again = valueOf(await press())
    expect(first.pieces[0]?.isAskSkipped).toBe(true)
    expect(again.version).toBe(first.version)
    expect(await asked(hand)).toBe(true)
  })

  it('is not to be skipped for a piece that was not on the carry, nor from another site', async () => {
    const box = await carried('522', 2, 1)
    const other = await yard.box('523')
    const skip = (as: SiteMember, piece: string) => skipAsk(database.db, as, box.carryId, piece, now)
    expect(await skip(owner, other.code)).toMatchObject({ ok: false })
    expect(await skip(stranger, box.code)).toMatchObject({ ok: false })
  })
})
