'use client'

import { useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { ControlSentence, SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { instantOfLocalField, localFieldValue, nextFullHour } from '@/lib/format/local-time'
import { type Cover, coverSchema, coverWords } from '@/lib/pieces/piece'
import type { Room } from '@/lib/rooms/room'
import type { Reader } from '@/lib/sites/reader'
import { ChoosePieces } from '../../_components/choose-pieces'
import { stays, stayWords } from '../../_components/stays'
import { roomOf } from './carry-form-state'
import { RepeatDays } from './repeat-days'
import { useRepeatActions } from './use-repeat-actions'

type PlanFormProps = { reader: Reader; now: Date; onDone: () => void }

/** A plan as a sentence: each week on some days, or once, with named pieces or with whatever is taken. */
export function PlanForm({ reader, now, onDone }: PlanFormProps) {
  const { timeZone, site } = reader
  const actions = useRepeatActions(site)
  const { data: rooms } = useSiteQuery<{ items: Room[] }>({
    site,
    area: 'rooms',
    key: ['list'],
    path: '/rooms',
  })
  const [isWhatever, setIsWhatever] = useState(true)
  const [pieceIds, setPieceIds] = useState<string[]>([])
  const [to, setTo] = useState<string | null>(null)
  const [isWeekly, setIsWeekly] = useState(true)
  const [weekdays, setWeekdays] = useState<number[]>([])
  const [time, setTime] = useState('09:00')
  const [at, setAt] = useState(localFieldValue(nextFullHour(now, timeZone), timeZone))
  const [stayMinutes, setStayMinutes] = useState(180)
  const [cover, setCover] = useState<Cover>('open')
  const room = rooms && roomOf(rooms.items, to)
  const plannedAt = instantOfLocalField(at, timeZone)
  const missing = missingWords({ isWhatever, pieceIds, isWeekly, weekdays, plannedAt, now })
  const { error } = isWeekly ? actions.create : actions.once
  const send = () => {
    if (room === undefined) return
    const what = isWhatever ? { takesWhatever: true } : { pieceIds }
    const common = { ...what, toRoomId: room.id, cover, stayMinutes }
    if (isWeekly) actions.create.act({ ...common, weekdays, atTime: time }, { onSuccess: onDone })
    else if (plannedAt)
      actions.once.act({ ...common, plannedAt: plannedAt.toISOString() }, { onSuccess: onDone })
  }
  return (
    <div className="flex flex-col gap-4">
      <ControlSentence>
        <span>Take</span>
        <SentenceSelect
          label="What goes"
          value={isWhatever ? 'whatever' : 'named'}
          onChange={(event) => {
            setIsWhatever(event.target.value === 'whatever')
          }}
        >
          <option value="whatever">whatever I take</option>
          <option value="named">these pieces</option>
        </SentenceSelect>
        <span>to</span>
        <SentenceSelect
          label="The room it goes to"
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
        <SentenceSelect
          label="How often"
          value={isWeekly ? 'weekly' : 'once'}
          onChange={(event) => {
            setIsWeekly(event.target.value === 'weekly')
          }}
        >
          <option value="weekly">every week</option>
          <option value="once">once</option>
        </SentenceSelect>
        <span>at</span>
        {isWeekly ? (
          <SentenceInput
            label="At what time"
            type="time"
            required
            value={time}
            onChange={(event) => {
              setTime(event.target.value)
            }}
          />
        ) : (
          <SentenceInput
            label="When it is to go"
            type="datetime-local"
            value={at}
            onChange={(event) => {
              setAt(event.target.value)
            }}
          />
        )}
        <span>for</span>
        <SentenceSelect
          label="How long it stays"
          value={String(stayMinutes)}
          onChange={(event) => {
            setStayMinutes(Number(event.target.value))
          }}
        >
          {stays.map((minutes) => (
            <option key={minutes} value={minutes}>
              {stayWords(minutes)}
            </option>
          ))}
        </SentenceSelect>
        <SentenceSelect
          label="How it sits out there"
          value={cover}
          onChange={(event) => {
            setCover(coverSchema.parse(event.target.value))
          }}
        >
          {coverSchema.options.map((option) => (
            <option key={option} value={option}>
              {coverWords[option]}
            </option>
          ))}
        </SentenceSelect>
      </ControlSentence>
      {isWeekly ? <RepeatDays weekdays={weekdays} onChange={setWeekdays} /> : null}
      {isWhatever ? (
        <p className="max-w-words text-label text-ink-soft">
          It is judged by the least forgiving finished box that stands where it is kept. What you really take
          is chosen when you go.
        </p>
      ) : (
        <ChoosePieces
          site={site}
          legend="These go"
          toRoomId={room?.id ?? ''}
          chosen={pieceIds}
          onChange={setPieceIds}
        />
      )}
      {error ? <ErrorCallout error={error} /> : null}
      <div className="flex flex-wrap items-center gap-3">
        <Button
          variant="filled"
          notYet={missing}
          pending={actions.create.pending || actions.once.pending}
          onClick={send}
        >
          Keep this plan
        </Button>
        <Button variant="quiet" onClick={onDone}>
          Not now
        </Button>
      </div>
    </div>
  )
}

type Told = {
  isWhatever: boolean
  pieceIds: readonly string[]
  isWeekly: boolean
  weekdays: readonly number[]
  plannedAt: Date | undefined
  now: Date
}

function missingWords({
  isWhatever,
  pieceIds,
  isWeekly,
  weekdays,
  plannedAt,
  now,
}: Told): string | undefined {
  if (isWeekly && weekdays.length === 0) return 'Choose a day first.'
  if (!isWhatever && pieceIds.length === 0) return 'Choose a piece first.'
  if (!isWeekly && (plannedAt === undefined || plannedAt < now)) return 'A time to come, please.'
  return undefined
}
