'use client'

import { useState } from 'react'
import { problemCodeOf } from '@/lib/api/problems'
import type { Carry } from '@/lib/carry/carry'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { AgainstAdvice } from './against-advice'
import type { CarryActions } from './use-carry-actions'

type StartCarryProps = {
  carry: Carry
  start: CarryActions['start']
  /** Its time is near: then going is the answer that the page offers first. */
  isSoon: boolean
}

/**
 * Takes a planned carry out. Against the advice it asks again, and says why: at once where the verdict on the page
 * says so, and after the server's own check where that has changed meanwhile.
 */
export function StartCarry({ carry, start, isSoon }: StartCarryProps) {
  const isAdvised = start.problem !== null && problemCodeOf(start.problem) === 'advised-against'
  const [asking, setAsking] = useState(false)
  const isBest = isSoon && carry.worst !== 'leave' && carry.worst !== 'unknown'
  return (
    <>
      <Button
        variant={isBest ? 'filled' : 'second'}
        pending={start.pending}
        onClick={() => {
          if (carry.worst === 'leave') setAsking(true)
          else start.act({ carryId: carry.id, againstAdvice: false })
        }}
      >
        {carry.pieces.length > 1 ? 'Take them out now' : 'Take it out now'}
      </Button>
      <AgainstAdvice
        open={asking || isAdvised}
        why={start.problem?.detail ?? carry.headline}
        pending={start.pending}
        onCancel={() => {
          setAsking(false)
          start.reset()
        }}
        onConfirm={() => {
          setAsking(false)
          start.act({ carryId: carry.id, againstAdvice: true })
        }}
      />
      {start.error && !isAdvised ? <ErrorCallout error={start.error} /> : null}
    </>
  )
}
