import type { Kysely } from 'kysely'
import { insertCarry, updateCarry, updateCarryPiece } from '@/db/queries/carry-changes'
import { movePiece } from '@/db/queries/places'
import type { Database } from '@/db/schema'
import { makeSensorSecret } from '@/db/sensor-secret'
import { signInNameOf, topicOf } from '@/lib/readings/topic'
import { houseAir, seedPiece, seedRoom, type SeededRoom } from '../../support/seed-rooms'
import { seedSite } from '../../support/seed-site'

const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS
const OUT_FOR_MS = 6 * HOUR_MS

export interface WaitingSite {
  siteId: number
  /** The shop's sensor, which has not said a word yet. */
  sensor: { name: string; secret: string; topic: string }
  /** A reading of the shop, straight into the database. */
  readShop: SeededRoom['read']
}

/** A site with a box out in a shop that nobody has read: the first damp reading there says that its time is over. */
export async function seedWaitingSite(db: Kysely<Database>, now: Date): Promise<WaitingSite> {
  const since = new Date(now.getTime() - 3 * DAY_MS)
  const { siteId, siteCode, join } = await seedSite(db, since)
  const maker = await join('maker')
  const house = await seedRoom(db, siteId, 'Cupboard', 'cupboard', since)
  const shop = await seedRoom(db, siteId, 'Shop', 'shop', since)
  await house.readSpan(houseAir, since, now)
  const { secret, hash } = await makeSensorSecret()
  await db
    .updateTable('sensor')
    .set({ secret_hash: hash })
    .where('site_id', '=', siteId)
    .where('id', '=', shop.sensorId)
    .execute()
  const box = await seedPiece(db, siteId, maker, house, since, { number: '207', fitGrade: 'snug' })
  const outAt = new Date(now.getTime() - OUT_FOR_MS)
  const { id } = await insertCarry(
    db,
    siteId,
    {
      toRoomId: shop.roomId,
      cover: 'open',
      plannedAt: outAt,
      stayMinutes: 600,
      note: '',
      userId: maker,
      pieces: [{ pieceId: box.id, fromRoomId: house.roomId }],
    },
    outAt,
  )
  await updateCarry(db, siteId, id, { state: 'out', startedAt: outAt })
  await updateCarryPiece(db, siteId, id, box.id, { outAt })
  await movePiece(db, siteId, box.id, {
    roomId: shop.roomId,
    cover: 'open',
    at: outAt,
    carryId: id,
    userId: maker,
  })
  return {
    siteId,
    readShop: shop.read,
    sensor: {
      name: signInNameOf(siteCode, shop.sensorCode),
      secret,
      topic: topicOf(siteCode, shop.sensorCode, 'reading'),
    },
  }
}
