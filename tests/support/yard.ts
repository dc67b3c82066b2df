import type { Kysely } from 'kysely'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import type { Database } from '@/db/schema'
import type { NewPiece } from '@/lib/pieces/piece'
import type { Role } from '@/lib/sites/permissions'
import { houseAir, seedPiece, seedRoom, type SeededRoom, shopAir } from './seed-rooms'
import { seedSite } from './seed-site'

const hourMs = 3_600_000

export const hoursBefore = (now: Date, hours: number): Date => new Date(now.getTime() - hours * hourMs)
export const hoursAfter = (now: Date, hours: number): Date => hoursBefore(now, -hours)

export interface Yard {
  siteId: number
  cupboard: SeededRoom
  shop: SeededRoom
  member(role: Role): Promise<SiteMember>
  /** An ash box that rests in the cupboard. */
  box(number: string, facts?: Partial<NewPiece>): Promise<{ id: number; code: string }>
}

/** A site with a dry cupboard and a damp shop, both read up to `now`: what carries are made between. */
export async function makeYard(
  db: Kysely<Database>,
  now: Date,
  options: { readHours?: number; timeZone?: string } = {},
): Promise<Yard> {
  const readHours = options.readHours ?? 72
  const since = hoursBefore(now, readHours)
  const site = await seedSite(db, since, 'Test Yard', options.timeZone ?? 'Europe/London')
  const cupboard = await seedRoom(db, site.siteId, 'Landing cupboard', 'cupboard', since)
  const shop = await seedRoom(db, site.siteId, 'Shop', 'shop', since)
  await cupboard.readSpan(houseAir, since, now)
  await shop.readSpan(shopAir, since, now)
  return {
    siteId: site.siteId,
    cupboard,
    shop,
    async member(role) {
      const userId = role === 'owner' ? site.ownerId : await site.join(role)
      const member = await findSiteMember(db, site.siteCode, userId)
      if (member === undefined) throw new Error(`no ${role}`)
      return member
    },
    box: (number, facts = {}) =>
      seedPiece(db, site.siteId, site.ownerId, cupboard, since, { fitGrade: 'snug', ...facts, number }),
  }
}

/** What an outcome holds; fails the test with the reason when it holds none. */
export function valueOf<T>(outcome: { ok: true; value: T } | { ok: false; error: unknown }): T {
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.error))
  return outcome.value
}
