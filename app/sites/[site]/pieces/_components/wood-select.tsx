'use client'

import type { ComponentProps } from 'react'
import { Select } from '@/app/_components/ui/select'
import { SPECIES } from '@/lib/wood/species'

type WoodSelectProps = Omit<ComponentProps<'select'>, 'value' | 'onChange'> & {
  value: string | null
  onChange: (wood: string | null) => void
}

/** Every wood with a row of figures, and the honest answer for the rest. */
export function WoodSelect({ value, onChange, ...rest }: WoodSelectProps) {
  return (
    <Select
      {...rest}
      value={value ?? ''}
      onChange={(event) => {
        onChange(event.target.value === '' ? null : event.target.value)
      }}
    >
      <option value="">Not sure, or not in this list</option>
      {SPECIES.map((species) => (
        <option key={species.slug} value={species.slug}>
          {species.commonName}
        </option>
      ))}
    </Select>
  )
}
