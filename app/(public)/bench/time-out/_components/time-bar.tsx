'use client'

import { useId } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { textWidth } from '@/app/_components/charts/rule-layout'
import { useWidth } from '@/app/_components/charts/use-width'
import { formatDuration } from '@/lib/format/times'
import { barEndMinutes, barTicksMinutes, tickText } from './time-bar-model'

type TimeBarProps = { minutesEarly: number; minutes: number; minutesLate: number | undefined }

const TOP = 24
const HEIGHT = 26
const BOTTOM = TOP + HEIGHT

/** The time out from the moment it leaves: clear to the early edge, hatched from there on, the middle dashed. */
export function TimeBar({ minutesEarly, minutes, minutesLate }: TimeBarProps) {
  const hatchId = useId()
  const [ref, width] = useWidth<HTMLDivElement>(760)
  const end = barEndMinutes(minutes)
  const x = (at: number) => Math.round((at / end) * width * 10) / 10
  const early = formatDuration(minutesEarly)
  const middle = formatDuration(minutes)
  const earlyAt = Math.min(x(minutesEarly) + 6, width - textWidth(`back within ${early}`, true))
  const middleAt = Math.max(0, Math.min(x(minutes), width - textWidth(middle)))
  return (
    <FigureFrame
      title="Time out"
      aside="from the moment it leaves"
      tableName="Bar as a table"
      table={
        <FigureTable
          caption="Time out"
          heads={['Edge', 'After', 'What it means']}
          rows={[
            ['Early', early, '1 in 10 like it has used up what it may lose'],
            ['Middle', middle, 'as many have as have not'],
            minutesLate === undefined
              ? ['Late', 'never', 'more than 1 in 10 keep their fit for good']
              : ['Late', formatDuration(minutesLate), '9 in 10 have'],
          ]}
        />
      }
    >
      <div ref={ref} className="mt-2 [--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={`Back within ${early}; more likely good until about ${middle}.`}
          viewBox={`0 0 ${String(width)} 78`}
          className="block w-full"
          fontSize="14"
        >
          <defs>
            <Hatch id={hatchId} />
          </defs>
          <g aria-hidden="true">
            <rect x="0" y={TOP} width={width} height={HEIGHT} fill="var(--steel)" />
            <rect
              x={x(minutesEarly)}
              y={TOP}
              width={width - x(minutesEarly)}
              height={HEIGHT}
              fill={`url(#${hatchId})`}
            />
            <path
              d={`M0 ${String(TOP)}H${String(width)}M0 ${String(BOTTOM)}H${String(width)}M0.5 ${String(TOP)}V${String(BOTTOM)}`}
              stroke="var(--edge)"
            />
            <path
              d={`M${String(x(minutes))} ${String(TOP - 4)}V${String(BOTTOM)}`}
              stroke="var(--ink)"
              strokeWidth="2"
              strokeDasharray="3 3"
            />
            <path
              d={`M${String(x(minutesEarly))} ${String(TOP - 5)}V${String(BOTTOM)}`}
              stroke="var(--heart)"
              strokeWidth="3"
            />
            <text x={earlyAt} y="16" fontWeight="600" fill="var(--heart)">
              back within {early}
            </text>
            {middleAt > earlyAt + textWidth(`back within ${early}`, true) + 12 ? (
              <text x={middleAt} y="16" fill="var(--ink-soft)">
                {middle}
              </text>
            ) : null}
            {barTicksMinutes(end).map((at) => (
              <g key={at}>
                <path d={`M${String(x(at) + 0.5)} ${String(BOTTOM)}v7`} stroke="var(--ink)" />
                {x(at) > width - 30 ? null : (
                  <text x={x(at)} y="74" textAnchor={at === 0 ? 'start' : 'middle'} fill="var(--ink-soft)">
                    {tickText(at)}
                  </text>
                )}
              </g>
            ))}
          </g>
        </svg>
      </div>
    </FigureFrame>
  )
}
