'use client'

import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'

type AgainstAdviceProps = {
  open: boolean
  /** The check's own words. */
  why: string
  pending: boolean
  onCancel: () => void
  onConfirm: () => void
}

/** Asked once more before a piece goes where its fit would not keep. Leaving it is the filled button. */
export function AgainstAdvice({ open, why, pending, onCancel, onConfirm }: AgainstAdviceProps) {
  return (
    <ConfirmDialog
      open={open}
      onOpenChange={(isOpen) => {
        if (!isOpen) onCancel()
      }}
      title="The advice is to leave it where it is"
      confirmLabel="Take it out all the same"
      cancelLabel="Leave it where it is"
      pending={pending}
      onConfirm={onConfirm}
    >
      {why ? <p>{why}</p> : null}
      <p>
        It is noted that it went against the advice, and it counts as overdue from its early edge on. If its
        lid turns tight out there, never force it: line the grain up and keep the parts side by side.
      </p>
    </ConfirmDialog>
  )
}
