'use client'

import { useId } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { useWidth } from '@/app/_components/charts/use-width'
import { formatMass } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { type BenchReady, spanWords } from './ready-model'
import { curveSentence, frameOf, timeMarks, weightTicks } from './resting-chart-model'

const HEIGHT = 320
const PLOT = { top: 14, bottom: 288, left: 52, right: 10 }
const tenths = (px: number) => Math.round(px * 10) / 10

/** Weighings as open circles, the curve through them, where it leads with its doubt, and the range in which it is ready. */
export function RestingChart({ bench, units }: { bench: BenchReady; units: UnitSystem }) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(760)
  const { curve, target, answer, weights, isByDate } = bench
  const frame = frameOf(bench)
  const right = width - PLOT.right
  const x = (at: number) =>
    tenths(PLOT.left + ((at - frame.fromAt) / (frame.toAt - frame.fromAt)) * (right - PLOT.left))
  const y = (grams: number) =>
    tenths(PLOT.bottom - ((grams - frame.lowG) / (frame.highG - frame.lowG)) * (PLOT.bottom - PLOT.top))
  const path = (at: readonly number[], grams: readonly number[]) =>
    at.map((instant, index) => `${String(x(instant))} ${String(y(grams[index] ?? frame.lowG))}`).join('L')
  const lastAt = weights.at(-1)?.at ?? frame.fromAt
  const { forecast, fit } = curve
  const span = answer.span
  const spanText = span === undefined ? undefined : spanWords(span, lastAt, isByDate)

  return (
    <FigureFrame
      title="Resting curve"
      aside={units === 'metric' ? 'g' : 'oz'}
      tableName="Curve as a table"
      table={
        <FigureTable
          caption="Weighings"
          heads={['Weighing', isByDate ? 'Day' : 'Weeks from the first', 'Weight']}
          rows={weights.map((weight, index) => [
            String(index + 1),
            isByDate
              ? new Date(weight.at).toISOString().slice(0, 10)
              : String(Math.round((weight.at / 604_800_000) * 10) / 10),
            formatMass(weight.grams, units),
          ])}
        />
      }
    >
      <div ref={ref} className="mt-2 [--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={curveSentence(bench, spanText, units)}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <defs>
            <Hatch id={`${ids}-home`} colour="var(--heart)" gap={8} width={1} />
          </defs>
          <g aria-hidden="true">
            {span === undefined ? null : (
              <rect
                x={x(span.fromAt)}
                y={PLOT.top}
                width={Math.max(3, x(span.toAt) - x(span.fromAt))}
                height={PLOT.bottom - PLOT.top}
                fill="var(--wash)"
              />
            )}
            {weightTicks(frame, units).map(({ grams, text }) => (
              <g key={text}>
                <path d={`M${String(PLOT.left)} ${String(y(grams))}H${String(right)}`} stroke="var(--line)" />
                <text x={PLOT.left - 8} y={y(grams) + 5} textAnchor="end" fill="var(--ink-soft)">
                  {text}
                </text>
              </g>
            ))}
            <path d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(right)}`} stroke="var(--edge)" />
            {timeMarks(frame, isByDate, width < 560 ? 4 : 8).map(({ at, text }, index) => (
              <g key={text}>
                <path d={`M${String(x(at))} ${String(PLOT.bottom)}v6`} stroke="var(--edge)" />
                <text
                  x={x(at)}
                  y={PLOT.bottom + 24}
                  textAnchor={index === 0 ? 'start' : x(at) > right - 24 ? 'end' : 'middle'}
                  fill="var(--ink-soft)"
                >
                  {text}
                </text>
              </g>
            ))}
            {target === undefined ? null : (
              <rect
                x={PLOT.left}
                y={y(target.highG)}
                width={right - PLOT.left}
                height={y(target.lowG) - y(target.highG)}
                fill={`url(#${ids}-home)`}
                stroke="var(--heart)"
              />
            )}
            {forecast === undefined ? null : (
              <>
                <path
                  d={`M${path(forecast.at, forecast.highG)}L${path([...forecast.at].reverse(), [...forecast.lowG].reverse())}Z`}
                  fill="var(--ink)"
                  opacity="0.15"
                />
                <path
                  d={`M${path(forecast.at, forecast.grams)}`}
                  fill="none"
                  stroke="var(--ink)"
                  strokeWidth="1.5"
                  strokeDasharray="4 4"
                />
              </>
            )}
            {fit === undefined ? null : (
              <path d={`M${path(fit.at, fit.grams)}`} fill="none" stroke="var(--ink)" strokeWidth="1.5" />
            )}
            {span === undefined ? null : (
              <>
                <path
                  d={`M${String(x(span.fromAt))} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
                  stroke="var(--heart)"
                  strokeWidth="3"
                />
                <path
                  d={`M${String(x(span.toAt))} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
                  stroke="var(--heart)"
                  strokeWidth="1.5"
                  strokeDasharray="4 4"
                />
                <text
                  className="halo"
                  x={x(span.fromAt) - 8}
                  y={PLOT.top + 16}
                  textAnchor="end"
                  fontWeight="600"
                  fill="var(--heart)"
                >
                  may be ready
                </text>
              </>
            )}
            {weights.map((weight) => (
              <circle
                key={weight.at}
                cx={x(weight.at)}
                cy={y(weight.grams)}
                r="5"
                fill="var(--board)"
                stroke="var(--ink)"
                strokeWidth="2"
              />
            ))}
          </g>
        </svg>
      </div>
      <p className="text-label text-ink-soft">
        Circles are weighings. The line is the curve through them, dashed where it is forecast, with the
        middle 8 in 10.
        {target === undefined ? '' : ' Hatched: what it weighs at the moisture of its home.'}
      </p>
    </FigureFrame>
  )
}
