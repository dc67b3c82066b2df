'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { Field } from '@/app/_components/ui/field'
import { Select } from '@/app/_components/ui/select'
import { useAction } from '@/app/_components/use-action'
import type { PieceDetail } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import type { RoomChoice } from './first-piece'

type MovePieceProps = { reader: Reader; piece: PieceDetail; rooms: readonly RoomChoice[] }

/** A move is for good, until the next one. What comes back is a carry, and this says so. */
export function MovePiece({ reader, piece, rooms }: MovePieceProps) {
  const others = rooms.filter((room) => room.id !== piece.room?.id)
  const [isOpen, setIsOpen] = useState(false)
  const [roomId, setRoomId] = useState(others[0]?.id ?? '')
  const move = useAction<{ roomId: string }, unknown>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/pieces/${piece.id}/events`, {
        method: 'POST',
        body: { kind: 'move', ...body },
        idempotencyKey,
      }),
    invalidates: [siteKey(reader.site, 'pieces'), siteKey(reader.site, 'now'), siteKey(reader.site, 'rooms')],
    done: (_answer, input) =>
      `${piece.number} is in ${rooms.find((room) => room.id === input.roomId)?.name ?? 'its new place'}`,
    onDone: () => {
      setIsOpen(false)
    },
    errors: 'inline',
  })
  if (others.length === 0) return null
  return (
    <>
      <Button
        className="max-sm:grow"
        onClick={() => {
          setIsOpen(true)
        }}
      >
        Move it
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={setIsOpen}
        title={`Move ${piece.number}`}
        description="For good, until you move it again. If it comes back today, check a carry instead: that keeps watch over the time."
      >
        <form
          className="flex flex-col gap-4"
          onSubmit={(event) => {
            event.preventDefault()
            move.act({ roomId })
          }}
        >
          <Field
            label="To"
            error={
              move.error
                ? (move.problem?.errorOf('roomId') ??
                  move.problem?.detail ??
                  'No answer came. Nothing was changed.')
                : undefined
            }
          >
            <Select
              value={roomId}
              onChange={(event) => {
                setRoomId(event.target.value)
              }}
            >
              {others.map((room) => (
                <option key={room.id} value={room.id}>
                  {room.name}
                </option>
              ))}
            </Select>
          </Field>
          <Button type="submit" variant="filled" pending={move.pending}>
            Move it
          </Button>
        </form>
      </Dialog>
    </>
  )
}
