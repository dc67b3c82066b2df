'use client'

import { useQuery } from '@tanstack/react-query'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Sheet } from '@/app/_components/ui/sheet'
import { StaleState } from '@/app/_components/ui/states'
import type { RuleList } from '@/lib/notices/rule-view'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { RuleLine } from './rule-line'

/** The rules as sentences whose underlined words can be changed, by those who may. */
export function WhatIsTold({ reader }: { reader: Reader }) {
  const rules = useQuery({
    queryKey: siteKey(reader.site, 'notices', 'rules'),
    queryFn: ({ signal }) => apiFetch<RuleList>(`/sites/${reader.site}/rules`, { signal }),
  })
  const mayChange = may(reader.role, 'rules:change')
  return (
    <Sheet
      title="What you asked to be told"
      id="rules"
      aside={mayChange ? 'Press an underlined word to change it' : 'The makers change this'}
    >
      {rules.isError ? (
        <StaleState>The rules could not be fetched just now. They go on as they are.</StaleState>
      ) : null}
      {rules.data === undefined ? (
        rules.isPending ? (
          <p className="text-ink-soft">Fetching the rules.</p>
        ) : null
      ) : (
        <ul className="flex flex-col divide-y divide-line">
          {rules.data.items.map((rule) => (
            <RuleLine
              key={`${rule.rule} ${String(rule.version)}`}
              reader={reader}
              rule={rule}
              rooms={rules.data.rooms}
              mayChange={mayChange}
            />
          ))}
        </ul>
      )}
      <p className="mt-3 text-label text-ink-soft">
        The same for everyone here. Each thing is told once, and a room once more when it is back to normal.
        “Points” are points of % MC.
      </p>
    </Sheet>
  )
}
