import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { checkCarry } from '@/app/_server/carry-check'
import { callOffCarry, changeCarry, createCarry, getCarry } from '@/app/_server/carries'
import { bringBack, changeCover, startCarry, undoBringBack } from '@/app/_server/carry-steps'
import { moveToRoom } from '@/app/_server/piece-changes'
import { getPiece } from '@/app/_server/pieces'
import type { SiteMember } from '@/db/queries/members'
import { listPlaces } from '@/db/queries/places'
import { newCarrySchema, type NewCarry } from '@/lib/carry/carry'
import { carryCheckAnswerSchema, carryCheckRequestSchema } from '@/lib/carry/carry-answer'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
const minutesAfter = (minutes: number) => new Date(now.getTime() + minutes * 60_000)

let database: TestDatabase
let yard: Yard
let maker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
})
afterAll(() => database.drop())

let lastNumber = 300
/** Each test has a box of its own, so that one that is left out does not get in the way of the next. */
const newBox = (facts?: Parameters<Yard['box']>[1]) => yard.box(String((lastNumber += 1)), facts)

const toShop = (pieceIds: string[], more: Partial<NewCarry> = {}): NewCarry =>
  newCarrySchema.parse({ pieceIds, toRoomId: yard.shop.code, cover: 'open', stayMinutes: 45, ...more })

const plan = async (pieceIds: string[], more: Partial<NewCarry> = {}) =>
  valueOf(
    await createCarry(
      database.db,
      maker,
      toShop(pieceIds, { plannedAt: hoursAfter(now, 4).toISOString(), ...more }),
      now,
    ),
  )

const goNow = async (pieceIds: string[], more: Partial<NewCarry> = {}) =>
  valueOf(
    await createCarry(
      database.db,
      maker,
      toShop(pieceIds, { startsNow: true, againstAdvice: true, ...more }),
      now,
    ),
  )

const roomOf = async (code: string, at: Date) =>
  valueOf(await getPiece(database.db, maker, code, at)).room?.name

describe('the check before a carry', () => {
  it('keeps a snug ash box short in a damp shop, and longer when bagged', async () => {
    const box = await newBox()
    const ask = (cover: 'open' | 'bagged', stayMinutes: number) =>
      checkCarry(
        database.db,
        maker,
        { pieceIds: [box.code], toRoomId: yard.shop.code, cover, stayMinutes },
        now,
      )
    const open = valueOf(await ask('open', 24 * 60))
    const bagged = valueOf(await ask('bagged', 24 * 60))
    expect(open.worst).not.toBe('fine')
    expect(open.room.emcPct).toBeGreaterThan(12)
    expect(open.forecastNote).toMatch(/No forecast yet/)
    const edge = (answer: typeof open) => {
      const check = answer.pieces[0]?.check
      return check?.kind === 'verdict' ? Date.parse(check.earlyAt ?? '9999-01-01') : NaN
    }
    expect(edge(bagged)).toBeGreaterThan(edge(open))
  })

  it('gives no verdict once the shop has gone quiet', async () => {
    const box = await newBox()
    const later = hoursAfter(now, 3)
    const answer = valueOf(
      await checkCarry(
        database.db,
        maker,
        { pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 30 },
        later,
      ),
    )
    expect(answer.worst).toBe('unknown')
    expect(answer.headline).toBe('No verdict: no reading from Shop since 10:00.')
    expect(answer.room.emcPct).toBeNull()
  })

  it('judges air as told like a room of that air, and never as a fresh reading', async () => {
    const box = await newBox()
    const common = { pieceIds: [box.code], cover: 'open' as const, stayMinutes: 24 * 60 }
    const shop = valueOf(await checkCarry(database.db, maker, { ...common, toRoomId: yard.shop.code }, now))
    const toAir = { name: 'the show', temperatureC: 18, humidityPct: 85 }
    const told = valueOf(await checkCarry(database.db, maker, { ...common, toAir }, now))
    expect(carryCheckAnswerSchema.parse(told)).toEqual(told)
    expect(told.room).toMatchObject({ id: null, name: 'the show', isTold: true })
    expect(told.room.emcPct).toBeGreaterThan(16)
    expect(told.forecastNote).toContain('as you typed it')
    expect(told.worst).not.toBe('fine')
    expect(shop.room).toMatchObject({ id: yard.shop.code, isTold: false })
    // The shop has gone quiet; what was typed does not depend on it.
    const later = valueOf(await checkCarry(database.db, maker, { ...common, toAir }, hoursAfter(now, 3)))
    expect(later.pieces[0]?.check.kind).toBe('verdict')
  })

  it('takes either a room or air as told, never both or neither, and no piece that is not there', async () => {
    const toAir = { name: 'the show', temperatureC: 18, humidityPct: 60 }
    const common = { pieceIds: ['2222222222'], cover: 'open', stayMinutes: 30 }
    expect(carryCheckRequestSchema.safeParse(common).success).toBe(false)
    expect(carryCheckRequestSchema.safeParse({ ...common, toAir, toRoomId: 'x' }).success).toBe(false)
    const asked = carryCheckRequestSchema.parse({ ...common, toAir })
    expect(await checkCarry(database.db, maker, asked, now)).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
  })

  it('tells others of a private piece how long it may stay, and no figure of its wood and sizes', async () => {
    const box = await newBox()
    const hand = await yard.member('hand')
    await database.db
      .updateTable('piece')
      .set({ is_private: true, owner_user_id: maker.userId })
      .where('site_id', '=', yard.siteId)
      .where('code', '=', box.code)
      .execute()
    const asked = { pieceIds: [box.code], toRoomId: yard.shop.code, cover: 'open' as const, stayMinutes: 480 }
    const seen = valueOf(await checkCarry(database.db, hand, asked, now)).pieces[0]
    const own = valueOf(await checkCarry(database.db, maker, asked, now)).pieces[0]
    if (seen?.check.kind !== 'verdict' || own?.check.kind !== 'verdict') throw new Error('no verdict')
    expect(seen.check).toMatchObject({ verdict: own.check.verdict, earlyAt: own.check.earlyAt })
    const { ringMcPct, cutMcPct, changePct, allowedMcPct, lossMm, allowanceMm, curve } = seen.check
    expect([ringMcPct, cutMcPct, changePct, allowedMcPct, lossMm, allowanceMm, curve]).toEqual(
      Array.from({ length: 7 }, () => null),
    )
    expect(seen).toMatchObject({ hangsOn: null, backHome: null })
    expect(own.check.curve?.at.length ?? 0).toBeGreaterThan(10)
  })

  it('tells how long to wait at home, what the time hangs on, the best cover and the order of a session', async () => {
    const tight = await newBox({ allowanceMm: 0.12 })
    const easy = await newBox({ allowanceMm: 0.2 })
    const answer = valueOf(
      await checkCarry(
        database.db,
        maker,
        { pieceIds: [easy.code, tight.code], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 480 },
        now,
      ),
    )
    expect(carryCheckAnswerSchema.parse(answer)).toEqual(answer)
    for (const piece of answer.pieces) {
      expect(piece.check).toMatchObject({ kind: 'verdict', verdict: 'keep-short' })
      expect(piece.backHome?.words).toMatch(/^Wait about/)
      expect(piece.hangsOn?.ask).toMatch(/hangs on most/)
      expect(piece.bestCover?.verdict).toBe('fine')
    }
    expect(answer.session?.order.map((piece) => piece.id)).toEqual([tight.code, easy.code])
    expect(answer.session?.words).toContain('the least forgiving')
  })

  it('refuses the whole for one piece that is not there', async () => {
    const box = await newBox()
    const answer = await checkCarry(
      database.db,
      maker,
      { pieceIds: [box.code, '2222222222'], toRoomId: yard.shop.code, cover: 'open', stayMinutes: 30 },
      now,
    )
    expect(answer).toMatchObject({ ok: false, error: { code: 'not-found' } })
  })
})

describe('going out', () => {
  it('asks again before going against the advice, and says why', async () => {
    const box = await newBox({ allowanceMm: 0.01 })
    const first = await createCarry(database.db, maker, toShop([box.code], { startsNow: true }), now)
    expect(first).toMatchObject({ ok: false, error: { code: 'advised-against' } })
    expect(first.ok ? '' : first.error.detail).toMatch(/^Leave \d+ where it is\. The air there, .*damper/)
    expect(await roomOf(box.code, now)).toBe('Landing cupboard')

    const second = await goNow([box.code])
    expect(second).toMatchObject({ state: 'out', againstAdvice: true })
    expect(await roomOf(box.code, now)).toBe('Shop')
  })

  it('does not call a carry against advice when there was none', async () => {
    const box = await newBox({ fitGrade: 'loose' })
    expect(await goNow([box.code], { stayMinutes: 30 })).toMatchObject({ state: 'out', againstAdvice: false })
  })

  it('goes out once, however often and by however many it is pressed', async () => {
    const box = await newBox()
    const carry = await plan([box.code])
    const presses = await Promise.all(
      [1, 2, 3].map(() => startCarry(database.db, maker, carry.id, { againstAdvice: true }, now)),
    )
    expect(presses.map((press) => valueOf(press).state)).toEqual(['out', 'out', 'out'])
    expect(await listPlaces(database.db, yard.siteId, box.id)).toHaveLength(2)
  })

  it('lets one of two carries of the same piece go, and names the piece to the other', async () => {
    const box = await newBox()
    const outcomes = await Promise.all(
      [1, 2].map(() =>
        createCarry(database.db, maker, toShop([box.code], { startsNow: true, againstAdvice: true }), now),
      ),
    )
    expect(outcomes.filter((outcome) => outcome.ok)).toHaveLength(1)
    const refused = outcomes.find((outcome) => !outcome.ok)
    expect(refused).toMatchObject({ error: { code: 'already-out', errors: [{ message: 'is out already' }] } })
  })

  it('logs what went out an hour ago as of then', async () => {
    const box = await newBox()
    const wentAt = hoursBefore(now, 1).toISOString()
    const carry = await goNow([box.code], { plannedAt: wentAt, againstAdvice: false })
    expect(carry.pieces[0]).toMatchObject({ outAt: wentAt })
    const [place] = await listPlaces(database.db, yard.siteId, box.id)
    expect(place?.fromAt.toISOString()).toBe(wentAt)
  })

  it('refuses a plan for a time that has passed', async () => {
    const box = await newBox()
    const plannedAt = hoursBefore(now, 1).toISOString()
    const outcome = await createCarry(database.db, maker, toShop([box.code], { plannedAt }), now)
    expect(outcome).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })
})

describe('while it is out', () => {
  it('tells by when to bring it in, and that it is overdue afterwards', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    const check = carry.pieces[0]?.check
    const earlyAt = check?.kind === 'verdict' ? check.earlyAt : null
    expect(earlyAt).not.toBeNull()
    expect(carry.headline).toMatch(/^Bring \d+ in by \d\d:\d\d\.$/)
    const after = new Date(Date.parse(earlyAt ?? '') + 60_000)
    await yard.shop.readSpan({ temperatureC: 8, humidityPct: 71 }, minutesAfter(10), after)
    const late = valueOf(await getCarry(database.db, maker, carry.id, after))
    expect(late.pieces[0]?.isOverdue).toBe(true)
    expect(late.headline).toMatch(/^Bring in \d+ now/)
  })

  it('counts a bag from the moment it is put on', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    const bagged = valueOf(
      await changeCover(database.db, maker, carry.id, { cover: 'bagged' }, minutesAfter(5)),
    )
    expect(bagged.pieces[0]?.cover).toBe('bagged')
    const places = await listPlaces(database.db, yard.siteId, box.id)
    expect(places.map((place) => place.cover)).toEqual(['bagged', 'open', 'closed'])
    expect(places[1]?.toAt).toEqual(minutesAfter(5))
  })

  it('takes a new stay, and nothing that has already happened', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    const longer = valueOf(
      await changeCarry(database.db, maker, carry.id, carry.version, { stayMinutes: 90 }, now),
    )
    expect(longer.stayMinutes).toBe(90)
    const stale = await changeCarry(database.db, maker, carry.id, carry.version, { stayMinutes: 20 }, now)
    expect(stale).toMatchObject({ ok: false, error: { code: 'changed-meanwhile', version: longer.version } })
    const moved = await changeCarry(database.db, maker, carry.id, longer.version, { cover: 'tub' }, now)
    expect(moved).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })
})

describe('coming back', () => {
  it('puts each piece back where it came from, and ends with the last', async () => {
    const [a, b] = [await newBox(), await newBox()]
    const carry = await goNow([a.code, b.code])
    const half = valueOf(
      await bringBack(database.db, maker, carry.id, { pieceIds: [a.code] }, minutesAfter(10)),
    )
    expect(half.state).toBe('out')
    expect(await roomOf(a.code, minutesAfter(11))).toBe('Landing cupboard')
    expect(await roomOf(b.code, minutesAfter(11))).toBe('Shop')
    const presses = await Promise.all(
      [1, 2].map(() => bringBack(database.db, maker, carry.id, {}, minutesAfter(20))),
    )
    expect(presses.map((press) => valueOf(press).state)).toEqual(['back', 'back'])
    expect(await listPlaces(database.db, yard.siteId, b.id)).toHaveLength(3)
  })

  it('can be taken back for ten minutes, and the history is then as if it had not been', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    const before = await listPlaces(database.db, yard.siteId, box.id)
    const back = valueOf(await bringBack(database.db, maker, carry.id, {}, minutesAfter(10)))
    expect(back.canUndo).toBe(true)
    const undone = valueOf(await undoBringBack(database.db, maker, carry.id, minutesAfter(12)))
    expect(undone).toMatchObject({ state: 'out', endedAt: null })
    expect(await listPlaces(database.db, yard.siteId, box.id)).toEqual(before)

    await bringBack(database.db, maker, carry.id, {}, minutesAfter(20))
    const tooLate = await undoBringBack(database.db, maker, carry.id, minutesAfter(31))
    expect(tooLate).toMatchObject({ ok: false, error: { code: 'not-possible' } })
    expect(await roomOf(box.code, minutesAfter(31))).toBe('Landing cupboard')
  })

  it('is not taken back over a move that was made since', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    await bringBack(database.db, maker, carry.id, {}, minutesAfter(10))
    valueOf(await moveToRoom(database.db, maker, box.code, { roomId: yard.shop.code }, minutesAfter(12)))
    const undone = await undoBringBack(database.db, maker, carry.id, minutesAfter(13))
    expect(undone).toMatchObject({ ok: false, error: { code: 'not-possible' } })
  })

  it('is also done by moving the piece to another room', async () => {
    const box = await newBox()
    const carry = await goNow([box.code])
    valueOf(await moveToRoom(database.db, maker, box.code, { roomId: yard.cupboard.code }, minutesAfter(10)))
    expect(valueOf(await getCarry(database.db, maker, carry.id, minutesAfter(11))).state).toBe('back')
  })
})

describe('a plan', () => {
  it('is called off once, and not when it is out', async () => {
    const box = await newBox()
    const carry = await plan([box.code])
    for (const _ of [1, 2])
      expect(valueOf(await callOffCarry(database.db, maker, carry.id, now)).state).toBe('called-off')
    const out = await goNow([box.code])
    expect(await callOffCarry(database.db, maker, out.id, now)).toMatchObject({
      ok: false,
      error: { code: 'not-possible' },
    })
  })

  it('can be given other pieces, another hour and another cover', async () => {
    const [a, b] = [await newBox(), await newBox()]
    const carry = await plan([a.code])
    const changed = valueOf(
      await changeCarry(
        database.db,
        maker,
        carry.id,
        carry.version,
        { pieceIds: [b.code], cover: 'bagged', plannedAt: hoursAfter(now, 6).toISOString() },
        now,
      ),
    )
    expect(changed.pieces.map((piece) => [piece.id, piece.cover])).toEqual([[b.code, 'bagged']])
    expect(changed.plannedAt).toBe(hoursAfter(now, 6).toISOString())
  })
})
