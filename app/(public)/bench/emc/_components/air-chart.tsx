'use client'

import { useId, useMemo, useRef } from 'react'
import { FigureFrame, FigureTable } from '@/app/_components/charts/figure-frame'
import { moistureColour } from '@/app/_components/charts/moisture-colour'
import { useWidth } from '@/app/_components/charts/use-width'
import { formatHumidity, formatTemperature } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { TYPICAL_HUMIDITY_DOUBT_PCT } from '@/lib/wood/emc'
import {
  type AirPoint,
  lineOfEmc,
  lineOfSameAir,
  LINES_PCT,
  temperatureDomain,
  temperatureTicks,
} from './air-chart-model'
import { useAirHandle } from './use-air-handle'

type AirChartProps = {
  air: AirPoint
  /** What the point says: "8.0 °C and 71 % RH: 13.6 % MC". */
  words: string
  /** The same air at another temperature; left out where water would fall out. */
  warmed: AirPoint | undefined
  units: UnitSystem
  onPlace: (air: AirPoint) => void
  /** Steps of the arrow keys: warmer or colder, damper or drier. */
  onStep: (warmer: number, damper: number) => void
}

const HEIGHT = 388
const PLOT = { top: 12, bottom: 360, left: 40, right: 68 }

/** Server and browser differ in the last digits of an exponential, and a figure must not. */
const tenths = (px: number) => Math.round(px * 10) / 10

/** The air as a chart: temperature to the right, humidity upwards, and lines where wood ends at one moisture content. */
export function AirChart({ air, words, warmed, units, onPlace, onStep }: AirChartProps) {
  const ids = useId()
  const [ref, width] = useWidth<HTMLDivElement>(760)
  const svg = useRef<SVGSVGElement>(null)
  const [low, high] = temperatureDomain([air.temperatureC, warmed?.temperatureC ?? air.temperatureC])
  const lines = useMemo(
    () => LINES_PCT.map((pct) => ({ pct, points: lineOfEmc(pct, [low, high]) })),
    [low, high],
  )
  const right = width - PLOT.right
  const x = (temperatureC: number) =>
    tenths(PLOT.left + ((temperatureC - low) / (high - low)) * (right - PLOT.left))
  const y = (humidityPct: number) => tenths(PLOT.bottom - (humidityPct / 100) * (PLOT.bottom - PLOT.top))
  const path = (points: readonly AirPoint[]) =>
    points.map((point) => `${String(x(point.temperatureC))} ${String(y(point.humidityPct))}`).join('L')
  const airAt = (event: { clientX: number; clientY: number }): AirPoint | undefined => {
    const box = svg.current?.getBoundingClientRect()
    if (!box || box.width === 0) return undefined
    const scale = width / box.width
    const share = ((event.clientX - box.left) * scale - PLOT.left) / (right - PLOT.left)
    const up = (PLOT.bottom - (event.clientY - box.top) * scale) / (PLOT.bottom - PLOT.top)
    return { temperatureC: low + share * (high - low), humidityPct: up * 100 }
  }
  const handle = useAirHandle({ air, airAt, onPlace, onStep, words })
  const ticks = temperatureTicks([low, high], units, width < 560)
  const at = { x: x(air.temperatureC), y: y(air.humidityPct) }

  return (
    <FigureFrame
      title="The air"
      aside="where wood ends, by temperature and humidity"
      tableName="Chart as a table"
      table={<AirTable units={units} />}
    >
      <div ref={ref} className="mt-2 [--figure-ground:var(--board)]">
        <svg
          ref={svg}
          role="group"
          aria-label={`Chart of the air. The point stands at ${words}.`}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full select-none"
          fontSize="14"
        >
          <defs>
            <clipPath id={`${ids}-plot`}>
              <rect x={PLOT.left} y={PLOT.top} width={right - PLOT.left} height={PLOT.bottom - PLOT.top} />
            </clipPath>
          </defs>
          <g aria-hidden="true">
            {lines.slice(0, -1).map(({ pct, points }, index) => (
              <path
                key={pct}
                d={`M${path(points)}L${path([...(lines[index + 1]?.points ?? [])].reverse())}Z`}
                fill={moistureColour(pct + 1)}
                opacity="0.16"
              />
            ))}
            {[0, 20, 40, 60, 80, 100].map((humidityPct) => (
              <g key={humidityPct}>
                <path
                  d={`M${String(PLOT.left)} ${String(y(humidityPct))}H${String(right)}`}
                  stroke={humidityPct === 0 ? 'var(--edge)' : 'var(--line)'}
                />
                <text x={PLOT.left - 8} y={y(humidityPct) + 5} textAnchor="end" fill="var(--ink-soft)">
                  {humidityPct}
                </text>
              </g>
            ))}
            {ticks.map(({ temperatureC, text }) => (
              <g key={text}>
                <path d={`M${String(x(temperatureC))} ${String(PLOT.bottom)}v6`} stroke="var(--edge)" />
                <text x={x(temperatureC)} y={PLOT.bottom + 22} textAnchor="middle" fill="var(--ink-soft)">
                  {text}
                </text>
              </g>
            ))}
            <text x={right + 16} y={PLOT.bottom + 22} fill="var(--ink-soft)">
              {units === 'metric' ? '°C' : '°F'}
            </text>
            <text className="halo" x={PLOT.left + 4} y={PLOT.top + 18} fill="var(--ink-soft)">
              % RH
            </text>
            {lines.map(({ pct, points }) => (
              <g key={pct}>
                <path d={`M${path(points)}`} fill="none" stroke="var(--ink-soft)" />
                <text x={right + 8} y={y(points.at(-1)?.humidityPct ?? 0) + 5} fill="var(--ink)">
                  {pct} % MC
                </text>
              </g>
            ))}
            <path
              d={`M${path(lineOfSameAir(air, [low, high]))}`}
              clipPath={`url(#${ids}-plot)`}
              fill="none"
              stroke="var(--ink)"
              strokeWidth="1.5"
              strokeDasharray="6 4"
            />
            {warmed === undefined ? null : (
              <WarmedMark
                x={x(warmed.temperatureC)}
                y={y(warmed.humidityPct)}
                isLast={x(warmed.temperatureC) > right - 120}
              />
            )}
          </g>
          <rect
            x={PLOT.left}
            y={PLOT.top}
            width={right - PLOT.left}
            height={PLOT.bottom - PLOT.top}
            fill="transparent"
            onClick={(event) => {
              const placed = airAt(event)
              if (placed) onPlace(placed)
            }}
          />
          <g {...handle}>
            <circle cx={at.x} cy={at.y} r="24" fill="transparent" />
            <rect
              x={at.x - 4}
              y={y(Math.min(100, air.humidityPct + TYPICAL_HUMIDITY_DOUBT_PCT))}
              width="8"
              height={
                y(Math.max(0, air.humidityPct - TYPICAL_HUMIDITY_DOUBT_PCT)) -
                y(Math.min(100, air.humidityPct + TYPICAL_HUMIDITY_DOUBT_PCT))
              }
              fill="var(--heart)"
              opacity="0.3"
            />
            <circle cx={at.x} cy={at.y} r="8" fill="var(--board)" stroke="var(--heart)" strokeWidth="3" />
            <circle cx={at.x} cy={at.y} r="2.5" fill="var(--heart)" />
          </g>
        </svg>
      </div>
      <figcaption className="text-label text-ink-soft">
        Drag the point, or move it by the arrow keys. Its bar is a sensor’s ±{TYPICAL_HUMIDITY_DOUBT_PCT} %
        RH; the dashed line is the same air warmed or cooled, with no water added.
      </figcaption>
    </FigureFrame>
  )
}

function WarmedMark({ x, y, isLast }: { x: number; y: number; isLast: boolean }) {
  return (
    <>
      <circle cx={x} cy={y} r="5" fill="var(--board)" stroke="var(--ink)" strokeWidth="1.5" />
      <text
        className="halo"
        x={isLast ? x - 10 : x + 10}
        y={y - 8}
        textAnchor={isLast ? 'end' : 'start'}
        fontWeight="600"
        fill="var(--ink)"
      >
        the same air
      </text>
    </>
  )
}

const TABLE_C = [0, 5, 10, 15, 20, 25, 30]

function AirTable({ units }: { units: UnitSystem }) {
  return (
    <FigureTable
      caption="Humidity that holds wood at a moisture content, by temperature"
      heads={['To hold wood at', ...TABLE_C.map((temperatureC) => formatTemperature(temperatureC, units))]}
      rows={LINES_PCT.map((pct) => [
        `${String(pct)} % MC`,
        ...TABLE_C.map((temperatureC) => {
          const found = lineOfEmc(pct, [temperatureC, temperatureC])[0]
          return found === undefined ? 'none' : formatHumidity(found.humidityPct)
        }),
      ])}
    />
  )
}
