import type { Kysely, Transaction } from 'kysely'
import type { NewRoom } from '@/lib/rooms/room'
import type { Role } from '@/lib/sites/permissions'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'
import { insertMember } from './members'
import { insertRoom } from './rooms'
import { insertSite, newTextId } from './sites'

/** What only the demo writes: whole lives of things, with a past that no page could enter. */

/** The mark in the site's history that says that the demo was made to its end. */
const madeAction = 'demo-made'

export interface DemoSiteState {
  id: number
  code: string
  /** False after a start that was ended half-way. */
  isComplete: boolean
}

export async function listDemoSites(db: Kysely<Database>): Promise<DemoSiteState[]> {
  const rows = await db
    .selectFrom('site')
    .leftJoin('change', (join) =>
      join.onRef('change.site_id', '=', 'site.id').on('change.action', '=', madeAction),
    )
    .where('site.is_demo', '=', true)
    .select(['site.id', 'site.code', 'change.id as made'])
    .orderBy('site.id')
    .execute()
  return rows.map((row) => ({ id: row.id, code: row.code, isComplete: row.made !== null }))
}

export async function isAnySiteThere(db: Kysely<Database>): Promise<boolean> {
  return (await db.selectFrom('site').select('id').limit(1).executeTakeFirst()) !== undefined
}

/** Whether a site was here once: a place that its owner took away must not come back by itself. */
export async function wasAnySiteThere(db: Kysely<Database>): Promise<boolean> {
  return (await db.selectFrom('retired_code').select('code').limit(1).executeTakeFirst()) !== undefined
}

export async function markDemoComplete(
  db: Kysely<Database>,
  siteId: number,
  siteCode: string,
  now: Date,
): Promise<void> {
  await db
    .insertInto('change')
    .values({
      site_id: siteId,
      at: now,
      user_id: null,
      subject_kind: 'site',
      subject_code: siteCode,
      action: madeAction,
      before: null,
      after: null,
    })
    .execute()
}

export interface DemoAccount {
  email: string
  name: string
  passwordHash: string
}

/** Makes the account with its password, verified, or finds the one that has this address already. */
export async function ensureDemoAccount(
  trx: Transaction<Database>,
  { email, name, passwordHash }: DemoAccount,
  now: Date,
): Promise<string> {
  const known = await trx.selectFrom('user').where('email', '=', email).select('id').executeTakeFirst()
  if (known !== undefined) return known.id
  const id = newTextId()
  await trx
    .insertInto('user')
    .values({ id, name, email, emailVerified: true, image: null, createdAt: now, updatedAt: now })
    .execute()
  await trx
    .insertInto('account')
    .values({
      id: newTextId(),
      accountId: id,
      providerId: 'credential',
      userId: id,
      accessToken: null,
      refreshToken: null,
      idToken: null,
      accessTokenExpiresAt: null,
      refreshTokenExpiresAt: null,
      scope: null,
      password: passwordHash,
      createdAt: now,
      updatedAt: now,
    })
    .execute()
  return id
}

export interface DemoMember {
  userId: string
  role: Role
  onHouseList: boolean
}

/** Makes the site with its members; the first of them is its owner. */
export async function insertDemoSite(
  trx: Transaction<Database>,
  site: { name: string; timeZone: string },
  members: readonly DemoMember[],
  now: Date,
): Promise<{ id: number; code: string }> {
  const [owner] = members
  if (owner === undefined) throw new RangeError('a site needs an owner')
  const inserted = await insertSite(trx, { ...site, unitSystem: 'metric' }, owner.userId, now)
  const { organization_id: organizationId } = await trx
    .updateTable('site')
    .set({ is_demo: true })
    .where('id', '=', inserted.id)
    .returning('organization_id')
    .executeTakeFirstOrThrow()
  for (const { userId, role } of members) await insertMember(trx, { organizationId, userId, role }, now)
  await trx
    .insertInto('member_setting')
    .values(
      members.map(({ userId, onHouseList }) => ({
        site_id: inserted.id,
        user_id: userId,
        on_house_list: onHouseList,
      })),
    )
    .execute()
  return { id: inserted.id, code: inserted.site.id }
}

/** Makes a room with its own mark. @returns its number within the site */
export async function insertDemoRoom(
  trx: Transaction<Database>,
  siteId: number,
  room: NewRoom,
  mark: number,
  now: Date,
): Promise<number> {
  const { id } = await insertRoom(trx, siteId, room, now)
  await trx.updateTable('room').set({ mark }).where('site_id', '=', siteId).where('id', '=', id).execute()
  return id
}

export interface DemoSensorRow {
  name: string
  secretHash: string
  createdAt: Date
  /** Where it has hung, oldest first; the last place is where it hangs now. */
  placements: readonly { roomId: number; fromAt: Date; spot: string }[]
}

export async function insertDemoSensor(
  trx: Transaction<Database>,
  siteId: number,
  { name, secretHash, createdAt, placements }: DemoSensorRow,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(trx, siteId, 'sensor')
  const code = newCode()
  await trx
    .insertInto('sensor')
    .values({
      site_id: siteId,
      id,
      code,
      name,
      kind: 'device',
      secret_hash: secretHash,
      secret_set_at: createdAt,
      created_at: createdAt,
    })
    .execute()
  await trx
    .insertInto('placement')
    .values(
      placements.map(({ roomId, fromAt, spot }, index) => ({
        site_id: siteId,
        sensor_id: id,
        from_at: fromAt,
        to_at: placements[index + 1]?.fromAt ?? null,
        room_id: roomId,
        spot,
      })),
    )
    .execute()
  return { id, code }
}

export interface DemoSensorState {
  sensorId: number
  heardAt: Date
  isHere: boolean
  batteryPct: number
  usualGapS: number
}

/** What arrivals would have told of a sensor; its last reading stands there already. */
export async function updateDemoSensorState(
  db: Kysely<Database>,
  siteId: number,
  { sensorId, heardAt, isHere, batteryPct, usualGapS }: DemoSensorState,
): Promise<void> {
  const state = { heard_at: heardAt, is_here: isHere, battery_pct: batteryPct, usual_gap_s: usualGapS }
  await db
    .insertInto('sensor_state')
    .values({ site_id: siteId, sensor_id: sensorId, ...state })
    .onConflict((clash) => clash.columns(['site_id', 'sensor_id']).doUpdateSet(state))
    .execute()
}

/** The sensors of a demo whose secrets were lost get new ones. */
export async function renewDemoSecret(
  db: Kysely<Database>,
  siteId: number,
  sensorId: number,
  secretHash: string,
  now: Date,
): Promise<void> {
  await db
    .updateTable('sensor')
    .set({ secret_hash: secretHash, secret_set_at: now })
    .where('site_id', '=', siteId)
    .where('id', '=', sensorId)
    .execute()
}

export async function listDemoSensors(
  db: Kysely<Database>,
  siteId: number,
): Promise<{ id: number; code: string; name: string; lastAt: Date | null; batteryPct: number | null }[]> {
  const rows = await db
    .selectFrom('sensor')
    .leftJoin('sensor_state as state', (join) =>
      join.onRef('state.site_id', '=', 'sensor.site_id').onRef('state.sensor_id', '=', 'sensor.id'),
    )
    .where('sensor.site_id', '=', siteId)
    .where('sensor.kind', '=', 'device')
    .where('sensor.archived_at', 'is', null)
    .select(['sensor.id', 'sensor.code', 'sensor.name', 'state.at', 'state.battery_pct'])
    .orderBy('sensor.id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    name: row.name,
    lastAt: row.at,
    batteryPct: row.battery_pct,
  }))
}

/** What the arrivals of the last hours would have counted, and one message that could not be used. */
export async function insertDemoArrivals(
  db: Kysely<Database>,
  siteId: number,
  arrivals: {
    late: { sensorId: number; dayOn: string; n: number }
    refused: {
      sensorId: number
      at: Date
      topic: string
      message: string
      reason: string
      field: string
      detail: string
    }
  },
): Promise<void> {
  const { late, refused } = arrivals
  await db
    .insertInto('ingest_count')
    .values({ site_id: siteId, sensor_id: late.sensorId, day_on: late.dayOn, kind: 'late', n: late.n })
    .execute()
  const bytes = Buffer.from(refused.message)
  await db
    .insertInto('refused')
    .values({
      site_id: siteId,
      sensor_id: refused.sensorId,
      at: refused.at,
      topic: refused.topic,
      reason: refused.reason,
      field: refused.field,
      detail: refused.detail,
      size_bytes: bytes.length,
      head_hex: bytes.subarray(0, 64).toString('hex'),
    })
    .execute()
}

/** Sets the hours of the demo's day; what is left out stays. */
export async function updateDemoHours(
  db: Kysely<Database>,
  siteId: number,
  hours: { lockUpAt?: string; quietFrom?: string; quietTo?: string },
): Promise<void> {
  await db
    .updateTable('site')
    .set({ lock_up_at: hours.lockUpAt, quiet_from: hours.quietFrom, quiet_to: hours.quietTo })
    .where('id', '=', siteId)
    .execute()
}
