import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { bringBack } from '@/app/_server/carry-steps'
import { answerNothingElse, closeDay, getLockUp } from '@/app/_server/lock-up'
import type { SiteMember } from '@/db/queries/members'
import { newCarrySchema } from '@/lib/carry/carry'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { shopAir } from '../support/seed-rooms'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T18:05:00Z')
const minutesAfter = (minutes: number) => new Date(now.getTime() + minutes * 60_000)

let database: TestDatabase
let yard: Yard
let maker: SiteMember
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

async function newYard(): Promise<void> {
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
}
const takeOut = async (number: string, since: Date) => {
  const box = await yard.box(number)
  const carry = await createCarry(
    database.db,
    maker,
    newCarrySchema.parse({
      ...{ pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 60 },
      ...{ startsNow: true, plannedAt: since.toISOString() },
    }),
    now,
  )
  return { box, carry: valueOf(carry) }
}

describe('lock-up', () => {
  it('asks nothing on a day on which the shop was not used', async () => {
    await newYard()
    const lockUp = await getLockUp(database.db, maker, now)
    expect(lockUp).toMatchObject({ dayOn: '2026-02-10', out: [], used: null, closed: null, noticeId: null })
    expect(lockUp.lockUpAt).toBe('2026-02-10T18:00:00.000Z')
    expect(lockUp.lastCallAt).toBe('2026-02-10T21:30:00.000Z')
    expect(
      valueOf(await closeDay(database.db, maker, { isClosed: true, stayOutIds: [] }, now)).closed,
    ).not.toBeNull()
  })

  it('asks for what is not logged on a day on which the shop was warmed', async () => {
    await newYard()
    // Between the readings that are there already, so that each hour's mean is half way.
    const from = new Date(hoursBefore(now, 8).getTime() + 300_000)
    await yard.shop.readSpan({ ...shopAir, temperatureC: 22 }, from, hoursBefore(now, 5))
    expect((await getLockUp(database.db, maker, now)).used).toBe('warmed')
    // Yesterday's fire says nothing of today.
    expect((await getLockUp(database.db, maker, hoursAfter(now, 24))).used).toBeNull()
  })

  it('closes the day once everything is answered, and by the first who does', async () => {
    await newYard()
    const { box, carry } = await takeOut('501', hoursBefore(now, 6))
    const close = (stayOutIds: string[], at = now) =>
      closeDay(database.db, maker, { isClosed: true, stayOutIds }, at)
    const first = await getLockUp(database.db, maker, now)
    expect(first.used).toBe('carried')
    expect(first.out.map(({ id }) => id)).toEqual([carry.id])
    expect(await close([])).toMatchObject({ ok: false, error: { detail: '501 first: is it in?' } })
    valueOf(await bringBack(database.db, maker, carry.id, { pieceIds: [box.code] }, now))
    expect(await close([])).toMatchObject({ ok: false, error: { code: 'not-possible' } })
    const answered = await answerNothingElse(database.db, maker, true, now)
    expect(answered.nothingElse).toMatchObject({ at: now.toISOString(), by: 'maker' })
    valueOf(await close([]))
    const again = valueOf(await close([], minutesAfter(5)))
    expect(again.closed).toMatchObject({ at: now.toISOString(), by: 'maker' })
    // After midnight it still is that day; the next evening asks anew.
    expect((await getLockUp(database.db, maker, hoursAfter(now, 8))).closed).not.toBeNull()
    expect((await getLockUp(database.db, maker, hoursAfter(now, 24))).closed).toBeNull()
  })

  it('lets a piece stay out that was named, and takes answers back', async () => {
    await newYard()
    const { box } = await takeOut('502', hoursBefore(now, 1))
    await answerNothingElse(database.db, maker, true, now)
    const closed = valueOf(
      await closeDay(database.db, maker, { isClosed: true, stayOutIds: [box.code] }, now),
    )
    expect(closed.closed).not.toBeNull()
    const opened = valueOf(await closeDay(database.db, maker, { isClosed: false, stayOutIds: [] }, now))
    expect(opened.closed).toBeNull()
    expect((await answerNothingElse(database.db, maker, false, now)).nothingElse).toBeNull()
  })
})
