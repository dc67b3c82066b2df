import type { ReactNode } from 'react'
import { classNames } from './class-names'

type SheetProps = {
  title?: ReactNode
  /** A few soft words beside the title. */
  aside?: ReactNode
  /** Stands at the right end of the title line: a link, a button. */
  action?: ReactNode
  /** Rule ticks on the top edge, only where the sheet shows a scale. */
  ticks?: boolean
  /** A thick left edge: something is due (warn) or went well (good). Always beside words that say so. */
  edge?: 'warn' | 'good' | 'ink'
  id?: string
  className?: string
  children: ReactNode
}

const edges = { warn: 'border-l-warn', good: 'border-l-good', ink: 'border-l-ink' }

/** A board on the wall: the surface that most things of a page lie on. Edge to edge on a phone. */
export function Sheet({ title, aside, action, ticks = false, edge, id, className, children }: SheetProps) {
  return (
    <section
      id={id}
      aria-labelledby={title && id ? `${id}-title` : undefined}
      className={classNames(
        'border-y border-line bg-board px-4 py-5 [--figure-ground:var(--board)] sm:rounded sm:border sm:px-6',
        ticks && 'rule-edge border-t-edge pt-8',
        edge && `border-l-[6px] sm:border-l-[6px] ${edges[edge]}`,
        className,
      )}
    >
      {title ? (
        <header className="mb-4 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-2 border-b border-line pb-3">
          <div className="flex flex-wrap items-baseline gap-x-4">
            <h2 id={id ? `${id}-title` : undefined} className="text-title font-semibold">
              {title}
            </h2>
            {aside ? <span className="text-ink-soft">{aside}</span> : null}
          </div>
          {action}
        </header>
      ) : null}
      {children}
    </section>
  )
}
