'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { PageActions } from '@/app/_components/ui/page-actions'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { useNow } from '@/app/_components/ui/use-now'
import { formatClock, formatMoment, formatRelativeDay } from '@/lib/format/times'
import type { LockUp } from '@/lib/lock-up/lock-up'
import { lockUpHeadline, notYetClosable, stillOut } from '@/lib/lock-up/words'
import { nextPersonAfterMs } from '@/lib/notices/policy'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { BeforeTheDoor } from './before-the-door'
import { LockUpPiece } from './lock-up-piece'
import { Unlogged } from './unlogged'
import { useLockUpActions } from './use-lock-up-actions'

/** The evening question: what is out, logged or not, and what stays for the night. */
export function LockUpView({ reader, initial }: { reader: Reader; initial: LockUp }) {
  const { data: lockUp = initial } = useSiteQuery<LockUp>({
    site: reader.site,
    area: 'carries',
    key: ['lock-up'],
    path: '/lock-up',
    initial,
  })
  const now = useNow(lockUp.at)
  const actions = useLockUpActions(reader.site)
  const [staying, setStaying] = useState<ReadonlySet<string>>(new Set())
  const out = stillOut(lockUp.out)
  const mayDo = may(reader.role, 'carries:do')
  const reason = notYetClosable(lockUp, staying)
  const day = formatRelativeDay(lockUp.lockUpAt, reader.timeZone, now)
  return (
    <>
      <PageSentence
        above={`Lock-up, ${day} ${formatClock(lockUp.lockUpAt, reader.timeZone)}`}
        parts={lockUpHeadline(lockUp)}
      />
      {out.length > 0 ? (
        <Sheet id="still-out" edge={out.some(({ piece }) => piece.isOverdue) ? 'warn' : 'ink'}>
          <ul>
            {out.map(({ carry, piece }, index) => (
              <LockUpPiece
                key={`${carry.id} ${piece.id}`}
                carry={carry}
                piece={piece}
                lockUp={lockUp}
                reader={reader}
                now={now}
                actions={actions}
                isFirst={index === 0}
                isStaying={staying.has(piece.id)}
                onStay={(stays) => {
                  const rest = [...staying].filter((id) => id !== piece.id)
                  setStaying(new Set(stays ? [...rest, piece.id] : rest))
                }}
              />
            ))}
          </ul>
          <p className="mt-4 text-label text-ink-soft">
            If the lathe is running, wait where you can be seen.
          </p>
        </Sheet>
      ) : null}
      {mayDo ? <Unlogged lockUp={lockUp} reader={reader} now={now} actions={actions} /> : null}
      <BeforeTheDoor />
      <p className="max-w-words px-4 text-label text-ink-soft sm:px-0">{askedWords(lockUp, reader, now)}</p>
      {lockUp.closed ? (
        <div className="max-sm:px-4">
          <Callout
            tone="good"
            announce
            action={
              mayDo ? (
                <Button
                  variant="link"
                  pending={actions.close.pending}
                  onClick={() => {
                    actions.close.act({ isClosed: false, stayOutIds: [] })
                  }}
                >
                  Undo
                </Button>
              ) : undefined
            }
          >
            <p>
              The day was closed {formatMoment(lockUp.closed.at, reader.timeZone, now)}
              {lockUp.closed.by ? ` by ${lockUp.closed.by}` : ''}.
            </p>
          </Callout>
        </div>
      ) : mayDo ? (
        <PageActions>
          <Button
            variant="filled"
            notYet={reason}
            pending={actions.close.pending}
            onClick={() => {
              actions.close.act({ isClosed: true, stayOutIds: [...staying] })
            }}
          >
            Close the day
          </Button>
        </PageActions>
      ) : null}
    </>
  )
}

/** Who is asked next, and when it is asked for the last time. */
function askedWords(
  { lockUpAt, lastCallAt, noticeId, closed }: LockUp,
  { timeZone }: Reader,
  now: Date,
): string {
  const houseAt = new Date(new Date(lockUpAt).getTime() + nextPersonAfterMs)
  const house =
    noticeId !== null && closed === null && houseAt > now
      ? `No answer by ${formatClock(houseAt, timeZone)} and the house list is asked. `
      : ''
  return lastCallAt === null ? house : `${house}Last call is at ${formatClock(lastCallAt, timeZone)}.`
}
