'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { useAction } from '@/app/_components/use-action'
import type { NewRoom, Room } from '@/lib/rooms/room'
import { RoomForm } from './room-form'

export function AddRoom({ site, isFirst = false }: { site: string; isFirst?: boolean }) {
  const [open, setOpen] = useState(false)
  const create = useAction({
    run: (room: NewRoom, idempotencyKey) =>
      apiFetch<Room>(`/sites/${site}/rooms`, { method: 'POST', body: room, idempotencyKey }),
    invalidates: [siteKey(site, 'rooms'), siteKey(site, 'now'), siteKey(site, 'frame')],
    done: (room) => `${room.name} is a room now`,
    errors: 'inline',
    onDone: () => {
      setOpen(false)
    },
  })
  return (
    <>
      <Button
        variant="filled"
        onClick={() => {
          create.reset()
          setOpen(true)
        }}
      >
        {isFirst ? 'Add the first room' : 'Add a room'}
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title="A new room">
        <RoomForm
          defaults={{
            name: '',
            kind: isFirst ? 'cupboard' : 'shop',
            isShared: false,
            keepsDryWork: isFirst,
            note: '',
          }}
          submitWords="Add the room"
          pending={create.pending}
          error={create.error}
          onSubmit={(room) => {
            create.act(room)
          }}
        />
      </Dialog>
    </>
  )
}
