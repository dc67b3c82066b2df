'use client'

import { X } from 'lucide-react'
import { Dialog as Radix } from 'radix-ui'
import type { ReactNode } from 'react'

type DialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: string
  /** One sentence under the title, read out when the dialog opens. */
  description?: ReactNode
  children: ReactNode
}

export function Dialog({ open, onOpenChange, title, description, children }: DialogProps) {
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-ink/40 dark:bg-chalk/70" />
        <Radix.Content
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
          className="fixed z-50 max-h-[92dvh] overflow-y-auto border border-line bg-board p-6 shadow-menu max-sm:inset-x-0 max-sm:bottom-0 max-sm:p-4 sm:top-1/2 sm:left-1/2 sm:w-[34rem] sm:max-w-[calc(100vw-2rem)] sm:-translate-x-1/2 sm:-translate-y-1/2 sm:rounded"
        >
          <div className="mb-4 flex items-start justify-between gap-4">
            <Radix.Title className="pt-2 text-title font-semibold">{title}</Radix.Title>
            <Radix.Close
              aria-label="Close"
              className="-mr-2 flex size-11 shrink-0 items-center justify-center rounded"
            >
              <X aria-hidden="true" size={20} strokeWidth={1.5} />
            </Radix.Close>
          </div>
          {description === undefined ? null : (
            <Radix.Description asChild>
              <div className="mb-4 text-ink-soft">{description}</div>
            </Radix.Description>
          )}
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
