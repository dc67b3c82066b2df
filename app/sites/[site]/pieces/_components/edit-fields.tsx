'use client'

import { Controller, type FieldPath, useFormContext } from 'react-hook-form'
import type { ApiProblem } from '@/app/_components/api'
import { Field } from '@/app/_components/ui/field'
import { Select } from '@/app/_components/ui/select'
import type { PieceChange } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import type { RoomChoice } from './first-piece'
import { LengthInput, lengthError } from './length-input'

/** What every group of the form needs. */
export type EditFieldsProps = { reader: Reader; rooms: readonly RoomChoice[]; problem: ApiProblem | null }

type LengthName = Extract<FieldPath<PieceChange>, `${string}Mm`>

type LengthFieldProps = {
  name: LengthName
  label: string
  hint?: string
  problem: ApiProblem | null
  reader: Reader
}

export function LengthField({ name, label, hint, problem, reader }: LengthFieldProps) {
  const { control } = useFormContext<PieceChange>()
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <Field
          label={label}
          hint={hint}
          error={lengthError(field.value, fieldState.error?.message ?? problem?.errorOf(name))}
        >
          <LengthInput
            valueMm={field.value ?? null}
            onChange={field.onChange}
            onBlur={field.onBlur}
            units={reader.units}
          />
        </Field>
      )}
    />
  )
}

type ListName = 'stage' | 'woodKind' | 'grain' | 'spigotOn' | 'lidForm'

type ListFieldProps = {
  name: ListName
  label: string
  hint?: string
  options: Readonly<Record<string, string>>
}

/** One of a closed list of words. */
export function ListField({ name, label, hint, options }: ListFieldProps) {
  const { register, formState } = useFormContext<PieceChange>()
  return (
    <Field label={label} hint={hint} error={formState.errors[name]?.message}>
      <Select {...register(name)}>
        {Object.entries(options).map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </Select>
    </Field>
  )
}

type RoomFieldProps = {
  name: 'keepRoomId' | 'fittedRoomId'
  label: string
  hint?: string
  rooms: readonly RoomChoice[]
}

export function RoomField({ name, label, hint, rooms }: RoomFieldProps) {
  const { register, formState } = useFormContext<PieceChange>()
  return (
    <Field label={label} hint={hint} error={formState.errors[name]?.message}>
      <Select {...register(name, { setValueAs: emptyIsNull })}>
        <option value="">Not told</option>
        {rooms.map((room) => (
          <option key={room.id} value={room.id}>
            {room.name}
          </option>
        ))}
      </Select>
    </Field>
  )
}

export const emptyIsNull = (value: string | null): string | null => (value === '' ? null : value)
