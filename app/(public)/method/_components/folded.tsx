import { ChevronDown } from 'lucide-react'
import type { ReactNode } from 'react'

/** Something long that waits under its name until it is asked for. */
export function Folded({ title, children }: { title: string; children: ReactNode }) {
  return (
    <details className="group border-b border-line">
      <summary className="flex min-h-11 items-center justify-between gap-4 py-1">
        {title}
        <ChevronDown aria-hidden="true" className="size-5 shrink-0 group-open:rotate-180" strokeWidth={1.5} />
      </summary>
      <div className="pb-4">{children}</div>
    </details>
  )
}
