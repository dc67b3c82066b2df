'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import { formatDay } from '@/lib/format/times'
import { may, roleWords } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { Invitation } from '@/lib/sites/site'

export function InvitationList({
  reader,
  invitations,
}: {
  reader: Reader
  invitations: readonly Invitation[]
}) {
  return (
    <Sheet title="Waiting" id="invitations">
      <ul className="flex flex-col divide-y divide-line">
        {invitations.map((invitation) => (
          <InvitationLine key={invitation.id} reader={reader} invitation={invitation} />
        ))}
      </ul>
    </Sheet>
  )
}

function InvitationLine({ reader, invitation }: { reader: Reader; invitation: Invitation }) {
  const path = `/sites/${reader.site}/invitations/${invitation.id}`
  const invalidates = [siteKey(reader.site, 'members')]
  const resend = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`${path}/resend`, { method: 'POST' }),
    invalidates,
    done: `Sent again to ${invitation.email}`,
  })
  const withdraw = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(path, { method: 'DELETE' }),
    invalidates,
    done: `The invitation of ${invitation.email} is taken back`,
  })
  const day = (at: string) => formatDay(at, reader.timeZone, new Date(reader.at))
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 py-3">
      <p className="min-w-0 break-words">
        <strong>{invitation.email}</strong> was invited as {roleWords[invitation.role].toLowerCase()} on{' '}
        {day(invitation.invitedAt)}.{' '}
        <span className={invitation.state === 'expired' ? 'text-warn' : 'text-ink-soft'}>
          {invitation.state === 'expired'
            ? `The link stopped working on ${day(invitation.expiresAt)}.`
            : `The link works until ${day(invitation.expiresAt)}.`}
        </span>
      </p>
      {may(reader.role, 'invitations:change') ? (
        <div className="flex flex-wrap gap-3">
          <Button
            pending={resend.pending}
            onClick={() => {
              resend.act({})
            }}
          >
            Send it again
          </Button>
          <Button
            variant="link"
            pending={withdraw.pending}
            onClick={() => {
              withdraw.act({})
            }}
          >
            Take it back
          </Button>
        </div>
      ) : null}
    </li>
  )
}
