'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { Member } from '@/lib/sites/site'
import { InviteDialog } from './invite-dialog'
import { memberGrid, MemberLine } from './member-line'

export function MemberList({ reader, members }: { reader: Reader; members: readonly Member[] }) {
  const [isInviting, setIsInviting] = useState(false)
  const mayInvite = may(reader.role, 'invitations:change')
  return (
    <Sheet
      title="Members"
      id="members"
      action={
        mayInvite ? (
          <Button
            variant="filled"
            onClick={() => {
              setIsInviting(true)
            }}
          >
            Invite someone
          </Button>
        ) : null
      }
    >
      <div
        aria-hidden="true"
        className={`${memberGrid} border-b border-edge pb-2 text-label font-semibold text-ink-soft max-sm:hidden`}
      >
        <span>Name</span>
        <span>E-mail</span>
        <span>Role</span>
        <span>Last here</span>
      </div>
      <ul className="flex flex-col divide-y divide-line">
        {members.map((member) => (
          <MemberLine key={member.id} reader={reader} member={member} />
        ))}
      </ul>
      {mayInvite ? <InviteDialog reader={reader} open={isInviting} onOpenChange={setIsInviting} /> : null}
    </Sheet>
  )
}
