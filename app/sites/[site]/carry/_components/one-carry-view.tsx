'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Callout } from '@/app/_components/ui/callout'
import { Cautions } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { useNow } from '@/app/_components/ui/use-now'
import { carryCautions } from '@/lib/carry/cautions'
import { type Carry, hasLid } from '@/lib/carry/carry'
import { formatMoment } from '@/lib/format/times'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { ForgottenPanel } from '../../_components/forgotten-panel'
import { OutSheet, piecesOut } from '../../_components/out-sheet'
import { PlannedSheet } from '../../_components/planned-sheet'
import { useCarryActions } from '../../_components/use-carry-actions'
import { EndedSheet } from './ended-sheet'

const stateWords: Record<Carry['state'], string> = {
  planned: 'A carry that is planned',
  out: 'A carry that is out',
  back: 'A carry that is back',
  'called-off': 'A carry that was called off',
}

/** One carry from plan to back. */
export function OneCarryView({ reader, initial }: { reader: Reader; initial: Carry }) {
  const { data: carry = initial } = useSiteQuery<Carry>({
    site: reader.site,
    area: 'carries',
    key: ['one', initial.id],
    path: `/carries/${initial.id}`,
    initial,
  })
  const now = useNow(reader.at)
  const actions = useCarryActions(reader.site)
  const out = piecesOut([carry])
  const mayDo = may(reader.role, 'carries:do')
  const isOpen = carry.state === 'planned' || carry.state === 'out'
  return (
    <>
      <PageSentence above={stateWords[carry.state]}>{carry.headline}</PageSentence>
      {carry.state === 'planned' ? <PlannedSheet carry={carry} reader={reader} now={now} isOwnPage /> : null}
      {out.length > 0 ? (
        <OutSheet
          title={`Out in ${carry.toRoom.name}`}
          pieces={out}
          reader={reader}
          now={now}
          isUrgent={out.some(({ piece }) => piece.isOverdue)}
        />
      ) : null}
      {mayHaveBeenForgotten(carry, now) ? (
        <ForgottenPanel reader={reader} carryId={carry.id} isOpenAtFirst={isAskedFor(carry)} />
      ) : null}
      {carry.pieces.some((piece) => piece.backAt !== null) || !isOpen ? (
        <EndedSheet carry={carry} reader={reader} now={now} />
      ) : null}
      {carry.canUndo && mayDo ? (
        <div className="max-sm:px-4">
          <Callout
            tone="good"
            action={
              <Button
                variant="link"
                pending={actions.undo.pending}
                onClick={() => {
                  actions.undo.act({ carryId: carry.id })
                }}
              >
                Undo
              </Button>
            }
          >
            <p>
              Brought back{carry.endedAt ? ` ${formatMoment(carry.endedAt, reader.timeZone, now)}` : ''}. Not
              right? It can be taken back for ten minutes.
            </p>
          </Callout>
        </div>
      ) : null}
      <div className="flex flex-wrap gap-3 px-4 sm:px-0">
        <ButtonLink href={`/sites/${reader.site}/carry`}>All carries</ButtonLink>
      </div>
      {isOpen ? (
        <div className="max-sm:px-4">
          <Cautions cautions={carryCautions} />
        </div>
      ) : null}
    </>
  )
}

/** Some days on, how it was no longer helps. */
const FORGOTTEN_TOLD_MS = 5 * 86_400_000

/** A box that is overdue, or came in later than was planned, or went against the advice. */
function mayHaveBeenForgotten(carry: Carry, now: Date): boolean {
  return carry.pieces.some((piece) => {
    if (piece.outAt === null || !hasLid(piece)) return false
    if (piece.backAt === null) return piece.isOverdue
    const backAt = new Date(piece.backAt).getTime()
    const stayedMs = backAt - new Date(piece.outAt).getTime()
    const isLate = carry.againstAdvice || stayedMs > carry.stayMinutes * 60_000
    return isLate && now.getTime() - backAt < FORGOTTEN_TOLD_MS
  })
}

/** An overdue piece has no time for another press. */
const isAskedFor = (carry: Carry): boolean => carry.pieces.some((piece) => piece.isOverdue)
