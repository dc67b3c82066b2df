'use client'

import { useQuery } from '@tanstack/react-query'
import { ApiProblem, apiFetch } from '@/app/_components/api'
import { HourStripFigure } from '@/app/_components/charts/hour-strip-figure'
import { Logo } from '@/app/_components/ui/icons'
import { RichText } from '@/app/_components/ui/rich-text'
import { useNow } from '@/app/_components/ui/use-now'
import type { DoorView } from '@/lib/door/door'
import { formatAge, formatClock, formatWeekday } from '@/lib/format/times'
import { DoorPieceLine } from './door-piece-line'

const everyMs = 20_000
/** After so long without an answer the screen no longer says how things stand. */
const staleMs = 120_000

/** Read from three metres, touched by nobody: what is out, until when, and what the hours will do. */
export function DoorScreen({ token, initial }: { token: string; initial: DoorView }) {
  const { data, dataUpdatedAt, error } = useQuery({
    queryKey: ['door', token],
    queryFn: ({ signal }) => apiFetch<DoorView>(`/door/${token}`, { signal }),
    initialData: initial,
    refetchInterval: everyMs,
    // It hangs there with nobody in front of it.
    refetchIntervalInBackground: true,
  })
  const now = useNow(data.at, 10_000)
  const isRevoked = error instanceof ApiProblem && error.status === 404
  const isStale = error !== null && now.getTime() - Math.max(dataUpdatedAt, 0) > staleMs
  if (isRevoked) return <Closed />
  const { timeZone, room, heard, out } = data
  const [first, ...others] = out
  return (
    <main className="flex min-h-dvh flex-col bg-board px-6 py-4 text-[28px] leading-9 sm:px-10">
      <header className="flex flex-wrap items-baseline justify-between gap-x-8 border-b-4 border-ink pb-2">
        <h1 className="flex items-center gap-5 text-[36px] leading-[44px] font-semibold">
          <Logo size={42} />
          {room.name}
        </h1>
        <p className="flex flex-wrap items-baseline gap-x-4">
          <strong className="text-[36px] leading-[44px]">
            {formatWeekday(now, timeZone)}, {formatClock(now, timeZone)}
          </strong>
          <HeardWords heard={heard} now={now} timeZone={timeZone} />
        </p>
      </header>
      {isStale ? (
        <p role="alert" className="my-3 border-l-[16px] border-warn bg-chalk px-6 py-4 font-semibold">
          No answer since {formatClock(new Date(dataUpdatedAt), timeZone)}. What stands here may be past.
        </p>
      ) : null}
      {first === undefined ? (
        <p className="py-8 text-[52px] leading-[60px]">Nothing logged out</p>
      ) : (
        <ul aria-label="What is out" className="flex flex-col">
          <DoorPieceLine piece={first} isFirst />
          {others.slice(0, shownOthers).map((piece) => (
            <DoorPieceLine key={piece.number} piece={piece} />
          ))}
          {others.length > shownOthers ? (
            <li className="py-3">and {others.length - shownOthers} more that press less</li>
          ) : null}
        </ul>
      )}
      <section aria-label={`The coming hours of ${room.name}`} className="pt-4">
        <p className="text-[32px] leading-[40px]">
          <RichText parts={data.strip.words} />
        </p>
        {data.strip.cells.length > 0 ? (
          <>
            <HourStripFigure strip={data.strip} timeZone={timeZone} size="door" />
            <p className="sr-only">{data.strip.note}</p>
          </>
        ) : null}
      </section>
      <div className="grow" />
      <footer className="mt-4 flex flex-wrap justify-between gap-x-8 gap-y-1 border-t-2 border-edge pt-3">
        <p>{data.gap}</p>
        <p>{data.next}</p>
      </footer>
    </main>
  )
}

/** More would not stay legible; the most pressing stand first. */
const shownOthers = 4

function HeardWords({ heard, now, timeZone }: { heard: DoorView['heard']; now: Date; timeZone: string }) {
  if (heard === null) return <span className="text-ink-soft">never heard</span>
  if (!heard.isFresh)
    return <span className="font-semibold text-warn">no reading since {formatClock(heard.at, timeZone)}</span>
  return (
    <span className="text-ink-soft">heard {formatAge(now.getTime() - new Date(heard.at).getTime())}</span>
  )
}

function Closed() {
  return (
    <main className="flex min-h-dvh flex-col justify-center gap-6 bg-board p-10 text-[28px] leading-9">
      <h1 className="text-[44px] leading-tight font-semibold">This link was taken back</h1>
      <p>A maker makes a new one under People and place.</p>
    </main>
  )
}
