'use client'

import { useSyncExternalStore } from 'react'
import { CopyText } from '@/app/sites/[site]/sensors/_components/copy-text'

type ApiTwinProps = {
  /** "/bench/emc" */
  path: string
  /** The query, in the API's own names and units. Left out where the inputs are refused. */
  query: Readonly<Record<string, string | number>> | undefined
}

const nothing = () => () => undefined
const origin = () => window.location.origin
const noOrigin = () => ''

/** The address under which the API gives the same answer. */
export function ApiTwin({ path, query }: ApiTwinProps) {
  // The address that the reader knows this machine by is only known in the browser.
  const base = useSyncExternalStore(nothing, origin, noOrigin)
  if (query === undefined) return null
  const text = Object.entries(query).map(([key, value]) => [key, String(value)])
  return (
    <div className="flex min-w-0 flex-wrap items-baseline gap-x-3 text-label">
      <span className="text-ink-soft">The same by API:</span>
      <CopyText text={`${base}/api/v1${path}?${new URLSearchParams(text).toString()}`} what="the address" />
    </div>
  )
}
