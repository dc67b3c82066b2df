import { randomUUID } from 'node:crypto'
import type { Kysely } from 'kysely'
import { newCode, takeIds } from '@/db/queries/counters'
import type { Database } from '@/db/schema'
import { makeSensorSecret } from '@/db/sensor-secret'
import { signInNameOf, topicOf } from '@/lib/readings/topic'

export interface TestSite {
  id: number
  code: string
}

export interface TestSensor {
  siteId: number
  siteCode: string
  id: number
  code: string
  /** With which it signs in to the broker. */
  name: string
  secret: string
  topic: string
}

/** An empty site, straight into the tables: tests of the readings' way need no accounts. */
export async function makeSite(db: Kysely<Database>, timeZone = 'UTC'): Promise<TestSite> {
  const organization = randomUUID()
  await db
    .insertInto('organization')
    .values({ id: organization, name: 'Test', slug: organization, createdAt: new Date() })
    .execute()
  const row = await db
    .insertInto('site')
    .values({ code: newCode(), organization_id: organization, name: 'Test', time_zone: timeZone })
    .returning(['id', 'code'])
    .executeTakeFirstOrThrow()
  return row
}

export async function makeRoom(db: Kysely<Database>, site: TestSite): Promise<number> {
  const id = await takeIds(db, site.id, 'room')
  await db
    .insertInto('room')
    .values({ site_id: site.id, id, code: newCode(), name: `Room ${id}`, kind: 'shop' })
    .execute()
  return id
}

/** A sensor that hangs in the room since ever, or nowhere. */
export async function makeSensor(
  db: Kysely<Database>,
  site: TestSite,
  roomId: number | undefined,
): Promise<TestSensor> {
  const id = await takeIds(db, site.id, 'sensor')
  const code = newCode()
  const { secret, hash } = await makeSensorSecret()
  await db
    .insertInto('sensor')
    .values({
      ...{ site_id: site.id, id, code, name: `Sensor ${id}` },
      ...{ secret_hash: hash, secret_set_at: new Date() },
    })
    .execute()
  if (roomId !== undefined)
    await db
      .insertInto('placement')
      .values({ site_id: site.id, sensor_id: id, from_at: new Date(0), room_id: roomId })
      .execute()
  return {
    ...{ siteId: site.id, siteCode: site.code, id, code, secret },
    name: signInNameOf(site.code, code),
    topic: topicOf(site.code, code, 'reading'),
  }
}

/** Both tables of figures of a site, in order, to compare them with those made again. */
export async function listFigures(db: Kysely<Database>, siteId: number) {
  const hours = await db
    .selectFrom('room_hour')
    .where('site_id', '=', siteId)
    .selectAll()
    .orderBy('room_id')
    .orderBy('sensor_id')
    .orderBy('hour_at')
    .execute()
  const days = await db
    .selectFrom('room_day')
    .where('site_id', '=', siteId)
    .selectAll()
    .orderBy('room_id')
    .orderBy('sensor_id')
    .orderBy('day_on')
    .execute()
  return { hours, days }
}
