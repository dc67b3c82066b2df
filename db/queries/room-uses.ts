import { type Kysely, sql } from 'kysely'
import type { Database } from '../schema'

export interface RoomUses {
  /** Pieces in use that are in it now. */
  pieces: number
  /** Sensors in use that hang in it now, typed readings aside. */
  sensors: number
  /** Carries planned or out that go there. */
  carries: number
  /** Pieces in use that are kept to match it. */
  kept: number
}

/** What still needs a room. */
export async function findRoomUses(db: Kysely<Database>, siteId: number, roomId: number): Promise<RoomUses> {
  const { rows } = await sql<RoomUses>`
    select
      (select count(*) from piece_place p
        join piece on piece.site_id = p.site_id and piece.id = p.piece_id and piece.archived_at is null
        where p.site_id = ${siteId} and p.room_id = ${roomId} and p.to_at is null)::int as pieces,
      (select count(*) from placement p
        join sensor on sensor.site_id = p.site_id and sensor.id = p.sensor_id
          and sensor.archived_at is null and sensor.kind = 'device'
        where p.site_id = ${siteId} and p.room_id = ${roomId} and p.to_at is null)::int as sensors,
      (select count(*) from carry
        where site_id = ${siteId} and to_room_id = ${roomId} and state in ('planned', 'out'))::int as carries,
      (select count(*) from piece
        where site_id = ${siteId} and keep_room_id = ${roomId} and archived_at is null)::int as kept`.execute(
    db,
  )
  return rows[0] ?? { pieces: 0, sensors: 0, carries: 0, kept: 0 }
}
