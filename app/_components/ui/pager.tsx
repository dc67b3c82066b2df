'use client'

import { Button } from './button'

type PagerProps = {
  shown: number
  /** Whether more follow. */
  hasMore: boolean
  onMore: () => void
  pending?: boolean
  /** "pieces", "messages" */
  noun: string
}

/** Lists grow by a page at a time and keep their place. */
export function Pager({ shown, hasMore, onMore, pending = false, noun }: PagerProps) {
  return (
    <div className="mt-4 flex flex-wrap items-center gap-4">
      <p role="status" className="text-label text-ink-soft">
        {hasMore ? `The first ${String(shown)} ${noun}` : `All ${String(shown)} ${noun}`}
      </p>
      {hasMore ? (
        <Button onClick={onMore} pending={pending}>
          Show more
        </Button>
      ) : null}
    </div>
  )
}
