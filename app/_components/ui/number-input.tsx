'use client'

import { type ComponentProps, useId } from 'react'
import { classNames } from './class-names'
import { controlClassName } from './control-style'
import { useFieldWiring } from './field'

type NumberInputProps = Omit<ComponentProps<'input'>, 'type'> & {
  /** Stands inside the field's right end and is read out with it: "mm", "°C", "% RH". */
  unit?: string
}

/** A number typed by hand. Text with a decimal keypad, so that "20,6" and a stray space can be put right by the form. */
export function NumberInput({ unit, className, ...rest }: NumberInputProps) {
  const wiring = useFieldWiring()
  const unitId = useId()
  const describedBy = [wiring['aria-describedby'], unit ? unitId : ''].filter(Boolean).join(' ')
  return (
    <span className="relative block">
      <input
        {...wiring}
        inputMode="decimal"
        autoComplete="off"
        {...rest}
        type="text"
        aria-describedby={describedBy || undefined}
        className={classNames(controlClassName, unit && 'pr-16', className)}
      />
      {unit ? (
        <span
          id={unitId}
          className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-ink-soft"
        >
          {unit}
        </span>
      ) : null}
    </span>
  )
}
