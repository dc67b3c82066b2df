'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { Reader } from '@/lib/sites/reader'

export function LeaveSite({ reader, isOnlyOwner }: { reader: Reader; isOnlyOwner: boolean }) {
  const [isAsking, setIsAsking] = useState(false)
  const leave = useAction<Record<string, never>, unknown>({
    run: () => apiFetch(`/sites/${reader.site}/members/me`, { method: 'DELETE' }),
    onDone: () => {
      // A whole load: nothing of a site that one has left may stay in the page's memory.
      window.location.replace('/sites')
    },
  })
  return (
    <Sheet title="Leave this site" id="leave">
      <p className="mb-4 max-w-words">
        {isOnlyOwner
          ? 'You are the only owner: make someone else an owner first, or delete the site.'
          : 'You stop seeing it and hear no more of it. Coming back takes a new invitation.'}
      </p>
      <Button
        notYet={isOnlyOwner ? 'Not while you are the only owner.' : undefined}
        onClick={() => {
          setIsAsking(true)
        }}
      >
        Leave {reader.siteName}
      </Button>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`Leave ${reader.siteName}?`}
        confirmLabel="Leave"
        cancelLabel="Stay"
        pending={leave.pending}
        onConfirm={() => {
          leave.act({})
        }}
      >
        <p>You see nothing of it from now on. What you made and moved stays in its record.</p>
      </ConfirmDialog>
    </Sheet>
  )
}
