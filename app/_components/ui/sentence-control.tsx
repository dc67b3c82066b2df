'use client'

import { ChevronDown } from 'lucide-react'
import type { ComponentProps } from 'react'
import { classNames } from './class-names'

const face =
  'min-h-11 max-w-full rounded-none border-0 border-b-2 border-heart bg-wash px-2 font-semibold text-ink sm:min-h-9 aria-invalid:border-warn disabled:border-dashed disabled:text-ink-soft'

/** A word of a sentence that can be changed: the browser's own list, worn as a word on wash with a heart underline. */
export function SentenceSelect({
  label,
  className,
  children,
  ...rest
}: ComponentProps<'select'> & { label: string }) {
  return (
    <span className="relative inline-flex max-w-full align-middle">
      <select
        {...rest}
        aria-label={label}
        className={classNames(face, 'field-sizing-content appearance-none pr-8', className)}
      >
        {children}
      </select>
      <ChevronDown
        aria-hidden="true"
        size={16}
        strokeWidth={1.5}
        className="pointer-events-none absolute top-1/2 right-2 -translate-y-1/2 text-heart"
      />
    </span>
  )
}

/** A typed word of a sentence: a number, a name, a time. Its width follows what stands in it. */
export function SentenceInput({
  label,
  unit,
  className,
  ...rest
}: ComponentProps<'input'> & { label: string; unit?: string }) {
  return (
    <span className="inline-flex max-w-full items-center align-middle">
      <input
        autoComplete="off"
        {...rest}
        aria-label={unit ? `${label}, ${unit}` : label}
        className={classNames(face, 'field-sizing-content min-w-12', className)}
      />
      {unit ? (
        <span
          aria-hidden="true"
          className="flex min-h-11 items-center border-b-2 border-heart bg-wash pr-2 leading-6 font-semibold sm:min-h-9"
        >
          {unit}
        </span>
      ) : null}
    </span>
  )
}

/** The sentence itself: large, with room between its lines for the controls in it. */
export function ControlSentence({ className, ...rest }: ComponentProps<'div'>) {
  return (
    <div
      {...rest}
      className={classNames(
        'flex flex-wrap items-center gap-x-2 gap-y-3 text-[18px] leading-7 sm:text-[19px]',
        className,
      )}
    />
  )
}
