'use client'

import { useWidth } from '@/app/_components/charts/use-width'
import type { TrackPoint } from '@/lib/carry/track-record'
import { BINDS_FROM, FELT_FROM } from '@/lib/follow/learned-pace'
import { formatCount } from '@/lib/format/figures'
import type { Turned } from '@/lib/pieces/outcome'

const ROWS: readonly { turned: Turned; label: string }[] = [
  { turned: 'binds', label: 'it bound' },
  { turned: 'tighter', label: 'tighter' },
  { turned: 'as-before', label: 'as before' },
  { turned: 'looser', label: 'looser' },
]
const ROW_HEIGHT = 56
const TOP = 8
const LEFT = 84
const RIGHT = 16
const AXIS = 44
/** So many marks stand side by side in a row before they lie on one another. */
const LANES = 5
/** What lies further out stands at the edge. */
const USED_MAX = 2.5

/** Each lid at what the model had used of its allowance, in the row of what was felt. The table below has the same. */
export function TrackFigure({ points }: { points: readonly TrackPoint[] }) {
  const [ref, width] = useWidth<HTMLDivElement>(640)
  const bottom = TOP + ROWS.length * ROW_HEIGHT
  const xOf = (used: number) =>
    LEFT + (Math.min(USED_MAX, Math.max(0, used)) / USED_MAX) * Math.max(1, width - LEFT - RIGHT)
  return (
    <div ref={ref}>
      <svg
        width={width}
        height={bottom + AXIS}
        role="img"
        aria-label={`${formatCount(points.length, 'lid')} by allowance used and by what was felt. The table below has the same figures.`}
        className="block max-w-full text-label"
      >
        <rect
          x={xOf(1)}
          y={TOP}
          width={Math.max(0, width - RIGHT - xOf(1))}
          height={bottom - TOP}
          className="fill-steel"
        />
        {ROWS.map(({ turned, label }, index) => {
          const y = TOP + (index + 0.5) * ROW_HEIGHT
          const inRow = points.filter((point) => point.turned === turned)
          return (
            <g key={turned}>
              <line x1={LEFT} x2={width - RIGHT} y1={y} y2={y} className="stroke-line" />
              <text x={LEFT - 10} y={y + 5} textAnchor="end" className="fill-ink">
                {label}
              </text>
              {inRow.map((point, n) => {
                // Side by side where several would lie on one another.
                const at = y + ((n % LANES) - (Math.min(LANES, inRow.length) - 1) / 2) * 8
                return (
                  <g key={`${point.carryId} ${point.pieceId}`}>
                    <line
                      x1={xOf(point.usedSlow)}
                      x2={xOf(point.usedFast)}
                      y1={at}
                      y2={at}
                      className="stroke-ink-soft"
                      strokeWidth={1.5}
                    />
                    {point.isAgainstAdvice ? (
                      <rect
                        x={xOf(point.usedMiddle) - 4}
                        y={at - 4}
                        width={8}
                        height={8}
                        className="fill-warn"
                      />
                    ) : (
                      <circle cx={xOf(point.usedMiddle)} cy={at} r={4} className="fill-ink" />
                    )}
                  </g>
                )
              })}
            </g>
          )
        })}
        {[FELT_FROM, 1, BINDS_FROM].map((used) => (
          <line
            key={used}
            x1={xOf(used)}
            x2={xOf(used)}
            y1={TOP}
            y2={bottom}
            className={used === 1 ? 'stroke-warn' : 'stroke-edge'}
            strokeDasharray={used === 1 ? undefined : '4 4'}
          />
        ))}
        {[0, 0.5, 1, 1.5, 2].map((used) => (
          <text key={used} x={xOf(used)} y={bottom + 18} textAnchor="middle" className="fill-ink-soft">
            {used === 0 ? 'none' : used === 0.5 ? 'half' : used === 1 ? 'all' : `${String(used)} ×`}
          </text>
        ))}
        <text x={LEFT} y={bottom + 38} className="fill-ink-soft">
          allowance used, by the reckoning
        </text>
      </svg>
      <p className="mt-2 text-label text-ink-soft">
        A disc went as told, a square against the advice. Left of the first dashed line a hand feels nothing;
        right of the second a lid may bind.
      </p>
    </div>
  )
}
