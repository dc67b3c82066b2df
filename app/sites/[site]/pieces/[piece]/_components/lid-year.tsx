'use client'

import { useId } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { clearanceScale, px } from '@/app/_components/charts/lid-drawing-model'
import { useWidth } from '@/app/_components/charts/use-width'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import type { MonthClearance } from '@/lib/fit/lid-place'
import { lidYearSentence, monthName } from '@/lib/fit/lid-year-words'
import { formatEmc, formatFineLength } from '@/lib/format/figures'
import { plainText } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import { MM_PER_INCH } from '@/lib/units'

type LidYearProps = {
  /** Oldest first, not empty. */
  year: readonly MonthClearance[]
  roomName: string
  isAssumed: boolean
  isSnap: boolean
  units: UnitSystem
}

const HEIGHT = 210
const PLOT = { top: 12, bottom: 172, left: 48, right: 14 }
/** Fewer months than these make no curve. */
const CURVE_FROM = 3

/** Clearance at a quarter turn through the year of the room that the lid is kept in. */
export function LidYear({ year, roomName, isAssumed, isSnap, units }: LidYearProps) {
  const sentence = lidYearSentence(roomName, year, isSnap, units)
  return (
    <Sheet id="lid-year" ticks>
      <FigureFrame
        title="Through the year"
        aside={`Clearance at a quarter turn, ${units === 'metric' ? 'mm' : 'in'}`}
        tableName="Year as a table"
        table={
          <FigureTable
            caption={`Clearance at a quarter turn, month by month in ${roomName}`}
            heads={['Month', 'The room, % MC', 'Clearance, about', '8 in 10 between']}
            rows={year.map((month) => [
              `${monthName(month.monthOn)} ${month.monthOn.slice(0, 4)}`,
              formatEmc(month.emcPct),
              formatFineLength(month.middleMm, units),
              `${formatFineLength(month.lowMm, units)} and ${formatFineLength(month.highMm, units)}`,
            ])}
          />
        }
      >
        {year.length >= CURVE_FROM ? (
          <YearCurve year={year} name={plainText(sentence)} units={units} isSnap={isSnap} />
        ) : null}
      </FigureFrame>
      <p className="mt-3 max-w-words">
        <RichText parts={sentence} />
      </p>
      <p className="mt-1 max-w-words text-label text-ink-soft">
        The wood is taken to stand at each month’s mean.
        {year.length < 12 ? ` ${String(year.length)} of the last 12 months have a reading.` : ''}
        {isAssumed ? ` Nobody has said what it is kept for: ${roomName} is taken.` : ''}
      </p>
    </Sheet>
  )
}

type YearCurveProps = { year: readonly MonthClearance[]; name: string; units: UnitSystem; isSnap: boolean }

function YearCurve({ year, name, units, isSnap }: YearCurveProps) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(720)
  const perUnitMm = units === 'metric' ? 1 : MM_PER_INCH
  const scale = clearanceScale(year, perUnitMm)
  const right = width - PLOT.right
  const stepX = (right - PLOT.left) / year.length
  const x = (n: number) => px(PLOT.left + (n + 0.5) * stepX)
  const y = (value: number) =>
    px(PLOT.bottom - ((value - scale.low) / (scale.high - scale.low)) * (PLOT.bottom - PLOT.top))
  const atMm = (lengthMm: number) => y(Math.max(scale.low, lengthMm / perUnitMm))
  const runs = runsOf(year)
  const path = (run: readonly number[], of: (month: MonthClearance) => number) =>
    run
      .flatMap((n) => {
        const month = year[n]
        return month === undefined ? [] : [`${x(n).toFixed(1)} ${atMm(of(month)).toFixed(1)}`]
      })
      .join('L')
  const letters = stepX < 34 ? 1 : 3
  return (
    <div ref={ref} className="mt-3 [--figure-ground:var(--board)]">
      <svg
        role="img"
        aria-label={name}
        viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
        className="block w-full"
        fontSize="14"
      >
        <defs>
          <Hatch id={`${ids}-binds`} colour="var(--warn)" gap={9} width={1} />
        </defs>
        <g aria-hidden="true">
          {scale.ticks.map(({ value, label }) => (
            <g key={value}>
              <path d={`M${String(PLOT.left)} ${String(y(value))}H${String(right)}`} stroke="var(--line)" />
              <text
                x={PLOT.left - 8}
                y={y(value) + 5}
                textAnchor="end"
                fontWeight={value === 0 ? 600 : 400}
                fill={value === 0 ? 'var(--warn)' : 'var(--ink-soft)'}
              >
                {label}
              </text>
            </g>
          ))}
          {runs.map((run) => (
            <path
              key={run[0]}
              d={`M${path(run, (month) => month.highMm)}L${path([...run].reverse(), (month) => month.lowMm)}Z`}
              fill="var(--ink)"
              opacity="0.15"
            />
          ))}
          {isSnap ? null : (
            <>
              <rect
                x={PLOT.left}
                width={right - PLOT.left}
                y={y(0)}
                height={PLOT.bottom - y(0)}
                fill={`url(#${ids}-binds)`}
              />
              <path
                d={`M${String(PLOT.left)} ${String(y(0))}H${String(right)}`}
                stroke="var(--warn)"
                strokeWidth="1.5"
              />
              <text
                className="halo"
                x={PLOT.left + 8}
                y={PLOT.bottom - 8}
                fontWeight="600"
                fill="var(--warn)"
              >
                binds at a quarter turn
              </text>
            </>
          )}
          {runs.map((run) => (
            <path
              key={run[0]}
              d={`M${path(run, (month) => month.middleMm)}`}
              fill="none"
              stroke="var(--ink)"
              strokeWidth="1.5"
              strokeDasharray="6 4"
            />
          ))}
          {year.map((month, n) => (
            <g key={month.monthOn}>
              <circle cx={x(n)} cy={atMm(month.middleMm)} r="3" fill="var(--ink)" />
              <text x={x(n)} y={PLOT.bottom + 24} textAnchor="middle" fill="var(--ink-soft)">
                {monthName(month.monthOn).slice(0, letters)}
              </text>
            </g>
          ))}
        </g>
      </svg>
    </div>
  )
}

/** Months that follow one another: a month without a reading is a gap and is never bridged. */
function runsOf(year: readonly MonthClearance[]): number[][] {
  const runs: number[][] = []
  year.forEach((month, n) => {
    const before = year[n - 1]
    const isNext = before !== undefined && monthNumber(month.monthOn) === monthNumber(before.monthOn) + 1
    const last = runs.at(-1)
    if (isNext && last !== undefined) last.push(n)
    else runs.push([n])
  })
  return runs
}

const monthNumber = (monthOn: string): number =>
  12 * Number(monthOn.slice(0, 4)) + Number(monthOn.slice(5, 7))
