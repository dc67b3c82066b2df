'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ControlSentence, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { Sheet } from '@/app/_components/ui/sheet'
import { formatDuration, formatMoment } from '@/lib/format/times'
import type { LockUp } from '@/lib/lock-up/lock-up'
import { shopUseWords } from '@/lib/notices/shop-used'
import type { Room } from '@/lib/rooms/room'
import type { Reader } from '@/lib/sites/reader'
import { ChoosePieces } from '../../_components/choose-pieces'
import type { LockUpActions } from './use-lock-up-actions'

const sinces = [30, 60, 120, 240, 360, 480, 720]

type UnloggedProps = {
  lockUp: LockUp
  reader: Reader
  now: Date
  actions: LockUpActions
}

/** "Anything out that isn't logged?" Asked on days on which the shop was used; always there to be said. */
export function Unlogged({ lockUp, reader, now, actions }: UnloggedProps) {
  const [isChoosing, setIsChoosing] = useState(false)
  const { nothingElse, used } = lockUp
  return (
    <Sheet id="unlogged" title="Anything out that isn’t logged?">
      <p className="text-ink-soft">
        {used === null ? 'Nothing on record says that the shop was used today.' : shopUseWords[used]}
      </p>
      {nothingElse && !isChoosing ? (
        <p role="status" className="mt-3">
          Nothing else{nothingElse.by ? `, says ${nothingElse.by}` : ''},{' '}
          {formatMoment(nothingElse.at, reader.timeZone, now)}.{' '}
          <Button
            variant="link"
            pending={actions.nothingElse.pending}
            onClick={() => {
              actions.nothingElse.act({ isNothing: false })
            }}
          >
            Undo
          </Button>
        </p>
      ) : (
        <div className="mt-3 grid grid-cols-2 gap-3 sm:flex">
          <Button
            pending={actions.nothingElse.pending}
            onClick={() => {
              setIsChoosing(false)
              actions.nothingElse.act({ isNothing: true })
            }}
          >
            No, nothing
          </Button>
          <Button
            aria-expanded={isChoosing}
            onClick={() => {
              setIsChoosing(!isChoosing)
            }}
          >
            Yes, choose
          </Button>
        </div>
      )}
      {isChoosing ? (
        <LogAsOut
          reader={reader}
          now={now}
          actions={actions}
          onDone={() => {
            setIsChoosing(false)
          }}
        />
      ) : null}
    </Sheet>
  )
}

type LogAsOutProps = Pick<UnloggedProps, 'reader' | 'now' | 'actions'> & { onDone: () => void }

function LogAsOut({ reader, now, actions, onDone }: LogAsOutProps) {
  const { site } = reader
  const { data: rooms } = useSiteQuery<{ items: Room[] }>({
    site,
    area: 'rooms',
    key: ['list'],
    path: '/rooms',
  })
  const [to, setTo] = useState<string>()
  const [since, setSince] = useState(240)
  const [chosen, setChosen] = useState<string[]>([])
  const room = rooms?.items.find(({ id }) => id === to) ?? rooms?.items.find(({ kind }) => kind === 'shop')
  const { error } = actions.logOut
  return (
    <div className="mt-5 flex flex-col gap-4 border-t border-line pt-5">
      <ControlSentence>
        <span>It is in</span>
        <SentenceSelect
          label="Where it is"
          value={room?.id ?? ''}
          onChange={(event) => {
            setTo(event.target.value)
          }}
        >
          {rooms?.items.map((option) => (
            <option key={option.id} value={option.id}>
              {option.name}
            </option>
          ))}
        </SentenceSelect>
        <span>since about</span>
        <SentenceSelect
          label="Since when"
          value={String(since)}
          onChange={(event) => {
            setSince(Number(event.target.value))
          }}
        >
          {sinces.map((minutes) => (
            <option key={minutes} value={minutes}>
              {formatDuration(minutes)} ago
            </option>
          ))}
        </SentenceSelect>
      </ControlSentence>
      <ChoosePieces
        site={site}
        legend="What is out"
        toRoomId={room?.id ?? ''}
        chosen={chosen}
        onChange={setChosen}
      />
      {error ? <ErrorCallout error={error} /> : null}
      <div>
        <Button
          variant="filled"
          pending={actions.logOut.pending}
          notYet={chosen.length === 0 ? 'Choose a piece first.' : undefined}
          onClick={() => {
            if (room === undefined) return
            const sinceAt = new Date(now.getTime() - since * 60_000).toISOString()
            actions.logOut.act({ pieceIds: chosen, toRoomId: room.id, since: sinceAt }, { onSuccess: onDone })
          }}
        >
          Log it as out
        </Button>
      </div>
    </div>
  )
}
