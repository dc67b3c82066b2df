'use client'

import { MoistureRule } from '@/app/_components/charts/moisture-rule'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { Sheet } from '@/app/_components/ui/sheet'
import type { RuleRoom } from '@/lib/now/now-view'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { TypedReadingForm } from './typed-reading-form'

const bare = {
  flags: [],
  bands: [],
  brackets: [],
  shelf: [],
  sentence: 'The moisture rule. No room has a reading yet.',
}

/** Nothing read yet: the bare rule, and two fields for each room to hang it with. */
export function NoReadings({ reader, rooms }: { reader: Reader; rooms: readonly RuleRoom[] }) {
  const base = `/sites/${reader.site}`
  const mayType = may(reader.role, 'readings:type')
  return (
    <>
      <MoistureRule
        model={bare}
        title="What the air would do to the wood, given time"
        aside="Drier to the left, damper to the right"
        note={
          <p className="max-w-words text-ink-soft">
            {rooms.length === 0
              ? 'No room is known here yet. Add the room where boxes are kept, and the shop.'
              : 'No room has a reading yet. Type what any hygrometer shows, or let a sensor do it.'}
          </p>
        }
      />
      {mayType
        ? rooms.slice(0, 4).map((room) => (
            <Sheet
              key={room.id}
              id={`type-${room.id}`}
              title={
                <span className="inline-flex items-center gap-2">
                  <RoomMark mark={room.mark} />
                  {room.name}
                </span>
              }
            >
              <TypedReadingForm site={reader.site} room={room} units={reader.units} />
            </Sheet>
          ))
        : null}
      <div className="flex flex-wrap gap-3 px-4 sm:px-0">
        {may(reader.role, 'rooms:change') ? (
          <ButtonLink href={`${base}/rooms`} variant={rooms.length === 0 ? 'filled' : 'second'}>
            {rooms.length === 0 ? 'Add a room' : 'See the rooms'}
          </ButtonLink>
        ) : null}
        {may(reader.role, 'sensors:change') && rooms.length > 0 ? (
          <ButtonLink href={`${base}/sensors/add`}>Add a sensor</ButtonLink>
        ) : null}
        {may(reader.role, 'pieces:change') && rooms.length > 0 ? (
          <ButtonLink href={`${base}/pieces/new`}>Add a piece</ButtonLink>
        ) : null}
      </div>
    </>
  )
}
