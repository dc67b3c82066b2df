'use client'

import { useId } from 'react'
import {
  CartesianGrid,
  Line,
  LineChart,
  ReferenceArea,
  ReferenceDot,
  ReferenceLine,
  ResponsiveContainer,
  XAxis,
  YAxis,
} from 'recharts'
import { Hatch } from './hatch'
import type { Gap } from './series-model'

type SeriesPanelProps = {
  name: string
  data: { at: number; value: number | null }[]
  axis: { domain: [number, number]; ticks: number[] }
  domain: [number, number]
  ticks: number[]
  tickWords: (at: number) => string
  gaps: readonly Gap[]
  gapWords?: (gap: Gap) => string
  /** The moment of the crosshair, and the value there in words. */
  at?: number
  atWords: string
  /** The last of the frame carries the time axis. */
  isLast: boolean
  onPoint: (at: number) => void
}

const PLOT_HEIGHT = 112
const AXIS_HEIGHT = 28

/** One measure of a room against time, in the frame that it shares with the others. */
export function SeriesPanel(props: SeriesPanelProps) {
  const { name, data, axis, domain, ticks, tickWords, gaps, gapWords, at, atWords, isLast, onPoint } = props
  const hatchId = useId()
  const atValue = data.find((point) => point.at === at)?.value ?? null
  const isLate = at !== undefined && (at - domain[0]) / (domain[1] - domain[0]) > 0.75
  const widest = gaps.reduce<Gap | null>(
    (best, gap) => (!best || gap.to - gap.from > best.to - best.from ? gap : best),
    null,
  )
  const hasRoomForWords = widest !== null && (widest.to - widest.from) / (domain[1] - domain[0]) > 0.12

  return (
    <div
      className="overflow-hidden border-b border-edge"
      style={{ height: PLOT_HEIGHT + (isLast ? AXIS_HEIGHT : 0) }}
    >
      <ResponsiveContainer width="100%" height="100%" initialDimension={{ width: 860, height: PLOT_HEIGHT }}>
        <LineChart
          data={data}
          margin={{ top: 26, right: 6, bottom: isLast ? 0 : 6, left: 0 }}
          accessibilityLayer={false}
          onMouseMove={(state) => {
            const label = Number(state.activeLabel)
            if (state.activeLabel !== undefined && Number.isFinite(label)) onPoint(label)
          }}
        >
          <defs>
            <Hatch id={hatchId} gap={8} width={1} />
          </defs>
          <CartesianGrid stroke="var(--line)" vertical={false} />
          <XAxis
            dataKey="at"
            type="number"
            domain={domain}
            ticks={ticks}
            tickFormatter={tickWords}
            hide={!isLast}
            height={AXIS_HEIGHT}
            stroke="var(--edge)"
            tick={{ fill: 'var(--ink-soft)', fontSize: 14 }}
            minTickGap={14}
          />
          <YAxis
            domain={axis.domain}
            ticks={axis.ticks}
            width={44}
            axisLine={false}
            tickLine={false}
            tick={{ fill: 'var(--ink-soft)', fontSize: 14 }}
            interval="equidistantPreserveStart"
          />
          {gaps.map((gap) => (
            <ReferenceArea
              key={gap.from}
              x1={gap.from}
              x2={gap.to}
              fill={`url(#${hatchId})`}
              fillOpacity={1}
              ifOverflow="hidden"
              label={
                gap === widest && hasRoomForWords && gapWords
                  ? {
                      value: 'no readings',
                      position: 'center',
                      className: 'halo',
                      fill: 'var(--ink)',
                      fontSize: 14,
                    }
                  : undefined
              }
            />
          ))}
          <Line
            dataKey="value"
            stroke="var(--ink)"
            strokeWidth={1.5}
            dot={false}
            activeDot={false}
            connectNulls={false}
            isAnimationActive={false}
          />
          {at === undefined ? null : (
            <ReferenceLine x={at} stroke="var(--heart)" strokeWidth={3} ifOverflow="hidden" />
          )}
          {at === undefined || atValue === null ? null : (
            <ReferenceDot
              x={at}
              y={atValue}
              r={5}
              fill="var(--heart)"
              stroke="none"
              ifOverflow="visible"
              label={{
                value: atWords,
                position: isLate ? 'left' : 'right',
                className: 'halo',
                fill: 'var(--heart)',
                fontSize: 14,
                fontWeight: 600,
                dy: -14,
              }}
            />
          )}
          <text className="halo" x={48} y={16} fontSize={14} fontWeight={600} fill="var(--ink)">
            {name}
          </text>
        </LineChart>
      </ResponsiveContainer>
    </div>
  )
}
