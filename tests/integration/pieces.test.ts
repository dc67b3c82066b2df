import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createCarry } from '@/app/_server/carries'
import { archivePiece, changePiece, createPiece, moveToRoom, restorePiece } from '@/app/_server/piece-changes'
import { getPiece, listPieces, piecesQuerySchema } from '@/app/_server/pieces'
import type { SiteMember } from '@/db/queries/members'
import { newCarrySchema } from '@/lib/carry/carry'
import { type NewPiece, newPieceSchema } from '@/lib/pieces/piece'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:00:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember
let other: SiteMember
let onlooker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
  other = await yard.member('maker')
  onlooker = await yard.member('onlooker')
})
afterAll(() => database.drop())

const facts = (number: string, more: Partial<NewPiece> = {}): NewPiece =>
  newPieceSchema.parse({
    number,
    wood: 'fraxinus-excelsior',
    jointDiameterMm: 62,
    fitGrade: 'snug',
    roomId: yard.cupboard.code,
    ...more,
  })
const make = async (number: string, more?: Partial<NewPiece>) =>
  valueOf(await createPiece(database.db, maker, facts(number, more), now))
const list = async (query: Record<string, string>, as = maker) =>
  valueOf(await listPieces(database.db, as, piecesQuerySchema.parse(query)))
const numbers = async (query: Record<string, string>, as = maker) =>
  (await list(query, as)).items.map((piece) => piece.number)

describe('a piece', () => {
  it('is made of five answers, and names what it assumed', async () => {
    const piece = await make('A1')
    expect(piece.title).toBe('Ash box')
    expect(piece.room?.name).toBe('Landing cupboard')
    expect(piece.assumed).toEqual(
      expect.arrayContaining([
        'spigot 6 mm long',
        'kept to match Landing cupboard',
        'joint cut at its present moisture',
      ]),
    )
    expect(piece.headline).toMatch(/^Ash box A1 keeps its fit, at about 8\.\d\s%\sMC in Landing cupboard\.$/)
    expect(piece.dust[0]?.text).toMatch(/All wood dust is harmful/)
  })

  it('has a number of its own, whatever its letters, for two at once as well', async () => {
    await make('b2')
    const again = await createPiece(database.db, maker, facts('B2'), now)
    expect(again).toMatchObject({ ok: false, error: { code: 'name-taken', errors: [{ path: 'number' }] } })
    const both = await Promise.all([1, 2].map(() => createPiece(database.db, maker, facts('B3'), now)))
    expect(both.filter((one) => one.ok)).toHaveLength(1)
  })

  it('is not made of a wood that nobody knows', async () => {
    const outcome = await createPiece(database.db, maker, facts('C1', { wood: 'lignum-fictum' }), now)
    expect(outcome).toMatchObject({ ok: false, error: { code: 'not-possible', errors: [{ path: 'wood' }] } })
  })

  it('is changed by one writer at a time', async () => {
    const piece = await make('D1')
    const first = valueOf(
      await changePiece(database.db, maker, piece.id, piece.version, { finish: 'oil' }, now),
    )
    expect(first).toMatchObject({ finish: 'oil', version: piece.version + 1 })
    expect(first.cautions.join(' ')).toMatch(/Oily rags/)
    const second = await changePiece(database.db, other, piece.id, piece.version, { finish: 'wax' }, now)
    expect(second).toMatchObject({
      ok: false,
      error: { code: 'changed-meanwhile', current: { finish: 'oil' }, version: first.version },
    })
  })

  it('is put away and brought out again, unless its number has been taken meanwhile', async () => {
    const piece = await make('E1')
    valueOf(await archivePiece(database.db, maker, piece.id, piece.version, now))
    expect(await numbers({ q: 'E1' })).toEqual([])
    const restored = valueOf(await restorePiece(database.db, maker, piece.id, now))
    expect(await numbers({ q: 'E1' })).toEqual(['E1'])
    valueOf(await archivePiece(database.db, maker, piece.id, restored.version, now))
    await make('E1')
    expect(await restorePiece(database.db, maker, piece.id, now)).toMatchObject({
      ok: false,
      error: { code: 'name-taken' },
    })
  })

  it('is not put away while it is planned to go, or out', async () => {
    const piece = await make('F1')
    const carry = (more: object) =>
      newCarrySchema.parse({
        pieceIds: [piece.id],
        toRoomId: yard.shop.code,
        cover: 'open',
        stayMinutes: 30,
        againstAdvice: true,
        ...more,
      })
    const away = () => archivePiece(database.db, maker, piece.id, piece.version, now)
    valueOf(
      await createCarry(database.db, maker, carry({ plannedAt: hoursAfter(now, 2).toISOString() }), now),
    )
    expect(await away()).toMatchObject({ ok: false, error: { code: 'conflict' } })
    valueOf(await createCarry(database.db, maker, carry({ startsNow: true }), now))
    expect(await away()).toMatchObject({ ok: false, error: { code: 'already-out' } })
  })

  it('moves to another room as of a time that is past, and not before it came to where it is', async () => {
    const piece = await make('G1')
    const soon = hoursAfter(now, 2)
    const moved = valueOf(
      await moveToRoom(
        database.db,
        maker,
        piece.id,
        { roomId: yard.shop.code, at: hoursAfter(now, 1).toISOString() },
        soon,
      ),
    )
    expect(moved.places.map((place) => [place.room.name, place.fromAt])).toEqual([
      ['Shop', hoursAfter(now, 1).toISOString()],
      ['Landing cupboard', now.toISOString()],
    ])
    const before = await moveToRoom(
      database.db,
      maker,
      piece.id,
      { roomId: yard.cupboard.code, at: hoursBefore(now, 1).toISOString() },
      soon,
    )
    expect(before).toMatchObject({ ok: false, error: { code: 'not-possible', errors: [{ path: 'at' }] } })
  })
})

describe('a private piece', () => {
  it('shows others its number, its room and its time out, and nothing else', async () => {
    const piece = await make('P1', { isPrivate: true, note: 'for a birthday', wood: 'taxus-baccata' })
    const seen = valueOf(await getPiece(database.db, other, piece.id, now))
    expect(seen).toMatchObject({ number: 'P1', title: 'Private piece', isHidden: true, isYours: false })
    expect(seen.room?.name).toBe('Landing cupboard')
    expect(JSON.stringify(seen)).not.toMatch(/taxus|yew|birthday|62|snug/i)
    expect(valueOf(await getPiece(database.db, maker, piece.id, now)).wood).toBe('taxus-baccata')
    expect(await changePiece(database.db, other, piece.id, piece.version, { note: '' }, now)).toMatchObject({
      ok: false,
      error: { code: 'not-yours-to-do' },
    })
  })

  it('gives nothing away by being searched for, filtered or sorted', async () => {
    await make('P2', { isPrivate: true, wood: 'taxus-baccata', stage: 'blank' })
    expect(await numbers({ q: 'yew' })).toContain('P2')
    expect(await numbers({ q: 'yew' }, other)).not.toContain('P2')
    expect(await numbers({ stage: 'blank' })).toContain('P2')
    expect(await numbers({ stage: 'blank' }, other)).not.toContain('P2')
    expect(await numbers({ q: 'P2' }, other)).toEqual(['P2'])
    // Hidden woods stand together at one end, not among the woods that begin like them.
    const sorted = await numbers({ sort: 'wood' }, other)
    expect(sorted.slice(0, 2).toSorted()).toEqual(['P1', 'P2'])
  })

  it('can be made private by its own maker only', async () => {
    const piece = await make('P3')
    const outcome = await changePiece(database.db, other, piece.id, piece.version, { isPrivate: true }, now)
    expect(outcome).toMatchObject({ ok: false, error: { code: 'not-yours-to-do' } })
  })
})

describe('an onlooker', () => {
  it('sees shared pieces, without where they are and without their notes', async () => {
    const piece = await make('S1', { isShared: true, note: 'sold to a friend' })
    expect(await numbers({}, onlooker)).toEqual(['S1'])
    const seen = valueOf(await getPiece(database.db, onlooker, piece.id, now))
    expect(seen).toMatchObject({ room: null, note: '', places: [], mc: null, since: null })
    const unshared = await make('S2')
    expect(await getPiece(database.db, onlooker, unshared.id, now)).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
  })
})

describe('the list', () => {
  it('takes every sign of a search as itself', async () => {
    await make('50-5')
    expect(await numbers({ q: '50%' })).toEqual([])
    expect(await numbers({ q: '5_-' })).toEqual([])
    expect(await numbers({ q: '\\' })).toEqual([])
    expect(await numbers({ q: "'; drop table piece; --" })).toEqual([])
    expect(await numbers({ q: '50-' })).toEqual(['50-5'])
  })

  it('gives each piece once, whatever the order and however it is paged', async () => {
    for (const number of ['9', '10', '100', '11']) await make(number)
    const whole = await numbers({})
    const digits = whole.filter((number) => /^\d+$/.test(number))
    expect(digits).toEqual(['9', '10', '11', '100'])
    for (const sort of piecesQuerySchema.shape.sort.unwrap().options) {
      const paged: string[] = []
      let cursor: string | undefined
      do {
        const page = await list({ sort, limit: '3', ...(cursor === undefined ? {} : { cursor }) })
        paged.push(...page.items.map((piece) => piece.number))
        cursor = page.nextCursor ?? undefined
      } while (cursor !== undefined)
      expect(paged.toSorted(), sort).toEqual(whole.toSorted())
      expect(paged, sort).toEqual(await numbers({ sort }))
    }
  })

  it('tells what is out from what is not', async () => {
    const out = await numbers({ out: 'yes' })
    expect(out).toEqual(['F1'])
    expect(await numbers({ out: 'no' })).not.toContain('F1')
    expect(await numbers({ room: yard.shop.code })).toEqual(['F1', 'G1'])
  })

  it('refuses an unknown order and a cursor that it never gave', async () => {
    expect(piecesQuerySchema.safeParse({ sort: 'number; drop table piece' }).success).toBe(false)
    const outcome = await listPieces(database.db, maker, piecesQuerySchema.parse({ cursor: 'e30' }))
    expect(outcome).toMatchObject({ ok: false, error: { code: 'malformed' } })
  })
})
