'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { useNow } from '@/app/_components/ui/use-now'
import { useAction } from '@/app/_components/use-action'
import { formatClock } from '@/lib/format/times'
import type { OwnSettings, OwnSettingsChange } from '@/lib/notices/own-settings'
import type { Reader } from '@/lib/sites/reader'

const hours = [1, 2, 3, 4, 6, 8]

function useSession(reader: Reader, version: number) {
  return useAction<OwnSettingsChange, OwnSettings>({
    run: (body) => apiFetch(`/sites/${reader.site}/members/me`, { method: 'PATCH', body, ifMatch: version }),
    invalidates: (['notices', 'members'] as const).map((area) => siteKey(reader.site, area)),
  })
}

type SessionLineProps = { reader: Reader; until: string | null; version: number }

/** At work in the shop: no sound and no mail until then; what presses is shown, and the house list hears it too. */
export function SessionLine({ reader, until, version }: SessionLineProps) {
  const now = useNow(reader.at)
  const change = useSession(reader, version)
  if (until === null || new Date(until) <= now) return null
  return (
    <div
      role="status"
      className="flex flex-wrap items-center justify-between gap-x-3 border-l-[6px] border-l-ink bg-board px-4 py-1"
    >
      <p>
        <strong>At work until {formatClock(until, reader.timeZone)}</strong>: no sound, no mail. The house
        list hears what presses.
      </p>
      <Button
        variant="link"
        pending={change.pending}
        onClick={() => {
          change.act({ sessionUntil: null })
        }}
      >
        Done for now
      </Button>
    </div>
  )
}

/** The other side of it: offers to be silent for some hours. Nothing while at work. */
export function SessionOffer({ reader, until, version }: SessionLineProps) {
  const now = useNow(reader.at)
  const [length, setLength] = useState(3)
  const change = useSession(reader, version)
  if (until !== null && new Date(until) > now) return null
  return (
    <div className="flex flex-wrap items-center gap-x-2 gap-y-2 max-sm:px-4">
      <span>At work for the next</span>
      <SentenceSelect
        label="How long at work"
        value={length}
        onChange={(event) => {
          setLength(Number(event.target.value))
        }}
      >
        {hours.map((count) => (
          <option key={count} value={count}>
            {count} h
          </option>
        ))}
      </SentenceSelect>
      <Button
        pending={change.pending}
        onClick={() => {
          const until = new Date(now.getTime() + length * 3_600_000)
          change.act({ sessionUntil: until.toISOString() })
        }}
      >
        No sound, no mail
      </Button>
    </div>
  )
}
