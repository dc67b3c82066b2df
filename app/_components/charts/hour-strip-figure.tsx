'use client'

import { useId } from 'react'
import type { HourState, HourStrip, StripCell } from '@/lib/forecast/strip-view'
import { Hatch } from './hatch'
import { HEIGHT_OF, litState, stripDays, stripTicks } from './hour-strip-model'
import { useWidth } from './use-width'

/** A page is read at arm's length, the door view from 3 m. */
export type StripSize = 'page' | 'door'

const SIZES = {
  page: { font: 14, letter: 7.5, high: 46, head: 24, foot: 24, gap: 1.5, hatch: 6, line: 1.5, tick: 6 },
  door: { font: 30, letter: 16, high: 88, head: 44, foot: 48, gap: 4, hatch: 13, line: 4, tick: 12 },
}

/** Room for the word "now" on the screen by the door, before a midnight that is near. */
const NOW_WIDTH = 66
const GUESS = { page: 358, door: 1200 }

type HourStripFigureProps = {
  strip: HourStrip
  timeZone: string
  size?: StripSize
  chosen?: number | null
  onChoose?: (index: number) => void
}

/** The drawing alone. Whoever shows it gives it a name, and the same figures as a table. */
export function HourStripFigure({
  strip,
  timeZone,
  size = 'page',
  chosen = null,
  onChoose,
}: HourStripFigureProps) {
  const { cells } = strip
  const id = useId()
  const [ref, width] = useWidth<HTMLDivElement>(GUESS[size])
  const { font, letter, high, head, foot, gap, hatch, line, tick } = SIZES[size]
  const step = width / Math.max(1, cells.length)
  const bottom = head + high
  const days = stripDays(cells, timeZone, (count) => count * step, letter)
  const ids = { unfit: `${id}unfit`, fit: `${id}fit`, tolerable: `${id}tolerable` }
  return (
    <div ref={ref} className="min-w-0" aria-hidden="true">
      <svg
        viewBox={`0 0 ${String(width)} ${String(bottom + foot)}`}
        width={width}
        className="block max-w-full"
        fontSize={font}
        onPointerDown={(event) => {
          const box = event.currentTarget.getBoundingClientRect()
          const index = Math.floor((event.clientX - box.left) / step)
          if (index >= 0 && index < cells.length) onChoose?.(index)
        }}
      >
        <defs>
          <Hatch id={ids.unfit} gap={hatch} width={line} />
          <Hatch id={ids.fit} colour="var(--good)" gap={hatch} width={line} />
          <Hatch id={ids.tolerable} colour="var(--mid)" gap={hatch} width={line} />
        </defs>
        {size === 'door' ? (
          <g fill="var(--heart)">
            <rect x={0} y={font + 10} width={7} height={bottom - font - 10} />
            <text x={0} y={font} fontWeight="600">
              now
            </text>
          </g>
        ) : null}
        {days.map(({ index, label, isMidnight }) => (
          // On the screen by the door the first hour is told as now, and its day stands in the head.
          <g key={index} className={size === 'door' && index === 0 ? 'hidden' : undefined}>
            {isMidnight && index > 0 ? (
              <path d={`M${String(index * step)} 0V${String(bottom)}`} stroke="var(--edge)" />
            ) : null}
            <text
              x={Math.max(index * step + (index === 0 ? 0 : 6), size === 'door' ? NOW_WIDTH : 0)}
              y={font}
              fontWeight="600"
              fill="var(--ink)"
            >
              {label}
            </text>
          </g>
        ))}
        {cells.map((cell, index) => (
          <Cell
            key={cell.at}
            cell={cell}
            x={index * step}
            width={Math.max(1, step - gap)}
            bottom={bottom}
            high={high}
            ids={ids}
          />
        ))}
        <path d={`M0 ${String(bottom)}H${String(width)}`} stroke="var(--ink)" strokeWidth={line} />
        {stripTicks(cells, timeZone).map(({ index, label }) => {
          const x = index * step
          return (
            <g key={index}>
              <path d={`M${String(x)} ${String(bottom)}v${String(tick)}`} stroke="var(--ink)" />
              {x > letter * 1.5 && x < width - letter * 1.5 ? (
                <text x={x} y={bottom + tick + font} textAnchor="middle" fill="var(--ink-soft)">
                  {label}
                </text>
              ) : null}
            </g>
          )
        })}
        {chosen === null ? null : (
          <path
            d={`M${String((chosen + 0.5) * step)} ${String(head - 4)}V${String(bottom)}`}
            stroke="var(--heart)"
            strokeWidth={line * 2}
          />
        )}
      </svg>
    </div>
  )
}

type CellProps = {
  cell: StripCell
  x: number
  width: number
  bottom: number
  high: number
  ids: Readonly<Record<HourState, string>>
}

const FILL: Readonly<Record<HourState, (ids: CellProps['ids']) => string>> = {
  fit: () => 'var(--good)',
  tolerable: () => 'var(--mid)',
  unfit: (ids) => `url(#${ids.unfit})`,
}

/** An hour: as it is from the ground up; what a lighting would add stands on it, outlined and hatched. */
function Cell({ cell, x, width, bottom, high, ids }: CellProps) {
  const own = HEIGHT_OF[cell.state] * high
  const lit = litState(cell)
  const litHigh = lit === null ? 0 : HEIGHT_OF[lit] * high
  return (
    <>
      <rect x={x} y={bottom - own} width={width} height={own} fill={FILL[cell.state](ids)} />
      {lit === null ? null : (
        <>
          <rect x={x} y={bottom - litHigh} width={width} height={litHigh - own} fill={`url(#${ids[lit]})`} />
          <rect
            x={x + 0.5}
            y={bottom - litHigh + 0.5}
            width={Math.max(0.5, width - 1)}
            height={litHigh - 0.5}
            fill="none"
            stroke={lit === 'fit' ? 'var(--good)' : 'var(--mid)'}
          />
        </>
      )}
    </>
  )
}
