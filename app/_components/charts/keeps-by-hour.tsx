'use client'

import { useId } from 'react'
import type { KeepsHour } from '@/lib/carry/carry-answer'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { FigureFrame, FigureTable } from './figure-frame'
import { Hatch } from './hatch'
import { stripDays, stripTicks } from './hour-strip-model'
import { useWidth } from './use-width'

type KeepsByHourProps = {
  number: string
  hours: readonly KeepsHour[]
  stayMinutes: number
  /** The hour that is offered; null where none betters it. */
  betterAt: string | null
  timeZone: string
  now: Date
}

const PLOT = { left: 58, top: 44, bottom: 160 }
const HEIGHT = 186
const FINE_MARGIN_MINUTES = 30

/** How long a piece keeps its fit by the hour that it goes, to its early edge; hatched where the room has to be lit. */
export function KeepsByHour({ number, hours, stayMinutes, betterAt, timeZone, now }: KeepsByHourProps) {
  const id = useId()
  const [ref, width] = useWidth<HTMLDivElement>(720)
  const cells = [...new Set(hours.map(({ at }) => at))].map((at) => ({
    at,
    asItIs: hours.find((hour) => hour.at === at && hour.ifLitAt === null),
    lit: hours.find((hour) => hour.at === at && hour.ifLitAt !== null),
  }))
  const most = scaleMinutes(hours, stayMinutes)
  const step = (width - PLOT.left) / Math.max(1, cells.length)
  const x = (index: number) => PLOT.left + index * step
  const kept = (hour: KeepsHour) => Math.min(most, hour.keepsMinutes ?? most)
  const y = (minutes: number) => PLOT.bottom - (minutes / most) * (PLOT.bottom - PLOT.top)
  const bar = (hour: KeepsHour, index: number) => ({
    x: x(index) + 1,
    y: Math.min(y(kept(hour)), PLOT.bottom - 2),
    width: Math.max(1, step - 2),
    height: Math.max(2, PLOT.bottom - y(kept(hour))),
  })
  const better = cells.findIndex(({ at }) => at === betterAt)
  return (
    <FigureFrame
      tableName="Hours as a table"
      isButtonBelow
      className="min-w-0"
      table={
        <FigureTable
          caption={`How long ${number} keeps its fit, by the hour it goes out`}
          heads={['It goes', 'Keeps its fit for', 'If the room is lit']}
          rows={cells.map(({ at, asItIs, lit }) => [
            formatMoment(at, timeZone, now),
            keepsWords(asItIs),
            lit?.ifLitAt ? `${keepsWords(lit)}, lit at ${formatMoment(lit.ifLitAt, timeZone, now)}` : '',
          ])}
        />
      }
    >
      <div ref={ref} className="min-w-0 [--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={figureWords(number, cells.length, betterAt, timeZone, now)}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <defs>
            <Hatch id={`${id}-lit`} colour="var(--good)" gap={7} />
          </defs>
          <g aria-hidden="true">
            {stripDays(cells, timeZone, (count) => count * step, 7.5).map(({ index, label }) => (
              <text key={index} x={x(index)} y={14} fontWeight="600" fill="var(--ink)">
                {label}
              </text>
            ))}
            <path d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(width)}`} stroke="var(--edge)" />
            {cells.map(({ at, asItIs, lit }, index) => (
              <g key={at}>
                {lit ? (
                  <rect
                    {...bar(lit, index)}
                    fill={`url(#${id}-lit)`}
                    stroke="var(--good)"
                    strokeWidth="1.5"
                  />
                ) : null}
                {asItIs ? <rect {...bar(asItIs, index)} fill="var(--ink-soft)" /> : null}
              </g>
            ))}
            {scaleSteps(most)
              .slice(1)
              .map((minutes) => (
                <path
                  key={minutes}
                  d={`M${String(PLOT.left)} ${String(y(minutes))}H${String(width)}`}
                  stroke="var(--line)"
                />
              ))}
            {stayMinutes <= most ? (
              <>
                <path
                  d={`M${String(PLOT.left)} ${String(y(stayMinutes))}H${String(width)}`}
                  stroke="var(--ink)"
                  strokeWidth="1.5"
                  strokeDasharray="5 4"
                />
                <text
                  className="halo"
                  x={PLOT.left + 4}
                  y={y(stayMinutes) - 6}
                  fontWeight="600"
                  fill="var(--ink)"
                >
                  {formatDuration(stayMinutes)}, as planned
                </text>
              </>
            ) : null}
            {scaleSteps(most).map((minutes) => (
              <text
                key={minutes}
                x={PLOT.left - 8}
                y={y(minutes) + 4}
                textAnchor="end"
                fill="var(--ink-soft)"
              >
                {minutes === 0 ? '0' : formatDuration(minutes)}
              </text>
            ))}
            {better >= 0 ? (
              <path
                d={`M${String(x(better) + step / 2 - 6)} ${String(PLOT.top - 14)}h12l-6 9z`}
                fill="var(--heart)"
              />
            ) : null}
            {stripTicks(cells, timeZone).map(({ index, label }) => (
              <text
                key={index}
                x={x(index) + step / 2}
                y={PLOT.bottom + 20}
                textAnchor="middle"
                fill="var(--ink-soft)"
              >
                {label}
              </text>
            ))}
          </g>
        </svg>
      </div>
    </FigureFrame>
  )
}

/** To past the planned stay; where no hour comes near it, to a little past the longest. */
function scaleMinutes(hours: readonly KeepsHour[], stayMinutes: number): number {
  const longest = Math.max(0, ...hours.map((hour) => hour.keepsMinutes ?? Infinity))
  return longest < stayMinutes / 3
    ? Math.ceil(Math.max(20, 1.3 * longest) / 10) * 10
    : stayMinutes + FINE_MARGIN_MINUTES
}

const STEPS_MINUTES = [10, 20, 30, 60, 120, 240, 480, 1440, 2880, 10_080] as const
const STEPS_MAX = 3

/** From nothing up in even steps, three at most. */
function scaleSteps(most: number): number[] {
  const step = STEPS_MINUTES.find((minutes) => most / minutes < STEPS_MAX + 1) ?? most
  return Array.from({ length: Math.floor(most / step) + 1 }, (_, n) => n * step)
}

function keepsWords(hour: KeepsHour | undefined): string {
  if (hour === undefined) return ''
  return hour.keepsMinutes === null ? 'the whole stay' : `about ${formatDuration(hour.keepsMinutes)}`
}

function figureWords(
  number: string,
  count: number,
  betterAt: string | null,
  timeZone: string,
  now: Date,
): string {
  const best =
    betterAt === null
      ? 'No hour is better than the one asked about'
      : `Better at ${formatMoment(betterAt, timeZone, now)}`
  return `How long ${number} keeps its fit in the next ${String(count)} h, by the hour it goes. ${best}.`
}
