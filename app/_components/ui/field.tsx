'use client'

import { createContext, type ReactNode, useContext, useId, useMemo } from 'react'
import { classNames } from './class-names'

type Wiring = { id: string; describedBy: string | undefined; invalid: boolean }

const FieldContext = createContext<Wiring | null>(null)

type FieldProps = {
  label: string
  hint?: ReactNode
  error?: string | undefined
  /** Keeps the label for assistive technology and hides it from sight, where the page already says it. */
  labelHidden?: boolean
  className?: string
  children: ReactNode
}

/** One question with its label, hint and error, wired to the control inside it. */
export function Field({ label, hint, error, labelHidden = false, className, children }: FieldProps) {
  const id = useId()
  const hasHint = hint !== undefined && hint !== null
  const wiring = useMemo<Wiring>(() => {
    const describedBy = [error ? `${id}-error` : '', hasHint ? `${id}-hint` : ''].filter(Boolean).join(' ')
    return { id, describedBy: describedBy || undefined, invalid: Boolean(error) }
  }, [id, error, hasHint])
  return (
    <FieldContext value={wiring}>
      <div className={classNames('flex flex-col gap-1', className)}>
        <label htmlFor={id} className={labelHidden ? 'sr-only' : 'text-label font-semibold'}>
          {label}
        </label>
        {children}
        {error ? (
          <p id={`${id}-error`} className="text-label text-warn">
            {error}
          </p>
        ) : null}
        {hasHint ? (
          <p id={`${id}-hint`} className="text-label text-ink-soft">
            {hint}
          </p>
        ) : null}
      </div>
    </FieldContext>
  )
}

/** What a control inside a field spreads onto its element. Outside a field it gives nothing. */
export function useFieldWiring(): { id?: string; 'aria-describedby'?: string; 'aria-invalid'?: true } {
  const wiring = useContext(FieldContext)
  if (!wiring) return {}
  return {
    id: wiring.id,
    'aria-describedby': wiring.describedBy,
    'aria-invalid': wiring.invalid ? true : undefined,
  }
}
