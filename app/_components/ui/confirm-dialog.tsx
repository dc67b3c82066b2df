'use client'

import { AlertDialog } from 'radix-ui'
import type { ReactNode } from 'react'
import { Button } from './button'

type ConfirmDialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: string
  /** What will happen, and what can't be undone. */
  children: ReactNode
  /** The verb of the act itself: "Remove the sensor", never "OK". */
  confirmLabel: string
  cancelLabel?: string
  onConfirm: () => void
  pending?: boolean
  /** The safer way out is the filled button when the act goes against the advice. */
  emphasis?: 'confirm' | 'cancel'
}

/** Asks before an act that is hard to undo, or that goes against the advice, and says why it asks. */
export function ConfirmDialog({
  open,
  onOpenChange,
  title,
  children,
  confirmLabel,
  cancelLabel = 'Keep it as it is',
  onConfirm,
  pending = false,
  emphasis = 'cancel',
}: ConfirmDialogProps) {
  return (
    <AlertDialog.Root open={open} onOpenChange={onOpenChange}>
      <AlertDialog.Portal>
        <AlertDialog.Overlay className="fixed inset-0 z-40 bg-ink/40 dark:bg-chalk/70" />
        <AlertDialog.Content className="fixed z-50 max-h-[92dvh] overflow-y-auto border border-line bg-board p-6 shadow-menu max-sm:inset-x-0 max-sm:bottom-0 max-sm:p-4 sm:top-1/2 sm:left-1/2 sm:w-[32rem] sm:max-w-[calc(100vw-2rem)] sm:-translate-x-1/2 sm:-translate-y-1/2 sm:rounded">
          <AlertDialog.Title className="text-title font-semibold">{title}</AlertDialog.Title>
          <AlertDialog.Description asChild>
            <div className="mt-2 flex flex-col gap-2">{children}</div>
          </AlertDialog.Description>
          <div className="mt-6 flex flex-wrap gap-3 max-sm:flex-col-reverse">
            <Button
              variant={emphasis === 'confirm' ? 'filled' : 'second'}
              pending={pending}
              onClick={onConfirm}
            >
              {confirmLabel}
            </Button>
            <AlertDialog.Cancel asChild>
              <Button variant={emphasis === 'cancel' ? 'filled' : 'second'}>{cancelLabel}</Button>
            </AlertDialog.Cancel>
          </div>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  )
}
