'use client'

import { useMemo } from 'react'
import { PieceOutlineShape } from '../ui/piece-outline'
import { RoomMarkShape } from '../ui/room-mark'
import { moistureColour } from './moisture-colour'
import { spread, twoLines } from './rule-layout'
import { type RuleModel, ruleDomain } from './rule-model'

const WIDTH = 358
const RULE_LEFT = 138
const RULE_WIDTH = 38
const RULE_RIGHT = RULE_LEFT + RULE_WIDTH
const PX_PER_PCT = 46
const PAD = 22

/** The moisture rule on a phone: it stands on end, damper up, rooms to the left and pieces to the right. */
export function MoistureRuleTall({ model, isPlain }: { model: RuleModel; isPlain: boolean }) {
  const domain = useMemo(() => ruleDomain(model), [model])
  const [low, high] = domain
  const scale = Math.min(PX_PER_PCT, 560 / (high - low))
  const length = (high - low) * scale
  const height = length + 2 * PAD
  const y = (mcPct: number) => PAD + (high - mcPct) * scale
  const whole = Array.from({ length: high - low + 1 }, (_, step) => low + step)

  const flags = [...model.flags].sort((a, b) => b.emcPct - a.emcPct)
  const flagAt = spread(
    flags.map((flag) => ({ at: y(flag.emcPct), size: 38 })),
    0,
    height,
  )
  const brackets = model.brackets.slice(0, 4)
  const bracketX = (index: number) => RULE_RIGHT + 12 + index * 15
  const shelfLeft = RULE_RIGHT + 26 + brackets.length * 15
  const shelf = [...model.shelf]
    .sort((a, b) => b.mcPct - a.mcPct)
    .map((item) => ({ ...item, lines: twoLines(item.sub, WIDTH - shelfLeft - 36) }))
  const shelfAt = spread(
    shelf.map((item) => ({ at: y(item.mcPct), size: 30 + 16 * Math.max(1, item.lines.length) })),
    0,
    height,
  )
  const ticks = Array.from({ length: (high - low) * 10 + 1 }, (_, step) => step)
    .filter((step) => step % 5 === 0 || scale >= 30)
    .map((step) => {
      const long = step % 10 === 0 ? 10 : step % 5 === 0 ? 7 : 4
      const at = y(low + step / 10).toFixed(1)
      return `M${String(RULE_LEFT + (isPlain ? 1 : 5))} ${at}h${String(long)}M${String(RULE_RIGHT - 1)} ${at}h${String(-long)}`
    })
    .join('')

  return (
    <svg
      role="img"
      aria-label={model.sentence}
      viewBox={`0 0 ${String(WIDTH)} ${String(height)}`}
      className="mx-auto mt-2 block w-full max-w-[420px]"
      fontSize="14"
    >
      <g aria-hidden="true">
        <rect
          x={RULE_LEFT}
          y="0.5"
          width={RULE_WIDTH}
          height={height - 1}
          fill="var(--steel)"
          stroke="var(--edge)"
        />
        {isPlain
          ? null
          : whole
              .slice(0, -1)
              .map((pct) => (
                <rect
                  key={pct}
                  x={RULE_LEFT + 1}
                  y={y(pct + 1)}
                  width="4"
                  height={scale + 0.3}
                  fill={moistureColour(pct)}
                />
              ))}
        <path d={ticks} stroke="var(--ink)" fill="none" />
        {whole.slice(1, -1).map((pct) => (
          <text
            key={pct}
            x={RULE_LEFT + RULE_WIDTH / 2 + 2}
            y={y(pct) + 5}
            textAnchor="middle"
            fontWeight="600"
            fontSize="15"
            fill="var(--ink)"
          >
            {pct}
          </text>
        ))}
        {model.bands.map((band) => (
          <g key={band.label}>
            <rect
              x={RULE_LEFT - 11}
              y={y(band.highPct)}
              width="6"
              height={Math.max(2, y(band.lowPct) - y(band.highPct))}
              fill="var(--wash)"
              stroke="var(--heart)"
              strokeWidth="1.5"
            />
            <text
              className="halo"
              x={RULE_LEFT - 15}
              y={bandLabelAt(y(band.highPct), flagAt)}
              textAnchor="end"
              fill="var(--heart)"
            >
              {band.label}
            </text>
          </g>
        ))}
        {model.drop ? (
          <path
            d={`M${String(RULE_RIGHT)} ${String(y(model.drop.emcPct))}H${String(WIDTH)}`}
            stroke="var(--warn)"
            strokeWidth="1.5"
            strokeDasharray="5 4"
          />
        ) : null}
        {flags.map((flag, index) => {
          const heart = flag.tone === 'heart'
          const colour = heart ? 'var(--heart)' : flag.tone === 'soft' ? 'var(--ink-soft)' : 'var(--ink)'
          const at = flagAt[index] ?? y(flag.emcPct)
          return (
            <g key={flag.id} style={{ color: colour }}>
              <path
                d={`M${String(RULE_LEFT - 26)} ${at.toFixed(1)}L${String(RULE_LEFT - 16)} ${y(flag.emcPct).toFixed(1)}H${String(RULE_LEFT)}`}
                stroke={colour}
                strokeWidth={heart ? 3 : 1.5}
                fill="none"
              />
              <g transform={`translate(${String(RULE_LEFT - 8)} ${y(flag.emcPct).toFixed(1)})`}>
                <RoomMarkShape mark={flag.mark} />
              </g>
              <text
                className="halo"
                x={RULE_LEFT - 30}
                y={at - 2}
                textAnchor="end"
                fontWeight="600"
                fill={heart ? colour : 'var(--ink)'}
                {...fit(flag.name, 106)}
              >
                {flag.name}
              </text>
              <text
                className="halo"
                x={RULE_LEFT - 30}
                y={at + 14}
                textAnchor="end"
                fill={flag.tone === 'soft' ? colour : 'var(--ink)'}
                {...fit(flag.value, 106)}
              >
                {flag.value}
              </text>
            </g>
          )
        })}
        {brackets.map((bracket, index) => {
          const at = bracketX(index)
          const from = Math.min(y(bracket.lowPct), height - 3)
          const to = Math.max(y(bracket.highPct), 16)
          return (
            <g key={bracket.id}>
              <path
                d={`M${String(at)} ${String(from)}V${String(to)}m-4 0h8M${String(at - 4)} ${String(from)}h8`}
                stroke="var(--ink)"
                strokeWidth="1.5"
              />
              {bracket.leftToPct === undefined ? null : (
                <path
                  d={`M${String(at)} ${String(y(bracket.atPct))}V${String(Math.max(y(bracket.leftToPct), 16))}`}
                  stroke="var(--damp)"
                  strokeWidth="4"
                />
              )}
              <circle cx={at} cy={y(bracket.atPct)} r="4" fill="var(--ink)" />
              <text
                className="halo"
                x={shortName(bracket.label).length > 5 ? at - 5 : at}
                y={to - 5}
                textAnchor={shortName(bracket.label).length > 5 ? 'start' : 'middle'}
                fontWeight="600"
                fontSize="13"
                fill="var(--ink)"
              >
                {shortName(bracket.label)}
              </text>
            </g>
          )
        })}
        {shelf.map((item, index) => {
          const at = shelfAt[index] ?? y(item.mcPct)
          return (
            <g key={item.id} style={{ color: 'var(--ink)' }}>
              <path
                d={`M${String(RULE_RIGHT)} ${y(item.mcPct).toFixed(1)}H${String(shelfLeft - 16)}L${String(shelfLeft)} ${at.toFixed(1)}`}
                stroke="var(--ink-soft)"
                fill="none"
              />
              <g transform={`translate(${String(shelfLeft + 3)} ${(at - 17).toFixed(1)}) scale(0.7)`}>
                <PieceOutlineShape outline={item.outline} isOut={item.isOut} />
              </g>
              <text className="halo" x={shelfLeft + 36} y={at - 2} fontWeight="600" fill="var(--ink)">
                {item.label}
              </text>
              {item.lines.map((line, row) => (
                <text
                  key={line}
                  className="halo"
                  x={shelfLeft + 36}
                  y={at + 14 + 16 * row}
                  fill="var(--ink-soft)"
                >
                  {line}
                </text>
              ))}
            </g>
          )
        })}
        {model.drop ? (
          <text className="halo" x={WIDTH} y={y(model.drop.emcPct) - 6} textAnchor="end" fill="var(--warn)">
            given time
          </text>
        ) : null}
      </g>
    </svg>
  )
}

/** "207" of "207, out: 1.0 left, back by 13:35": there is no room for the rest, which the table has. */
const shortName = (label: string) => label.split(/[:,]/)[0] ?? label

/** Squeezes a text that would run out of its place; shorter ones keep their own width. */
function fit(text: string, space: number) {
  return text.length * 6.4 > space ? { textLength: space, lengthAdjust: 'spacingAndGlyphs' as const } : {}
}

/** The band's name stands at its top end, or as far below as the words of the flags need. */
function bandLabelAt(top: number, taken: readonly number[]): number {
  let at = top + 10
  while (taken.some((flag) => at > flag - 20 && at < flag + 30)) at += 4
  return at
}
