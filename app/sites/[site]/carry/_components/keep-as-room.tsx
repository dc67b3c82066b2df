'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { Sheet } from '@/app/_components/ui/sheet'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { useAction } from '@/app/_components/use-action'
import type { ToldAir } from '@/lib/carry/told-air'
import type { Room, RoomKind } from '@/lib/rooms/room'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'

const KINDS: readonly { kind: RoomKind; words: string }[] = [
  { kind: 'house', words: 'a house, hall or gallery' },
  { kind: 'van', words: 'a van' },
  { kind: 'shop', words: 'a shop' },
  { kind: 'outdoor', words: 'outdoors' },
]

type KeepAsRoomProps = { reader: Reader; air: ToldAir; onKept: (roomId: string) => void }

/** What goes to air as told can't be watched: kept as a room, with what was typed as its reading, it can. */
export function KeepAsRoom({ reader, air, onKept }: KeepAsRoomProps) {
  const [kind, setKind] = useState<RoomKind>('house')
  const keep = useAction({
    run: async (as: { air: ToldAir; kind: RoomKind }, idempotencyKey) => {
      const room = await apiFetch<Room>(`/sites/${reader.site}/rooms`, {
        method: 'POST',
        body: { name: as.air.name, kind: as.kind },
        idempotencyKey,
      })
      await apiFetch(`/sites/${reader.site}/rooms/${room.id}/readings`, {
        method: 'POST',
        body: { temperatureC: as.air.temperatureC, humidityPct: as.air.humidityPct },
        idempotencyKey: `${idempotencyKey}-reading`,
      })
      return room
    },
    invalidates: (['now', 'rooms', 'carries'] as const).map((area) => siteKey(reader.site, area)),
    done: (room) => `${room.name} is a room now`,
    errors: 'inline',
    onDone: (room) => {
      onKept(room.id)
    },
  })
  const isAllowed = may(reader.role, 'rooms:change')
  return (
    <Sheet id="keep-as-room" title="To log it out there">
      <p className="mb-3 max-w-words">
        Air that was typed can be asked about, not watched. Kept as a room, with what you typed as its first
        reading, {air.name} can have a carry that is watched.
      </p>
      {isAllowed ? (
        <div className="flex flex-wrap items-center gap-3">
          <SentenceSelect
            label="What kind of place it is"
            value={kind}
            onChange={(event) => {
              const chosen = KINDS.find((one) => one.kind === event.target.value)
              if (chosen) setKind(chosen.kind)
            }}
          >
            {KINDS.map((one) => (
              <option key={one.kind} value={one.kind}>
                {one.words}
              </option>
            ))}
          </SentenceSelect>
          <Button
            pending={keep.pending}
            onClick={() => {
              keep.act({ air, kind })
            }}
          >
            Keep {air.name} as a room
          </Button>
        </div>
      ) : (
        <p className="text-ink-soft">Somebody who may change rooms can add it.</p>
      )}
      {keep.error ? <ErrorCallout error={keep.error} /> : null}
    </Sheet>
  )
}
