import 'server-only'
import type { Kysely } from 'kysely'
import { insertChange } from '@/db/queries/changes'
import {
  closeInvitation,
  extendInvitation,
  findInvitation,
  findOpenInvitation,
  insertInvitation,
  listOpenInvitations,
  type InvitationOfSite,
  type InvitationRecord,
} from '@/db/queries/invitations'
import { notifySite } from '@/db/queries/live'
import { findSiteMember, insertMember, listMemberRecords, type SiteMember } from '@/db/queries/members'
import { lockMembersOf } from '@/db/queries/sites'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import { ok } from '@/lib/result'
import { roleSchema, type Role } from '@/lib/sites/permissions'
import type { Invitation, Site } from '@/lib/sites/site'
import type { InvitationView } from '@/lib/sites/invitation-view'
import { invitationMail } from './auth-mails'
import { sendMail } from './mail'
import { fail, failField, notThere, type Outcome } from './problem'
import { overLimit } from './rate-limit'
import type { SignedInUser } from './session'

/** How long an invitation can be taken up. Common practice, no source. */
const openForMs = 7 * 86_400_000
const mostOpen = 50
const mostMailsPerHour = 30

const viewOf = (record: InvitationRecord, now: Date): Invitation[] => {
  const role = roleSchema.safeParse(record.role)
  // A row that we could not have made is no invitation.
  if (!role.success) return []
  return [
    {
      id: record.id,
      email: record.email,
      role: role.data,
      invitedAt: record.invitedAt.toISOString(),
      expiresAt: record.expiresAt.toISOString(),
      state: record.expiresAt > now ? 'waiting' : 'expired',
    },
  ]
}

export async function listInvitations(
  db: Kysely<Database>,
  siteId: number,
  now: Date,
): Promise<Invitation[]> {
  const records = await listOpenInvitations(db, siteId)
  return records.flatMap((record) => viewOf(record, now))
}

/** Invites an address. The mail is the caller's to send, once the invitation is stored. */
export async function createInvitation(
  db: Kysely<Database>,
  actor: SiteMember,
  wanted: { email: string; role: Role },
  now: Date,
): Promise<Outcome<Invitation>> {
  const email = wanted.email.toLowerCase()
  return inTransaction(db, async (trx) => {
    await lockMembersOf(trx, actor.siteId)
    const members = await listMemberRecords(trx, actor.siteId)
    if (members.some((member) => member.email.toLowerCase() === email)) {
      return failField('already-done', 'email', 'belongs to a member already')
    }
    const open = await listOpenInvitations(trx, actor.siteId)
    if (open.some((invitation) => invitation.email === email)) {
      return failField('already-done', 'email', 'invited already: send that mail again, or withdraw it first')
    }
    if (open.length >= mostOpen) {
      return fail(
        'not-possible',
        `A site can have ${mostOpen} open invitations at most. Withdraw some first.`,
      )
    }
    const late = await mailsOverLimit(trx, actor.siteId, now)
    if (late !== undefined) return late
    const made = await insertInvitation(
      trx,
      {
        organizationId: actor.organizationId,
        email,
        role: wanted.role,
        inviterId: actor.userId,
        expiresAt: new Date(now.getTime() + openForMs),
      },
      now,
    )
    await noteChange(trx, actor, made.id, 'create', { role: wanted.role })
    const [view] = viewOf(made, now)
    return view === undefined ? notThere() : ok(view)
  })
}

/** Gives an invitation another week; the caller sends the mail again. */
export async function renewInvitation(
  db: Kysely<Database>,
  actor: SiteMember,
  id: string,
  now: Date,
): Promise<Outcome<Invitation>> {
  return inTransaction(db, async (trx) => {
    const found = await findOpenInvitation(trx, actor.siteId, id)
    if (found === undefined) return notThere()
    const late = await mailsOverLimit(trx, actor.siteId, now)
    if (late !== undefined) return late
    const expiresAt = new Date(now.getTime() + openForMs)
    await extendInvitation(trx, id, expiresAt)
    const [view] = viewOf({ ...found, expiresAt }, now)
    return view === undefined ? notThere() : ok(view)
  })
}

export async function withdrawInvitation(
  db: Kysely<Database>,
  actor: SiteMember,
  id: string,
): Promise<Outcome<undefined>> {
  return inTransaction(db, async (trx) => {
    const found = await findOpenInvitation(trx, actor.siteId, id)
    if (found === undefined || !(await closeInvitation(trx, id, 'canceled'))) return notThere()
    await noteChange(trx, actor, id, 'withdraw')
    return ok(undefined)
  })
}

export const mailInvitation = (
  actor: SiteMember,
  inviter: SignedInUser,
  invitation: Invitation,
): Promise<void> => sendMail(invitationMail(invitation, actor.site.name, inviter.name))

async function mailsOverLimit(db: Kysely<Database>, siteId: number, now: Date) {
  const limit = { key: `invitations:${siteId}`, most: mostMailsPerHour, windowS: 3_600 }
  const retryAfterS = await overLimit(db, [limit], now)
  if (retryAfterS === undefined) return undefined
  return fail('too-many', `A site can send ${mostMailsPerHour} invitations an hour.`, { retryAfterS })
}

/** Why an invitation can't be taken up by this person, or the role that it gives. */
function judge(invitation: InvitationOfSite, user: SignedInUser, now: Date): Outcome<Role> {
  if (invitation.email !== user.email.toLowerCase()) {
    return fail(
      'other-address',
      'This invitation went to another e-mail address. Sign in with that one, or ask for an invitation to yours.',
    )
  }
  if (invitation.status === 'accepted')
    return fail('invitation-over', 'This invitation has been taken up already.')
  if (invitation.status !== 'pending') {
    return fail(
      'invitation-over',
      'This invitation was withdrawn. Ask the person who runs the site for another.',
    )
  }
  if (invitation.expiresAt <= now) {
    return fail(
      'invitation-over',
      'This invitation is too old. Ask the person who runs the site for another.',
    )
  }
  const role = roleSchema.safeParse(invitation.role)
  return role.success
    ? ok(role.data)
    : fail('invitation-over', 'This invitation is not in order. Ask for another.')
}

/** What the invited person sees before taking it up. */
export async function lookAtInvitation(
  db: Kysely<Database>,
  user: SignedInUser,
  id: string,
  now: Date,
): Promise<Outcome<InvitationView>> {
  const invitation = await findInvitation(db, id)
  if (invitation === undefined) return notThere()
  const role = judge(invitation, user, now)
  if (!role.ok) return role
  return ok({
    id,
    siteName: invitation.siteName,
    role: role.value,
    email: invitation.email,
    expiresAt: invitation.expiresAt.toISOString(),
  })
}

/** Takes an invitation up, once: of two at the same moment one becomes the membership. */
export async function acceptInvitation(
  db: Kysely<Database>,
  user: SignedInUser,
  id: string,
  now: Date,
): Promise<Outcome<Site>> {
  return inTransaction(db, async (trx) => {
    const invitation = await findInvitation(trx, id)
    if (invitation === undefined) return notThere()
    const role = judge(invitation, user, now)
    if (!role.ok) return role
    await lockMembersOf(trx, invitation.siteId)
    if (!(await closeInvitation(trx, id, 'accepted'))) {
      return fail('invitation-over', 'This invitation has been taken up already.')
    }
    const { organizationId, siteCode } = invitation
    // Somebody who is a member by now keeps the role that they have.
    const isNew = await insertMember(trx, { organizationId, userId: user.id, role: role.value }, now)
    const member = await findSiteMember(trx, siteCode, user.id)
    if (member === undefined) throw new Error('a member who was just stored is not there')
    if (isNew) await noteChange(trx, member, id, 'accept', { role: role.value })
    return ok(member.site)
  })
}

async function noteChange(
  db: Kysely<Database>,
  actor: SiteMember,
  id: string,
  action: string,
  after?: { role: Role },
): Promise<void> {
  await insertChange(db, actor.siteId, {
    userId: actor.userId,
    subjectKind: 'invitation',
    // The whole id is what the mail's link is worth, so the record shows its beginning only.
    subjectCode: id.slice(0, 8),
    action,
    after,
  })
  await notifySite(db, actor.siteId, 'site')
}
