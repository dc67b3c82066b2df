'use client'

import { useFormContext } from 'react-hook-form'
import type { ApiProblem } from '@/app/_components/api'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Textarea } from '@/app/_components/ui/textarea'
import type { WoodEntry } from '@/lib/wood/wood-entry'

type Props = { problem: ApiProblem | null }

export function NameFields({ problem }: Props) {
  const { register, formState } = useFormContext<WoodEntry>()
  return (
    <div className="grid gap-5 md:grid-cols-2">
      <Field
        label="What you call it"
        error={formState.errors.commonName?.message ?? problem?.errorOf('commonName')}
        hint="The first words name its pieces: “Hedge ash, top field” makes a hedge ash box."
      >
        <Input autoComplete="off" maxLength={60} {...register('commonName')} />
      </Field>
      <Field
        label="Latin name"
        error={formState.errors.latinName?.message ?? problem?.errorOf('latinName')}
        hint="Dust, oil and protection are looked up by it. Leave it empty if you don’t know it."
      >
        <Input
          autoComplete="off"
          maxLength={80}
          placeholder="Fraxinus excelsior"
          {...register('latinName')}
        />
      </Field>
    </div>
  )
}

export function WordFields({ problem }: Props) {
  const { register, formState } = useFormContext<WoodEntry>()
  return (
    <div className="grid gap-5 md:grid-cols-2">
      <Field
        label="Source of the figures"
        error={formState.errors.source?.message ?? problem?.errorOf('source')}
        hint="A book and its table, a merchant’s sheet, or how you measured."
      >
        <Input autoComplete="off" maxLength={300} {...register('source')} />
      </Field>
      <Field label="Note" error={formState.errors.note?.message ?? problem?.errorOf('note')}>
        <Textarea maxLength={1000} {...register('note')} />
      </Field>
    </div>
  )
}
