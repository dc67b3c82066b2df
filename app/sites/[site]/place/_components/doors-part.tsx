'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import { useAction } from '@/app/_components/use-action'
import { type Door, type MadeDoor, type NewDoor, newDoorSchema } from '@/lib/door/door'
import { formatAge, formatDay } from '@/lib/format/times'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'

type Named = { id: string; name: string }
type List<Item> = { items: Item[] }

const doorsKey = (site: string) => siteKey(site, 'members', 'doors')

/** Screens by a door, each opened by its own link that can be taken back. */
export function DoorsPart({ reader }: { reader: Reader }) {
  const [made, setMade] = useState<MadeDoor | undefined>()
  const { data, isError } = useSiteQuery<List<Door>>({
    site: reader.site,
    area: 'members',
    key: ['doors'],
    path: '/doors',
  })
  const doors = data?.items ?? []
  const mayChange = may(reader.role, 'doors:change')
  return (
    <Sheet title="Screens by a door" id="doors">
      <p className="max-w-words text-ink-soft">
        A screen that shows what is out, until when, and the hours of one room. It needs no account: its link
        is the key, so give it to that screen alone.
      </p>
      {made ? <MadeLink door={made} /> : null}
      {isError ? <p className="mt-4 text-warn">The screens could not be fetched. Nothing was lost.</p> : null}
      {data && doors.length === 0 ? (
        <div className="mt-4">
          <EmptyState title="No screen yet">An old tablet by the shop’s door will do.</EmptyState>
        </div>
      ) : null}
      <ul className="mt-4 flex flex-col divide-y divide-line">
        {doors.map((door) => (
          <DoorLine key={door.id} reader={reader} door={door} mayChange={mayChange} />
        ))}
      </ul>
      {mayChange ? <NewDoorForm reader={reader} onMade={setMade} /> : null}
    </Sheet>
  )
}

function MadeLink({ door }: { door: MadeDoor }) {
  return (
    <div role="status" className="mt-4 border-l-4 border-heart bg-wash p-4">
      <p>
        The link for <strong>{door.name}</strong>. It is shown this once; open it on the screen.
      </p>
      <p className="mt-2 font-semibold break-all select-all">{door.link}</p>
    </div>
  )
}

function DoorLine({ reader, door, mayChange }: { reader: Reader; door: Door; mayChange: boolean }) {
  const [asks, setAsks] = useState(false)
  const now = new Date(reader.at)
  const revoke = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`/sites/${reader.site}/doors/${door.id}`, { method: 'DELETE' }),
    invalidates: [doorsKey(reader.site)],
    done: `The link of ${door.name} opens nothing any more`,
    onDone: () => {
      setAsks(false)
    },
  })
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 py-3">
      <p className="min-w-0 break-words">
        <strong>{door.name}</strong>, the hours of {door.room.name}.{' '}
        <span className="text-ink-soft">
          Made {formatDay(door.createdAt, reader.timeZone, now)}
          {door.by ? ` by ${door.by}` : ''};{' '}
          {door.lastSeenAt
            ? `last looked at ${formatAge(now.getTime() - new Date(door.lastSeenAt).getTime())}`
            : 'not opened yet'}
          .
        </span>
      </p>
      {mayChange ? (
        <>
          <Button
            onClick={() => {
              setAsks(true)
            }}
          >
            Take the link back
          </Button>
          <ConfirmDialog
            open={asks}
            onOpenChange={setAsks}
            title={`Take back the link of ${door.name}?`}
            confirmLabel="Take it back"
            pending={revoke.pending}
            onConfirm={() => {
              revoke.act({})
            }}
          >
            The screen goes blank at its next look. A new link can be made at any time.
          </ConfirmDialog>
        </>
      ) : null}
    </li>
  )
}

function NewDoorForm({ reader, onMade }: { reader: Reader; onMade: (door: MadeDoor) => void }) {
  const { data } = useSiteQuery<List<Named>>({ site: reader.site, area: 'rooms', path: '/rooms' })
  const rooms = data?.items ?? []
  const form = useForm({ resolver: zodResolver(newDoorSchema), defaultValues: { name: '', roomId: '' } })
  const make = useAction<NewDoor, MadeDoor>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/doors`, { method: 'POST', body, idempotencyKey }),
    invalidates: [doorsKey(reader.site)],
    onDone: (door) => {
      form.reset()
      onMade(door)
    },
    errors: 'inline',
  })
  const errors = form.formState.errors
  return (
    <form
      noValidate
      aria-label="A new screen"
      className="mt-4 flex flex-wrap items-end gap-4"
      onSubmit={form.handleSubmit((body) => {
        make.act(body)
      })}
    >
      <Field label="Where it hangs" error={errors.name?.message ?? make.problem?.errorOf('name')}>
        <Input autoComplete="off" {...form.register('name')} />
      </Field>
      <Field label="Hours of" error={errors.roomId ? 'choose a room' : undefined}>
        <Select {...form.register('roomId')}>
          <option value="">Choose a room</option>
          {rooms.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}
            </option>
          ))}
        </Select>
      </Field>
      <Button type="submit" variant="filled" pending={make.pending}>
        Make a link
      </Button>
      {make.error ? (
        <p role="alert" className="w-full text-warn">
          {make.problem?.detail ?? 'No answer came. Nothing was lost; press again.'}
        </p>
      ) : null}
    </form>
  )
}
