import type { ComponentProps, ReactNode } from 'react'

type CheckboxProps = Omit<ComponentProps<'input'>, 'type'> & { label: ReactNode; hint?: ReactNode }

/** The whole line is the target, 44 px high. */
export function Checkbox({ label, hint, ...rest }: CheckboxProps) {
  return (
    <label className="flex min-h-11 cursor-pointer items-start gap-3 py-2">
      <input {...rest} type="checkbox" className="mt-0.5 size-5 shrink-0 accent-heart" />
      <span>
        {label}
        {hint ? <span className="block text-label text-ink-soft">{hint}</span> : null}
      </span>
    </label>
  )
}
