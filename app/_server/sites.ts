import 'server-only'
import type { Kysely } from 'kysely'
import { changedFields, insertChange } from '@/db/queries/changes'
import { notifySite } from '@/db/queries/live'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import { insertRoom } from '@/db/queries/rooms'
import { holdFiguresAlone, rebuildSiteFigures } from '@/db/queries/rollups'
import {
  countOwnedSites,
  deleteSite,
  deleteUsersWithoutSite,
  insertSite,
  listSitesOf,
  updateSite,
} from '@/db/queries/sites'
import { allowLongStatements, inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import { demoAccounts } from '@/lib/sites/demo'
import type { NewSite, Site, SiteChange } from '@/lib/sites/site'
import { fail, failField, notThere, type Outcome } from './problem'

/** Guards against a script that makes sites without end; nobody runs as many. */
const mostOwnedSites = 20

export const listSites = (db: Kysely<Database>, userId: string): Promise<Site[]> => listSitesOf(db, userId)

/** Makes a site with its first rooms and its maker as owner, all of it or nothing. */
export async function createSite(
  db: Kysely<Database>,
  userId: string,
  wanted: NewSite,
  now: Date,
): Promise<Outcome<Site>> {
  const names = wanted.rooms.map((room) => room.name.toLowerCase())
  const twice = names.findIndex((name, index) => names.indexOf(name) !== index)
  if (twice !== -1) return failField('name-taken', `rooms.${twice}.name`, 'another room has that name')
  return inTransaction(db, async (trx) => {
    if ((await countOwnedSites(trx, userId)) >= mostOwnedSites) {
      return fail('not-possible', `One person can run ${mostOwnedSites} sites at most.`)
    }
    const { id, site } = await insertSite(trx, wanted, userId, now)
    for (const room of wanted.rooms) {
      await insertRoom(trx, id, { ...room, isShared: false, note: '' }, now)
    }
    await insertChange(trx, id, { userId, subjectKind: 'site', subjectCode: site.id, action: 'create' })
    return ok(site)
  })
}

/** Changes the place's own settings; refused when somebody else changed them since they were read. */
export async function changeSite(
  db: Kysely<Database>,
  member: SiteMember,
  change: SiteChange,
  version: number,
): Promise<Outcome<Site>> {
  const isNewZone = change.timeZone !== undefined && change.timeZone !== member.timeZone
  return inTransaction(db, async (trx) => {
    // Days begin at other instants in another zone, so every daily figure is made again, in the same step.
    if (isNewZone) await holdFiguresAlone(trx, member.siteId)
    const changed = await updateSite(trx, member.siteId, version, change)
    if (changed === undefined) return staleSite(trx, member)
    if (isNewZone) {
      await allowLongStatements(trx)
      await rebuildSiteFigures(trx, member.siteId)
    }
    const { id, name, timeZone, unitSystem, quietFrom, quietTo, lockUpAt, scaleStepG } = member.site
    const before = { name, timeZone, unitSystem, quietFrom, quietTo, lockUpAt, scaleStepG }
    await insertChange(trx, member.siteId, {
      userId: member.userId,
      subjectKind: 'site',
      subjectCode: id,
      action: 'update',
      ...changedFields(before, change),
    })
    await notifySite(trx, member.siteId, 'site')
    return ok({ ...changed, role: member.role })
  })
}

async function staleSite(db: Kysely<Database>, member: SiteMember): Promise<Outcome<Site>> {
  const now = await findSiteMember(db, member.siteCode, member.userId)
  if (now === undefined) return notThere()
  return fail(
    'changed-meanwhile',
    'Somebody changed these settings since you opened them. Look at them again.',
    {
      current: now.site,
      version: now.site.version,
    },
  )
}

/** Deletes a site for good. Its name has to be typed in, so that no stray press does it; the demo goes in one press. */
export async function removeSite(
  db: Kysely<Database>,
  member: SiteMember,
  confirmedName: string | undefined,
  now: Date,
): Promise<Outcome<undefined>> {
  if (!member.site.isDemo && confirmedName?.trim() !== member.site.name) {
    return failField('not-possible', 'name', 'not the name of this site')
  }
  return inTransaction(db, async (trx) => {
    await allowLongStatements(trx)
    await holdFiguresAlone(trx, member.siteId)
    await notifySite(trx, member.siteId, 'site')
    await deleteSite(trx, member.siteId, now)
    if (member.site.isDemo) {
      await deleteUsersWithoutSite(
        trx,
        demoAccounts.map((account) => account.email),
      )
    }
    return ok(undefined)
  })
}
