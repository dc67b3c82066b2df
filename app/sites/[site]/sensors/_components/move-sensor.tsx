'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { useAction } from '@/app/_components/use-action'
import { instantOfLocalField } from '@/lib/format/local-time'
import { newPlacementSchema, type NewPlacement, type SensorDetail } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'

type MoveSensorProps = {
  reader: Reader
  sensor: SensorDetail
  rooms: readonly { id: string; name: string }[]
}

/** A day and time as the browser's own field gives it; empty means from now on. */
const moveSchema = newPlacementSchema.pick({ roomId: true, spot: true }).extend({ since: z.string() })

export function MoveSensor({ reader, sensor, rooms }: MoveSensorProps) {
  const form = useForm({
    resolver: zodResolver(moveSchema),
    defaultValues: { roomId: sensor.room?.id ?? rooms[0]?.id ?? '', spot: '', since: '' },
  })
  const move = useAction<NewPlacement, unknown>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/sensors/${sensor.id}/placements`, {
        method: 'POST',
        body,
        idempotencyKey,
      }),
    invalidates: [
      siteKey(reader.site, 'sensors'),
      siteKey(reader.site, 'rooms'),
      siteKey(reader.site, 'now'),
    ],
    done: 'Moved',
    onDone: () => {
      form.resetField('since')
      form.resetField('spot')
    },
    errors: 'inline',
  })
  const submit = form.handleSubmit(({ roomId, spot, since }) => {
    const from = since === '' ? undefined : instantOfLocalField(since, reader.timeZone)
    if (since !== '' && from === undefined) {
      form.setError('since', { message: 'That is not a day and a time.' })
      return
    }
    move.act({ roomId, spot, ...(from === undefined ? {} : { fromAt: from.toISOString() }) })
  })
  const message = form.formState.errors.since?.message ?? move.problem?.detail ?? move.error?.message

  return (
    <form onSubmit={submit} noValidate aria-label="Move the sensor" className="mt-5 flex flex-col gap-3">
      <FlowingSentence>
        It hangs in{' '}
        <SentenceSelect label="Room to move it to" {...form.register('roomId')}>
          {rooms.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}
            </option>
          ))}
        </SentenceSelect>
        , <SentenceInput label="Where in the room" placeholder="on the shelf" {...form.register('spot')} />,
        since{' '}
        <SentenceInput
          label="Since when; empty means from now on"
          type="datetime-local"
          aria-describedby="move-note"
          {...form.register('since')}
        />
      </FlowingSentence>
      <p id="move-note" className="text-label text-ink-soft">
        Leave the time empty for “from now on”. A time in the past moves the readings taken since then to that
        room.
      </p>
      {message ? (
        <p role="alert" className="text-warn">
          {message}
        </p>
      ) : null}
      <Button type="submit" pending={move.pending} className="self-start">
        Move it
      </Button>
    </form>
  )
}
