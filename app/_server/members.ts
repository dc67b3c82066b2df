import 'server-only'
import type { Kysely } from 'kysely'
import { insertChange } from '@/db/queries/changes'
import { notifySite } from '@/db/queries/live'
import {
  deleteMember,
  listMemberRecords,
  updateRole,
  type MemberRecord,
  type SiteMember,
} from '@/db/queries/members'
import { lockMembersOf } from '@/db/queries/sites'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import type { Role } from '@/lib/sites/permissions'
import type { Member } from '@/lib/sites/site'
import { fail, notThere, type Outcome } from './problem'

const ownersAmong = (records: readonly MemberRecord[]): number =>
  records.filter((record) => record.role === 'owner').length

function memberOf(record: MemberRecord, records: readonly MemberRecord[], reader: SiteMember): Member {
  return {
    id: record.id,
    name: record.name,
    email: reader.role === 'onlooker' ? undefined : record.email,
    role: record.role,
    isYou: record.userId === reader.userId,
    isOnlyOwner: record.role === 'owner' && ownersAmong(records) === 1,
    lastHereAt: record.lastHereAt?.toISOString() ?? null,
  }
}

export async function listMembers(db: Kysely<Database>, reader: SiteMember): Promise<Member[]> {
  const records = await listMemberRecords(db, reader.siteId)
  return records.map((record) => memberOf(record, records, reader))
}

const noOwnerLeft = () =>
  fail('last-owner', 'This is the last owner. Make somebody else an owner first, or delete the site.')

/** Gives a member another role, effective at their next request. */
export async function changeRole(
  db: Kysely<Database>,
  actor: SiteMember,
  memberId: string,
  role: Role,
): Promise<Outcome<Member>> {
  return withMembers(db, actor, async (trx, records) => {
    const target = records.find((record) => record.id === memberId)
    if (target === undefined) return notThere()
    if (target.role === 'owner' && role !== 'owner' && ownersAmong(records) === 1) return noOwnerLeft()
    if (target.role !== role) {
      await updateRole(trx, actor.organizationId, memberId, role)
      await noteChange(trx, actor, target, 'update', { role })
    }
    const after = records.map((record) => (record.id === memberId ? { ...record, role } : record))
    return ok(memberOf({ ...target, role }, after, actor))
  })
}

/** Takes a member out of the site, effective at their next request. */
export async function removeMember(
  db: Kysely<Database>,
  actor: SiteMember,
  memberId: string,
): Promise<Outcome<undefined>> {
  return withMembers(db, actor, (trx, records) => {
    return takeOut(
      trx,
      actor,
      records,
      records.find((record) => record.id === memberId),
    )
  })
}

/** Everybody may leave but the last owner: a site that nobody runs could never be put right. */
export async function leaveSite(db: Kysely<Database>, member: SiteMember): Promise<Outcome<undefined>> {
  return withMembers(db, member, (trx, records) => {
    return takeOut(
      trx,
      member,
      records,
      records.find((record) => record.userId === member.userId),
    )
  })
}

async function takeOut(
  db: Kysely<Database>,
  actor: SiteMember,
  records: readonly MemberRecord[],
  target: MemberRecord | undefined,
): Promise<Outcome<undefined>> {
  if (target === undefined) return notThere()
  if (target.role === 'owner' && ownersAmong(records) === 1) return noOwnerLeft()
  await deleteMember(db, actor.siteId, actor.organizationId, target.userId)
  await noteChange(db, actor, target, 'remove')
  return ok(undefined)
}

/**
 * Works on the members while nobody else does. The actor is looked at again under the lock: of two owners who put each
 * other down at the same moment, the second is no owner any more.
 */
async function withMembers<T>(
  db: Kysely<Database>,
  actor: SiteMember,
  work: (trx: Kysely<Database>, records: MemberRecord[]) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  return inTransaction(db, async (trx) => {
    await lockMembersOf(trx, actor.siteId)
    const records = await listMemberRecords(trx, actor.siteId)
    const self = records.find((record) => record.userId === actor.userId)
    if (self === undefined) return notThere()
    if (self.role !== actor.role) return fail('not-yours-to-do', 'Your role here has just changed.')
    return work(trx, records)
  })
}

async function noteChange(
  db: Kysely<Database>,
  actor: SiteMember,
  target: MemberRecord,
  action: string,
  after?: { role: Role },
): Promise<void> {
  await insertChange(db, actor.siteId, {
    userId: actor.userId,
    subjectKind: 'member',
    subjectCode: target.id,
    action,
    before: { role: target.role },
    after,
  })
  await notifySite(db, actor.siteId, 'site')
}
