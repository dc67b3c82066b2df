'use client'

import { useState } from 'react'
import { apiFetch, describeError } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'

const leaveFor = (address: string) => {
  window.location.assign(address)
}

/** Signs in to the invented yard without a password; a whole load afterwards, so that no earlier reader's figures stay. */
export function TryDemo() {
  const [state, setState] = useState<'idle' | 'going' | { title: string; detail: string }>('idle')
  const go = async () => {
    setState('going')
    try {
      const { site } = await apiFetch<{ site: string }>('/demo/sign-in', { method: 'POST' })
      leaveFor(`/sites/${site}`)
    } catch (error) {
      setState(describeError(error))
    }
  }
  return (
    <div className="flex flex-col gap-2 max-sm:w-full">
      <Button
        variant="filled"
        pending={state === 'going'}
        onClick={() => void go()}
        className="max-sm:w-full"
      >
        Try the demo yard
      </Button>
      {typeof state === 'object' ? (
        <p role="alert" className="text-label text-warn">
          {state.title}. {state.detail}
        </p>
      ) : null}
    </div>
  )
}
