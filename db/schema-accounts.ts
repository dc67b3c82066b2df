import type { ColumnType } from 'kysely'

/** The account library's part of the database: its names and its letters. */

type Instant = ColumnType<Date, Date | string, Date | string>
type InstantDefault = ColumnType<Date, Date | string | undefined, Date | string>

interface UserTable {
  id: string
  name: string
  email: string
  emailVerified: boolean
  image: string | null
  createdAt: InstantDefault
  updatedAt: InstantDefault
}

interface SessionTable {
  id: string
  expiresAt: Instant
  token: string
  createdAt: InstantDefault
  updatedAt: Instant
  ipAddress: string | null
  userAgent: string | null
  userId: string
  activeOrganizationId: string | null
}

interface AccountTable {
  id: string
  accountId: string
  providerId: string
  userId: string
  accessToken: string | null
  refreshToken: string | null
  idToken: string | null
  accessTokenExpiresAt: Instant | null
  refreshTokenExpiresAt: Instant | null
  scope: string | null
  password: string | null
  createdAt: InstantDefault
  updatedAt: Instant
}

interface OrganizationTable {
  id: string
  name: string
  slug: string
  logo: string | null
  createdAt: Instant
  metadata: string | null
}

interface MemberTable {
  id: string
  organizationId: string
  userId: string
  role: string
  createdAt: Instant
}

interface InvitationTable {
  id: string
  organizationId: string
  email: string
  role: string | null
  status: string
  expiresAt: Instant
  createdAt: InstantDefault
  inviterId: string
}

export interface AccountTables {
  user: UserTable
  session: SessionTable
  account: AccountTable
  organization: OrganizationTable
  member: MemberTable
  invitation: InvitationTable
}
