'use client'

import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import type { PieceChange } from '@/lib/pieces/piece'
import { grainWords, stageWords, woodKindWords } from '@/lib/pieces/wording'
import { DustNotes } from './dust-notes'
import { type EditFieldsProps, LengthField, ListField } from './edit-fields'
import { WoodSelect } from './wood-select'

export function WoodFields({ reader, problem }: EditFieldsProps) {
  const { control, register, formState } = useFormContext<PieceChange>()
  const wood = useWatch({ control, name: 'wood' })
  return (
    <div className="grid gap-5 md:grid-cols-2">
      <Field label="Number" error={formState.errors.number?.message ?? problem?.errorOf('number')}>
        <Input autoComplete="off" maxLength={12} {...register('number')} />
      </Field>
      <ListField name="stage" label="What it is" options={stageWords} />
      <Controller
        control={control}
        name="wood"
        render={({ field, fieldState }) => (
          <Field label="Wood" error={fieldState.error?.message ?? problem?.errorOf('wood')}>
            <WoodSelect value={field.value ?? null} onChange={field.onChange} onBlur={field.onBlur} />
          </Field>
        )}
      />
      <ListField
        name="woodKind"
        label="Kind"
        options={woodKindWords}
        hint="Wild grain moves its own way; stabilised wood isn’t worked out to move."
      />
      <ListField name="grain" label="Grain" options={grainWords} />
      <LengthField name="bodyWallMm" label="Body wall" problem={problem} reader={reader} />
      <div className="md:col-span-2">
        <DustNotes wood={wood ?? null} />
      </div>
    </div>
  )
}
