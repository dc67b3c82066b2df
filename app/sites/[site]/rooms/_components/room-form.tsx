'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import type { z } from 'zod'
import { ApiProblem } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { Checkbox } from '@/app/_components/ui/checkbox'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import { Textarea } from '@/app/_components/ui/textarea'
import { type NewRoom, newRoomSchema, roomKindSchema, roomKindWords } from '@/lib/rooms/room'

type RoomFormProps = {
  defaults: z.input<typeof newRoomSchema>
  submitWords: string
  pending: boolean
  error: Error | null
  onSubmit: (room: NewRoom) => void
}

/** A room's name and nature: any air that wood can sit in, a cupboard and a lidded tub too. */
export function RoomForm({ defaults, submitWords, pending, error, onSubmit }: RoomFormProps) {
  const form = useForm<z.input<typeof newRoomSchema>, unknown, NewRoom>({
    resolver: zodResolver(newRoomSchema),
    defaultValues: defaults,
  })
  const { errors } = form.formState
  const problem = error instanceof ApiProblem ? error : null
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        void form.handleSubmit(onSubmit)(event)
      }}
    >
      <Field
        label="Its name"
        error={errors.name?.message ?? problem?.errorOf('name')}
        hint="As one says it: landing cupboard, shop."
      >
        <Input autoComplete="off" {...form.register('name')} />
      </Field>
      <Field label="What it is" error={errors.kind?.message}>
        <Select {...form.register('kind')}>
          {roomKindSchema.options.map((kind) => (
            <option key={kind} value={kind}>
              {roomKindWords[kind]}
            </option>
          ))}
        </Select>
      </Field>
      <Checkbox
        label="It keeps dry work"
        hint="Finished or resting wood: you are told when it stays damp enough for mould."
        {...form.register('keepsDryWork')}
      />
      <Checkbox
        label="Onlookers may see it"
        hint="Daily figures only. Readings can show when people are away."
        {...form.register('isShared')}
      />
      <Field label="A note" error={errors.note?.message} hint="Where it lies, how it is heated.">
        <Textarea {...form.register('note')} />
      </Field>
      {error ? <ErrorCallout error={error} /> : null}
      <div>
        <Button type="submit" variant="filled" pending={pending} className="max-sm:w-full">
          {submitWords}
        </Button>
      </div>
    </form>
  )
}
