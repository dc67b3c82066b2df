'use client'

import { useMemo } from 'react'
import { RoomMarkShape } from '../ui/room-mark'
import { RULE_HEIGHT, RuleBody } from './rule-body'
import { RuleBracketLine } from './rule-bracket-line'
import { placeLabels, textWidth } from './rule-layout'
import { type RuleModel, ruleDomain } from './rule-model'
import { RuleShelf } from './rule-shelf'

/** Room for the hanging hole before the scale and for the unit after it; a narrow rule has neither. */
const ENDS = { wide: [56, 62], narrow: [16, 16] } as const
const NARROW = 480
const LEVEL = 42
const ROW = 20
const SHELF_DROP = 128

type Scale = (mcPct: number) => number

/** The moisture rule across the page: rooms hang from its top edge, pieces stand below. */
export function MoistureRuleWide({
  model,
  width,
  isPlain,
}: {
  model: RuleModel
  width: number
  isPlain: boolean
}) {
  const domain = useMemo(() => ruleDomain(model), [model])
  const x = useMemo<Scale>(() => {
    const [low, high] = domain
    const [before, after] = width < NARROW ? ENDS.narrow : ENDS.wide
    return (mcPct) => before + ((mcPct - low) / (high - low)) * (width - before - after)
  }, [domain, width])
  const flags = useMemo(() => {
    const sorted = [...model.flags].sort((a, b) => a.emcPct - b.emcPct)
    const labels = sorted.map((flag) => ({
      x: x(flag.emcPct),
      width: Math.max(textWidth(flag.name, true), textWidth(flag.value)) + 4,
    }))
    return placeLabels(labels, width).flatMap((place, index) => {
      const flag = sorted[index]
      return flag ? [{ ...flag, ...place, x: x(flag.emcPct) }] : []
    })
  }, [model.flags, x, width])

  const levels = Math.max(0, ...flags.map((flag) => flag.level)) + 1
  const top = flags.length === 0 ? 4 : 24 + LEVEL * levels
  const bottom = top + RULE_HEIGHT
  const dropRow = freeRowForDrop(model, x)
  const rows = Math.max(model.brackets.length, model.drop ? dropRow + 2 : 0)
  const below = bottom + rows * ROW + 8
  const shelfAt = below + SHELF_DROP
  const height = model.shelf.length > 0 ? shelfAt + 46 : rows > 0 ? below + 6 : bottom + 2

  return (
    <svg
      role="img"
      aria-label={model.sentence}
      viewBox={`0 0 ${String(width)} ${String(height)}`}
      className="mt-2 block w-full"
      fontSize="14"
    >
      <g aria-hidden="true">
        {model.shelf.length > 0 ? (
          <RuleShelf model={model} x={x} width={width} bottom={bottom} below={below} shelfAt={shelfAt} />
        ) : null}
        {model.bands.map((band) => (
          <g key={band.label}>
            <rect
              x={x(band.lowPct)}
              y={top - 12}
              width={Math.max(2, x(band.highPct) - x(band.lowPct))}
              height="6"
              fill="var(--wash)"
              stroke="var(--heart)"
              strokeWidth="1.5"
            />
            <BandWords
              from={x(band.lowPct)}
              to={x(band.highPct)}
              y={top - 5}
              words={band.label}
              taken={flags.map((flag) => flag.x)}
            />
          </g>
        ))}
        <RuleBody width={width} top={top} domain={domain} x={x} isPlain={isPlain} isNarrow={width < NARROW} />
        {model.drop ? (
          <g>
            <path
              d={`M${String(x(model.drop.emcPct))} ${String(bottom)}V${String(model.shelf.length > 0 ? shelfAt : below)}`}
              stroke="var(--warn)"
              strokeWidth="1.5"
              strokeDasharray="5 4"
            />
            <DropWords model={model} x={x} width={width} y={bottom + ROW * (dropRow + 1) + 2} />
          </g>
        ) : null}
        {model.brackets.map((bracket, row) => (
          <RuleBracketLine
            key={bracket.id}
            bracket={bracket}
            x={x}
            width={width}
            y={bottom + ROW * row + 16}
          />
        ))}
        {flags.map((flag) => {
          const heart = flag.tone === 'heart'
          const colour = heart ? 'var(--heart)' : flag.tone === 'soft' ? 'var(--ink-soft)' : 'var(--ink)'
          const nameAt = top - 38 - LEVEL * flag.level
          const textAt = flag.side === 'right' ? flag.x + 8 : flag.x - 8
          const anchor = flag.side === 'right' ? 'start' : 'end'
          return (
            <g key={flag.id} className="moves" style={{ color: colour }}>
              <path
                d={`M${String(flag.x)} ${String(nameAt - 12)}V${String(top)}`}
                stroke={colour}
                strokeWidth={heart ? 3 : 1.5}
              />
              {flag.doubtPct === undefined ? null : (
                <path
                  d={`M${String(x(flag.emcPct - flag.doubtPct))} ${String(top - 9)}v-4m0 4v4m0-4H${String(x(flag.emcPct + flag.doubtPct))}m0-4v8`}
                  stroke={colour}
                  strokeWidth="1.5"
                  strokeDasharray="3 3"
                  fill="none"
                />
              )}
              <g transform={`translate(${String(flag.x)} ${String(top - 8)})`}>
                <RoomMarkShape mark={flag.mark} r={5.5} />
              </g>
              <text
                className="halo"
                x={textAt}
                y={nameAt}
                textAnchor={anchor}
                fontWeight="600"
                fill={heart ? colour : 'var(--ink)'}
              >
                {flag.name}
              </text>
              <text
                className="halo"
                x={textAt}
                y={nameAt + 16}
                textAnchor={anchor}
                fill={flag.tone === 'soft' ? colour : 'var(--ink)'}
              >
                {flag.value}
              </text>
            </g>
          )
        })}
      </g>
    </svg>
  )
}

type BandWordsProps = { from: number; to: number; y: number; words: string; taken: readonly number[] }

/** A band's name stands after its end, or before its start where a flag hangs in the way. */
function BandWords({ from, to, y, words, taken }: BandWordsProps) {
  const width = textWidth(words) + 16
  const isFree = (low: number, high: number) => low > 0 && !taken.some((at) => at > low && at < high)
  const onLeft = !isFree(to, to + width) && isFree(from - width, from)
  return (
    <text
      className="halo"
      x={onLeft ? from - 7 : to + 7}
      y={y}
      textAnchor={onLeft ? 'end' : 'start'}
      fill="var(--heart)"
    >
      {words}
    </text>
  )
}

/** The first row from which the drop's two lines of words have a free way to the right. */
function freeRowForDrop(model: RuleModel, x: Scale): number {
  const { drop } = model
  if (!drop) return 0
  let row = 0
  model.brackets.forEach((bracket, index) => {
    const reaches = x(bracket.highPct) + 16 + textWidth(bracket.label, true)
    if (reaches > x(drop.emcPct)) row = index + 1
  })
  return row
}

function DropWords({ model, x, width, y }: { model: RuleModel; x: Scale; width: number; y: number }) {
  const { drop } = model
  if (!drop) return null
  const at = x(drop.emcPct)
  const isLeft = at + 10 + Math.max(textWidth(drop.strong, true), textWidth(drop.soft)) > width
  const anchor = isLeft ? 'end' : 'start'
  const textAt = isLeft ? at - 10 : at + 10
  return (
    <>
      <text className="halo" x={textAt} y={y} textAnchor={anchor} fontWeight="600" fill="var(--ink)">
        {drop.strong}
      </text>
      <text className="halo" x={textAt} y={y + ROW} textAnchor={anchor} fill="var(--ink-soft)">
        {drop.soft}
      </text>
    </>
  )
}
