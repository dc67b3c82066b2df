'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { Sheet } from '@/app/_components/ui/sheet'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { TextLink } from '@/app/_components/ui/text-link'
import type { Carry } from '@/lib/carry/carry'
import { formatCount } from '@/lib/format/figures'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { coverWords } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { ChangePlan } from './change-plan'
import { PieceVerdict } from './piece-verdict'
import { PutOff, PutOffLine } from './put-off'
import { StartCarry } from './start-carry'
import { TakeWhatever } from './take-whatever'
import { useCarryActions } from './use-carry-actions'

type PlannedSheetProps = {
  carry: Carry
  reader: Reader
  now: Date
  /** The page of the carry itself has no link to it. */
  isOwnPage?: boolean
}

/** A carry that is down to go: its pieces with their verdicts, and what can be done about it. */
export function PlannedSheet({ carry, reader, now, isOwnPage = false }: PlannedSheetProps) {
  const actions = useCarryActions(reader.site)
  const [asking, setAsking] = useState(false)
  const minutes = (new Date(carry.plannedAt).getTime() - now.getTime()) / 60_000
  const when =
    minutes > 0 && minutes <= 24 * 60
      ? `in ${formatDuration(minutes)}, `
      : minutes <= 0
        ? 'its time has come, '
        : ''
  const isShort = carry.worst === 'leave' || carry.worst === 'keep-short'
  const mayDo = may(reader.role, 'carries:do')
  return (
    <Sheet
      id={`carry-${carry.id}`}
      title={`${whoGoes(carry)} down to go to ${carry.toRoom.name}, ${formatMoment(carry.plannedAt, reader.timeZone, now)}`}
      aside={`${when}for ${formatDuration(carry.stayMinutes)}, ${coverWords[carry.cover]}`}
    >
      {carry.whatever ? <p className="mb-2 max-w-words">{carry.whatever}</p> : null}
      <ul className="grid gap-x-8 sm:grid-cols-2">
        {carry.pieces.map((piece) => (
          <li key={piece.id} className="flex gap-4 border-b border-line py-3 last:border-b-0 sm:border-b-0">
            <PieceOutline outline={piece.outline} />
            <div className="min-w-0">
              <p className="text-label text-ink-soft">
                <TextLink href={`/sites/${reader.site}/pieces/${piece.id}`} className="font-semibold">
                  {piece.number}
                </TextLink>{' '}
                {piece.title}
              </p>
              {piece.check ? (
                <PieceVerdict check={piece.check} timeZone={reader.timeZone} now={now} isShort={!isOwnPage} />
              ) : null}
            </div>
          </li>
        ))}
      </ul>
      <div className="mt-4 flex flex-wrap items-center gap-3">
        {mayDo ? (
          <>
            {carry.takesWhatever ? (
              <TakeWhatever carry={carry} reader={reader} start={actions.start} />
            ) : (
              <StartCarry carry={carry} start={actions.start} isSoon={minutes <= 120} />
            )}
            {isShort && !carry.canPutBack ? (
              <PutOff
                carry={carry}
                actions={actions}
                isBest={carry.worst === 'leave'}
                timeZone={reader.timeZone}
                now={now}
              />
            ) : null}
            {carry.worst === 'leave' && carry.cover !== 'bagged' && !carry.takesWhatever ? (
              <Button
                pending={actions.change.pending}
                onClick={() => {
                  actions.change.act({
                    carryId: carry.id,
                    version: carry.version,
                    change: { cover: 'bagged' },
                  })
                }}
              >
                Plan {carry.pieces.length === 1 ? 'it' : 'them'} bagged
              </Button>
            ) : null}
            <ChangePlan carry={carry} actions={actions} timeZone={reader.timeZone} now={now} />
            <Button
              variant="link"
              onClick={() => {
                setAsking(true)
              }}
            >
              Call it off
            </Button>
          </>
        ) : null}
        {isOwnPage ? null : (
          <TextLink
            href={`/sites/${reader.site}/carry/${carry.id}`}
            className="inline-flex min-h-11 items-center px-1"
          >
            Open the carry
          </TextLink>
        )}
      </div>
      <PutOffLine carry={carry} actions={actions} timeZone={reader.timeZone} now={now} />
      {carry.repeat ? (
        <p className="mt-3 text-label text-ink-soft">
          One of those that go {carry.repeat.words}.{' '}
          <TextLink href={`/sites/${reader.site}/carry#plans`}>Change the plan that comes again</TextLink>
        </p>
      ) : null}
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="Call this carry off?"
        confirmLabel="Call it off"
        cancelLabel="Keep the plan"
        pending={actions.callOff.pending}
        onConfirm={() => {
          actions.callOff.act({ carryId: carry.id })
          setAsking(false)
        }}
      >
        <p>Nothing goes, and nobody is warned about it any more. The pieces stay where they are.</p>
      </ConfirmDialog>
    </Sheet>
  )
}

function whoGoes(carry: Carry): string {
  if (carry.takesWhatever) return 'Whatever you take is'
  const [first] = carry.pieces
  if (carry.pieces.length === 1 && first) return `${first.number} is`
  return `${formatCount(carry.pieces.length, 'piece')} are`
}
