'use client'

import type { ComponentProps } from 'react'
import { classNames } from './class-names'
import { controlClassName } from './control-style'
import { useFieldWiring } from './field'

export function Input({ className, ...rest }: ComponentProps<'input'>) {
  return <input {...useFieldWiring()} {...rest} className={classNames(controlClassName, className)} />
}
