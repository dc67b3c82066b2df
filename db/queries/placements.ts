import type { Kysely } from 'kysely'
import type { Database } from '../schema'

export interface PlacementRecord {
  room: { roomId: number; code: string; name: string; mark: number }
  fromAt: Date
  toAt: Date | null
  spot: string
}

/** Where a sensor has hung, newest first. */
export async function listPlacements(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
): Promise<PlacementRecord[]> {
  const rows = await db
    .selectFrom('placement')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'placement.site_id').onRef('room.id', '=', 'placement.room_id'),
    )
    .where('placement.site_id', '=', siteId)
    .where('placement.sensor_id', '=', sensorId)
    .select([
      'placement.room_id',
      'room.code',
      'room.name',
      'room.mark',
      'placement.from_at',
      'placement.to_at',
      'placement.spot',
    ])
    .orderBy('placement.from_at', 'desc')
    .execute()
  return rows.map((row) => ({
    room: { roomId: row.room_id, code: row.code, name: row.name, mark: row.mark },
    fromAt: row.from_at,
    toAt: row.to_at,
    spot: row.spot,
  }))
}

/**
 * A sensor hangs in a room from a moment on. What was said of the time after that moment is replaced, so that there is
 * always one answer to where it hung. The figures must be held, and made again from that moment on.
 */
export async function placeSensor(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
  to: { roomId: number; fromAt: Date; spot: string },
): Promise<void> {
  await db
    .deleteFrom('placement')
    .where('site_id', '=', siteId)
    .where('sensor_id', '=', sensorId)
    .where('from_at', '>=', to.fromAt)
    .execute()
  await db
    .updateTable('placement')
    .set({ to_at: to.fromAt })
    .where('site_id', '=', siteId)
    .where('sensor_id', '=', sensorId)
    .where((eb) => eb.or([eb('to_at', 'is', null), eb('to_at', '>', to.fromAt)]))
    .execute()
  await db
    .insertInto('placement')
    .values({
      site_id: siteId,
      sensor_id: sensorId,
      from_at: to.fromAt,
      to_at: null,
      room_id: to.roomId,
      spot: to.spot,
    })
    .execute()
}
