import type { Kysely } from 'kysely'
import { roleSchema, type Role } from '@/lib/sites/permissions'
import { unitSystemSchema, type Site, type UnitSystem } from '@/lib/sites/site'
import type { Database } from '../schema'

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
      'site.code',
      'site.organization_id',
      'site.name',
      'site.time_zone',
      'site.unit_system',
      'site.quiet_from',
      'site.quiet_to',
      'site.lock_up_at',
      'site.is_demo',
      'site.version',
      'member.role',
      'member_setting.unit_system as own_unit_system',
    ])
    .executeTakeFirst()
  if (row === undefined) return undefined
  const role = roleSchema.parse(row.role)
  const unitSystem = unitSystemSchema.parse(row.unit_system)
  return {
    siteId: row.id,
    siteCode: row.code,
    organizationId: row.organization_id,
    userId,
    role,
    timeZone: row.time_zone,
    unitSystem: row.own_unit_system === null ? unitSystem : unitSystemSchema.parse(row.own_unit_system),
    site: {
      id: row.code,
      name: row.name,
      timeZone: row.time_zone,
      unitSystem,
      // A time of day comes as 22:00:00.
      quietFrom: row.quiet_from.slice(0, 5),
      quietTo: row.quiet_to.slice(0, 5),
      lockUpAt: row.lock_up_at.slice(0, 5),
      isDemo: row.is_demo,
      version: row.version,
      role,
    },
  }
}
