import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  changeRepeat,
  createRepeat,
  endRepeat,
  listRepeats,
  restoreRepeat,
} from '@/app/_server/carry-repeats'
import { callOffCarry, listCarries } from '@/app/_server/carries'
import type { SiteMember } from '@/db/queries/members'
import { makeComingCarries } from '@/db/queries/repeat-carries'
import { newRepeatSchema, type Repeat } from '@/lib/carry/repeat'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursAfter, makeYard, valueOf, type Yard } from '../support/yard'

// Friday; British clocks go forward on Sunday the 29th.
const now = new Date('2026-03-27T10:00:00Z')

let database: TestDatabase
let yard: Yard
let maker: SiteMember
let lastNumber = 600

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now, { readHours: 24 })
  maker = await yard.member('maker')
})
afterAll(() => database.drop())

async function newRepeat(over: Record<string, unknown> = {}): Promise<Repeat> {
  const box = await yard.box(String((lastNumber += 1)))
  const input = newRepeatSchema.parse({
    ...{ pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open' },
    ...{ weekdays: [6, 7, 1], atTime: '09:00', stayMinutes: 60 },
    ...over,
  })
  return valueOf(await createRepeat(database.db, maker, input, now))
}

const carriesOf = async (repeat: Repeat, at = now, state: 'planned' | 'ended' = 'planned') => {
  const query = { state, sort: 'planned' as const, limit: 200 }
  const page = valueOf(await listCarries(database.db, maker, query, at))
  return page.items.filter((carry) => carry.repeat?.id === repeat.id)
}
const hoursOf = async (repeat: Repeat, at = now) => (await carriesOf(repeat, at)).map((one) => one.plannedAt)
const make = (at: Date) => makeComingCarries(database.db, maker, at)

describe('a plan that comes again', () => {
  it('is made for the coming days at once, at the same clock time over the change of the clocks', async () => {
    const repeat = await newRepeat()
    expect(repeat).toMatchObject({
      words: 'every Monday, Saturday and Sunday at 09:00',
      nextAt: '2026-03-28T09:00:00.000Z',
    })
    expect(await hoursOf(repeat)).toEqual([
      '2026-03-28T09:00:00.000Z',
      '2026-03-29T08:00:00.000Z',
      '2026-03-30T08:00:00.000Z',
    ])
  })

  it('is not made twice, by one worker after the other or by two at once', async () => {
    const repeat = await newRepeat()
    const before = await hoursOf(repeat)
    const day = hoursAfter(now, 26)
    await Promise.all([make(now), make(now)])
    expect(await hoursOf(repeat)).toEqual(before)
    await Promise.all([make(day), make(day), make(day)])
    const after = await hoursOf(repeat, now)
    expect(after).toEqual([...before, '2026-04-04T08:00:00.000Z'])
    expect(await make(day)).toBe(0)
  })

  it('leaves one that was called off alone', async () => {
    const repeat = await newRepeat()
    const [first, ...rest] = await carriesOf(repeat)
    valueOf(await callOffCarry(database.db, maker, first?.id ?? '', now))
    await make(hoursAfter(now, 1))
    expect(await hoursOf(repeat)).toEqual(rest.map((carry) => carry.plannedAt))
  })

  it('moves what is to come with its hour and its days', async () => {
    const repeat = await newRepeat()
    const change = { weekdays: [1, 2], atTime: '14:30', stayMinutes: 90 }
    const changed = valueOf(
      await changeRepeat(database.db, maker, repeat.id, repeat.version, change, hoursAfter(now, 1)),
    )
    expect(changed.words).toBe('every Monday and Tuesday at 14:30')
    const carries = await carriesOf(repeat)
    expect(carries.map((one) => [one.plannedAt, one.stayMinutes])).toEqual([
      ['2026-03-30T13:30:00.000Z', 90],
      ['2026-03-31T13:30:00.000Z', 90],
    ])
    const stale = await changeRepeat(database.db, maker, repeat.id, repeat.version, change, now)
    expect(stale).toMatchObject({ ok: false, error: { code: 'changed-meanwhile' } })
  })

  it('calls off what is to come when it is paused, and plans it again when it goes on', async () => {
    const repeat = await newRepeat()
    const [first] = await carriesOf(repeat)
    valueOf(await callOffCarry(database.db, maker, first?.id ?? '', hoursAfter(now, 1)))
    const paused = valueOf(
      await changeRepeat(
        database.db,
        maker,
        repeat.id,
        repeat.version,
        { isPaused: true },
        hoursAfter(now, 2),
      ),
    )
    expect(paused.nextAt).toBeNull()
    expect(await carriesOf(repeat)).toEqual([])
    await make(hoursAfter(now, 3))
    expect(await carriesOf(repeat)).toEqual([])
    valueOf(
      await changeRepeat(
        database.db,
        maker,
        repeat.id,
        paused.version,
        { isPaused: false },
        hoursAfter(now, 4),
      ),
    )
    // The one that somebody had called off stays so.
    expect(await hoursOf(repeat)).toEqual(['2026-03-29T08:00:00.000Z', '2026-03-30T08:00:00.000Z'])
  })

  it('ends, once, and its end can be taken back', async () => {
    const repeat = await newRepeat()
    const before = await hoursOf(repeat)
    valueOf(await endRepeat(database.db, maker, repeat.id, repeat.version, hoursAfter(now, 1)))
    expect(await carriesOf(repeat)).toEqual([])
    await make(hoursAfter(now, 2))
    expect(await carriesOf(repeat)).toEqual([])
    const listed = await listRepeats(database.db, maker, hoursAfter(now, 2))
    expect(listed.find((one) => one.id === repeat.id)?.endedAt).not.toBeNull()
    valueOf(await restoreRepeat(database.db, maker, repeat.id, hoursAfter(now, 3)))
    valueOf(await restoreRepeat(database.db, maker, repeat.id, hoursAfter(now, 3)))
    expect(await hoursOf(repeat)).toEqual(before)
    const later = await listRepeats(database.db, maker, hoursAfter(now, 80))
    expect(later.some((one) => one.id === repeat.id)).toBe(true)
  })

  it('is judged from two days before, and says so until then', async () => {
    const repeat = await newRepeat({ weekdays: [6, 2] })
    const [near, far] = await carriesOf(repeat)
    expect(near?.pieces[0]?.check?.kind).toBe('verdict')
    expect(far?.pieces[0]?.check).toBeNull()
    expect(far?.headline).toMatch(/will be judged from two days before/)
  })

  it('refuses pieces of another site and what is there already', async () => {
    const other = await makeYard(database.db, now, { readHours: 1 })
    const foreign = await other.box('1')
    const ask = (input: Record<string, unknown>) =>
      createRepeat(
        database.db,
        maker,
        newRepeatSchema.parse({
          ...{ toRoomId: yard.shop.code, cover: 'open', weekdays: [1], atTime: '09:00', stayMinutes: 60 },
          ...input,
        }),
        now,
      )
    expect(await ask({ pieceIds: [foreign.code] })).toMatchObject({ error: { code: 'not-found' } })
    const own = await yard.box(String((lastNumber += 1)))
    expect(await ask({ pieceIds: [own.code], toRoomId: yard.cupboard.code })).toMatchObject({
      error: { code: 'not-possible' },
    })
  })
})
