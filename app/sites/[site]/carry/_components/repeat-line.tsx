'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import type { Repeat } from '@/lib/carry/repeat'
import { namesOf } from '@/lib/carry/summary'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { coverWords } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { useRepeatActions } from './use-repeat-actions'

type RepeatLineProps = { repeat: Repeat; reader: Reader; now: Date }

/** One plan that comes again: what, when, when next, and the ways to stop it. */
export function RepeatLine({ repeat, reader, now }: RepeatLineProps) {
  const actions = useRepeatActions(reader.site)
  const [asking, setAsking] = useState(false)
  const isStopped = repeat.pausedAt !== null || repeat.endedAt !== null
  const what = repeat.takesWhatever ? 'Whatever I take' : namesOf(repeat.pieces)
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3 border-b border-line py-4 first:pt-0 last:border-b-0 last:pb-0">
      <div className="min-w-0 grow basis-72">
        <p className="font-semibold">
          {what}, {repeat.words}
        </p>
        <p className="text-label text-ink-soft">
          to {repeat.toRoom.name} for {formatDuration(repeat.stayMinutes)}, {coverWords[repeat.cover]}.{' '}
          {stateWords(repeat, reader.timeZone, now)}
        </p>
      </div>
      {may(reader.role, 'carries:do') ? (
        <div className="flex flex-wrap gap-3">
          {repeat.endedAt === null ? (
            <>
              <Button
                aria-label={`${isStopped ? 'Go on' : 'Pause'}: ${what}, ${repeat.words}`}
                pending={actions.change.pending}
                onClick={() => {
                  actions.change.act({
                    repeatId: repeat.id,
                    version: repeat.version,
                    change: { isPaused: !isStopped },
                  })
                }}
              >
                {isStopped ? 'Go on' : 'Pause'}
              </Button>
              <Button
                variant="link"
                aria-label={`End: ${what}, ${repeat.words}`}
                onClick={() => {
                  setAsking(true)
                }}
              >
                End it
              </Button>
            </>
          ) : (
            <Button
              variant="link"
              pending={actions.restore.pending}
              onClick={() => {
                actions.restore.act({ repeatId: repeat.id })
              }}
            >
              Undo: let it come again
            </Button>
          )}
        </div>
      ) : null}
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="End this plan?"
        confirmLabel="End it"
        cancelLabel="Keep it"
        pending={actions.end.pending}
        onConfirm={() => {
          actions.end.act({ repeatId: repeat.id, version: repeat.version })
          setAsking(false)
        }}
      >
        <p>It comes no more, and what is still to come of it is called off. It can be undone for a day.</p>
      </ConfirmDialog>
    </li>
  )
}

function stateWords(repeat: Repeat, timeZone: string, now: Date): string {
  if (repeat.endedAt !== null) return `Ended ${formatMoment(repeat.endedAt, timeZone, now)}.`
  if (repeat.pausedAt !== null) return `Paused since ${formatMoment(repeat.pausedAt, timeZone, now)}.`
  return repeat.nextAt === null ? '' : `Next ${formatMoment(repeat.nextAt, timeZone, now)}.`
}
