import { type Kysely, sql } from 'kysely'
import { startOfDayAt } from '@/lib/climate/days'
import { type ShopUse, shopWasUsed } from '@/lib/notices/shop-used'
import type { Database } from '../schema'
import { listRoomHours } from './series'

/** Whether somebody worked in a shop on a day, as far as its record up to now tells. */
export async function findShopUse(
  db: Kysely<Database>,
  site: { siteId: number; timeZone: string },
  dayOn: string,
  now: Date,
): Promise<ShopUse> {
  const { siteId } = site
  const from = startOfDayAt(dayOn, site.timeZone)
  const rooms = await db
    .selectFrom('room')
    .where('site_id', '=', siteId)
    .where('kind', '=', 'shop')
    .where('archived_at', 'is', null)
    .select('id')
    .execute()
  const hours = await Promise.all(rooms.map(({ id }) => listRoomHours(db, siteId, id, from, now)))
  const shops = hours.map((list) => list.map((hour) => ({ ...hour, at: hour.at.getTime() })))
  return shopWasUsed(shops, await countCarriesToShops(db, siteId, from, now))
}

/** Carries to a shop that went out or ended since a moment, or of which something is out still. */
async function countCarriesToShops(
  db: Kysely<Database>,
  siteId: number,
  from: Date,
  now: Date,
): Promise<number> {
  const { n } = await db
    .selectFrom('carry')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'carry.site_id').onRef('room.id', '=', 'carry.to_room_id'),
    )
    .where('carry.site_id', '=', siteId)
    .where('room.kind', '=', 'shop')
    .where('carry.started_at', 'is not', null)
    .where('carry.started_at', '<=', now)
    .where((eb) =>
      eb.or([
        eb('carry.state', '=', 'out'),
        eb('carry.started_at', '>=', from),
        eb.and([eb('carry.state', '=', 'back'), eb('carry.ended_at', '>=', from)]),
      ]),
    )
    .select(sql<number>`count(*)::int`.as('n'))
    .executeTakeFirstOrThrow()
  return n
}
