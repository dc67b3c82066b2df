'use client'

import { useState } from 'react'
import { NumberInput } from '@/app/_components/ui/number-input'
import { formatLengthFigure, parseLengthMm } from '@/lib/format/length-entry'
import type { UnitSystem } from '@/lib/sites/site'

type LengthInputProps = {
  valueMm: number | null
  /** NaN for something that is no length, so that the form refuses it and says so. */
  onChange: (valueMm: number | null) => void
  onBlur?: () => void
  units: UnitSystem
  placeholder?: string
}

/** A length in the reader's own unit, kept in millimetres. What is typed stays as typed until the value changes from outside. */
export function LengthInput({ valueMm, onChange, onBlur, units, placeholder }: LengthInputProps) {
  const [text, setText] = useState(() => formatLengthFigure(valueMm, units))
  return (
    <NumberInput
      unit={units === 'metric' ? 'mm' : 'in'}
      value={text}
      placeholder={placeholder}
      onBlur={onBlur}
      onChange={(event) => {
        setText(event.target.value)
        onChange(parseLengthMm(event.target.value, units))
      }}
    />
  )
}

/** The error to show at a length: what was typed is no number, or what the form has against it. */
export const lengthError = (
  valueMm: number | null | undefined,
  message: string | undefined,
): string | undefined => (Number.isNaN(valueMm) ? 'a number, such as 62 or 62.5' : message)
