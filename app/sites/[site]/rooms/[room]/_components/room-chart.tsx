'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { apiFetch, describeError } from '@/app/_components/api'
import { SeriesChart } from '@/app/_components/charts/series-chart'
import { siteKey } from '@/app/_components/live/site-keys'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { Sheet } from '@/app/_components/ui/sheet'
import { ErrorState } from '@/app/_components/ui/states'
import type { RoomSeries } from '@/lib/rooms/room'
import type { Reader } from '@/lib/sites/reader'
import { seriesQueryOf, type Span, spans, spansFor, spanTitles, spanWords } from './span'

type RoomChartProps = {
  reader: Reader
  roomId: string
  initial: { span: Span; series: RoomSeries }
  now: Date
}

/** The room's air over a day or a month; which one stands in the address. */
export function RoomChart({ reader, roomId, initial, now }: RoomChartProps) {
  const may = spansFor(reader.role)
  const [asked, setSpan] = useQueryState('span', parseAsStringLiteral(spans).withDefault(initial.span))
  const span = may.includes(asked) ? asked : initial.span
  const query = useQuery<RoomSeries>({
    queryKey: siteKey(reader.site, 'rooms', roomId, 'series', span),
    queryFn: ({ signal }) => {
      const range = seriesQueryOf(span, new Date())
      const search = new URLSearchParams({ from: range.from, to: range.to, points: String(range.points) })
      return apiFetch<RoomSeries>(`/sites/${reader.site}/rooms/${roomId}/series?${search.toString()}`, {
        signal,
      })
    },
    initialData: span === initial.span ? initial.series : undefined,
    placeholderData: keepPreviousData,
  })
  const series = query.data
  return (
    <Sheet id="series">
      {may.length > 1 ? (
        <SegmentedTabs
          label="How far back"
          value={span}
          onValueChange={(value) => {
            void setSpan(spans.find((known) => known === value) ?? 'day')
          }}
          segments={may.map((value) => ({ value, label: spanWords[value] }))}
        >
          <Figure query={query} series={series} span={span} reader={reader} now={now} />
        </SegmentedTabs>
      ) : (
        <Figure query={query} series={series} span={span} reader={reader} now={now} />
      )}
    </Sheet>
  )
}

type FigureProps = {
  query: { isError: boolean; error: Error | null; isFetching: boolean; refetch: () => Promise<unknown> }
  series: RoomSeries | undefined
  span: Span
  reader: Reader
  now: Date
}

function Figure({ query, series, span, reader, now }: FigureProps) {
  if (query.isError && !series) {
    return (
      <ErrorState
        title={describeError(query.error).title}
        pending={query.isFetching}
        onRetry={() => {
          void query.refetch()
        }}
      />
    )
  }
  if (!series) return <p role="status">Fetching the readings.</p>
  return (
    <SeriesChart
      series={series}
      title={spanTitles[span]}
      tableName={`${spanWords[span]} as a table`}
      timeZone={reader.timeZone}
      units={reader.units}
      now={now}
    />
  )
}
