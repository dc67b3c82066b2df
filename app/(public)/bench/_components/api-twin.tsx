'use client'

import { useSyncExternalStore } from 'react'
import { CopyText } from '@/app/sites/[site]/sensors/_components/copy-text'

export type Twin = {
  /** "/bench/emc" */
  path: string
  /** The query, in the API's own names and units. */
  query: Readonly<Record<string, string | number>>
}

const nothing = () => () => undefined
const origin = () => window.location.origin
const noOrigin = () => ''

/** The addresses under which the API gives the same answer. */
export function ApiTwins({ twins }: { twins: readonly Twin[] }) {
  // The address that the reader knows this machine by is only known in the browser.
  const base = useSyncExternalStore(nothing, origin, noOrigin)
  if (twins.length === 0) return null
  return (
    <div className="text-label">
      <p className="text-ink-soft">The same by API:</p>
      <ul className="flex flex-col gap-1">
        {twins.map(({ path, query }) => (
          <li key={path}>
            <CopyText text={`${base}/api/v1${path}?${queryText(query)}`} what={`the address of ${path}`} />
          </li>
        ))}
      </ul>
    </div>
  )
}

const queryText = (query: Twin['query']): string =>
  new URLSearchParams(Object.entries(query).map(([key, value]) => [key, String(value)])).toString()
