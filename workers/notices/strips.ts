import type { Kysely } from 'kysely'
import { findForecasts } from '@/db/queries/forecasts'
import type { NoticeSite } from '@/db/queries/notice-state'
import type { RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import type { NoticeStrip } from '@/lib/notices/surroundings'

/** The coming hours of each shop, by its newest forecast. */
export async function loadStrips(
  db: Kysely<Database>,
  site: NoticeSite,
  rooms: readonly RoomRecord[],
  now: Date,
): Promise<NoticeStrip[]> {
  const shops = rooms.filter(({ kind }) => kind === 'shop')
  const forecasts = await findForecasts(db, site.siteId, new Set(shops.map(({ id }) => id)), now)
  return shops.flatMap((room): NoticeStrip[] => {
    const forecast = forecasts.get(room.id)
    return forecast === undefined ? [] : []
  })
}
