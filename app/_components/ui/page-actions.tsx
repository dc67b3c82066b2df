import type { ReactNode } from 'react'

/** A page's own buttons: in the text on a desk, fixed above the bottom bar on a phone. */
export function PageActions({ children }: { children: ReactNode }) {
  return (
    <div className="flex flex-wrap items-center gap-3 max-sm:sticky max-sm:bottom-14 max-sm:z-20 max-sm:border-t max-sm:border-edge max-sm:bg-board max-sm:p-3 max-sm:[&>*]:grow">
      {children}
    </div>
  )
}
