'use client'

import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import type { Carry } from '@/lib/carry/carry'
import { formatMoment } from '@/lib/format/times'
import type { CarryActions } from './use-carry-actions'

type PutOffProps = { carry: Carry; actions: CarryActions; isBest: boolean; timeZone: string; now: Date }

/** One press puts a plan off to the better hour that the forecast knows of. */
export function PutOff({ carry, actions, isBest, timeZone, now }: PutOffProps) {
  if (carry.betterAt === null) return null
  return (
    <Button
      variant={isBest ? 'filled' : 'second'}
      pending={actions.putOff.pending}
      onClick={() => {
        actions.putOff.act({ carryId: carry.id, from: carry.plannedAt })
      }}
    >
      Put off to {formatMoment(carry.betterAt, timeZone, now)}
    </Button>
  )
}

type PutOffLineProps = { carry: Carry; actions: CarryActions; timeZone: string; now: Date }

/** "Put off from 14:00 to tomorrow 11:00. Undo", for as long as it can be put back. */
export function PutOffLine({ carry, actions, timeZone, now }: PutOffLineProps) {
  if (carry.putOffFrom === null) return null
  const words = `Put off from ${formatMoment(carry.putOffFrom, timeZone, now)} to ${formatMoment(carry.plannedAt, timeZone, now)}.`
  if (!carry.canPutBack) return <p className="mt-3 text-label text-ink-soft">{words}</p>
  return (
    <div className="mt-4">
      <Callout
        tone="good"
        announce
        action={
          <Button
            variant="link"
            pending={actions.putBack.pending}
            onClick={() => {
              actions.putBack.act({ carryId: carry.id })
            }}
          >
            Undo
          </Button>
        }
      >
        <p>{words}</p>
      </Callout>
    </div>
  )
}
