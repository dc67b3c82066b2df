import type { Kysely } from 'kysely'
import { insertSite, newTextId } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import type { Role } from '@/lib/sites/permissions'

/** A person whose address is proved, without a password. */
export async function seedUser(db: Kysely<Database>, name: string, now: Date): Promise<string> {
  const id = newTextId()
  await db
    .insertInto('user')
    .values({
      id,
      name,
      email: `${name}.${id.slice(0, 6).toLowerCase()}@example.org`,
      emailVerified: true,
      image: null,
      createdAt: now,
      updatedAt: now,
    })
    .execute()
  return id
}

export interface SeededSite {
  siteId: number
  siteCode: string
  organizationId: string
  ownerId: string
  /** Adds a member with a role and says who it is. */
  join(role: Role, settings?: { mailOn?: boolean; onHouseList?: boolean }): Promise<string>
}

/** A site with its owner, straight into the database. */
export async function seedSite(
  db: Kysely<Database>,
  now: Date,
  name = 'Test Yard',
  timeZone = 'Europe/London',
): Promise<SeededSite> {
  const ownerId = await seedUser(db, 'owner', now)
  const { id: siteId, site } = await insertSite(db, { name, timeZone, unitSystem: 'metric' }, ownerId, now)
  const { organization_id: organizationId } = await db
    .selectFrom('site')
    .where('id', '=', siteId)
    .select('organization_id')
    .executeTakeFirstOrThrow()
  return {
    siteId,
    siteCode: site.id,
    organizationId,
    ownerId,
    async join(role, { mailOn = true, onHouseList = false } = {}) {
      const userId = await seedUser(db, role, now)
      await db
        .insertInto('member')
        .values({ id: newTextId(), organizationId, userId, role, createdAt: now })
        .execute()
      await db
        .insertInto('member_setting')
        .values({
          site_id: siteId,
          user_id: userId,
          unit_system: null,
          mail_on: mailOn,
          on_house_list: onHouseList,
          last_here_at: null,
        })
        .execute()
      return userId
    },
  }
}
