'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { SentenceInput, SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import type { OwnSettings } from '@/lib/notices/own-settings'
import type { HearingChange } from './use-hearing'

type OwnQuietProps = { settings: OwnSettings; change: HearingChange; timeZones: readonly string[] }

/** Quiet hours of one's own, by one's own clock; else those of the place. */
export function OwnQuiet({ settings, change, timeZones }: OwnQuietProps) {
  const [from, setFrom] = useState(settings.quiet?.from ?? '22:00')
  const [to, setTo] = useState(settings.quiet?.to ?? '07:00')
  const isOwn = settings.quiet !== null
  const isChanged = isOwn && (from !== settings.quiet?.from || to !== settings.quiet.to)
  return (
    <div className="border-t border-line pt-3">
      <FlowingSentence>
        My quiet hours are{' '}
        <SentenceSelect
          label="Whose quiet hours"
          value={isOwn ? 'own' : 'site'}
          onChange={(event) => {
            change.act({ quiet: event.target.value === 'own' ? { from, to } : null })
          }}
        >
          <option value="site">those of the place</option>
          <option value="own">my own</option>
        </SentenceSelect>
        {isOwn ? (
          <>
            , from{' '}
            <SentenceInput
              type="time"
              label="My quiet hours begin"
              value={from}
              onChange={(event) => {
                setFrom(event.target.value)
              }}
            />{' '}
            to{' '}
            <SentenceInput
              type="time"
              label="My quiet hours end"
              value={to}
              onChange={(event) => {
                setTo(event.target.value)
              }}
            />
          </>
        ) : null}
        , by the clock of{' '}
        <SentenceSelect
          label="My time zone"
          value={settings.timeZone ?? ''}
          onChange={(event) => {
            change.act({ timeZone: event.target.value === '' ? null : event.target.value })
          }}
        >
          <option value="">the place</option>
          {timeZones.map((zone) => (
            <option key={zone} value={zone}>
              {zone}
            </option>
          ))}
        </SentenceSelect>
        .
      </FlowingSentence>
      {isChanged && from !== '' && to !== '' ? (
        <Button
          pending={change.pending}
          onClick={() => {
            change.act({ quiet: { from, to } })
          }}
        >
          Keep these hours
        </Button>
      ) : null}
    </div>
  )
}
