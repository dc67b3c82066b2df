'use client'

import type { Reader } from '@/lib/sites/reader'
import type { Invitation, Member } from '@/lib/sites/site'
import { InvitationList } from './invitation-list'
import { LeaveSite } from './leave-site'
import { MemberList } from './member-list'
import { RoleTable } from './role-table'

type MembersPartProps = {
  reader: Reader
  /** Null for readers who may not see them. */
  members: readonly Member[] | null
  invitations: readonly Invitation[] | null
}

export function MembersPart({ reader, members, invitations }: MembersPartProps) {
  const you = members?.find((member) => member.isYou)
  return (
    <>
      {members ? <MemberList reader={reader} members={members} /> : null}
      {invitations && invitations.length > 0 ? (
        <InvitationList reader={reader} invitations={invitations} />
      ) : null}
      <RoleTable role={reader.role} />
      <LeaveSite reader={reader} isOnlyOwner={you?.isOnlyOwner ?? false} />
    </>
  )
}
