import type { Kysely } from 'kysely'
import type { Role } from '@/lib/sites/permissions'
import type { Database } from '../schema'
import { newTextId } from './sites'

export interface InvitationRecord {
  id: string
  email: string
  /** As stored: who reads it checks it, as a role that we don't know must not open anything. */
  role: string | null
  status: string
  invitedAt: Date
  expiresAt: Date
}

export interface InvitationOfSite extends InvitationRecord {
  siteId: number
  siteCode: string
  siteName: string
  organizationId: string
}

const columns = [
  'invitation.id',
  'invitation.email',
  'invitation.role',
  'invitation.status',
  'invitation.createdAt',
  'invitation.expiresAt',
] as const

type Row = Omit<InvitationRecord, 'invitedAt'> & { createdAt: Date }

const invitationOf = ({ createdAt, ...row }: Row): InvitationRecord => ({ ...row, invitedAt: createdAt })

/** The invitations of a site that were neither taken up nor withdrawn, newest first. */
export async function listOpenInvitations(db: Kysely<Database>, siteId: number): Promise<InvitationRecord[]> {
  const rows = await db
    .selectFrom('invitation')
    .innerJoin('site', 'site.organization_id', 'invitation.organizationId')
    .where('site.id', '=', siteId)
    .where('invitation.status', '=', 'pending')
    .select(columns)
    .orderBy('invitation.createdAt', 'desc')
    .orderBy('invitation.id')
    .execute()
  return rows.map(invitationOf)
}

/** An open invitation of one site, for those who run it. */
export async function findOpenInvitation(
  db: Kysely<Database>,
  siteId: number,
  id: string,
): Promise<InvitationRecord | undefined> {
  const open = await listOpenInvitations(db, siteId)
  return open.find((invitation) => invitation.id === id)
}

/** Any invitation, for whoever holds its link. */
export async function findInvitation(
  db: Kysely<Database>,
  id: string,
): Promise<InvitationOfSite | undefined> {
  const row = await db
    .selectFrom('invitation')
    .innerJoin('site', 'site.organization_id', 'invitation.organizationId')
    .where('invitation.id', '=', id)
    .select([
      ...columns,
      'invitation.organizationId',
      'site.id as siteId',
      'site.code as siteCode',
      'site.name as siteName',
    ])
    .executeTakeFirst()
  if (row === undefined) return undefined
  const { siteId, siteCode, siteName, organizationId, ...invitation } = row
  return { ...invitationOf(invitation), siteId, siteCode, siteName, organizationId }
}

export async function insertInvitation(
  db: Kysely<Database>,
  invitation: { organizationId: string; email: string; role: Role; inviterId: string; expiresAt: Date },
  now: Date,
): Promise<InvitationRecord> {
  const row = await db
    .insertInto('invitation')
    .values({ id: newTextId(), ...invitation, status: 'pending', createdAt: now })
    .returning(columns)
    .executeTakeFirstOrThrow()
  return invitationOf(row)
}

/** Gives an open invitation a new span of time. */
export async function extendInvitation(db: Kysely<Database>, id: string, expiresAt: Date): Promise<void> {
  await db
    .updateTable('invitation')
    .set({ expiresAt })
    .where('id', '=', id)
    .where('status', '=', 'pending')
    .execute()
}

/** Ends an open invitation in one way or the other. Of two at once only one gets `true`. */
export async function closeInvitation(
  db: Kysely<Database>,
  id: string,
  status: 'accepted' | 'canceled',
): Promise<boolean> {
  const row = await db
    .updateTable('invitation')
    .set({ status })
    .where('id', '=', id)
    .where('status', '=', 'pending')
    .returning('id')
    .executeTakeFirst()
  return row !== undefined
}
