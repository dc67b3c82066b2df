'use client'

import { problemCodeOf } from '@/lib/api/problems'
import type { Carry } from '@/lib/carry/carry'
import { describeError } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { AgainstAdvice } from './against-advice'
import type { CarryActions } from './use-carry-actions'

/** Takes a planned carry out. Against the advice it asks again, and says why. */
export function StartCarry({ carry, start }: { carry: Carry; start: CarryActions['start'] }) {
  const isAdvised = start.problem !== null && problemCodeOf(start.problem) === 'advised-against'
  const isBest = carry.worst === 'fine' || carry.worst === 'keep-short' || carry.worst === 'words'
  return (
    <>
      <Button
        variant={isBest ? 'filled' : 'second'}
        pending={start.pending}
        onClick={() => {
          start.act({ carryId: carry.id, againstAdvice: false })
        }}
      >
        Take it out now
      </Button>
      <AgainstAdvice
        open={isAdvised}
        why={start.problem?.detail ?? ''}
        pending={start.pending}
        onCancel={start.reset}
        onConfirm={() => {
          start.act({ carryId: carry.id, againstAdvice: true })
        }}
      />
      {start.error && !isAdvised ? (
        <Callout tone="warn" mark="silent" title={describeError(start.error).title} announce>
          <p>{describeError(start.error).detail}</p>
        </Callout>
      ) : null}
    </>
  )
}
