'use client'

import { useId } from 'react'
import { formatDuration, formatMoment, formatShortMoment } from '@/lib/format/times'
import { Hatch } from './hatch'
import { textWidth } from './rule-layout'
import { timeTicks } from './time-ticks'
import { useWidth } from './use-width'

type TimeOutBarProps = {
  number: string
  outAt: string
  now: Date
  /** By when 1 in 10 would have used up its allowance: the due line. Null: no such moment is known. */
  earlyAt: string | null
  middleAt: string | null
  /** When it was to be back, for a bar that has no due line. */
  plannedBackAt: string
  /** No fresh reading in the room: what comes is unknown, and hatching fills it. */
  isRoomUnknown?: boolean
  timeZone: string
}

const TOP = 24
const HEIGHT = 26
const MINUTE_MS = 60_000

/** Time gone in ink, time left as track, the doubt hatched from the early edge on. Overdue: the fill turns warn. */
export function TimeOutBar(props: TimeOutBarProps) {
  const { outAt, now, earlyAt, middleAt, plannedBackAt, isRoomUnknown = false, timeZone } = props
  const hatchId = useId()
  const [ref, width] = useWidth<HTMLDivElement>(340)
  const from = new Date(outAt).getTime()
  const at = Math.max(from, now.getTime())
  const early = earlyAt === null ? null : new Date(earlyAt).getTime()
  const middle = middleAt === null ? null : new Date(middleAt).getTime()
  const isOverdue = early !== null && at > early
  const to = barEnd(from, at, early, middle, new Date(plannedBackAt).getTime())
  const x = (time: number) => ((Math.min(time, to) - from) / (to - from)) * width
  const ticks = timeTicks(from, to, timeZone)
  const words = (time: number) => formatShortMoment(new Date(time), timeZone, now)
  const hatchFrom = isRoomUnknown ? Math.min(early ?? at, Math.max(at, early ?? at)) : early
  const nowX = x(at)
  const earlyX = early === null ? null : x(early)
  const bottom = TOP + HEIGHT
  const middleX = middle !== null && middle < to ? x(middle) : null
  const startWidth = textWidth(words(from)) + 24
  const hasMiddleWords = middleX !== null && middleX > startWidth + 16

  return (
    <div ref={ref} className="min-w-0 [--figure-ground:var(--board)]">
      <svg
        role="img"
        aria-label={sentence(props, isOverdue)}
        viewBox={`0 0 ${String(width)} 78`}
        className="block w-full"
        fontSize="14"
      >
        <defs>
          <Hatch id={hatchId} />
        </defs>
        <g aria-hidden="true">
          <rect x="0" y={TOP} width={width} height={HEIGHT} fill="var(--steel)" />
          {hatchFrom === null ? null : (
            <rect
              x={x(Math.max(hatchFrom, isOverdue ? at : hatchFrom))}
              y={TOP}
              width={Math.max(0, width - x(Math.max(hatchFrom, isOverdue ? at : hatchFrom)))}
              height={HEIGHT}
              fill={`url(#${hatchId})`}
            />
          )}
          <path
            d={`M0 ${String(TOP)}H${String(width)}M0 ${String(bottom)}H${String(width)}`}
            stroke="var(--edge)"
          />
          <rect
            className="moves"
            x="0"
            y={TOP}
            width={Math.max(1.5, nowX)}
            height={HEIGHT}
            fill={isOverdue ? 'var(--warn)' : 'var(--ink)'}
          />
          {middleX === null ? null : (
            <path
              d={`M${String(middleX)} ${String(TOP)}V${String(bottom + 4)}`}
              stroke="var(--ink)"
              strokeWidth="2"
              strokeDasharray="3 3"
            />
          )}
          {earlyX === null ? null : (
            <path
              d={`M${String(earlyX)} ${String(TOP - 5)}V${String(bottom)}`}
              stroke={isOverdue ? 'var(--board)' : 'var(--heart)'}
              strokeWidth="3"
            />
          )}
          {ticks.map((tick) => (
            <path
              key={tick.at}
              d={`M${String(x(tick.at))} ${String(bottom)}v${tick.isLong ? '9' : '4'}`}
              stroke="var(--ink)"
            />
          ))}
          <TopWords
            nowX={nowX}
            earlyX={earlyX}
            width={width}
            isOverdue={isOverdue}
            nowWords={words(at)}
            earlyWords={early === null ? '' : words(early)}
          />
          <path d={`M0.5 ${String(bottom)}v12`} stroke="var(--ink)" />
          <text y="76" fill="var(--ink-soft)">
            {words(from)}
          </text>
          {!hasMiddleWords || middle === null ? null : (
            <text x={clampMiddle(middleX, width)} y="76" textAnchor="middle" fill="var(--ink-soft)">
              {words(middle)}
            </text>
          )}
          {ticks
            .filter((tick) => tick.label && x(tick.at) > startWidth + 16 && x(tick.at) < width - 20)
            .filter(
              (tick) =>
                !hasMiddleWords ||
                middle === null ||
                Math.abs(x(tick.at) - clampMiddle(middleX, width)) >
                  (textWidth(words(middle)) + textWidth(tick.label ?? '')) / 2 + 6,
            )
            .map((tick) => (
              <text key={tick.at} x={x(tick.at)} y="76" textAnchor="middle" fill="var(--ink-soft)">
                {tick.label}
              </text>
            ))}
        </g>
      </svg>
    </div>
  )
}

/** A little past the middle, so that the hatching runs off the end; never before now. */
function barEnd(
  from: number,
  at: number,
  early: number | null,
  middle: number | null,
  planned: number,
): number {
  const last = Math.max(middle ?? early ?? planned, at + (early === null ? 0 : 10 * MINUTE_MS))
  return from + Math.max(10 * MINUTE_MS, (last - from) * 1.13)
}

const clampMiddle = (at: number | null, width: number) => Math.min(Math.max(at ?? 0, 18), width - 32)

type TopWordsProps = {
  nowX: number
  earlyX: number | null
  width: number
  isOverdue: boolean
  nowWords: string
  earlyWords: string
}

/** "now" ends left of the due time; overdue, the due time stands left of "now". */
function TopWords({ nowX, earlyX, width, isOverdue, nowWords, earlyWords }: TopWordsProps) {
  if (isOverdue && earlyX !== null) {
    const dueAt = Math.max(earlyX - 6, textWidth(`due ${earlyWords}`, true))
    const nowAt = Math.min(Math.max(nowX, dueAt + 10), width - textWidth(`now ${nowWords}`, true))
    return (
      <>
        <text x={dueAt} y="16" textAnchor="end" fontWeight="600" fill="var(--heart)">
          due {earlyWords}
        </text>
        <text x={nowAt} y="16" fontWeight="600" fill="var(--ink)">
          now {nowWords}
        </text>
      </>
    )
  }
  const dueWidth = textWidth(earlyWords, true)
  const dueAt = earlyX === null ? null : Math.min(earlyX + 6, width - dueWidth)
  const nowEnd = dueAt === null ? Math.min(nowX + 14, width) : Math.min(nowX + 14, dueAt - 8)
  return (
    <>
      {nowEnd > 28 ? (
        <text x={nowEnd} y="16" textAnchor="end" fontWeight="600" fill="var(--ink)">
          now
        </text>
      ) : (
        <text x="0" y="16" fontWeight="600" fill="var(--ink)">
          {dueAt !== null && dueAt < 40 ? '' : 'now'}
        </text>
      )}
      {dueAt === null ? null : (
        <text x={dueAt} y="16" fontWeight="600" fill="var(--heart)">
          {earlyWords}
        </text>
      )}
    </>
  )
}

function sentence(props: TimeOutBarProps, isOverdue: boolean): string {
  const { number, outAt, now, earlyAt, middleAt, timeZone, isRoomUnknown } = props
  const start = `${number}, out since ${formatMoment(outAt, timeZone, now)}`
  if (earlyAt === null)
    return `${start}; ${isRoomUnknown ? 'how long it keeps its fit is not known' : 'no limit in sight'}.`
  const minutes = (new Date(earlyAt).getTime() - now.getTime()) / MINUTE_MS
  const due = isOverdue
    ? `overdue by ${formatDuration(-minutes)}, due at ${formatMoment(earlyAt, timeZone, now)}`
    : `bring it in by ${formatMoment(earlyAt, timeZone, now)}, ${formatDuration(minutes)} left`
  const more =
    middleAt === null ? '' : `; more likely good until about ${formatMoment(middleAt, timeZone, now)}`
  return `${start}; ${due}${more}.`
}
