import { hashPassword } from 'better-auth/crypto'
import type { Kysely } from 'kysely'
import { ensureDemoAccount, insertDemoRoom, insertDemoSensor, insertDemoSite } from '@/db/queries/demo'
import type { Database } from '@/db/schema'
import { makeSensorSecret } from '@/db/sensor-secret'
import type { Role } from '@/lib/sites/permissions'
import { demoPassword } from '@/lib/sites/demo'
import { placeAccounts, placeName, placeRooms, placeSensors, placeTimeZone, type RoomKey } from './place'

const dayMs = 86_400_000

export interface MadeSensor {
  id: number
  code: string
  secret: string
}

/** The place with its people, rooms and sensors, before anything has happened in it. */
export interface MadePlace {
  siteId: number
  siteCode: string
  users: Record<Role, string>
  rooms: Record<RoomKey, number>
  /** By the model of the simulated instrument. */
  sensors: ReadonlyMap<string, MadeSensor>
}

/** Makes people, site, rooms and sensors, all or nothing. */
export async function makePlace(db: Kysely<Database>, now: Date, days: number): Promise<MadePlace> {
  const hashes = await Promise.all(placeAccounts.map(() => hashPassword(demoPassword)))
  const secrets = await Promise.all(placeSensors.map(() => makeSensorSecret()))
  const beganAt = new Date(now.getTime() - days * dayMs)

  return db.transaction().execute(async (trx) => {
    const users = {} as Record<Role, string>
    for (const [index, { email, name, role }] of placeAccounts.entries())
      users[role] = await ensureDemoAccount(trx, { email, name, passwordHash: hashes[index] ?? '' }, now)
    const site = await insertDemoSite(
      trx,
      { name: placeName, timeZone: placeTimeZone },
      placeAccounts.map(({ role, onHouseList }) => ({ userId: users[role], role, onHouseList })),
      beganAt,
    )
    const rooms = {} as Record<RoomKey, number>
    for (const [mark, { key, ...room }] of placeRooms.entries())
      rooms[key] = await insertDemoRoom(trx, site.id, room, mark, beganAt)

    const sensors = new Map<string, MadeSensor>()
    for (const [index, sensor] of placeSensors.entries()) {
      const secret = secrets[index]
      if (secret === undefined) throw new RangeError('a secret for each sensor')
      // An hour earlier than its first reading, so that every reading has a room.
      const cameAt = new Date(
        Math.max(beganAt.getTime(), now.getTime() - (sensor.cameDaysAgo ?? Infinity) * dayMs) - 3_600_000,
      )
      const here = { roomId: rooms[sensor.room], spot: sensor.spot }
      const { before } = sensor
      const movedAt = new Date(now.getTime() - (before?.untilDaysAgo ?? 0) * dayMs)
      const placements =
        before === undefined || movedAt <= cameAt
          ? [{ ...here, fromAt: cameAt }]
          : [
              { roomId: rooms[before.room], spot: before.spot, fromAt: cameAt },
              { ...here, fromAt: movedAt },
            ]
      const made = await insertDemoSensor(trx, site.id, {
        name: sensor.name,
        secretHash: secret.hash,
        createdAt: cameAt,
        placements,
      })
      sensors.set(sensor.model, { ...made, secret: secret.secret })
    }
    return { siteId: site.id, siteCode: site.code, users, rooms, sensors }
  })
}
