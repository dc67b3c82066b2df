'use client'

import type { ReactNode } from 'react'
import { Button } from './button'
import { Mark } from './mark'

type EmptyStateProps = { title: string; children?: ReactNode; actions?: ReactNode }

/** Nothing here yet: says what would stand here, and how to make the first one. */
export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-start gap-3">
      <p className="text-title font-semibold">{title}</p>
      {children ? <div className="max-w-words text-ink-soft">{children}</div> : null}
      {actions ? <div className="flex flex-wrap gap-3">{actions}</div> : null}
    </div>
  )
}

/** The page's shape without colour, while the first figures are on their way. */
export function LoadingState({
  what = 'Fetching the latest readings',
  rows = 4,
}: {
  what?: string
  rows?: number
}) {
  return (
    <div role="status" aria-label={what} className="flex flex-col gap-4 max-sm:px-4">
      <div aria-hidden="true" className="h-8 w-4/5 max-w-[40rem] rounded bg-steel" />
      {Array.from({ length: rows }, (_, row) => (
        <div key={row} aria-hidden="true" className="h-14 w-full rounded border border-line bg-board p-4">
          <div className="h-4 rounded bg-steel" style={{ width: `${String(35 + ((row * 23) % 50))}%` }} />
        </div>
      ))}
      <p className="text-label text-ink-soft">{what}.</p>
    </div>
  )
}

type ErrorStateProps = {
  /** What happened: "The figures could not be fetched at 13:10." */
  title: string
  /** What was not lost, and what to do next. */
  children?: ReactNode
  onRetry?: () => void
  pending?: boolean
}

export function ErrorState({
  title,
  children = 'Nothing is lost: readings are still being kept.',
  onRetry,
  pending = false,
}: ErrorStateProps) {
  return (
    <div role="alert" className="flex flex-col items-start gap-3">
      <p className="flex items-start gap-2">
        <Mark kind="silent" size={20} className="mt-0.5" />
        <span className="font-semibold">{title}</span>
      </p>
      <div className="max-w-words text-ink-soft">{children}</div>
      {onRetry ? (
        <Button onClick={onRetry} pending={pending}>
          Try again
        </Button>
      ) : null}
    </div>
  )
}

/** Older than it should be: the last value stays, with its time, and is never shown as now. */
export function StaleState({ children }: { children: ReactNode }) {
  return (
    <p className="flex items-start gap-2">
      <Mark kind="silent" size={20} className="mt-0.5" />
      <span className="max-w-words">{children}</span>
    </p>
  )
}
