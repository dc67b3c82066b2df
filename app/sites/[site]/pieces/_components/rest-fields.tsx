'use client'

import { useFormContext, useWatch } from 'react-hook-form'
import { Checkbox } from '@/app/_components/ui/checkbox'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Textarea } from '@/app/_components/ui/textarea'
import type { PieceChange } from '@/lib/pieces/piece'
import { type EditFieldsProps, emptyIsNull, RoomField } from './edit-fields'

export function RestFields({ rooms, problem }: EditFieldsProps) {
  const { control, register, formState } = useFormContext<PieceChange>()
  const stage = useWatch({ control, name: 'stage' })
  return (
    <div className="grid gap-5 md:grid-cols-2">
      <RoomField
        name="keepRoomId"
        label="Kept for"
        hint="The room that it is being kept to match, usually the house cupboard."
        rooms={rooms}
      />
      <Field label="Finish" error={formState.errors.finish?.message ?? problem?.errorOf('finish')}>
        <Input autoComplete="off" {...register('finish')} />
      </Field>
      {stage === 'box' ? null : (
        <>
          <Field
            label="Roughed out on"
            hint="Its rest counts from that day."
            error={formState.errors.roughedOn?.message ?? problem?.errorOf('roughedOn')}
          >
            <Input type="date" {...register('roughedOn', { setValueAs: emptyIsNull })} />
          </Field>
          <div className="flex flex-col">
            <Checkbox
              label="Ends sealed"
              hint="With wax or glue: it dries through its sides alone."
              {...register('endsSealed')}
            />
            <Checkbox
              label="Ready by weight alone"
              hint="Its weights decide, and its MC is not asked for. It will be marked."
              {...register('isReadyByWeight')}
            />
          </div>
        </>
      )}
      <Field
        label="Note"
        className="md:col-span-2"
        error={formState.errors.note?.message ?? problem?.errorOf('note')}
      >
        <Textarea rows={4} {...register('note')} />
      </Field>
      <Checkbox
        label="Private"
        hint="Others see its number, its room and its time out, and nothing else."
        {...register('isPrivate')}
      />
      <Checkbox
        label="Shared with onlookers"
        hint="They see it among the pieces."
        {...register('isShared')}
      />
    </div>
  )
}
