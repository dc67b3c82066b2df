import Link from 'next/link'
import type { ComponentProps } from 'react'
import { classNames } from './class-names'

export function TextLink({ className, ...rest }: ComponentProps<typeof Link>) {
  return (
    <Link
      {...rest}
      className={classNames(
        'text-heart underline decoration-1 underline-offset-4 hover:decoration-2',
        className,
      )}
    />
  )
}
