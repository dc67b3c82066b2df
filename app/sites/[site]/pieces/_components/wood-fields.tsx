'use client'

import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import type { PieceChange } from '@/lib/pieces/piece'
import type { WoodChoice } from '@/lib/wood/wood'
import { grainWords, stageWords, woodKindWords } from '@/lib/pieces/wording'
import { type EditFieldsProps, LengthField, ListField } from './edit-fields'
import { WoodCare } from './wood-care'
import { WoodField } from './wood-field'

export function WoodFields({ reader, problem, woods }: EditFieldsProps & { woods: readonly WoodChoice[] }) {
  const { control, register, formState, setValue } = useFormContext<PieceChange>()
  const [wood, woodKind, stage] = useWatch({ control, name: ['wood', 'woodKind', 'stage'] })
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
          <WoodField
            label="Wood"
            error={fieldState.error?.message ?? problem?.errorOf('wood')}
            woods={woods}
            value={field.value ?? null}
            onChange={field.onChange}
            onBlur={field.onBlur}
            kind={woodKind ?? 'plain'}
            onKindChange={(kind) => {
              setValue('woodKind', kind, { shouldDirty: true })
            }}
          />
        )}
      />
      <ListField
        name="woodKind"
        label="Kind"
        options={woodKindWords}
        hint="Wild grain moves its own way; stabilised wood isn’t worked out to move."
      />
      <ListField name="grain" label="Grain" options={grainWords} />
      {stage === 'blank' ? (
        <LengthField
          name="blankDiameterMm"
          label="How thick it is"
          hint="Straight across the blank, at its thickest."
          problem={problem}
          reader={reader}
        />
      ) : (
        <LengthField name="bodyWallMm" label="Body wall" problem={problem} reader={reader} />
      )}
      <div className="md:col-span-2">
        <WoodCare wood={woods.find((one) => one.slug === wood)} />
      </div>
    </div>
  )
}
