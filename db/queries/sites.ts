import { randomBytes } from 'node:crypto'
import { type Kysely, type Selectable, sql } from 'kysely'
import { roleSchema, type Role } from '@/lib/sites/permissions'
import { unitSystemSchema, type NewSite, type Site, type SiteChange } from '@/lib/sites/site'
import type { Database } from '../schema'
import { newCode } from './counters'

export const siteColumns = [
  'site.code',
  'site.name',
  'site.time_zone',
  'site.unit_system',
  'site.quiet_from',
  'site.quiet_to',
  'site.lock_up_at',
  'site.scale_step_g',
  'site.is_demo',
  'site.version',
] as const

type SiteRow = Pick<
  Selectable<Database['site']>,
  | 'code'
  | 'name'
  | 'time_zone'
  | 'unit_system'
  | 'quiet_from'
  | 'quiet_to'
  | 'lock_up_at'
  | 'scale_step_g'
  | 'is_demo'
  | 'version'
>

export function siteOf(row: SiteRow, role: Role): Site {
  return {
    id: row.code,
    name: row.name,
    timeZone: row.time_zone,
    unitSystem: unitSystemSchema.parse(row.unit_system),
    // A time of day comes as 22:00:00.
    quietFrom: row.quiet_from.slice(0, 5),
    quietTo: row.quiet_to.slice(0, 5),
    lockUpAt: row.lock_up_at.slice(0, 5),
    scaleStepG: row.scale_step_g,
    isDemo: row.is_demo,
    version: row.version,
    role,
  }
}

/** The sites of a person, oldest first. */
export async function listSitesOf(db: Kysely<Database>, userId: string): Promise<Site[]> {
  const rows = await db
    .selectFrom('site')
    .innerJoin('member', 'member.organizationId', 'site.organization_id')
    .where('member.userId', '=', userId)
    .select([...siteColumns, 'member.role'])
    .orderBy('site.id')
    .execute()
  return rows.map((row) => siteOf(row, roleSchema.parse(row.role)))
}

/** How many sites a person runs. */
export async function countOwnedSites(db: Kysely<Database>, userId: string): Promise<number> {
  const row = await db
    .selectFrom('member')
    .where('userId', '=', userId)
    .where('role', '=', 'owner')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow()
  return row.n
}

export interface InsertedSite {
  id: number
  site: Site
}

/** Makes a site with its organisation and its first owner. Call it in a transaction. */
export async function insertSite(
  db: Kysely<Database>,
  { name, timeZone, unitSystem }: Pick<NewSite, 'name' | 'timeZone' | 'unitSystem'>,
  ownerId: string,
  now: Date,
): Promise<InsertedSite> {
  const code = newCode()
  const organizationId = newTextId()
  await db
    .insertInto('organization')
    .values({ id: organizationId, name, slug: code, logo: null, createdAt: now, metadata: null })
    .execute()
  await db
    .insertInto('member')
    .values({ id: newTextId(), organizationId, userId: ownerId, role: 'owner', createdAt: now })
    .execute()
  const row = await db
    .insertInto('site')
    .values({
      code,
      organization_id: organizationId,
      name,
      time_zone: timeZone,
      unit_system: unitSystem,
      created_at: now,
    })
    .returning(['site.id', ...siteColumns])
    .executeTakeFirstOrThrow()
  return { id: row.id, site: siteOf(row, 'owner') }
}

/** An id for the tables of the account library, whose ids are long texts. */
export const newTextId = (): string => randomBytes(24).toString('base64url')

/** Changes a site that is still at the version that the writer saw; `undefined` when it has moved on. */
export async function updateSite(
  db: Kysely<Database>,
  siteId: number,
  version: number,
  change: SiteChange,
): Promise<Omit<Site, 'role'> | undefined> {
  const row = await db
    .updateTable('site')
    .set((eb) => ({
      name: change.name,
      time_zone: change.timeZone,
      unit_system: change.unitSystem,
      quiet_from: change.quietFrom,
      quiet_to: change.quietTo,
      lock_up_at: change.lockUpAt,
      scale_step_g: change.scaleStepG,
      version: eb('version', '+', 1),
    }))
    .where('id', '=', siteId)
    .where('version', '=', version)
    .returning(siteColumns)
    .executeTakeFirst()
  if (row === undefined) return undefined
  const { role: _role, ...site } = siteOf(row, 'owner')
  return site
}

/** Keeps the step of the scale that was told first; what is known already stays. */
export async function rememberScaleStep(
  db: Kysely<Database>,
  siteId: number,
  stepG: number,
): Promise<boolean> {
  const row = await db
    .updateTable('site')
    .set((eb) => ({ scale_step_g: stepG, version: eb('version', '+', 1) }))
    .where('id', '=', siteId)
    .where('scale_step_g', 'is', null)
    .returning('id')
    .executeTakeFirst()
  return row !== undefined
}

/** Lets one writer at a time change who belongs to a site, so that two owners can't both step down at once. */
export async function lockMembersOf(db: Kysely<Database>, siteId: number): Promise<void> {
  await db.selectFrom('site').where('id', '=', siteId).select('id').forUpdate().executeTakeFirst()
}

/**
 * Deletes a site and everything of it. The codes that stood in its sensors' topics are kept, so that they are never
 * given out again. Call it in a transaction.
 */
export async function deleteSite(db: Kysely<Database>, siteId: number, now: Date): Promise<void> {
  await sql`
    insert into retired_code (code, retired_at)
    select code, ${now}::timestamptz from site where id = ${siteId}
    union select code, ${now}::timestamptz from sensor where site_id = ${siteId}
    on conflict do nothing`.execute(db)
  // What points at rooms goes before them: such a key is looked at before the cascade has come round to its own table.
  for (const table of ['notice', 'piece_place', 'carry_piece', 'carry', 'piece', 'reading'] as const) {
    await db.deleteFrom(table).where('site_id', '=', siteId).execute()
  }
  const { organization_id: organizationId } = await db
    .selectFrom('site')
    .where('id', '=', siteId)
    .select('organization_id')
    .executeTakeFirstOrThrow()
  // Rooms, sensors, pieces, carries and notices go with the site, and the site with its organisation.
  await db.deleteFrom('organization').where('id', '=', organizationId).execute()
}

/** Deletes those accounts, of the given addresses, that belong to no site any more. */
export async function deleteUsersWithoutSite(db: Kysely<Database>, emails: readonly string[]): Promise<void> {
  await db
    .deleteFrom('user')
    .where('email', 'in', [...emails])
    .where((eb) =>
      eb.not(
        eb.exists(eb.selectFrom('member').whereRef('member.userId', '=', 'user.id').select('member.id')),
      ),
    )
    .execute()
}

/** The code of a site by its number, for links that were signed here. */
export async function findSiteCode(db: Kysely<Database>, siteId: number): Promise<string | undefined> {
  const row = await db.selectFrom('site').where('id', '=', siteId).select('code').executeTakeFirst()
  return row?.code
}

/** Whether there is a demo to try. */
export async function findDemoSiteCode(db: Kysely<Database>): Promise<string | undefined> {
  const row = await db
    .selectFrom('site')
    .where('is_demo', '=', true)
    .select('code')
    .orderBy('id')
    .executeTakeFirst()
  return row?.code
}
