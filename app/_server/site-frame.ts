import 'server-only'
import type { Kysely } from 'kysely'
import { noteMemberHere, type SiteMember } from '@/db/queries/members'
import { loadRuleBook } from '@/db/queries/rules'
import { countNewNotices, countPieces, countRooms, listSensorsHeard } from '@/db/queries/site-counts'
import { listSitesOf } from '@/db/queries/sites'
import type { Database } from '@/db/schema'
import { silentAfterOf } from '@/lib/notices/rule-settings'
import { may } from '@/lib/sites/permissions'
import type { SiteFrame } from '@/lib/sites/site'
import type { SignedInUser } from './session'

const newForMs = 30 * 86_400_000

/** What the frame round every page of a site shows, counted for what this member may see. */
export async function getSiteFrame(
  db: Kysely<Database>,
  member: SiteMember,
  user: SignedInUser,
  now: Date,
): Promise<SiteFrame> {
  await noteMemberHere(db, member.siteId, member.userId, now)
  const { siteId, role } = member
  const onlyShared = role === 'onlooker'
  const [sites, rooms, pieces, sensors, rules, newNotices] = await Promise.all([
    listSitesOf(db, member.userId),
    countRooms(db, siteId, onlyShared),
    countPieces(db, siteId, onlyShared),
    may(role, 'sensors:see') ? listSensorsHeard(db, siteId) : [],
    loadRuleBook(db, siteId),
    may(role, 'notices:see')
      ? countNewNotices(db, siteId, member.userId, new Date(now.getTime() - newForMs))
      : 0,
  ])
  const silent = sensors.filter(({ heardAt, usualGapS }) => {
    return heardAt !== null && now.getTime() - heardAt.getTime() > silentAfterOf(rules, usualGapS)
  }).length
  const heard = sensors.filter(({ heardAt }) => heardAt !== null).length - silent
  return {
    site: member.site,
    sites: sites.map(({ id, name }) => ({ id, name })),
    user: { name: user.name, email: user.email },
    unitSystem: member.unitSystem,
    counts: {
      rooms,
      sensors: sensors.length,
      sensorsHeard: heard,
      sensorsSilent: silent,
      pieces,
      newNotices,
    },
    at: now.toISOString(),
  }
}
