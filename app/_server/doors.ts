import 'server-only'
import { randomBytes } from 'node:crypto'
import type { Kysely } from 'kysely'
import { insertChange } from '@/db/queries/changes'
import {
  type DoorRecord,
  doorTokenHash,
  findDoor,
  insertDoor,
  listDoors,
  revokeDoor,
} from '@/db/queries/door-links'
import type { SiteMember } from '@/db/queries/members'
import { findRoom } from '@/db/queries/rooms'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import type { Door, MadeDoor, NewDoor } from '@/lib/door/door'
import { ok } from '@/lib/result'
import { fail, notThere, type Outcome } from './problem'

/** More screens than these hang by no shop's door. */
const doorsMax = 20

const viewOf = (door: DoorRecord): Door => ({
  id: door.code,
  name: door.name,
  room: { id: door.room.code, name: door.room.name, mark: door.room.mark },
  createdAt: door.createdAt.toISOString(),
  by: door.by,
  lastSeenAt: door.lastSeenAt?.toISOString() ?? null,
})

export async function listDoorViews(db: Kysely<Database>, member: SiteMember): Promise<Door[]> {
  return (await listDoors(db, member.siteId)).map(viewOf)
}

/** A door with its link. Only a hash of the secret in it is kept, so the link is told this once. */
export async function createDoor(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewDoor,
  at: { now: Date; baseUrl: string },
): Promise<Outcome<MadeDoor>> {
  return inTransaction(db, async (trx) => {
    const room = await findRoom(trx, member.siteId, input.roomId)
    if (room === undefined) return notThere()
    if ((await listDoors(trx, member.siteId)).length >= doorsMax)
      return fail('not-possible', `There are ${String(doorsMax)} already. Take one away first.`)
    const token = randomBytes(32).toString('base64url')
    const code = await insertDoor(
      trx,
      member.siteId,
      { name: input.name, roomId: room.id, tokenHash: doorTokenHash(token), userId: member.userId },
      at.now,
    )
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'door',
      subjectCode: code,
      action: 'create',
      after: { name: input.name, room: room.name },
    })
    const door = await findDoor(trx, member.siteId, code)
    if (door === undefined) return notThere()
    return ok({ ...viewOf(door), link: `${at.baseUrl}/door/${token}` })
  })
}

/** The link opens nothing from the next look on. Pressed twice, the second finds nothing. */
export async function removeDoor(
  db: Kysely<Database>,
  member: SiteMember,
  doorCode: string,
  now: Date,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const door = await findDoor(trx, member.siteId, doorCode)
    if (door === undefined) return notThere()
    await revokeDoor(trx, member.siteId, door.id, now)
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'door',
      subjectCode: doorCode,
      action: 'delete',
      before: { name: door.name, room: door.room.name },
    })
    return ok(undefined)
  })
}
