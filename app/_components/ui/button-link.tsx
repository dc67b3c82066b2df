import Link from 'next/link'
import type { ComponentProps } from 'react'
import { type ButtonVariant, buttonClassName } from './button-style'

/** Goes to another page, and looks like what the button of the same variant would. */
export function ButtonLink({
  variant = 'second',
  className,
  ...rest
}: ComponentProps<typeof Link> & { variant?: ButtonVariant }) {
  return <Link {...rest} className={buttonClassName(variant, false, className)} />
}
