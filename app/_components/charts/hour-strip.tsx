'use client'

import { useId, useState } from 'react'
import { formatEmc, formatTemperature } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { plainText } from '@/lib/format/sentence'
import type { HourStrip } from '@/lib/forecast/strip-view'
import type { UnitSystem } from '@/lib/sites/site'
import { FigureFrame, FigureTable } from './figure-frame'
import { HourStripFigure } from './hour-strip-figure'
import { HourStripLegend } from './hour-strip-legend'
import { cellWords, litState } from './hour-strip-model'

type HourStripChartProps = {
  strip: HourStrip
  /** "The shop, next 48 hours"; left out where the page has said it. */
  title?: string
  /** What the figure is of, for assistive technology: "The shop". */
  roomName: string
  timeZone: string
  units: UnitSystem
  now: Date
  headingLevel?: 2 | 3
}

/** The coming 48 hours of a room, an hour a cell, with the sentence that they come to. */
export function HourStripChart({
  strip,
  title,
  roomName,
  timeZone,
  units,
  now,
  headingLevel = 2,
}: HourStripChartProps) {
  const sliderId = useId()
  const [chosen, setChosen] = useState<number | null>(null)
  const clock = { timeZone, now, units }
  const sentence = (
    <p className="mt-1 max-w-words">
      {strip.words.map((part, index) =>
        part.strong ? <strong key={index}>{part.text}</strong> : <span key={index}>{part.text}</span>,
      )}{' '}
      <span className="text-ink-soft">{strip.note}</span>
    </p>
  )
  if (strip.cells.length === 0)
    return (
      <>
        {title ? <h2 className="text-title font-semibold">{title}</h2> : null}
        {sentence}
      </>
    )
  const cell = chosen === null ? undefined : strip.cells[chosen]
  return (
    <FigureFrame
      title={title}
      tableName="Hours as a table"
      headingLevel={headingLevel}
      table={
        <FigureTable
          caption={`${roomName}, hour by hour`}
          heads={['Hour', 'As it is', 'EMC', 'Temperature', 'If lit']}
          rows={strip.cells.map((one) => [
            formatMoment(one.at, timeZone, now),
            one.state,
            formatEmc(one.emcPct),
            formatTemperature(one.temperatureC, units),
            one.ifLit === null
              ? 'the same'
              : `${litState(one) ?? 'no better'}, ${formatEmc(one.ifLit.emcPct)}`,
          ])}
        />
      }
    >
      {sentence}
      <HourStripLegend cells={strip.cells} litAtTime={strip.lit?.atTime ?? null} />
      <div
        role="img"
        aria-label={`${roomName}, the next 48 hours. ${plainText(strip.words)}`}
        className="mt-3 [--figure-ground:var(--board)]"
      >
        <HourStripFigure strip={strip} timeZone={timeZone} chosen={chosen} onChoose={setChosen} />
      </div>
      <div className="flex flex-wrap items-center gap-x-4">
        <label htmlFor={sliderId} className="sr-only">
          Hour to read off
        </label>
        <input
          id={sliderId}
          type="range"
          min={0}
          max={strip.cells.length - 1}
          step={1}
          value={chosen ?? 0}
          aria-valuetext={cellWords(strip.cells[chosen ?? 0] ?? FIRST, strip.lit, clock)}
          onChange={(event) => {
            setChosen(Number(event.target.value))
          }}
          className="min-h-11 grow basis-64 accent-heart"
        />
        <output htmlFor={sliderId} className="min-h-6 basis-full text-label text-ink-soft">
          {cell ? cellWords(cell, strip.lit, clock) : 'Move along to read an hour off.'}
        </output>
      </div>
    </FigureFrame>
  )
}

const FIRST = {
  at: new Date(0).toISOString(),
  state: 'unfit',
  emcPct: 0,
  temperatureC: 0,
  ifLit: null,
} as const
