import { type ComponentProps, useId } from 'react'
import { type ButtonVariant, buttonClassName } from './button-style'

type ButtonProps = ComponentProps<'button'> & {
  variant?: ButtonVariant
  /** The work is under way: the button stays where it is and says so to assistive technology. */
  pending?: boolean
  /** Why it is not possible yet. It stands beside the button; the button keeps its place in the tab order. */
  notYet?: string
}

export function Button({
  variant = 'second',
  pending = false,
  notYet,
  className,
  onClick,
  type = 'button',
  children,
  ...rest
}: ButtonProps) {
  const reasonId = useId()
  const held = pending || notYet !== undefined
  const button = (
    <button
      {...rest}
      type={held ? 'button' : type}
      aria-disabled={held || undefined}
      aria-busy={pending || undefined}
      aria-describedby={notYet === undefined ? rest['aria-describedby'] : reasonId}
      className={buttonClassName(variant, notYet !== undefined, className)}
      onClick={held ? undefined : onClick}
    >
      {children}
      {pending ? <span aria-hidden="true">…</span> : null}
    </button>
  )
  if (notYet === undefined) return button
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3 gap-y-1">
      {button}
      <span id={reasonId} className="text-label text-ink-soft">
        {notYet}
      </span>
    </span>
  )
}
