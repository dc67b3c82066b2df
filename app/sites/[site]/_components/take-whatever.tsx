'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { Dialog } from '@/app/_components/ui/dialog'
import { problemCodeOf } from '@/lib/api/problems'
import type { Carry } from '@/lib/carry/carry'
import type { Reader } from '@/lib/sites/reader'
import { AgainstAdvice } from './against-advice'
import { ChoosePieces } from './choose-pieces'
import type { CarryActions } from './use-carry-actions'

type TakeWhateverProps = { carry: Carry; reader: Reader; start: CarryActions['start'] }

/** A plan for whatever is taken goes out: here it is said what that is, and each of them is judged. */
export function TakeWhatever({ carry, reader, start }: TakeWhateverProps) {
  const [open, setOpen] = useState(false)
  const [chosen, setChosen] = useState<string[]>([])
  const isAdvised = start.problem !== null && problemCodeOf(start.problem) === 'advised-against'
  const go = (againstAdvice: boolean) => {
    start.act({ carryId: carry.id, againstAdvice, pieceIds: chosen })
  }
  return (
    <>
      <Button
        onClick={() => {
          setChosen([])
          start.reset()
          setOpen(true)
        }}
      >
        Choose what goes now
      </Button>
      <Dialog open={open && !isAdvised && !start.done} onOpenChange={setOpen} title="What do you take?">
        <div className="flex flex-col gap-4">
          <ChoosePieces
            site={reader.site}
            legend={`To ${carry.toRoom.name}`}
            toRoomId={carry.toRoom.id}
            chosen={chosen}
            onChange={setChosen}
          />
          {start.error && !isAdvised ? <ErrorCallout error={start.error} /> : null}
          <div>
            <Button
              variant="filled"
              pending={start.pending}
              notYet={chosen.length === 0 ? 'Choose a piece first.' : undefined}
              onClick={() => {
                go(false)
              }}
            >
              Take it out now
            </Button>
          </div>
        </div>
      </Dialog>
      <AgainstAdvice
        open={open && isAdvised}
        why={start.problem?.detail ?? carry.headline}
        pending={start.pending}
        onCancel={start.reset}
        onConfirm={() => {
          go(true)
        }}
      />
    </>
  )
}
