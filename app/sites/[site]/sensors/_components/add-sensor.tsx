'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Caution } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import { useAction } from '@/app/_components/use-action'
import {
  newSensorSchema,
  type NewSensor,
  type SensorCredential,
  type SensorDetail,
} from '@/lib/sensors/sensor'
import { coinCellCaution } from '@/lib/sensors/wording'
import type { Reader } from '@/lib/sites/reader'
import { CredentialSentence } from './credential-sentence'
import { FirstReading } from './first-reading'

type RoomChoice = { id: string; name: string }
/** A sensor that was just made, with the secret that is shown this once. */
type SensorMade = SensorDetail & { credential: SensorCredential }

type AddSensorProps = { reader: Reader; rooms: readonly RoomChoice[]; roomId?: string }

/** One sentence that grows by a clause at a time: what it is called and where, how it signs in, what it says. */
export function AddSensor({ reader, rooms, roomId }: AddSensorProps) {
  const [made, setMade] = useState<SensorMade | null>(null)
  const form = useForm({
    resolver: zodResolver(newSensorSchema),
    defaultValues: { name: '', roomId: roomId ?? rooms[0]?.id ?? '', spot: '' },
  })
  const add = useAction<NewSensor, SensorMade>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/sensors`, { method: 'POST', body, idempotencyKey }),
    invalidates: [
      siteKey(reader.site, 'sensors'),
      siteKey(reader.site, 'frame'),
      siteKey(reader.site, 'rooms'),
    ],
    onDone: setMade,
    errors: 'inline',
  })
  const errorOf = (field: keyof NewSensor) =>
    form.formState.errors[field]?.message ?? add.problem?.errorOf(field)
  const messages = [errorOf('name'), errorOf('roomId'), errorOf('spot')].filter(
    (message) => message !== undefined,
  )

  if (rooms.length === 0) {
    return (
      <>
        <PageSentence above="A new sensor">
          A sensor hangs in a room, and there is no room here yet.
        </PageSentence>
        <Sheet>
          <EmptyState
            title="A room first"
            actions={
              <ButtonLink href={`/sites/${reader.site}/rooms`} variant="filled">
                Add a room
              </ButtonLink>
            }
          >
            A cupboard counts as a room, and so does a lidded tub.
          </EmptyState>
        </Sheet>
      </>
    )
  }

  return (
    <>
      <PageSentence above="A new sensor, a sentence at a time">
        {made === null ? (
          'Say what it is called and where it hangs; the rest of the sentence follows.'
        ) : (
          <>
            <strong>{made.name}</strong> is known here. Copy its secret now: it is shown once.
          </>
        )}
      </PageSentence>
      <form
        noValidate
        aria-label="A new sensor"
        className="flex flex-col gap-5 px-4 sm:px-0"
        onSubmit={form.handleSubmit((values) => {
          add.act(values)
        })}
      >
        {made === null ? (
          <>
            <FlowingSentence>
              A sensor called{' '}
              <SentenceInput
                label="Name of the sensor"
                placeholder="Pantry shelf"
                aria-invalid={errorOf('name') ? true : undefined}
                aria-describedby="new-sensor-errors"
                {...form.register('name')}
              />{' '}
              hangs in{' '}
              <SentenceSelect
                label="Room that it hangs in"
                aria-invalid={errorOf('roomId') ? true : undefined}
                {...form.register('roomId')}
              >
                {rooms.map((room) => (
                  <option key={room.id} value={room.id}>
                    {room.name}
                  </option>
                ))}
              </SentenceSelect>
              ,{' '}
              <SentenceInput
                label="Where in the room"
                placeholder="1.5 m up, away from the stove"
                aria-invalid={errorOf('spot') ? true : undefined}
                {...form.register('spot')}
              />
              .
            </FlowingSentence>
            <div id="new-sensor-errors" role="alert" className="text-warn empty:hidden">
              {add.problem && messages.length === 0 ? add.problem.detail || add.problem.title : null}
              {add.error && !add.problem ? 'No answer came. Nothing was lost; press the button again.' : null}
              {messages.map((message) => (
                <p key={message}>{message}</p>
              ))}
            </div>
            <Button type="submit" variant="filled" pending={add.pending} className="self-start max-sm:w-full">
              Make it known
            </Button>
            <p className="text-[18px] text-ink-soft sm:text-[19px]">
              It then signs in under a name of its own, with a secret that is shown once, and publishes to an
              address of its own. Its first reading appears here.
            </p>
          </>
        ) : (
          <MadeSentence made={made} reader={reader} />
        )}
      </form>
      <div className="px-4 sm:px-0">
        <Caution>{coinCellCaution}</Caution>
      </div>
    </>
  )
}

function MadeSentence({ made, reader }: { made: SensorMade; reader: Reader }) {
  const { credential } = made
  return (
    <>
      <FlowingSentence>
        A sensor called <strong>{made.name}</strong> hangs in <strong>{made.room?.name ?? 'no room'}</strong>
        {made.spot ? `, ${made.spot}` : ''}.
      </FlowingSentence>
      <CredentialSentence credential={credential} />
      <FirstReading reader={reader} sensorId={made.id} />
      <div className="flex flex-wrap gap-3">
        <ButtonLink href={`/sites/${reader.site}/sensors/${made.id}`}>Open its page</ButtonLink>
        <ButtonLink href={`/sites/${reader.site}/sensors`} variant="quiet">
          All sensors
        </ButtonLink>
      </div>
    </>
  )
}
