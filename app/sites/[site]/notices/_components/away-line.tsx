'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { dayOn, formatDate } from '@/lib/format/times'
import { daysAfter } from '@/lib/climate/days'
import type { Hearing } from '@/lib/notices/own-settings'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Reader } from '@/lib/sites/reader'
import type { HearingChange } from './use-hearing'

type AwayLineProps = { reader: Reader; hearing: Hearing; change: HearingChange }

/** Away for some days: who hears in one's stead. */
export function AwayLine({ reader, hearing, change }: AwayLineProps) {
  const { away, timeZone } = hearing.settings
  const zone = timeZone ?? reader.timeZone
  const today = dayOn(reader.at, zone)
  const [from, setFrom] = useState(today)
  const [last, setLast] = useState(daysAfter(today, 7))
  const [coverId, setCoverId] = useState('')
  if (away !== null) {
    const cover = hearing.covers.find(({ id }) => id === away.coverId)
    // The last whole day away: it ends as the next one begins.
    const lastDay = new Date(new Date(away.until).getTime() - 1)
    const now = new Date(reader.at)
    return (
      <div className="flex flex-wrap items-center justify-between gap-3 border-t border-line pt-3">
        <p>
          Away from <strong>{formatDate(away.from, zone, now)}</strong> to{' '}
          <strong>{formatDate(lastDay, zone, now)}</strong>: {cover?.name ?? 'every maker'} hears in your
          stead.
        </p>
        <Button
          variant="link"
          pending={change.pending}
          onClick={() => {
            change.act({ away: null })
          }}
        >
          I am here after all
        </Button>
      </div>
    )
  }
  const isInOrder = from !== '' && last !== '' && last >= from && last >= today
  return (
    <div className="border-t border-line pt-3">
      <FlowingSentence>
        Away from{' '}
        <SentenceInput
          type="date"
          label="First day away"
          value={from}
          onChange={(event) => {
            setFrom(event.target.value)
          }}
        />{' '}
        to{' '}
        <SentenceInput
          type="date"
          label="Last day away"
          value={last}
          onChange={(event) => {
            setLast(event.target.value)
          }}
        />
        :{' '}
        <SentenceSelect
          label="Who covers"
          value={coverId}
          onChange={(event) => {
            setCoverId(event.target.value)
          }}
        >
          <option value="">every maker</option>
          {hearing.covers.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SentenceSelect>{' '}
        hears in my stead.
      </FlowingSentence>
      <Button
        pending={change.pending}
        notYet={isInOrder ? undefined : 'The last day comes before the first, or has passed.'}
        onClick={() => {
          const at = (day: string) => new Date(instantOfLocalTime(day, '00:00', zone)).toISOString()
          change.act({
            away: { from: at(from), until: at(daysAfter(last, 1)), coverId: coverId === '' ? null : coverId },
          })
        }}
      >
        I am away then
      </Button>
    </div>
  )
}
