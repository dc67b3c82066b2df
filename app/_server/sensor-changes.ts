import 'server-only'
import type { Kysely } from 'kysely'
import { changedFields, insertChange } from '@/db/queries/changes'
import { takeIds } from '@/db/queries/counters'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import { placeSensor } from '@/db/queries/placements'
import { holdFiguresAlone, rebuildFigures } from '@/db/queries/rollups'
import { findRoom } from '@/db/queries/rooms'
import {
  insertSensor,
  isSensorNameTaken,
  lockSensor,
  type SensorRecord,
  updateSensor,
} from '@/db/queries/sensors'
import { allowLongStatements, inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { makeSensorSecret } from '@/db/sensor-secret'
import { CLOCK_AHEAD_MAX_MS, OLDEST_READING_MS } from '@/lib/readings/plausible'
import { ok } from '@/lib/result'
import type { NewPlacement, NewSensor, SensorCredential, SensorDetail } from '@/lib/sensors/sensor'
import { fail, failField, notThere, type Outcome } from './problem'
import { addressOf, getSensor } from './sensors'

export type MadeSensor = SensorDetail & { credential: SensorCredential }

const nameTaken = () => failField('name-taken', 'name', 'another sensor has this name')

/** A sensor with its secret, which is shown this once. */
export async function createSensor(
  db: Kysely<Database>,
  member: SiteMember,
  input: NewSensor,
  now: Date,
): Promise<Outcome<MadeSensor>> {
  const { secret, hash } = await makeSensorSecret()
  return inTransaction(db, async (trx) => {
    const room = await findRoom(trx, member.siteId, input.roomId)
    if (room === undefined) return notThere()
    // Holding the row of numbers makes two who choose the same name wait for one another.
    await takeIds(trx, member.siteId, 'sensor', 0)
    if (await isSensorNameTaken(trx, member.siteId, input.name)) return nameTaken()
    const sensor = await insertSensor(
      trx,
      member.siteId,
      {
        name: input.name,
        kind: 'device',
        secretHash: hash,
        roomId: room.id,
        spot: input.spot,
        // Its clock may be a little behind ours: its first reading has to count for the room all the same.
        fromAt: new Date(now.getTime() - CLOCK_AHEAD_MAX_MS),
      },
      now,
    )
    await log(trx, member, sensor.code, 'create')
    const view = await getSensor(trx, member, sensor.code, now)
    return view.ok ? ok({ ...view.value, credential: { ...addressOf(member, sensor.code), secret } }) : view
  })
}

async function log(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  action: string,
  changed: { before?: Record<string, unknown>; after?: Record<string, unknown> } = {},
): Promise<void> {
  await insertChange(db, member.siteId, {
    userId: member.userId,
    subjectKind: 'sensor',
    subjectCode: sensorCode,
    action,
    ...changed,
  })
  await notifySite(db, member.siteId, 'sensor', sensorCode)
}

/** Locks the sensor and refuses what can't be done with a retired one. */
async function sensorToChange(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
): Promise<Outcome<SensorRecord>> {
  const sensor = await lockSensor(db, member.siteId, sensorCode)
  if (sensor === undefined) return notThere()
  if (sensor.archivedAt !== null) return fail('already-done', 'This sensor has been retired.')
  return ok(sensor)
}

export async function renameSensor(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  version: number,
  change: { name?: string },
  now: Date,
): Promise<Outcome<SensorDetail>> {
  return inTransaction(db, async (trx) => {
    await takeIds(trx, member.siteId, 'sensor', 0)
    const found = await sensorToChange(trx, member, sensorCode)
    if (!found.ok) return found
    const sensor = found.value
    if (sensor.version !== version) return changedMeanwhile(trx, member, sensor, now)
    if (change.name !== undefined && (await isSensorNameTaken(trx, member.siteId, change.name, sensor.id)))
      return nameTaken()
    await updateSensor(trx, member.siteId, sensor.id, change)
    await log(trx, member, sensor.code, 'change', changedFields({ name: sensor.name }, change))
    return getSensor(trx, member, sensor.code, now)
  })
}

/** Its readings stay; its secret opens nothing any more, and its name may be used again. */
export async function retireSensor(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  version: number,
  now: Date,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const found = await sensorToChange(trx, member, sensorCode)
    if (!found.ok) return found
    if (found.value.version !== version) return changedMeanwhile(trx, member, found.value, now)
    await updateSensor(trx, member.siteId, found.value.id, { archivedAt: now })
    await log(trx, member, sensorCode, 'retire')
    return ok(undefined)
  })
}

/** A new secret, shown this once; the old one opens nothing from now on. */
export async function renewCredential(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  now: Date,
): Promise<Outcome<SensorCredential>> {
  const { secret, hash } = await makeSensorSecret()
  return inTransaction(db, async (trx) => {
    const found = await sensorToChange(trx, member, sensorCode)
    if (!found.ok) return found
    if (found.value.kind === 'typed') return fail('not-possible', 'Typed readings have no secret.')
    await updateSensor(trx, member.siteId, found.value.id, { secretHash: hash, secretSetAt: now })
    await log(trx, member, sensorCode, 'renew-secret')
    return ok({ ...addressOf(member, sensorCode), secret })
  })
}

/**
 * A sensor hangs in another room from a moment on. A moment in the past moves the readings that it has taken since: the
 * figures of both rooms are made again in the same step.
 */
export async function moveSensor(
  db: Kysely<Database>,
  member: SiteMember,
  sensorCode: string,
  input: NewPlacement,
  now: Date,
): Promise<Outcome<SensorDetail>> {
  return inTransaction(db, async (trx) => {
    const fromAt = input.fromAt === undefined ? now : new Date(input.fromAt)
    if (fromAt > now) return failField('not-possible', 'fromAt', 'a time to come: hang it there first')
    if (fromAt.getTime() < OLDEST_READING_MS)
      return failField('not-possible', 'fromAt', 'no reading is older than 2020')
    const room = await findRoom(trx, member.siteId, input.roomId)
    if (room === undefined) return notThere()
    // The figures before the sensor, always in this order, so that two never wait for one another crosswise.
    await holdFiguresAlone(trx, member.siteId)
    const found = await sensorToChange(trx, member, sensorCode)
    if (!found.ok) return found
    const sensor = found.value
    if (sensor.kind === 'typed')
      return fail('not-possible', 'Typed readings belong to the room that they were typed in for.')
    await placeSensor(trx, member.siteId, sensor.id, { roomId: room.id, fromAt, spot: input.spot })
    await allowLongStatements(trx)
    await rebuildFigures(trx, { siteId: member.siteId, sensorId: sensor.id, fromAt, toAt: null })
    await updateSensor(trx, member.siteId, sensor.id, {})
    await log(trx, member, sensor.code, 'move', {
      before: { roomId: sensor.room?.code ?? null, spot: sensor.spot },
      after: { roomId: room.code, spot: input.spot, fromAt: fromAt.toISOString() },
    })
    return getSensor(trx, member, sensor.code, now)
  })
}

async function changedMeanwhile(db: Kysely<Database>, member: SiteMember, sensor: SensorRecord, now: Date) {
  const current = await getSensor(db, member, sensor.code, now)
  return fail('changed-meanwhile', 'Somebody changed this sensor meanwhile. Look at it again.', {
    current: current.ok ? current.value : undefined,
    version: sensor.version,
  })
}
