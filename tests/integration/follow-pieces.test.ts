import { sql } from 'kysely'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { changePiece } from '@/app/_server/piece-changes'
import { createCarry } from '@/app/_server/carries'
import { bringBack } from '@/app/_server/carry-steps'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { followPieces } from '@/db/queries/follow-pieces'
import { findMoisture } from '@/db/queries/moisture'
import type { SiteMember } from '@/db/queries/members'
import { newCarrySchema } from '@/lib/carry/carry'
import { woodAt } from '@/lib/carry/material'
import { followSites } from '@/workers/wood/follow-sites'
import { createTestDatabase, type TestDatabase } from '../support/database'
import { shopAir } from '../support/seed-rooms'
import { hoursAfter, hoursBefore, makeYard, valueOf, type Yard } from '../support/yard'

const now = new Date('2026-02-10T10:20:00Z')
let database: TestDatabase
let yard: Yard
let maker: SiteMember

beforeAll(async () => {
  database = await createTestDatabase()
  yard = await makeYard(database.db, now)
  maker = await yard.member('maker')
})
afterAll(() => database.drop())

const follow = (at: Date, pieceIds: number[] | null = null) => followPieces(database.db, maker, pieceIds, at)
const stored = async (pieceId: number) =>
  (await findMoisture(database.db, maker.siteId, [pieceId])).get(pieceId)
const ringPct = async (pieceId: number, at: Date) => {
  const material = await loadCarryMaterial(database.db, maker, [pieceId], [], at)
  const piece = material.pieces.get(pieceId)
  return piece && woodAt(material, piece, at.getTime())?.ringPct
}

describe('the wood kept with a piece', () => {
  it('stops at the last whole hour, and a second look changes nothing', async () => {
    const box = await yard.box('701')
    expect(await follow(now, [box.id])).toEqual({ carriedOn: 0, rebuilt: 1 })
    const first = await stored(box.id)
    expect(first?.at.toISOString()).toBe('2026-02-10T10:00:00.000Z')
    expect(await follow(now, [box.id])).toEqual({ carriedOn: 0, rebuilt: 0 })
    expect(await stored(box.id)).toEqual(first)
  })

  it('is carried on by the hours since, and comes to the same as made anew', async () => {
    const box = await yard.box('702')
    await follow(now, [box.id])
    const at = hoursAfter(now, 6)
    await yard.cupboard.readSpan({ temperatureC: 20, humidityPct: 60 }, hoursAfter(now, 0.1), at)
    expect(await follow(at, [box.id])).toEqual({ carriedOn: 1, rebuilt: 0 })
    const carriedOn = await stored(box.id)
    await database.db.deleteFrom('piece_moisture').where('piece_id', '=', box.id).execute()
    expect(await follow(at, [box.id])).toEqual({ carriedOn: 0, rebuilt: 1 })
    const anew = await stored(box.id)
    expect(anew?.airKey).toBe(carriedOn?.airKey)
    const ring = (state: unknown) => (state as { ring: number[] }).ring
    ring(anew?.state).forEach((value, n) => {
      expect(value).toBeCloseTo(ring(carriedOn?.state)[n] ?? NaN, 6)
    })
  })

  it('is made anew when a late reading changes an hour that it was made from', async () => {
    const box = await yard.box('703')
    const at = hoursAfter(now, 12)
    await follow(at, [box.id])
    const before = await ringPct(box.id, at)
    // Kept by the sensor while it was away: a day of damp, two days ago.
    await yard.cupboard.readSpan(
      { temperatureC: 19, humidityPct: 88 },
      hoursBefore(now, 60.05),
      hoursBefore(now, 30.05),
    )
    expect(await follow(at, [box.id])).toEqual({ carriedOn: 0, rebuilt: 1 })
    const after = await ringPct(box.id, at)
    expect(after).toBeGreaterThan((before ?? NaN) + 0.05)
  })

  it('is made anew when its own sizes change, and left alone when its number does', async () => {
    const box = await yard.box('704')
    const at = hoursAfter(now, 13)
    await follow(at, [box.id])
    const first = await stored(box.id)
    const version = async () =>
      (
        await database.db
          .selectFrom('piece')
          .where('id', '=', box.id)
          .where('site_id', '=', maker.siteId)
          .select('version')
          .executeTakeFirstOrThrow()
      ).version
    valueOf(await changePiece(database.db, maker, box.code, await version(), { number: '7040' }, at))
    expect(await stored(box.id)).toEqual(first)
    valueOf(await changePiece(database.db, maker, box.code, await version(), { wallMm: 5 }, at))
    const thicker = await stored(box.id)
    expect(thicker?.pieceKey).not.toBe(first?.pieceKey)
    expect(await follow(at, [box.id])).toEqual({ carriedOn: 0, rebuilt: 0 })
  })

  it('remembers its wood as it went out, however long it is out', async () => {
    const box = await yard.box('705')
    const outAt = hoursAfter(now, 14.25)
    await follow(outAt, [box.id])
    const carry = valueOf(
      await createCarry(
        database.db,
        maker,
        newCarrySchema.parse({
          pieceIds: [box.code],
          toRoomId: yard.shop.code,
          cover: 'open',
          stayMinutes: 60,
          startsNow: true,
          againstAdvice: true,
        }),
        outAt,
      ),
    )
    const atStart = await ringPct(box.id, outAt)
    const later = hoursAfter(outAt, 8)
    await yard.shop.readSpan(shopAir, outAt, later)
    await follow(later, [box.id])
    const kept = await stored(box.id)
    expect(kept?.outAt).toEqual(outAt)
    expect(await ringPct(box.id, outAt)).toBeCloseTo(atStart ?? NaN, 2)
    expect(await ringPct(box.id, later)).toBeGreaterThan((atStart ?? NaN) + 1)
    // A day of it, then home: what the shop did is still in the wood, and the outing is over.
    valueOf(await bringBack(database.db, maker, carry.id, {}, later))
    const home = hoursAfter(later, 2)
    await yard.cupboard.readSpan({ temperatureC: 20, humidityPct: 45 }, later, home)
    await follow(home, [box.id])
    expect((await stored(box.id))?.outAt).toBeNull()
    expect(await ringPct(box.id, home)).toBeGreaterThan((atStart ?? NaN) + 0.5)
  })

  it('is followed for every site by the worker, and a page that looks writes nothing', async () => {
    const at = hoursAfter(now, 40)
    const failed: string[] = []
    const counts = await followSites(database.db, at, (site) => failed.push(site))
    expect(failed).toEqual([])
    expect(counts.carriedOn + counts.rebuilt).toBeGreaterThan(3)
    const made = () =>
      sql<{ made_at: Date }>`select max(made_at) as made_at from piece_moisture`.execute(database.db)
    const before = await made()
    const box = await database.db.selectFrom('piece').select('id').executeTakeFirstOrThrow()
    await ringPct(box.id, hoursAfter(at, 0.5))
    expect((await made()).rows).toEqual(before.rows)
  })
})
