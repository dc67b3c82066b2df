'use client'

import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { StaleState } from '@/app/_components/ui/states'
import { formatDate, formatMoment } from '@/lib/format/times'
import type { RuleValue, ToldRule } from '@/lib/notices/rule-settings'
import type { RulePreview } from '@/lib/notices/rule-view'
import type { Reader } from '@/lib/sites/reader'

/** More than these are only counted and drawn. */
const listedMax = 12

/** When a rule would have told something in the last 90 days, as its words stand in the fields. */
export function RulePreviewLine({
  reader,
  rule,
  settings,
}: {
  reader: Reader
  rule: ToldRule
  settings: Record<string, RuleValue>
}) {
  const preview = useQuery({
    queryKey: siteKey(reader.site, 'notices', 'rule-preview', rule, settings),
    queryFn: ({ signal }) =>
      apiFetch<RulePreview>(`/sites/${reader.site}/rules/preview`, {
        method: 'POST',
        body: { rule, settings },
        signal,
      }),
    placeholderData: keepPreviousData,
    staleTime: 60_000,
  })
  if (preview.isError) return <StaleState>The last 90 days could not be gone through just now.</StaleState>
  if (preview.data === undefined) return <p className="text-ink-soft">Going through the last 90 days.</p>
  const { words, moments, from, to } = preview.data
  const listed = moments.slice(-listedMax).toReversed()
  return (
    <div className="flex flex-col gap-3 border-l-2 border-line pl-4" aria-live="polite">
      <p>{words}</p>
      {moments.length > 0 ? (
        <>
          <NinetyDays from={from} to={to} at={moments.map((moment) => moment.at)} reader={reader} />
          <ul className="flex flex-col gap-1 text-label text-ink-soft">
            {listed.map((moment) => (
              <li key={`${moment.at} ${moment.of}`}>
                <span className="tabular-nums">
                  {formatMoment(moment.at, reader.timeZone, new Date(reader.at))}
                </span>
                : {moment.of}
              </li>
            ))}
            {moments.length > listed.length ? <li>and {moments.length - listed.length} before</li> : null}
          </ul>
        </>
      ) : null}
    </div>
  )
}

/** A line of 90 days with a mark at each moment. */
function NinetyDays({ from, to, at, reader }: { from: string; to: string; at: string[]; reader: Reader }) {
  const start = new Date(from).getTime()
  const span = Math.max(1, new Date(to).getTime() - start)
  const now = new Date(reader.at)
  return (
    <figure className="max-w-words">
      <svg
        viewBox="0 0 900 24"
        preserveAspectRatio="none"
        className="h-6 w-full overflow-visible"
        role="img"
        aria-label={`${String(at.length)} marks on a line of 90 days`}
      >
        <line
          x1="0"
          x2="900"
          y1="18"
          y2="18"
          className="stroke-edge"
          strokeWidth="1.5"
          vectorEffect="non-scaling-stroke"
        />
        {at.map((moment, index) => {
          const x = ((new Date(moment).getTime() - start) / span) * 900
          return (
            <line
              key={index}
              x1={x}
              x2={x}
              y1="4"
              y2="18"
              className="stroke-heart"
              strokeWidth="3"
              vectorEffect="non-scaling-stroke"
            />
          )
        })}
      </svg>
      <figcaption className="flex justify-between text-label text-ink-soft">
        <span>{formatDate(from, reader.timeZone, now)}</span>
        <span>now</span>
      </figcaption>
    </figure>
  )
}
