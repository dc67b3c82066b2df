'use client'

import type { ComponentProps } from 'react'
import { classNames } from './class-names'
import { controlClassName } from './control-style'
import { useFieldWiring } from './field'

export function Textarea({ className, rows = 3, ...rest }: ComponentProps<'textarea'>) {
  return (
    <textarea
      {...useFieldWiring()}
      rows={rows}
      {...rest}
      className={classNames(controlClassName, 'py-2', className)}
    />
  )
}
