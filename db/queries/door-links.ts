import { createHash } from 'node:crypto'
import type { Kysely } from 'kysely'
import type { Site } from '@/lib/sites/site'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'
import { siteColumns, siteOf } from './sites'

/** What is kept of a link: the secret in it can't be read back. */
export const doorTokenHash = (token: string): string => createHash('sha256').update(token).digest('base64url')

export interface DoorRecord {
  id: number
  code: string
  name: string
  room: { roomId: number; code: string; name: string; mark: number }
  createdAt: Date
  by: string | null
  lastSeenAt: Date | null
}

const doorQuery = (db: Kysely<Database>, siteId: number) =>
  db
    .selectFrom('door_link')
    .innerJoin('room', (join) =>
      join.onRef('room.site_id', '=', 'door_link.site_id').onRef('room.id', '=', 'door_link.room_id'),
    )
    .leftJoin('user', 'user.id', 'door_link.created_by')
    .where('door_link.site_id', '=', siteId)
    .where('door_link.revoked_at', 'is', null)
    .select([
      'door_link.id',
      'door_link.code',
      'door_link.name',
      'door_link.room_id',
      'room.code as room_code',
      'room.name as room_name',
      'room.mark as room_mark',
      'door_link.created_at',
      'door_link.last_seen_at',
      'user.name as by',
    ])

type Row = Awaited<ReturnType<ReturnType<typeof doorQuery>['executeTakeFirstOrThrow']>>

const recordOf = (row: Row): DoorRecord => ({
  id: row.id,
  code: row.code,
  name: row.name,
  room: { roomId: row.room_id, code: row.room_code, name: row.room_name, mark: row.room_mark },
  createdAt: row.created_at,
  by: row.by,
  lastSeenAt: row.last_seen_at,
})

/** The doors of a site whose links still open, oldest first. */
export async function listDoors(db: Kysely<Database>, siteId: number): Promise<DoorRecord[]> {
  return (await doorQuery(db, siteId).orderBy('door_link.id').execute()).map(recordOf)
}

export async function findDoor(
  db: Kysely<Database>,
  siteId: number,
  code: string,
): Promise<DoorRecord | undefined> {
  const row = await doorQuery(db, siteId).where('door_link.code', '=', code).executeTakeFirst()
  return row === undefined ? undefined : recordOf(row)
}

/** @returns the new door's code */
export async function insertDoor(
  db: Kysely<Database>,
  siteId: number,
  door: { name: string; roomId: number; tokenHash: string; userId: string },
  now: Date,
): Promise<string> {
  const code = newCode()
  await db
    .insertInto('door_link')
    .values({
      site_id: siteId,
      id: await takeIds(db, siteId, 'door'),
      code,
      name: door.name,
      room_id: door.roomId,
      token_hash: door.tokenHash,
      created_by: door.userId,
      created_at: now,
    })
    .execute()
  return code
}

/** From the next look on the link opens nothing. */
export async function revokeDoor(
  db: Kysely<Database>,
  siteId: number,
  doorId: number,
  now: Date,
): Promise<void> {
  await db
    .updateTable('door_link')
    .set({ revoked_at: now })
    .where('site_id', '=', siteId)
    .where('id', '=', doorId)
    .execute()
}

export interface OpenDoor {
  siteId: number
  door: DoorRecord
  site: Site
}

/** The door that a link opens, by the hash of its secret; undefined for one that was revoked or never was. */
export async function findOpenDoor(db: Kysely<Database>, tokenHash: string): Promise<OpenDoor | undefined> {
  const row = await db
    .selectFrom('door_link')
    .innerJoin('site', 'site.id', 'door_link.site_id')
    .where('door_link.token_hash', '=', tokenHash)
    .where('door_link.revoked_at', 'is', null)
    .select(['door_link.site_id', 'door_link.code as door_code', ...siteColumns])
    .executeTakeFirst()
  if (row === undefined) return undefined
  const door = await findDoor(db, row.site_id, row.door_code)
  return door === undefined ? undefined : { siteId: row.site_id, door, site: siteOf(row, 'onlooker') }
}

/** Notes that a screen asks by this link, to the minute: no need to write each time. */
export async function touchDoor(
  db: Kysely<Database>,
  siteId: number,
  doorId: number,
  now: Date,
): Promise<void> {
  await db
    .updateTable('door_link')
    .set({ last_seen_at: now })
    .where('site_id', '=', siteId)
    .where('id', '=', doorId)
    .where((eb) =>
      eb.or([eb('last_seen_at', 'is', null), eb('last_seen_at', '<', new Date(now.getTime() - 60_000))]),
    )
    .execute()
}
