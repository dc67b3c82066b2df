'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Dialog } from '@/app/_components/ui/dialog'
import { useAction } from '@/app/_components/use-action'
import type { NewRoom, Room, RoomDetail } from '@/lib/rooms/room'
import { RoomForm } from '../../_components/room-form'

/** Name, kind and note of a room; and putting it away, which asks first. */
export function EditRoom({ site, room }: { site: string; room: RoomDetail }) {
  const router = useRouter()
  const [open, setOpen] = useState(false)
  const [asking, setAsking] = useState(false)
  const invalidates = [siteKey(site, 'rooms'), siteKey(site, 'now'), siteKey(site, 'frame')]
  const change = useAction({
    run: (changed: NewRoom) =>
      apiFetch<Room>(`/sites/${site}/rooms/${room.id}`, {
        method: 'PATCH',
        body: changed,
        ifMatch: room.version,
      }),
    invalidates,
    done: 'Changed',
    errors: 'inline',
    onDone: () => {
      setOpen(false)
    },
  })
  const putAway = useAction({
    run: () => apiFetch(`/sites/${site}/rooms/${room.id}`, { method: 'DELETE', ifMatch: room.version }),
    invalidates,
    done: `${room.name} is put away`,
    onDone: () => {
      router.push(`/sites/${site}/rooms`)
    },
  })
  return (
    <>
      <Button
        onClick={() => {
          change.reset()
          setOpen(true)
        }}
      >
        Edit the room
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title={room.name}>
        <RoomForm
          defaults={{
            name: room.name,
            kind: room.kind,
            isShared: room.isShared,
            keepsDryWork: room.keepsDryWork,
            note: room.note,
          }}
          submitWords="Keep the changes"
          pending={change.pending}
          error={change.error}
          onSubmit={(changed) => {
            change.act(changed)
          }}
        />
        <div className="mt-6 border-t border-line pt-4">
          <Button
            variant="link"
            onClick={() => {
              setOpen(false)
              setAsking(true)
            }}
          >
            Put the room away
          </Button>
        </div>
      </Dialog>
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title={`Put ${room.name} away?`}
        confirmLabel="Put it away"
        cancelLabel="Keep the room"
        pending={putAway.pending}
        onConfirm={() => {
          putAway.act(undefined)
          setAsking(false)
        }}
      >
        <p>
          It leaves the lists and the rule. Its readings are kept, and what wood has felt there still counts.
        </p>
      </ConfirmDialog>
    </>
  )
}
