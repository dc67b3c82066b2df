'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Age } from '@/app/_components/ui/age'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Select } from '@/app/_components/ui/select'
import { useAction } from '@/app/_components/use-action'
import { may, type Role, roleSchema, roleWords } from '@/lib/sites/permissions'
import { roleDeeds } from '@/lib/sites/role-words'
import type { Reader } from '@/lib/sites/reader'
import type { Member } from '@/lib/sites/site'

/** The columns of a member's line from a tablet's width up. */
export const memberGrid = 'grid gap-x-4 sm:grid-cols-[minmax(0,4fr)_minmax(0,5fr)_10rem_minmax(0,3fr)_5.5rem]'

export function MemberLine({ reader, member }: { reader: Reader; member: Member }) {
  const [isRemoving, setIsRemoving] = useState(false)
  const [wanted, setWanted] = useState<Role | null>(null)
  const path = `/sites/${reader.site}/members/${member.id}`
  const invalidates = [siteKey(reader.site, 'members')]
  const change = useAction<{ role: Role }, unknown>({
    run: (body) => apiFetch(path, { method: 'PATCH', body }),
    invalidates,
    done: (_answer, { role }) => `${member.name} is now ${roleWords[role].toLowerCase()}`,
    onDone: () => {
      setWanted(null)
    },
  })
  const remove = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(path, { method: 'DELETE' }),
    invalidates,
    done: `${member.name} is no member any more`,
    onDone: () => {
      setIsRemoving(false)
    },
  })
  // An owner changes others; for oneself there is "leave", so that nobody locks themselves out by a slip.
  const isChangeable = may(reader.role, 'members:change') && !member.isYou

  return (
    <li className={`${memberGrid} items-center gap-y-2 py-3`}>
      <p className="font-semibold">
        {member.name}
        {member.isYou ? ', you' : ''}
      </p>
      <p className="break-all text-ink-soft">{member.email}</p>
      {isChangeable ? (
        <Select
          aria-label={`Role of ${member.name}`}
          value={member.role}
          disabled={change.pending}
          onChange={(event) => {
            const parsed = roleSchema.safeParse(event.target.value)
            if (parsed.success) setWanted(parsed.data)
          }}
        >
          {roleSchema.options.map((role) => (
            <option key={role} value={role}>
              {roleWords[role]}
            </option>
          ))}
        </Select>
      ) : (
        <p>{roleWords[member.role]}</p>
      )}
      <p className="text-label text-ink-soft sm:text-body">
        <span className="sm:sr-only">Last here: </span>
        {member.lastHereAt === null ? (
          'never'
        ) : (
          <Age at={member.lastHereAt} timeZone={reader.timeZone} now={reader.at} />
        )}
      </p>
      {isChangeable ? (
        <Button
          variant="link"
          className="justify-self-start sm:justify-self-end"
          onClick={() => {
            setIsRemoving(true)
          }}
        >
          Remove<span className="sr-only"> {member.name}</span>
        </Button>
      ) : (
        <p className="text-label text-ink-soft sm:text-right">{member.isOnlyOwner ? 'the only owner' : ''}</p>
      )}
      <ConfirmDialog
        open={wanted !== null}
        onOpenChange={(isOpen) => {
          if (!isOpen) setWanted(null)
        }}
        title={wanted ? `Make ${member.name} ${roleWords[wanted].toLowerCase()}?` : ''}
        confirmLabel="Change the role"
        pending={change.pending}
        onConfirm={() => {
          if (wanted) change.act({ role: wanted })
        }}
      >
        <p>{wanted ? roleDeeds[wanted] : ''} It counts from the next thing that they do.</p>
      </ConfirmDialog>
      <ConfirmDialog
        open={isRemoving}
        onOpenChange={setIsRemoving}
        title={`Remove ${member.name}?`}
        confirmLabel="Remove"
        pending={remove.pending}
        onConfirm={() => {
          remove.act({})
        }}
      >
        <p>
          They see nothing of {reader.siteName} from now on. What they made and moved stays in the record.
        </p>
      </ConfirmDialog>
    </li>
  )
}
