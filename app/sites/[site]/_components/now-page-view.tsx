'use client'

import { Fragment, useState } from 'react'
import { describeError } from '@/app/_components/api'
import { HourStripChart } from '@/app/_components/charts/hour-strip'
import { MoistureRule, apartWords } from '@/app/_components/charts/moisture-rule'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Callout } from '@/app/_components/ui/callout'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Button } from '@/app/_components/ui/button'
import { Sheet } from '@/app/_components/ui/sheet'
import { UndoLine } from '@/app/_components/ui/undo-line'
import { useNow } from '@/app/_components/ui/use-now'
import { formatClock } from '@/lib/format/times'
import type { AsksView } from '@/lib/notices/delivery'
import type { NowView } from '@/lib/now/now-view'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { LockUpLink } from './lock-up-link'
import { AsksSheet, AtWork, AtWorkNow } from './asks-sheet'
import { NeedsSheet } from './needs-sheet'
import { NoReadings } from './no-readings'
import { furthestApart, nowRule } from './now-rule'
import { OutAnnouncer } from './out-announcer'
import { OutSheet, isDueSoon, piecesOut } from './out-sheet'
import { PlannedSheet } from './planned-sheet'
import { TurnedAfterCarry } from './turned-after-carry'
import { useCarryActions } from './use-carry-actions'

const TWO_HOURS_MS = 2 * 3_600_000

/** Now: what is out and until when, what is down to go, what the air would do, and what needs a hand. */
type NowPageViewProps = { reader: Reader; initial: NowView; asks: AsksView | null }

export function NowPageView({ reader, initial, asks }: NowPageViewProps) {
  const query = useSiteQuery<NowView>({ site: reader.site, area: 'now', path: '/now', initial })
  const view = query.data ?? initial
  const now = useNow(view.at)
  const clock = { timeZone: reader.timeZone, now }
  const actions = useCarryActions(reader.site)
  const [passed, setPassed] = useState<readonly string[]>([])

  const out = piecesOut(view.out)
  const due = out.filter((piece) => isDueSoon(piece, now))
  const otherOut = out.filter((piece) => !due.includes(piece))
  const isNear = (plannedAt: string) => new Date(plannedAt).getTime() - now.getTime() <= TWO_HOURS_MS
  const near = view.planned.filter((carry) => isNear(carry.plannedAt))
  const later = view.planned.filter((carry) => !isNear(carry.plannedAt))
  const base = `/sites/${reader.site}`
  const mayDo = may(reader.role, 'carries:do')
  const isRead = view.rule.rooms.some((room) => room.air.kind !== 'never')
  const justBack = view.justBack.filter(
    (back) => !passed.includes(`${back.carryId} ${back.number} ${back.at}`),
  )
  const apart = furthestApart(view.rule.rooms)

  return (
    <>
      <PageSentence parts={view.headline} />
      {asks === null ? null : <AtWorkNow reader={reader} initial={asks} />}
      <OutAnnouncer pieces={out} now={now} />
      {out.length === 0 && mayDo && isRead ? (
        <div className="flex flex-wrap gap-3 px-4 sm:px-0">
          <ButtonLink href={`${base}/carry?mode=now`} variant="filled" className="max-sm:grow">
            Going out now
          </ButtonLink>
          <ButtonLink href={`${base}/carry?mode=now&since=30`} className="max-sm:grow">
            Something is out
          </ButtonLink>
        </div>
      ) : null}
      {due.length > 0 ? (
        <OutSheet
          title={
            due.some(({ piece }) => piece.isOverdue)
              ? 'Out, and overdue or due in within the hour'
              : 'Out, and due in within the hour'
          }
          pieces={due}
          reader={reader}
          now={now}
          isUrgent
        />
      ) : null}
      {asks === null ? null : <AsksSheet reader={reader} initial={asks} isFirst={due.length === 0} />}
      {view.isLockUp && mayDo ? <LockUpLink base={base} isOut={out.length > 0} /> : null}
      {near.map((carry) => (
        <PlannedSheet key={carry.id} carry={carry} reader={reader} now={now} />
      ))}
      {isRead ? (
        <MoistureRule
          model={nowRule(view, clock)}
          title="What the air would do to the wood, given time"
          aside="Points are points of % MC"
          state={query.isError ? 'error' : 'ready'}
          folded={out.length > 0 && apart ? { words: apartWords(apart.keep, apart.far) } : undefined}
          note={
            query.isError ? (
              <Callout tone="warn" mark="silent" title={describeError(query.error).title} announce>
                <p>
                  Nothing is lost: readings are still being kept. These are from{' '}
                  {formatClock(view.at, reader.timeZone)}.
                </p>
              </Callout>
            ) : undefined
          }
          onRetry={() => {
            void query.refetch()
          }}
        />
      ) : (
        <NoReadings reader={reader} rooms={view.rule.rooms} />
      )}
      {otherOut.length > 0 ? (
        <OutSheet title={due.length > 0 ? 'Also out' : 'Out'} pieces={otherOut} reader={reader} now={now} />
      ) : null}
      {justBack.length > 0 ? (
        <div className="flex flex-col gap-3 max-sm:px-4">
          {justBack.map((back) => {
            const key = `${back.carryId} ${back.number} ${back.at}`
            return (
              <Fragment key={key}>
                <UndoLine
                  pending={actions.undo.pending}
                  onUndo={() => {
                    actions.undo.act({ carryId: back.carryId })
                  }}
                  seconds={600}
                  onGone={() => {
                    setPassed((gone) => [...gone, key])
                  }}
                >
                  {back.number} is back in <strong>{back.roomName}</strong>,{' '}
                  {formatClock(back.at, reader.timeZone)}.
                </UndoLine>
                {back.hasLid && may(reader.role, 'pieces:record') ? (
                  <TurnedAfterCarry
                    reader={reader}
                    pieceId={back.pieceId}
                    number={back.number}
                    carryId={back.carryId}
                    isAskSkipped={back.isAskSkipped}
                    className="border-l-[6px] border-l-good bg-board p-4"
                  />
                ) : null}
              </Fragment>
            )
          })}
        </div>
      ) : null}
      {later.map((carry) => (
        <PlannedSheet key={carry.id} carry={carry} reader={reader} now={now} />
      ))}
      {view.strip ? (
        <Sheet ticks>
          <HourStripChart
            strip={view.strip.hours}
            title={`${view.strip.room.name}, next 48 hours`}
            roomName={view.strip.room.name}
            timeZone={reader.timeZone}
            units={reader.units}
            now={now}
          />
        </Sheet>
      ) : null}
      {view.needs.length > 0 ? <NeedsSheet needs={view.needs} base={base} /> : null}
      {asks === null ? null : <AtWork reader={reader} initial={asks} />}
      {query.isError && !isRead ? (
        <div className="max-sm:px-4">
          <Button
            onClick={() => {
              void query.refetch()
            }}
          >
            Try again
          </Button>
        </div>
      ) : null}
    </>
  )
}
