'use client'

import { type PointerEvent, useId } from 'react'
import { CURVE_POINTS, type CurvePoint } from '@/lib/fit/clearance-curve'
import type { LidTurned } from '@/lib/fit/lid-view'
import type { UnitSystem } from '@/lib/sites/site'
import { MM_PER_INCH } from '@/lib/units'
import { Hatch } from './hatch'
import { clearanceScale, px } from './lid-drawing-model'
import { useWidth } from './use-width'

export type OtherCurve = { readonly label: string; readonly curve: readonly CurvePoint[] }

type LidCurveProps = {
  curve: readonly CurvePoint[]
  turned: LidTurned
  /** Another state of the same lid to read it against, dashed. */
  other?: OtherCurve | undefined
  units: UnitSystem
  name: string
  onTurn: (angleDeg: number) => void
}

const HEIGHT = 210
const PLOT = { top: 12, bottom: 176, left: 48, right: 14 }
const LAST_DEG = CURVE_POINTS - 1

/** Least clearance against how far the lid is turned: the curve, its doubt, and where it binds. */
export function LidCurve({ curve, turned, other, units, name, onTurn }: LidCurveProps) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(420)
  const perUnitMm = units === 'metric' ? 1 : MM_PER_INCH
  const scale = clearanceScale([...curve, ...(other?.curve ?? [])], perUnitMm)
  const right = width - PLOT.right
  const x = (angleDeg: number) => px(PLOT.left + (angleDeg / LAST_DEG) * (right - PLOT.left))
  const y = (value: number) =>
    px(PLOT.bottom - ((value - scale.low) / (scale.high - scale.low)) * (PLOT.bottom - PLOT.top))
  const atMm = (lengthMm: number) => y(Math.max(scale.low, lengthMm / perUnitMm))
  const line = (points: readonly CurvePoint[], of: (point: CurvePoint) => number) =>
    points.map((point) => `${x(point.angleDeg).toFixed(1)} ${atMm(of(point)).toFixed(1)}`).join('L')
  const follow = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect()
    const at = ((event.clientX - box.left) / box.width) * width
    onTurn(Math.round(Math.min(1, Math.max(0, (at - PLOT.left) / (right - PLOT.left))) * LAST_DEG))
  }
  const plot = { x: PLOT.left, width: right - PLOT.left }

  return (
    <div ref={ref}>
      <svg
        role="img"
        aria-label={name}
        viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
        className="block w-full select-none"
        fontSize="14"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId)
          follow(event)
        }}
        onPointerMove={(event) => {
          if (event.currentTarget.hasPointerCapture(event.pointerId)) follow(event)
        }}
        style={{ touchAction: 'pan-y', cursor: 'ew-resize' }}
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
          <path
            d={`M${line(curve, (point) => point.highMm)}L${line([...curve].reverse(), (point) => point.lowMm)}Z`}
            fill="var(--ink)"
            opacity="0.15"
          />
          <rect {...plot} y={y(0)} height={PLOT.bottom - y(0)} fill="var(--warn)" opacity="0.08" />
          <rect {...plot} y={y(0)} height={PLOT.bottom - y(0)} fill={`url(#${ids}-binds)`} />
          <path
            d={`M${String(PLOT.left)} ${String(y(0))}H${String(right)}`}
            stroke="var(--warn)"
            strokeWidth="1.5"
          />
          {other ? (
            <path
              d={`M${line(other.curve, (point) => point.middleMm)}`}
              fill="none"
              stroke="var(--ink)"
              strokeWidth="1.5"
              strokeDasharray="6 4"
            />
          ) : null}
          <path
            d={`M${line(curve, (point) => point.middleMm)}`}
            fill="none"
            stroke="var(--ink)"
            strokeWidth="1.5"
          />
          <text className="halo" x={PLOT.left + 8} y={PLOT.bottom - 8} fontWeight="600" fill="var(--warn)">
            binds
          </text>
          {other ? <OtherLabel other={other} right={right} at={atMm} /> : null}
          <path
            d={`M${String(x(turned.angleDeg))} ${String(PLOT.top)}V${String(PLOT.bottom)}`}
            stroke="var(--heart)"
            strokeWidth="3"
          />
          <circle
            cx={x(turned.angleDeg)}
            cy={atMm(turned.clearance.middleMm)}
            r="6"
            fill="var(--heart)"
            stroke="var(--board)"
            strokeWidth="1.5"
          />
          <text
            className="halo"
            x={x(turned.angleDeg) + (turned.angleDeg > 70 ? -9 : 9)}
            y={PLOT.top + 11}
            textAnchor={turned.angleDeg > 70 ? 'end' : 'start'}
            fontWeight="600"
            fill="var(--heart)"
          >
            {`${String(Math.round(turned.angleDeg))}°`}
          </text>
          <AngleAxis x={x} />
        </g>
      </svg>
    </div>
  )
}

function OtherLabel({
  other,
  right,
  at,
}: {
  other: OtherCurve
  right: number
  at: (lengthMm: number) => number
}) {
  const last = other.curve.at(-1)
  if (last === undefined) return null
  return (
    <text className="halo" x={right - 4} y={at(last.middleMm) - 8} textAnchor="end" fill="var(--ink)">
      {other.label}
    </text>
  )
}

function AngleAxis({ x }: { x: (angleDeg: number) => number }) {
  return [0, 15, 30, 45, 60, 75, 90].map((angleDeg) => (
    <g key={angleDeg}>
      <path
        d={`M${String(x(angleDeg))} ${String(PLOT.bottom)}v${angleDeg % 30 === 0 ? '8' : '5'}`}
        stroke="var(--edge)"
      />
      {angleDeg % 30 === 0 ? (
        <text x={x(angleDeg)} y={PLOT.bottom + 25} textAnchor="middle" fill="var(--ink-soft)">
          {`${String(angleDeg)}°`}
        </text>
      ) : null}
    </g>
  ))
}
