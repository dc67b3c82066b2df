'use client'

import { ChevronDown } from 'lucide-react'
import type { ComponentProps } from 'react'
import { classNames } from './class-names'
import { controlClassName } from './control-style'
import { useFieldWiring } from './field'

/** The browser's own list, which a phone and a screen reader both know; only its closed face is ours. */
export function Select({ className, children, ...rest }: ComponentProps<'select'>) {
  return (
    <span className="relative block">
      <select
        {...useFieldWiring()}
        {...rest}
        className={classNames(controlClassName, 'appearance-none pr-10', className)}
      >
        {children}
      </select>
      <ChevronDown
        aria-hidden="true"
        size={18}
        strokeWidth={1.5}
        className="pointer-events-none absolute top-1/2 right-3 -translate-y-1/2 text-heart"
      />
    </span>
  )
}
