'use client'

import { useId, useMemo } from 'react'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { formatUsed } from '@/lib/format/figures'
import { formatClock, formatDuration, formatMoment } from '@/lib/format/times'
import { FigureFrame, FigureTable } from './figure-frame'
import { Hatch } from './hatch'
import { textWidth } from './rule-layout'
import { timeTicks } from './time-ticks'
import { useWidth } from './use-width'

type ShownVerdict = Extract<PieceCheck, { kind: 'verdict' }>
/** A verdict that can be drawn: of a piece that is private to another, no curve is told. */
export type DrawnCheck = ShownVerdict & { curve: NonNullable<ShownVerdict['curve']> }

type UsedChartProps = {
  number: string
  check: DrawnCheck
  startsAt: string
  stayMinutes: number
  timeZone: string
  now: Date
}

const HEIGHT = 150
const PLOT = { top: 6, bottom: 118, left: 44 }
const FULL = 1.28

/** How much of what the lid may lose is used, against time: the curve, its doubt, the planned stay, where it may bind. */
export function UsedChart({ number, check, startsAt, stayMinutes, timeZone, now }: UsedChartProps) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(360)
  const { curve } = check
  const from = new Date(startsAt).getTime()
  const stayEnd = from + stayMinutes * 60_000
  const to = useMemo(() => chartEnd(from, stayEnd, check), [from, stayEnd, check])
  const x = (at: number) =>
    PLOT.left + ((Math.min(Math.max(at, from), to) - from) / (to - from)) * (width - PLOT.left - 4)
  const y = (used: number) => PLOT.bottom - (Math.max(used, 0) / FULL) * (PLOT.bottom - PLOT.top)
  const points = curve.at
    .map((at, index) => ({
      at: new Date(at).getTime(),
      early: curve.usedEarly[index] ?? 0,
      used: curve.used[index] ?? 0,
      late: curve.usedLate[index] ?? 0,
    }))
    .filter((point) => point.at >= from && point.at <= to)
  const line = (value: (point: (typeof points)[number]) => number, isBack = false) =>
    (isBack ? [...points].reverse() : points)
      .map((point) => `${x(point.at).toFixed(1)} ${y(value(point)).toFixed(1)}`)
      .join('L')
  const early = check.earlyAt === null ? null : new Date(check.earlyAt).getTime()
  const middle = check.middleAt === null ? null : new Date(check.middleAt).getTime()
  const isLeave = check.verdict === 'leave'
  const edgeColour = isLeave ? 'var(--warn)' : 'var(--heart)'

  return (
    <FigureFrame
      tableName={`${number} as a table`}
      isButtonBelow
      className="min-w-0"
      table={
        <FigureTable
          caption={`${number}: how much of what the lid may lose is used`}
          heads={['Time', 'About', 'At most likely by 1 in 10']}
          rows={sampled(points).map((point) => [
            formatMoment(new Date(point.at), timeZone, now),
            `${String(Math.round(point.used * 100))} % used`,
            `${String(Math.round(point.early * 100))} % used`,
          ])}
        />
      }
    >
      <div ref={ref} className="[--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={sentence(number, check, stayEnd, timeZone, now)}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <defs>
            <Hatch id={`${ids}-binds`} colour="var(--warn)" gap={9} width={1} />
            <clipPath id={`${ids}-plot`}>
              <rect
                x={PLOT.left}
                y={PLOT.top}
                width={width - PLOT.left - 4}
                height={PLOT.bottom - PLOT.top}
              />
            </clipPath>
          </defs>
          <g aria-hidden="true">
            <rect
              x={x(from)}
              y={PLOT.top}
              width={Math.max(0, x(stayEnd) - x(from))}
              height={PLOT.bottom - PLOT.top}
              fill="var(--steel)"
              opacity="0.6"
            />
            <path
              d={`M${line((point) => point.early)}L${line((point) => point.late, true)}Z`}
              fill="var(--ink)"
              opacity="0.15"
              clipPath={`url(#${ids}-plot)`}
            />
            <rect
              x={PLOT.left}
              y={PLOT.top}
              width={width - PLOT.left - 4}
              height={y(1) - PLOT.top}
              fill="var(--warn)"
              opacity="0.08"
            />
            <rect
              x={PLOT.left}
              y={PLOT.top}
              width={width - PLOT.left - 4}
              height={y(1) - PLOT.top}
              fill={`url(#${ids}-binds)`}
            />
            <path d={`M${String(PLOT.left)} ${String(y(0.5))}H${String(width - 4)}`} stroke="var(--line)" />
            <path
              d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(width - 4)}`}
              stroke="var(--edge)"
            />
            <path
              d={`M${String(PLOT.left)} ${String(y(1))}H${String(width - 4)}`}
              stroke="var(--warn)"
              strokeWidth="1.5"
            />
            {[from, stayEnd].map((at) => (
              <path
                key={at}
                d={`M${String(x(at))} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
                stroke="var(--ink)"
                strokeWidth="1.5"
                strokeDasharray="2 3"
              />
            ))}
            <path
              d={`M${line((point) => point.used)}`}
              fill="none"
              clipPath={`url(#${ids}-plot)`}
              stroke="var(--ink)"
              strokeWidth="1.5"
            />
            <text x={PLOT.left - 8} y={y(1) + 5} textAnchor="end" fontWeight="600" fill="var(--warn)">
              all
            </text>
            <text x={PLOT.left - 8} y={y(0.5) + 5} textAnchor="end" fill="var(--ink-soft)">
              half
            </text>
            <text x={PLOT.left - 8} y={y(0) + 5} textAnchor="end" fill="var(--ink-soft)">
              none
            </text>
            <TimeAxis from={from} to={to} x={x} timeZone={timeZone} width={width} />
            {early !== null && early <= to && check.verdict !== 'fine' ? (
              <EdgeDrop
                at={x(early)}
                top={y(1)}
                colour={edgeColour}
                width={width}
                words={`${isLeave ? 'may bind from' : 'back by'} ${formatClock(new Date(early), timeZone)}`}
              />
            ) : null}
            {check.verdict === 'fine' && check.usedAtEnd < 1 ? (
              <EndDot
                at={x(stayEnd)}
                y={y(check.usedAtEnd)}
                words={formatUsed(check.usedAtEnd)}
                width={width}
              />
            ) : null}
            {middle !== null && middle <= to ? (
              <circle
                cx={x(middle)}
                cy={y(1)}
                r="4"
                fill="var(--board)"
                stroke="var(--ink)"
                strokeWidth="1.5"
              />
            ) : null}
          </g>
        </svg>
      </div>
    </FigureFrame>
  )
}

/** Past the stay and the early edge, and the middle where it is not far off: what is judged is in sight, large. */
function chartEnd(from: number, stayEnd: number, check: UsedChartProps['check']): number {
  const last = new Date(check.curve.at.at(-1) ?? from).getTime()
  const early = check.earlyAt === null ? 0 : new Date(check.earlyAt).getTime()
  const middle = check.middleAt === null ? 0 : new Date(check.middleAt).getTime()
  const stay = stayEnd - from
  const wanted = [stayEnd, early, middle].filter((at) => at - from <= 3 * stay)
  const end = from + (Math.max(...wanted, stayEnd) - from) * 1.25
  return Math.max(from + 60_000, Math.min(Math.max(last, stayEnd), end))
}

function EdgeDrop({
  at,
  top,
  colour,
  words,
  width,
}: {
  at: number
  top: number
  colour: string
  words: string
  width: number
}) {
  const onRight = at + 10 + textWidth(words, true) <= width
  return (
    <g>
      <path d={`M${String(at)} ${String(top)}V${String(PLOT.bottom)}`} stroke={colour} strokeWidth="3" />
      <circle cx={at} cy={top} r="5" fill={colour} />
      <text
        className="halo"
        x={onRight ? at + 8 : at - 8}
        y={PLOT.bottom - 14}
        textAnchor={onRight ? 'start' : 'end'}
        fontWeight="600"
        fill={colour}
      >
        {words}
      </text>
    </g>
  )
}

function EndDot({ at, y, words, width }: { at: number; y: number; words: string; width: number }) {
  const onRight = at + 12 + textWidth(words, true) <= width
  return (
    <g>
      <path d={`M${String(at)} ${String(y - 6)}l6 6l-6 6l-6-6z`} fill="var(--good)" />
      <text
        className="halo"
        x={onRight ? at + 10 : at - 10}
        y={y > PLOT.bottom - 22 ? y - 12 : y + 20}
        textAnchor={onRight ? 'start' : 'end'}
        fontWeight="600"
        fill="var(--good)"
      >
        {words}
      </text>
    </g>
  )
}

type TimeAxisProps = { from: number; to: number; x: (at: number) => number; timeZone: string; width: number }

function TimeAxis({ from, to, x, timeZone, width }: TimeAxisProps) {
  const ticks = timeTicks(from, to, timeZone)
  const isStartOnTick = ticks.some((tick) => tick.label && Math.abs(x(tick.at) - x(from)) < 46)
  return (
    <g>
      {ticks.map((tick) => (
        <path
          key={tick.at}
          d={`M${String(x(tick.at))} ${String(PLOT.bottom)}v${tick.isLong ? '7' : '4'}`}
          stroke="var(--edge)"
        />
      ))}
      <text x={PLOT.left} y={PLOT.bottom + 23} fill="var(--ink-soft)">
        {formatClock(new Date(from), timeZone)}
      </text>
      {ticks
        .filter((tick) => tick.label && x(tick.at) - x(from) > 64 && x(tick.at) < width - 20)
        .filter(
          (tick, index, all) => index === 0 || x(tick.at) - x(all[index - 1]?.at ?? 0) > 50 || !isStartOnTick,
        )
        .map((tick) => (
          <text key={tick.at} x={x(tick.at)} y={PLOT.bottom + 23} textAnchor="middle" fill="var(--ink-soft)">
            {tick.label}
          </text>
        ))}
    </g>
  )
}

function sampled<Point>(points: readonly Point[]): Point[] {
  const every = Math.max(1, Math.ceil(points.length / 12))
  return points.filter((_, index) => index % every === 0 || index === points.length - 1)
}

function sentence(
  number: string,
  check: UsedChartProps['check'],
  stayEnd: number,
  timeZone: string,
  now: Date,
): string {
  const end = `by ${formatMoment(new Date(stayEnd), timeZone, now)}, ${formatUsed(check.usedAtEnd)} of what the lid may lose`
  if (check.earlyAt === null) return `${number}: ${end}; it is not used up in sight.`
  const left = formatDuration((new Date(check.earlyAt).getTime() - now.getTime()) / 60_000)
  return `${number}: ${end}; it may bind from ${formatMoment(check.earlyAt, timeZone, now)}, in ${left}.`
}
