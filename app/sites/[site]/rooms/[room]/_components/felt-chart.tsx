'use client'

import { type ReactNode, useId, useState } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { textWidth } from '@/app/_components/charts/rule-layout'
import { timeTicks } from '@/app/_components/charts/time-ticks'
import { useWidth } from '@/app/_components/charts/use-width'
import { formatEmc, formatEmcFigure, formatLength, formatPoints } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import type { RoomFelt } from '@/lib/rooms/felt'
import type { Reader } from '@/lib/sites/reader'
import { endLabels, type FeltDot, feltFigure, type FeltFigure, type FeltLine } from './felt-figure'

const HEIGHT = 236
const PLOT = { top: 14, bottom: 204, left: 44, right: 64 }
/** How the lines that are not in focus are told apart, thinnest wood first. */
const DASHES = [undefined, '7 4', '2 3', '9 3 2 3'] as const

type FeltChartProps = { felt: RoomFelt; ownMm: number | null; reader: Reader; now: Date }

/** What wood of each thickness has felt over the last month, with the room's own air behind it. */
export function FeltChart({ felt, ownMm, reader, now }: FeltChartProps) {
  const sliderId = useId()
  const [ref, width] = useWidth<HTMLDivElement>(860)
  const [chosen, setChosen] = useState<number | null>(null)
  const figure = feltFigure(felt, ownMm)
  if (figure === undefined) return null
  const { course } = felt
  const index = Math.min(chosen ?? course.at.length - 1, course.at.length - 1)
  const moment = course.at[index] ?? ''
  const when = formatMoment(moment, reader.timeZone, now)
  const words = course.felt.flatMap((one) => {
    const value = one.mcPct[index] ?? null
    return value === null ? [] : [`${formatLength(one.thicknessMm, reader.units)} ${formatEmcFigure(value)}`]
  })
  const air = course.emcPct[index] ?? null
  const readout =
    words.length === 0
      ? `${when}: before the record`
      : `${when}: ${words.join(', ')} % MC; the air ${air === null ? 'was not heard' : formatEmc(air)}`

  return (
    <FigureFrame
      headingLevel={3}
      title="The last 30 days"
      aside="Gaps are shown, never joined up"
      tableName="Felt as a table"
      table={<FeltTable felt={felt} reader={reader} now={now} />}
    >
      <div ref={ref} className="mt-3">
        <svg
          role="img"
          aria-label={sentence(felt, figure, reader)}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <Drawing
            figure={figure}
            width={width}
            reader={reader}
            atMs={moment === '' ? figure.toAt : new Date(moment).getTime()}
          />
        </svg>
      </div>
      <div className="mt-1 flex flex-wrap items-center gap-x-4">
        <label htmlFor={sliderId} className="sr-only">
          Moment to read off
        </label>
        <input
          id={sliderId}
          type="range"
          min={0}
          max={course.at.length - 1}
          step={1}
          value={index}
          aria-valuetext={readout}
          onChange={(event) => {
            setChosen(Number(event.target.value))
          }}
          className="min-h-11 grow basis-64 accent-heart"
        />
        <output htmlFor={sliderId} className="text-label font-semibold text-heart">
          {readout}
        </output>
      </div>
    </FigureFrame>
  )
}

type DrawingProps = { figure: FeltFigure; width: number; reader: Reader; atMs: number }

function Drawing({ figure, width, reader, atMs }: DrawingProps) {
  const hatchId = useId()
  const { fromAt, toAt, axis, lines } = figure
  const right = width - PLOT.right
  const x = (at: number) => PLOT.left + ((at - fromAt) / (toAt - fromAt)) * (right - PLOT.left)
  const y = (value: number) =>
    PLOT.bottom - ((value - axis.domain[0]) / (axis.domain[1] - axis.domain[0])) * (PLOT.bottom - PLOT.top)
  const path = (dots: readonly FeltDot[]) =>
    dots.map((dot) => `${x(dot.at).toFixed(1)} ${y(dot.value).toFixed(1)}`).join('L')
  const focus = lines.find((line) => line.isFocus)
  const others = lines.filter((line) => !line.isFocus)
  const dashOf = (line: FeltLine) => DASHES[others.indexOf(line)]
  const labels = endLabels(
    lines.map((line) => y(line.last ?? axis.domain[0])),
    PLOT.top,
    PLOT.bottom,
  )
  return (
    <g aria-hidden="true">
      <defs>
        <Hatch id={hatchId} gap={8} width={1} />
      </defs>
      {axis.ticks.map((value) => (
        <g key={value}>
          <path d={`M${String(PLOT.left)} ${String(y(value))}H${String(right)}`} stroke="var(--line)" />
          <text x={PLOT.left - 8} y={y(value) + 5} textAnchor="end" fill="var(--ink-soft)">
            {value}
          </text>
        </g>
      ))}
      <TimeAxis figure={figure} x={x} right={right} timeZone={reader.timeZone} />
      {figure.gaps.map((gap) => (
        <rect
          key={gap.from}
          x={x(gap.from)}
          y={PLOT.top}
          width={Math.max(2, x(gap.to) - x(gap.from))}
          height={PLOT.bottom - PLOT.top}
          fill={`url(#${hatchId})`}
        />
      ))}
      {figure.air.map((stretch) => (
        <Stretch key={stretch[0]?.at} d={path(stretch)} colour="var(--edge)" strokeWidth={1} />
      ))}
      {focus === undefined ? null : (
        <path
          d={`M${path(focus.high)}L${path(focus.low.toReversed())}Z`}
          fill="var(--heart)"
          opacity="0.15"
        />
      )}
      {[...others, ...(focus === undefined ? [] : [focus])].map((line) =>
        line.stretches.map((stretch) => (
          <Stretch
            key={`${String(line.thicknessMm)} ${String(stretch[0]?.at)}`}
            d={path(stretch)}
            colour={line.isFocus ? 'var(--heart)' : 'var(--ink)'}
            strokeWidth={line.isFocus ? 3 : 1.5}
            dash={dashOf(line)}
          />
        )),
      )}
      {atMs < toAt ? (
        <path
          d={`M${x(atMs).toFixed(1)} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
          stroke="var(--heart)"
          strokeWidth="1.5"
        />
      ) : null}
      {lines.map((line, n) => (
        <text
          key={line.thicknessMm}
          className="halo"
          x={right + 6}
          y={(labels[n] ?? 0) + 5}
          fontWeight={line.isFocus ? 600 : 400}
          fill={line.isFocus ? 'var(--heart)' : 'var(--ink)'}
        >
          {formatLength(line.thicknessMm, reader.units)}
        </text>
      ))}
      <text className="halo" x={PLOT.left + 4} y={PLOT.top + 4} fontWeight="600" fill="var(--ink)">
        % MC
      </text>
    </g>
  )
}

function Stretch({
  d,
  colour,
  strokeWidth,
  dash,
}: {
  d: string
  colour: string
  strokeWidth: number
  dash?: string | undefined
}): ReactNode {
  return (
    <path
      d={`M${d}`}
      fill="none"
      stroke={colour}
      strokeWidth={strokeWidth}
      strokeDasharray={dash}
      strokeLinecap={dash === undefined ? 'round' : undefined}
    />
  )
}

type TimeAxisProps = { figure: FeltFigure; x: (at: number) => number; right: number; timeZone: string }

function TimeAxis({ figure, x, right, timeZone }: TimeAxisProps) {
  const ticks = timeTicks(figure.fromAt, figure.toAt, timeZone)
  const labelled = ticks.filter((tick) => tick.label !== null)
  /** On a phone every second or third label has room. */
  const every = Math.max(1, Math.ceil((labelled.length * 62) / Math.max(1, right - PLOT.left)))
  return (
    <g>
      <path d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(right)}`} stroke="var(--edge)" />
      {ticks.map((tick) => (
        <path
          key={tick.at}
          d={`M${x(tick.at).toFixed(1)} ${String(PLOT.bottom)}v${tick.isLong ? '7' : '4'}`}
          stroke="var(--edge)"
        />
      ))}
      {labelled
        .filter((_, n) => n % every === 0)
        .map((tick) => (
          <text
            key={tick.at}
            x={Math.max(PLOT.left + textWidth(tick.label ?? '') / 2 - 8, x(tick.at))}
            y={PLOT.bottom + 24}
            textAnchor="middle"
            fill="var(--ink-soft)"
          >
            {tick.label}
          </text>
        ))}
    </g>
  )
}

const TABLE_ROWS = 30

/** Every day or so, newest first. */
function FeltTable({ felt: { course }, reader, now }: { felt: RoomFelt; reader: Reader; now: Date }) {
  const every = Math.max(1, Math.ceil(course.at.length / TABLE_ROWS))
  const rows = course.at
    .map((at, n) => ({ at, n }))
    .filter(({ n }) => (course.at.length - 1 - n) % every === 0)
    .toReversed()
  return (
    <FigureTable
      caption="What wood has felt here"
      heads={[
        'Time',
        ...course.felt.map((one) => `${formatLength(one.thicknessMm, reader.units)}, give or take`),
        'The air, mean since',
      ]}
      rows={rows.map(({ at, n }) => {
        const air = course.emcPct[n] ?? null
        return [
          formatMoment(at, reader.timeZone, now),
          ...course.felt.map((one) => {
            const value = one.mcPct[n] ?? null
            return value === null
              ? 'before the record'
              : `${formatEmc(value)}, ${formatPoints(one.doubtPct[n] ?? 0)}`
          }),
          air === null ? 'not heard' : formatEmc(air),
        ]
      })}
    />
  )
}

function sentence({ course }: RoomFelt, figure: FeltFigure, reader: Reader): string {
  const spans = course.felt.flatMap((one) => {
    const values = one.mcPct.filter((value) => value !== null)
    return values.length === 0
      ? []
      : [
          `${formatLength(one.thicknessMm, reader.units)} from ${formatEmcFigure(Math.min(...values))} to ${formatEmc(Math.max(...values))}`,
        ]
  })
  const gaps = figure.gaps.length
  const holes = gaps === 0 ? 'no gap' : `${String(gaps)} ${gaps === 1 ? 'gap' : 'gaps'}`
  return `What wood has felt over the last 30 days: ${spans.join('; ')}; ${holes} in the readings.`
}
