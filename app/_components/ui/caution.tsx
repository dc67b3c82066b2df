import type { ReactNode } from 'react'
import { Mark } from './mark'

/** Short, where it matters, and never dismissible for good. */
export function Caution({ children }: { children: ReactNode }) {
  return (
    <div role="note" className="flex items-start gap-2 text-label text-ink-soft">
      <Mark kind="silent" size={18} className="mt-px" />
      <div className="max-w-words">{children}</div>
    </div>
  )
}

/** Several cautions under one another. */
export function Cautions({ cautions }: { cautions: readonly string[] }) {
  if (cautions.length === 0) return null
  return (
    <div className="flex flex-col gap-2">
      {cautions.map((caution) => (
        <Caution key={caution}>{caution}</Caution>
      ))}
    </div>
  )
}
