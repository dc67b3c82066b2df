'use client'

import { type ReactNode, useId } from 'react'
import { classNames } from './class-names'

export type Option<Value extends string> = { value: Value; label: ReactNode; detail?: ReactNode }

type ChoiceProps<Value extends string> = {
  /** The question that stands above. */
  label: ReactNode
  options: readonly Option<Value>[]
  value: Value | undefined
  onChange: (value: Value) => void
  columns?: 2 | 3
  hint?: ReactNode
  error?: string | undefined
  labelHidden?: boolean
}

/** A few answers laid out as pressable cells; radio buttons underneath, so arrow keys work. */
export function Choice<Value extends string>({
  label,
  options,
  value,
  onChange,
  columns = 2,
  hint,
  error,
  labelHidden = false,
}: ChoiceProps<Value>) {
  const name = useId()
  return (
    <fieldset aria-describedby={hint || error ? `${name}-note` : undefined}>
      <legend className={labelHidden ? 'sr-only' : 'mb-1 text-label font-semibold'}>{label}</legend>
      <div className={classNames('grid gap-2', columns === 3 ? 'grid-cols-3' : 'grid-cols-2')}>
        {options.map((option) => (
          <label
            key={option.value}
            className="flex min-h-11 cursor-pointer flex-col justify-center rounded border border-edge bg-board px-3 py-2 text-center has-checked:border-ink has-checked:bg-ink has-checked:font-semibold has-checked:text-board has-focus-visible:outline-3 has-focus-visible:outline-offset-3 has-focus-visible:outline-heart"
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => {
                onChange(option.value)
              }}
              className="sr-only"
            />
            <span>{option.label}</span>
            {option.detail ? <span className="text-label font-normal">{option.detail}</span> : null}
          </label>
        ))}
      </div>
      {hint || error ? (
        <p
          id={`${name}-note`}
          className={classNames('mt-1 text-label', error ? 'text-warn' : 'text-ink-soft')}
        >
          {error ?? hint}
        </p>
      ) : null}
    </fieldset>
  )
}
