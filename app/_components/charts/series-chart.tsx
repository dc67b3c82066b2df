'use client'

import { useId, useMemo, useState } from 'react'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { formatClock, formatDay, formatMoment } from '@/lib/format/times'
import type { RoomSeries } from '@/lib/rooms/room'
import type { UnitSystem } from '@/lib/sites/site'
import { fahrenheitFromCelsius } from '@/lib/units'
import { FigureFrame, FigureTable } from './figure-frame'
import { axisOf, nearestIndex, seriesGaps, seriesPoints } from './series-model'
import { SeriesPanel } from './series-panel'
import { timeTicks } from './time-ticks'

type SeriesChartProps = {
  series: RoomSeries
  title: string
  /** "Day as a table" */
  tableName: string
  timeZone: string
  units: UnitSystem
  now: Date
}

/** EMC, humidity and temperature of a room under one another in one frame, with one crosshair. */
export function SeriesChart({ series, title, tableName, timeZone, units, now }: SeriesChartProps) {
  const sliderId = useId()
  const points = useMemo(() => seriesPoints(series), [series])
  const gaps = useMemo(() => seriesGaps(series, points), [series, points])
  const [chosen, setChosen] = useState<number | null>(null)
  const from = new Date(series.from).getTime()
  const to = new Date(series.to).getTime()
  const ticks = useMemo(
    () => timeTicks(from, to, timeZone).filter((tick) => tick.label),
    [from, to, timeZone],
  )
  const read = points.filter((point) => point.emc !== null)
  const index = nearestIndex(read, chosen ?? to)
  const point = read[index]
  const moment = (at: number) =>
    series.grain === 'day'
      ? formatDay(new Date(at), timeZone, now)
      : formatMoment(new Date(at), timeZone, now)

  const shownTemperature = (temperatureC: number | null) =>
    temperatureC === null || units === 'metric' ? temperatureC : fahrenheitFromCelsius(temperatureC)
  const panels = [
    {
      key: 'emc',
      name: 'EMC, % MC',
      least: 2,
      value: (p: (typeof points)[number]) => p.emc,
      words: (v: number) => formatEmc(v),
    },
    {
      key: 'humidity',
      name: 'Humidity, % RH',
      least: 8,
      value: (p: (typeof points)[number]) => p.humidity,
      words: (v: number) => formatHumidity(v),
    },
    {
      key: 'temperature',
      name: units === 'metric' ? 'Temperature, °C' : 'Temperature, °F',
      least: 4,
      value: (p: (typeof points)[number]) => shownTemperature(p.temperature),
      words: (v: number) => (units === 'metric' ? formatTemperature(v) : `${v.toFixed(0)}\u00a0°F`),
    },
  ]
  const readout =
    point && point.emc !== null && point.humidity !== null && point.temperature !== null
      ? `${moment(point.at)}: ${formatEmc(point.emc)}, ${formatHumidity(point.humidity)}, ${formatTemperature(point.temperature, units)}`
      : 'No readings in this stretch'

  return (
    <FigureFrame
      title={title}
      aside="Gaps are shown, never joined up"
      tableName={tableName}
      table={
        <FigureTable
          caption={title}
          heads={['Time', 'EMC', 'Humidity', 'Temperature']}
          rows={read.map((p) => [
            moment(p.at),
            p.emc === null ? 'no reading' : formatEmc(p.emc),
            p.humidity === null ? 'no reading' : formatHumidity(p.humidity),
            p.temperature === null ? 'no reading' : formatTemperature(p.temperature, units),
          ])}
        />
      }
    >
      <div
        role="img"
        aria-label={sentence(title, read, gaps.length)}
        className="mt-3 [--figure-ground:var(--board)]"
      >
        <div aria-hidden="true">
          {panels.map((panel, row) => (
            <SeriesPanel
              key={panel.key}
              name={panel.name}
              data={points.map((p) => ({ at: p.at, value: panel.value(p) }))}
              axis={axisOf(points.map(panel.value), panel.least)}
              domain={[from, to]}
              ticks={ticks.map((tick) => tick.at)}
              tickWords={(at) => ticks.find((tick) => tick.at === at)?.label ?? ''}
              gaps={gaps}
              gapWords={
                row === 0
                  ? (gap) =>
                      `${formatClock(new Date(gap.from), timeZone)} to ${formatClock(new Date(gap.to), timeZone)}`
                  : undefined
              }
              at={point?.at}
              atWords={point ? wordsOr(panel.value(point), panel.words) : ''}
              isLast={row === panels.length - 1}
              onPoint={setChosen}
            />
          ))}
        </div>
      </div>
      {read.length > 1 ? (
        <div className="mt-1 flex flex-wrap items-center gap-x-4">
          <label htmlFor={sliderId} className="sr-only">
            Moment to read off
          </label>
          <input
            id={sliderId}
            type="range"
            min={0}
            max={read.length - 1}
            step={1}
            value={index}
            aria-valuetext={readout}
            onChange={(event) => {
              const next = read[Number(event.target.value)]
              if (next) setChosen(next.at)
            }}
            className="ml-11 min-h-11 grow basis-64 accent-heart"
          />
          <output htmlFor={sliderId} className="text-label font-semibold text-heart">
            {readout}
          </output>
        </div>
      ) : (
        <p className="mt-2 text-label text-ink-soft">{readout}.</p>
      )}
    </FigureFrame>
  )
}

const wordsOr = (value: number | null, words: (value: number) => string) =>
  value === null ? '' : words(value)

function sentence(title: string, read: readonly { emc: number | null }[], gaps: number): string {
  const values = read.flatMap((point) => (point.emc === null ? [] : [point.emc]))
  if (values.length === 0) return `${title}: no readings.`
  const holes = gaps === 0 ? 'without a gap' : `with ${String(gaps)} ${gaps === 1 ? 'gap' : 'gaps'}`
  return `${title}: EMC from ${formatEmc(Math.min(...values))} to ${formatEmc(Math.max(...values))}, ${holes}.`
}
