'use client'

import { type ReactNode, useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { useAction } from '@/app/_components/use-action'
import { formatFullMoment, formatMoment } from '@/lib/format/times'
import type { DeliveryLog } from '@/lib/notices/delivery'
import type { Notice } from '@/lib/notices/notice'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'

const channelWords = { mail: 'e-mail', push: 'phone' }
const outcomeWords = { sent: 'sent', failed: 'did not go', 'given-up': 'given up' }
const stateWords = {
  held: 'held',
  waiting: 'on its way',
  sent: 'sent',
  'given-up': 'could not be sent',
  'let-go': 'not needed any more',
}

type DeliveryFoldProps = {
  reader: Reader
  notice: Notice
  /** The rest of the notice, where the list shows only its title. */
  children?: ReactNode
}

/** How a notice went out: each try with its time, and what could not be sent to be tried again. */
export function DeliveryFold({ reader, notice, children }: DeliveryFoldProps) {
  const [isOpen, setIsOpen] = useState(false)
  const path = `/notices/${notice.id}`
  const log = useSiteQuery<DeliveryLog>({
    site: reader.site,
    area: 'notices',
    key: ['log', notice.id],
    path: `${path}/deliveries`,
    enabled: isOpen,
  })
  const retry = useAction<Record<string, never>, Notice>({
    run: () => apiFetch(`/sites/${reader.site}${path}/retry`, { method: 'POST' }),
    invalidates: [siteKey(reader.site, 'notices')],
    done: 'It is on its way again',
  })
  const now = new Date(reader.at)
  return (
    <details
      className="text-label"
      onToggle={(event) => {
        setIsOpen(event.currentTarget.open)
      }}
    >
      <summary className="min-h-11 cursor-pointer py-2.5 text-heart sm:min-h-8 sm:py-1">
        {children ? 'All of it, and how it went out' : 'How it went out'}
      </summary>
      {children}
      {log.isError ? <p className="text-warn">The log could not be fetched just now.</p> : null}
      {log.data?.items.length === 0 ? <p>It stands on this page only.</p> : null}
      <ul className="mt-1 flex flex-col gap-2">
        {log.data?.items.map((way) => (
          <li key={`${way.to} ${way.channel}`}>
            <p>
              <strong>{way.to}</strong>, {channelWords[way.channel]}: {stateWords[way.state]}
              {way.state === 'held' && way.holdUntil !== null
                ? ` until ${formatMoment(way.holdUntil, reader.timeZone, now)}`
                : ''}
              {way.why === null ? '' : ` (${way.why})`}
            </p>
            <ol className="text-ink-soft">
              {way.tries.map((one) => (
                <li key={one.at} title={formatFullMoment(one.at, reader.timeZone)}>
                  {formatMoment(one.at, reader.timeZone, now)}: {outcomeWords[one.outcome]}
                  {one.detail === '' ? '' : `, ${one.detail}`}
                </li>
              ))}
            </ol>
          </li>
        ))}
      </ul>
      {notice.isLost && may(reader.role, 'notices:acknowledge') ? (
        <Button
          className="mt-2"
          pending={retry.pending}
          onClick={() => {
            retry.act({})
          }}
        >
          Try again
        </Button>
      ) : null}
    </details>
  )
}
