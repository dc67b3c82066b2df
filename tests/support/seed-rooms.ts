import type { Kysely } from 'kysely'
import { newCode, takeIds } from '@/db/queries/counters'
import { insertPiece } from '@/db/queries/piece-writes'
import { movePiece } from '@/db/queries/places'
import { insertReadings } from '@/db/queries/readings'
import { insertRoom } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { type NewPiece, newPieceSchema } from '@/lib/pieces/piece'
import type { RoomKind } from '@/lib/rooms/room'

export interface Air {
  temperatureC: number
  humidityPct: number
}

/** About 8.5 % MC, and about 13.6 % MC. */
export const houseAir: Air = { temperatureC: 20, humidityPct: 45 }
export const shopAir: Air = { temperatureC: 8, humidityPct: 71 }

export interface SeededRoom {
  roomId: number
  code: string
  sensorId: number
  sensorCode: string
  /** One reading at each of these instants. */
  read(air: Air, ...at: Date[]): Promise<void>
  /** One reading every ten minutes. */
  readSpan(air: Air, from: Date, to: Date): Promise<void>
}

/** A room with a sensor that has hung there since `since`. */
export async function seedRoom(
  db: Kysely<Database>,
  siteId: number,
  name: string,
  kind: RoomKind,
  since: Date,
): Promise<SeededRoom> {
  const room = await insertRoom(db, siteId, { name, kind, isShared: false, note: '' }, since)
  const sensorId = await takeIds(db, siteId, 'sensor')
  const sensorCode = newCode()
  await db
    .insertInto('sensor')
    .values({
      site_id: siteId,
      id: sensorId,
      code: sensorCode,
      name: `${name} sensor`,
      kind: 'device',
      secret_hash: '$7$1$none$none',
      secret_set_at: since,
      created_at: since,
      archived_at: null,
    })
    .execute()
  await db
    .insertInto('placement')
    .values({ site_id: siteId, sensor_id: sensorId, room_id: room.id, from_at: since, to_at: null })
    .execute()
  const read = async (air: Air, ...times: Date[]) => {
    await insertReadings(
      db,
      times.map((at) => ({ siteId, sensorId, at, ...air })),
    )
  }
  return {
    roomId: room.id,
    code: room.code,
    sensorId,
    sensorCode,
    read,
    async readSpan(air, from, to) {
      const stepMs = 600_000
      const count = Math.floor((to.getTime() - from.getTime()) / stepMs) + 1
      await read(air, ...Array.from({ length: count }, (_, n) => new Date(from.getTime() + n * stepMs)))
    },
  }
}

/** A finished ash box in a room since `since`, and whatever else is said of it. */
export async function seedPiece(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  room: SeededRoom,
  since: Date,
  facts: Partial<NewPiece> & { number: string },
): Promise<{ id: number; code: string }> {
  const piece = newPieceSchema.parse({
    wood: 'fraxinus-americana',
    jointDiameterMm: 62,
    fitGrade: 'easy',
    wallMm: 4,
    roomId: room.code,
    ...facts,
  })
  const inserted = await insertPiece(
    db,
    siteId,
    piece,
    { keepRoomId: room.roomId, fittedRoomId: null },
    userId,
    since,
  )
  await movePiece(db, siteId, inserted.id, {
    roomId: room.roomId,
    cover: 'closed',
    at: since,
    carryId: null,
    userId,
  })
  return inserted
}
