'use client'

import { useId } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { Hatch } from '@/app/_components/charts/hatch'
import { useWidth } from '@/app/_components/charts/use-width'
import { formatMass } from '@/lib/format/figures'
import { formatDate } from '@/lib/format/times'
import { rangeWords } from '@/lib/seasoning/rest-words'
import type { RestView } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { CurveLegend } from './curve-legend'
import { monthTicks, restingFigure, type RestingFigure, restingSentence, sideTicks } from './resting-figure'

const HEIGHT = 330
const PLOT = { top: 16, bottom: 290, left: 52, right: 10 }
const tenths = (px: number) => Math.round(px * 10) / 10

type RestingCurveProps = { rest: RestView; reader: Reader; now: Date }

/** Weighings as open circles, the curve through them, where it leads, the wood by its rooms, and where it is to end. */
export function RestingCurve({ rest, reader, now }: RestingCurveProps) {
  const [ref, width] = useWidth<HTMLDivElement>(760)
  const figure = restingFigure(rest, reader.units, now.getTime())
  if (figure === undefined)
    return (
      <p className="max-w-words text-ink-soft">
        Nothing to draw yet: it has not been weighed, and its room has no reading on record.
      </p>
    )
  return (
    <FigureFrame
      title="Resting curve"
      aside={figure.unit}
      tableName="Curve as a table"
      table={<CurveTable rest={rest} reader={reader} now={now} />}
    >
      <div ref={ref} className="mt-2 [--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={restingSentence(rest, reader.units, reader.timeZone, now)}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <Drawing figure={figure} width={width} reader={reader} now={now} />
        </svg>
      </div>
      <CurveLegend figure={figure} rest={rest} />
    </FigureFrame>
  )
}

type DrawingProps = { figure: RestingFigure; width: number; reader: Reader; now: Date }

function Drawing({ figure, width, reader, now }: DrawingProps) {
  const ids = useId()
  const right = width - PLOT.right
  const isNarrow = width < 560
  const x = (at: number) =>
    tenths(PLOT.left + ((at - figure.fromAt) / (figure.toAt - figure.fromAt)) * (right - PLOT.left))
  const y = (value: number) =>
    tenths(PLOT.bottom - ((value - figure.low) / (figure.high - figure.low)) * (PLOT.bottom - PLOT.top))
  const path = (line: readonly { at: number; value: number }[]) =>
    `M${line.map(({ at, value }) => `${String(x(at))} ${String(y(value))}`).join('L')}`
  const { span, ribbon, doubt } = figure
  // A phone has no room for the days; they stand in the sentence above.
  const days =
    span === null || isNarrow ? [] : [rangeWords(span, { now: now.getTime(), timeZone: reader.timeZone })]
  const spanLines = ['may be ready', ...days]
  return (
    <g aria-hidden="true">
      <defs>
        <Hatch id={`${ids}-home`} colour="var(--heart)" gap={8} width={1} />
      </defs>
      {span === null ? null : (
        <rect
          x={x(span.fromAt)}
          y={PLOT.top}
          width={Math.max(3, x(span.toAt) - x(span.fromAt))}
          height={PLOT.bottom - PLOT.top}
          fill="var(--wash)"
        />
      )}
      {sideTicks(figure).map((value) => (
        <g key={value}>
          <path d={`M${String(PLOT.left)} ${String(y(value))}H${String(right)}`} stroke="var(--line)" />
          <text x={PLOT.left - 8} y={y(value) + 5} textAnchor="end" fill="var(--ink-soft)">
            {value}
          </text>
        </g>
      ))}
      <path d={`M${String(PLOT.left)} ${String(PLOT.bottom)}H${String(right)}`} stroke="var(--edge)" />
      {monthTicks(figure, reader.timeZone, isNarrow ? 4 : 9).map(({ at, text }) => (
        <g key={at}>
          <path d={`M${String(x(at))} ${String(PLOT.bottom)}v6`} stroke="var(--edge)" />
          <text
            x={x(at)}
            y={PLOT.bottom + 24}
            textAnchor={x(at) < PLOT.left + 30 ? 'start' : x(at) > right - 24 ? 'end' : 'middle'}
            fill="var(--ink-soft)"
          >
            {text}
          </text>
        </g>
      ))}
      {ribbon === null ? null : (
        <rect
          x={PLOT.left}
          y={y(ribbon.high)}
          width={right - PLOT.left}
          height={Math.max(2, y(ribbon.low) - y(ribbon.high))}
          fill={`url(#${ids}-home)`}
          stroke="var(--heart)"
        />
      )}
      {figure.model.length > 1 ? <path d={path(figure.model)} fill="none" stroke="var(--edge)" /> : null}
      {doubt.length > 1 ? (
        <path
          d={`${path(doubt.map(({ at, high }) => ({ at, value: high })))}L${path(
            doubt.map(({ at, low }) => ({ at, value: low })).toReversed(),
          ).slice(1)}Z`}
          fill="var(--ink)"
          opacity="0.15"
        />
      ) : null}
      {figure.forecast.length > 1 ? (
        <path
          d={path(figure.forecast)}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="1.5"
          strokeDasharray="4 4"
        />
      ) : null}
      {figure.fit.length > 1 ? (
        <path d={path(figure.fit)} fill="none" stroke="var(--ink)" strokeWidth="1.5" />
      ) : null}
      <path
        d={`M${String(x(figure.now))} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
        stroke="var(--ink-soft)"
        strokeDasharray="2 4"
      />
      <text className="halo" x={x(figure.now) - 6} y={PLOT.top + 10} textAnchor="end" fill="var(--ink-soft)">
        today
      </text>
      {span === null ? null : (
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
          {spanLines.map((words, n) => (
            <text
              key={words}
              className="halo"
              x={x(span.fromAt) - 8}
              y={PLOT.top + 32 + 19 * n}
              textAnchor="end"
              fontWeight="600"
              fill="var(--heart)"
            >
              {words}
            </text>
          ))}
        </>
      )}
      {figure.weighed.map(({ at, value }) => (
        <circle
          key={at}
          cx={x(at)}
          cy={y(value)}
          r="5"
          fill="var(--board)"
          stroke="var(--ink)"
          strokeWidth="2"
        />
      ))}
    </g>
  )
}

function CurveTable({ rest, reader, now }: RestingCurveProps) {
  const { at, grams, correctedG } = rest.weighings
  const day = (instant: string) => formatDate(instant, reader.timeZone, now)
  const mass = (value: number | null | undefined) =>
    value === null || value === undefined ? 'not known' : formatMass(value, reader.units)
  const ahead = rest.forecastCurve
  // A dozen rows of the forecast say as much as all of them.
  const every = ahead === null ? 1 : Math.max(1, Math.ceil(ahead.at.length / 12))
  return (
    <div className="flex flex-col gap-5">
      <FigureTable
        caption="Weighings"
        heads={['Day', 'As weighed', 'Without the room’s drift']}
        rows={at.map((instant, n) => [day(instant), mass(grams[n]), mass(correctedG[n])])}
      />
      {ahead === null ? (
        <p className="text-label text-ink-soft">{rest.noForecast?.words}</p>
      ) : (
        <FigureTable
          caption="Forecast"
          heads={['Day', 'Forecast', 'Middle 8 in 10']}
          rows={ahead.at.flatMap((instant, n) =>
            n % every === 0
              ? [[day(instant), mass(ahead.grams[n]), `${mass(ahead.lowG[n])} to ${mass(ahead.highG[n])}`]]
              : [],
          )}
        />
      )}
    </div>
  )
}
