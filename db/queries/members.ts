import type { Kysely } from 'kysely'
import { roleSchema, type Role } from '@/lib/sites/permissions'
import { unitSystemSchema, type Site, type UnitSystem } from '@/lib/sites/site'
import type { Database } from '../schema'
import { newTextId, siteColumns, siteOf } from './sites'

/** A person in a site, with everything that a request needs to know about both. */
export interface SiteMember {
  siteId: number
  siteCode: string
  organizationId: string
  userId: string
  role: Role
  timeZone: string
  /** The member's own choice, or else the site's. */
  unitSystem: UnitSystem
  site: Site
}

/** `undefined` both for a site that isn't there and for one that the person doesn't belong to. */
export async function findSiteMember(
  db: Kysely<Database>,
  siteCode: string,
  userId: string,
): Promise<SiteMember | undefined> {
  const row = await db
    .selectFrom('site')
    .innerJoin('member', 'member.organizationId', 'site.organization_id')
    .leftJoin('member_setting', (join) =>
      join
        .onRef('member_setting.site_id', '=', 'site.id')
        .onRef('member_setting.user_id', '=', 'member.userId'),
    )
    .where('site.code', '=', siteCode)
    .where('member.userId', '=', userId)
    .select([
      'site.id',
      'site.organization_id',
      ...siteColumns,
      'member.role',
      'member_setting.unit_system as own_unit_system',
    ])
    .executeTakeFirst()
  if (row === undefined) return undefined
  const role = roleSchema.parse(row.role)
  const site = siteOf(row, role)
  return {
    siteId: row.id,
    siteCode: row.code,
    organizationId: row.organization_id,
    userId,
    role,
    timeZone: site.timeZone,
    unitSystem: row.own_unit_system === null ? site.unitSystem : unitSystemSchema.parse(row.own_unit_system),
    site,
  }
}

export interface MemberRecord {
  id: string
  userId: string
  name: string
  email: string
  role: Role
  lastHereAt: Date | null
}

/** The members of a site in the order in which they joined. */
export async function listMemberRecords(db: Kysely<Database>, siteId: number): Promise<MemberRecord[]> {
  const rows = await db
    .selectFrom('member')
    .innerJoin('site', 'site.organization_id', 'member.organizationId')
    .innerJoin('user', 'user.id', 'member.userId')
    .leftJoin('member_setting', (join) =>
      join
        .onRef('member_setting.site_id', '=', 'site.id')
        .onRef('member_setting.user_id', '=', 'member.userId'),
    )
    .where('site.id', '=', siteId)
    .select([
      'member.id',
      'member.userId',
      'member.role',
      'user.name',
      'user.email',
      'member_setting.last_here_at',
    ])
    .orderBy('member.createdAt')
    .orderBy('member.id')
    .execute()
  return rows.map((row) => ({
    id: row.id,
    userId: row.userId,
    name: row.name,
    email: row.email,
    role: roleSchema.parse(row.role),
    lastHereAt: row.last_here_at,
  }))
}

/** Makes somebody a member. @returns false when they are one already, whatever their role */
export async function insertMember(
  db: Kysely<Database>,
  member: { organizationId: string; userId: string; role: Role },
  now: Date,
): Promise<boolean> {
  const row = await db
    .insertInto('member')
    .values({ id: newTextId(), ...member, createdAt: now })
    .onConflict((clash) => clash.columns(['organizationId', 'userId']).doNothing())
    .returning('id')
    .executeTakeFirst()
  return row !== undefined
}

export async function updateRole(
  db: Kysely<Database>,
  organizationId: string,
  memberId: string,
  role: Role,
): Promise<void> {
  await db
    .updateTable('member')
    .set({ role })
    .where('organizationId', '=', organizationId)
    .where('id', '=', memberId)
    .execute()
}

/** Takes somebody out of a site, with their wishes for it. What they made stays. */
export async function deleteMember(
  db: Kysely<Database>,
  siteId: number,
  organizationId: string,
  userId: string,
): Promise<void> {
  for (const table of ['member_setting', 'member_rule'] as const)
    await db.deleteFrom(table).where('site_id', '=', siteId).where('user_id', '=', userId).execute()
  await db
    .deleteFrom('member')
    .where('organizationId', '=', organizationId)
    .where('userId', '=', userId)
    .execute()
}

/** Notes that a member is here, at most every five minutes: pages ask often, and the hour is all that is shown. */
export async function noteMemberHere(
  db: Kysely<Database>,
  siteId: number,
  userId: string,
  now: Date,
): Promise<void> {
  await db
    .insertInto('member_setting')
    .values({ site_id: siteId, user_id: userId, last_here_at: now })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'user_id'])
        .doUpdateSet({ last_here_at: now })
        .where((eb) =>
          eb.or([
            eb('member_setting.last_here_at', 'is', null),
            eb('member_setting.last_here_at', '<', new Date(now.getTime() - 5 * 60_000)),
          ]),
        ),
    )
    .execute()
}
