'use client'

import { useId } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { textWidth } from '@/app/_components/charts/rule-layout'
import { useWidth } from '@/app/_components/charts/use-width'
import type { TimeOutAnswer } from '@/lib/bench/time-out'
import { formatDuration } from '@/lib/format/times'
import { barTicksMinutes, tickText } from './time-bar-model'
import { curveEndHours, FULL, pointsTo, type UsedPoint } from './used-curve-model'

const HEIGHT = 240
const PLOT = { top: 8, bottom: 208, left: 44 }
const tenths = (px: number) => Math.round(px * 10) / 10

/** How much of what the joint may lose is used against time, with the middle 8 in 10, and from where it may bind. */
export function UsedCurve({ answer, sentence }: { answer: TimeOutAnswer; sentence: string }) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(760)
  const endHours = curveEndHours(answer)
  const points = pointsTo(endHours, answer)
  const right = width - 4
  const x = (hours: number) => tenths(PLOT.left + (hours / endHours) * (right - PLOT.left))
  const y = (used: number) => tenths(PLOT.bottom - (used / FULL) * (PLOT.bottom - PLOT.top))
  const path = (list: readonly UsedPoint[], of: (point: UsedPoint) => number) =>
    list.map((point) => `${String(x(point.hours))} ${String(y(of(point)))}`).join('L')
  const early = answer.minutesEarly
  const words = early === undefined ? '' : `back within ${formatDuration(early)}`
  const earlyX = early === undefined ? 0 : x(early / 60)
  const isOnRight = earlyX + 10 + textWidth(words, true) <= width

  return (
    <FigureFrame
      title="How much is used"
      aside="of what the joint may lose"
      tableName="Curve as a table"
      table={
        <FigureTable
          caption="How much of what the joint may lose is used"
          heads={['After', 'About', '1 in 10 has used more than', '1 in 10 has used less than']}
          rows={sampled(points).map((point) => [
            formatDuration(point.hours * 60),
            ...[point.used, point.early, point.late].map(
              (used) => `${String(Math.round(used * 100))} % used`,
            ),
          ])}
        />
      }
    >
      <div ref={ref} className="mt-2 [--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={sentence}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <defs>
            <Hatch id={`${ids}-binds`} colour="var(--warn)" gap={9} width={1} />
            <clipPath id={`${ids}-plot`}>
              <rect x={PLOT.left} y={PLOT.top} width={right - PLOT.left} height={PLOT.bottom - PLOT.top} />
            </clipPath>
          </defs>
          <g aria-hidden="true">
            <rect
              x={PLOT.left}
              y={PLOT.top}
              width={right - PLOT.left}
              height={y(1) - PLOT.top}
              fill={`url(#${ids}-binds)`}
            />
            <path d={`M${String(PLOT.left)} ${String(y(0.5))}H${String(right)}`} stroke="var(--line)" />
            <path d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(right)}`} stroke="var(--edge)" />
            <g clipPath={`url(#${ids}-plot)`}>
              <path
                d={`M${path(points, (point) => point.early)}L${path([...points].reverse(), (point) => point.late)}Z`}
                fill="var(--ink)"
                opacity="0.15"
              />
              <path
                d={`M${path(points, (point) => point.used)}`}
                fill="none"
                stroke="var(--ink)"
                strokeWidth="1.5"
              />
            </g>
            <path
              d={`M${String(PLOT.left)} ${String(y(1))}H${String(right)}`}
              stroke="var(--warn)"
              strokeWidth="1.5"
            />
            {(['none', 'half', 'all'] as const).map((name, index) => (
              <text
                key={name}
                x={PLOT.left - 8}
                y={y(index / 2) + 5}
                textAnchor="end"
                fontWeight={name === 'all' ? 600 : 400}
                fill={name === 'all' ? 'var(--warn)' : 'var(--ink-soft)'}
              >
                {name}
              </text>
            ))}
            {barTicksMinutes(endHours * 60).map((minutes) => (
              <g key={minutes}>
                <path d={`M${String(x(minutes / 60))} ${String(PLOT.bottom)}v6`} stroke="var(--edge)" />
                {x(minutes / 60) > right - 24 ? null : (
                  <text
                    x={x(minutes / 60)}
                    y={PLOT.bottom + 24}
                    textAnchor={minutes === 0 ? 'start' : 'middle'}
                    fill="var(--ink-soft)"
                  >
                    {tickText(minutes)}
                  </text>
                )}
              </g>
            ))}
            {early === undefined ? null : (
              <>
                <path
                  d={`M${String(earlyX)} ${String(y(1))}V${String(PLOT.bottom)}`}
                  stroke="var(--heart)"
                  strokeWidth="3"
                />
                <circle cx={earlyX} cy={y(1)} r="5" fill="var(--heart)" />
                <text
                  className="halo"
                  x={isOnRight ? earlyX + 10 : earlyX - 10}
                  y={PLOT.bottom - 14}
                  textAnchor={isOnRight ? 'start' : 'end'}
                  fontWeight="600"
                  fill="var(--heart)"
                >
                  {words}
                </text>
              </>
            )}
            {answer.binds ? (
              <circle
                cx={x(answer.minutes / 60)}
                cy={y(1)}
                r="4.5"
                fill="var(--board)"
                stroke="var(--ink)"
                strokeWidth="1.5"
              />
            ) : null}
          </g>
        </svg>
      </div>
      <p className="text-label text-ink-soft">
        The line is the middle, the grey the middle 8 in 10; hatched, the lid may bind a quarter turn on.
      </p>
    </FigureFrame>
  )
}

function sampled(points: readonly UsedPoint[]): UsedPoint[] {
  const every = Math.max(1, Math.ceil(points.length / 14))
  return points.filter((_, index) => index % every === 0 || index === points.length - 1)
}
