import type { ReactNode } from 'react'

/** What became of the whole form. Errors are read out at once; good news waits for a pause. */
export function FormMessage({ kind, children }: { kind: 'error' | 'done'; children: ReactNode }) {
  return (
    <p
      role={kind === 'error' ? 'alert' : 'status'}
      className={
        kind === 'error'
          ? 'border-l-4 border-warn bg-board px-3 py-2 text-warn'
          : 'border-l-4 border-good bg-board px-3 py-2'
      }
    >
      {children}
    </p>
  )
}
