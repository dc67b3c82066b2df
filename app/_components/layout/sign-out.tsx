'use client'

import { useState } from 'react'
import { toast } from 'sonner'
import { classNames } from '../ui/class-names'

/** Ends the session on the server, then leaves with a full load, so that nothing of the site stays in memory. */
export function SignOut({ className }: { className?: string }) {
  const [pending, setPending] = useState(false)
  const signOut = async () => {
    setPending(true)
    try {
      const response = await fetch('/api/auth/sign-out', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: '{}',
      })
      if (!response.ok) throw new Error(`sign-out answered ${String(response.status)}`)
      window.location.replace('/')
    } catch (error) {
      setPending(false)
      const reason = error instanceof Error ? error.message : 'no answer'
      toast.error('You are still signed in', {
        description: `Signing out did not work (${reason}). Try again.`,
      })
    }
  }
  return (
    <button
      type="button"
      aria-disabled={pending || undefined}
      onClick={() => {
        if (!pending) void signOut()
      }}
      className={classNames('text-heart underline decoration-1 underline-offset-4', className)}
    >
      Sign out
    </button>
  )
}
