'use client'

import { useFormContext, useWatch } from 'react-hook-form'
import type { ApiProblem } from '@/app/_components/api'
import { Choice, type Option } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { NumberInput } from '@/app/_components/ui/number-input'
import type { UnitSystem } from '@/lib/sites/site'
import { CLASS_MOVEMENT } from '@/lib/wood/movement-class'
import type { MovementClass } from '@/lib/wood/species'
import { type MovementBasis, movementOfEntry, type WoodEntry } from '@/lib/wood/wood-entry'
import { formatPerPointFigure, perPointUnit } from '@/lib/wood/wood-words'

type MovementFieldsProps = { problem: ApiProblem | null; isOwn: boolean; units: UnitSystem }

const classes: readonly Option<MovementClass>[] = [
  { value: 'small', label: 'Small', detail: 'as teak' },
  { value: 'medium', label: 'Medium', detail: 'as ash' },
  { value: 'large', label: 'Large', detail: 'as beech' },
]

export function MovementFields({ problem, isOwn, units }: MovementFieldsProps) {
  const { control, register, setValue, formState } = useFormContext<WoodEntry>()
  const [movementClass, basis, across, along] = useWatch({
    control,
    name: ['movementClass', 'basis', 'across', 'along'],
  })
  const bases: { value: MovementBasis; label: string; detail: string }[] = [
    isOwn
      ? { value: 'class', label: 'Only its class', detail: 'wider doubt' }
      : { value: 'class', label: 'As in the table', detail: 'nothing of your own' },
    { value: 'shrinkage', label: 'Shrinkage', detail: 'green to oven-dry' },
    { value: 'point', label: 'Per point', detail: 'of % MC' },
  ]
  const unit = basis === 'shrinkage' ? '% of size' : perPointUnit[units]
  return (
    <div className="flex max-w-[44rem] flex-col gap-5">
      <Choice
        label="It moves, as a whole"
        columns={3}
        options={classes}
        value={movementClass}
        onChange={(chosen) => {
          setValue('movementClass', chosen, { shouldDirty: true })
        }}
        error={problem?.errorOf('movementClass')}
      />
      <Choice
        label="What is known of its movement"
        columns={3}
        options={bases}
        value={basis}
        onChange={(chosen) => {
          // A figure of one kind means nothing as the other.
          setValue('across', '')
          setValue('along', '')
          setValue('basis', chosen, { shouldDirty: true })
        }}
      />
      {basis === 'class' ? null : (
        <div className="grid gap-5 sm:grid-cols-2">
          <Field
            label="Across the rings (radial)"
            error={formState.errors.across?.message ?? problem?.errorOf('radialPerPct')}
          >
            <NumberInput unit={unit} className="pr-24" {...register('across')} />
          </Field>
          <Field
            label="Along the rings (tangential)"
            error={formState.errors.along?.message ?? problem?.errorOf('tangentialPerPct')}
          >
            <NumberInput unit={unit} className="pr-24" {...register('along')} />
          </Field>
        </div>
      )}
      <p role="status" className="text-label text-ink-soft">
        {reckonedWords({ movementClass, basis, across, along }, isOwn, units)}
      </p>
      <Field
        className="max-w-72"
        label="Density at 12 % MC"
        error={formState.errors.density?.message ?? problem?.errorOf('densityKgM3')}
        hint={
          isOwn
            ? 'Empty: 650 kg/m³ is taken, and the doubt is wider.'
            : 'Empty: it stays as the table has it.'
        }
      >
        <NumberInput unit="kg/m³" {...register('density')} />
      </Field>
    </div>
  )
}

/** What the typed figures come to, so that a slip of the point shows before it is kept. */
function reckonedWords(
  entry: Pick<WoodEntry, 'movementClass' | 'basis' | 'across' | 'along'>,
  isOwn: boolean,
  units: UnitSystem,
): string {
  const unit = perPointUnit[units]
  if (entry.basis === 'class') {
    const { radialPerPct, tangentialPerPct } = CLASS_MOVEMENT[entry.movementClass]
    return isOwn
      ? `Woods of this class move about ${formatPerPointFigure(radialPerPct)} ${unit} across and ${formatPerPointFigure(tangentialPerPct)} along the rings for each point of % MC; warnings count with more.`
      : 'The figures of the table count.'
  }
  const movement = movementOfEntry(entry)
  return movement === undefined
    ? 'Both directions are needed; along the rings wood moves more.'
    : `Reckoned as ${formatPerPointFigure(movement.radialPerPct)} ${unit} across and ${formatPerPointFigure(movement.tangentialPerPct)} along the rings for each point of % MC.`
}
