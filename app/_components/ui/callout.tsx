import type { ReactNode } from 'react'
import type { Mark as MarkKind } from '@/lib/notices/notice'
import { classNames } from './class-names'
import { Mark } from './mark'

type CalloutProps = {
  tone?: 'warn' | 'good' | 'ink'
  mark?: MarkKind
  title?: ReactNode
  /** What to do about it. */
  action?: ReactNode
  /** Read out as soon as it appears: for what happened just now, not for what was there on arrival. */
  announce?: boolean
  children?: ReactNode
}

const edges = { warn: 'border-l-warn', good: 'border-l-good', ink: 'border-l-ink' }

/** A framed remark with a thick left edge. */
export function Callout({ tone = 'ink', mark, title, action, announce = false, children }: CalloutProps) {
  return (
    <div
      role={announce ? (tone === 'warn' ? 'alert' : 'status') : undefined}
      className={classNames(
        'flex flex-wrap items-center justify-between gap-x-4 gap-y-2 border border-l-[6px] border-edge bg-board px-4 py-3 [--figure-ground:var(--board)]',
        edges[tone],
      )}
    >
      <div className="flex min-w-0 flex-1 basis-64 gap-3">
        {mark ? <Mark kind={mark} size={20} className="mt-0.5" /> : null}
        <div className="min-w-0">
          {title ? <p className="font-semibold">{title}</p> : null}
          {children}
        </div>
      </div>
      {action}
    </div>
  )
}
