'use client'

import { type PointerEvent, useRef } from 'react'
import { moistureColour } from '@/app/_components/charts/moisture-colour'
import { PieceOutlineShape } from '@/app/_components/ui/piece-outline'
import { RoomMarkShape } from '@/app/_components/ui/room-mark'
import { formatEmc, formatEmcFigure } from '@/lib/format/figures'
import { bindingEnd, boxRange, type LandingModel } from './landing-model'
import { useBoxHandle } from './use-box-handle'

const WIDTH = 358
const LEFT = 134
const RULE = 40
const RIGHT = LEFT + RULE
const PAD = 16
const PER_PCT = 40
const BRACKET_X = RIGHT + 14

type LandingRuleProps = {
  model: LandingModel
  sentence: string
  valueText: string
  onMove: (mcPct: number) => void
}

/** The same rule on a phone: it stands on end, damper up. */
export function LandingRuleTall({ model, sentence, valueText, onMove }: LandingRuleProps) {
  const svg = useRef<SVGSVGElement>(null)
  const { carry, mcPct, domain } = model
  const [low, high] = domain
  const perPct = Math.min(PER_PCT, 480 / (high - low))
  const height = (high - low) * perPct + 2 * PAD
  const y = (value: number) => PAD + (high - value) * perPct
  const mcAt = (event: PointerEvent<SVGGElement>) => {
    const box = svg.current?.getBoundingClientRect()
    if (!box || box.height === 0) return undefined
    const at = ((event.clientY - box.top) / box.height) * height
    return high - (at - PAD) / perPct
  }
  const handle = useBoxHandle({
    mcPct,
    range: boxRange(carry),
    mcAt,
    onMove,
    valueText,
    orientation: 'vertical',
  })
  const isDamper = carry.shopEmcPct >= carry.houseEmcPct
  const end = bindingEnd(carry)
  const top = Math.max(y(carry.highMcPct), 6)
  const bottom = Math.min(y(carry.lowMcPct), height - 4)
  const boxY = y(mcPct)
  const whole = Array.from({ length: high - low + 1 }, (_, step) => low + step)
  const ticks = Array.from({ length: (high - low) * 10 + 1 }, (_, step) => {
    const long = step % 10 === 0 ? 10 : step % 5 === 0 ? 7 : 4
    const at = y(low + step / 10).toFixed(1)
    return `M${String(LEFT + 5)} ${at}h${String(long)}M${String(RIGHT - 1)} ${at}h${String(-long)}`
  }).join('')

  return (
    <svg
      ref={svg}
      role="group"
      aria-label={sentence}
      viewBox={`0 0 ${String(WIDTH)} ${String(height)}`}
      className="mx-auto block w-full max-w-[420px] select-none"
      fontSize="14"
    >
      <g aria-hidden="true">
        <rect x={LEFT} y="0.5" width={RULE} height={height - 1} fill="var(--steel)" stroke="var(--edge)" />
        {whole.slice(0, -1).map((pct) => (
          <rect
            key={pct}
            x={LEFT + 1}
            y={y(pct + 1)}
            width="4"
            height={perPct + 0.3}
            fill={moistureColour(pct)}
          />
        ))}
        <path d={ticks} stroke="var(--ink)" fill="none" />
        {whole.slice(1, -1).map((pct) => (
          <text
            key={pct}
            x={LEFT + RULE / 2 + 2}
            y={y(pct) + 5}
            textAnchor="middle"
            fontWeight="600"
            fill="var(--ink)"
          >
            {pct}
          </text>
        ))}
        <Flag at={y(carry.houseEmcPct)} name="The house" emcPct={carry.houseEmcPct} mark={0} isHeart />
        <Flag at={y(carry.shopEmcPct)} name="The shop" emcPct={carry.shopEmcPct} mark={3} />
        <path
          d={`M${String(BRACKET_X)} ${bottom.toFixed(1)}V${top.toFixed(1)}m-5 0h10M${String(BRACKET_X - 5)} ${bottom.toFixed(1)}h10M${String(BRACKET_X - 5)} ${y(carry.houseEmcPct).toFixed(1)}h10`}
          stroke="var(--ink)"
          strokeWidth="1.5"
          fill="none"
        />
        <text
          className="halo"
          x={BRACKET_X - 5}
          y={isDamper ? top - 6 : bottom + 16}
          fontWeight="600"
          fill="var(--ink)"
        >
          may bind past {formatEmcFigure(end)}
        </text>
        {carry.timeOut.binds ? (
          <>
            <path
              d={`M${String(RIGHT)} ${y(carry.shopEmcPct).toFixed(1)}H${String(WIDTH)}`}
              stroke="var(--warn)"
              strokeWidth="1.5"
              strokeDasharray="5 4"
            />
            <text
              className="halo"
              x={BRACKET_X - 2}
              y={y(carry.shopEmcPct) - 24}
              fontWeight="600"
              fill="var(--ink)"
            >
              Given time, wood
            </text>
            <text className="halo" x={BRACKET_X - 2} y={y(carry.shopEmcPct) - 7} fill="var(--ink-soft)">
              in the shop ends here
            </text>
          </>
        ) : null}
        <path d={`M${String(RIGHT)} ${boxY.toFixed(1)}H${String(BRACKET_X + 32)}`} stroke="var(--ink-soft)" />
        <circle cx={BRACKET_X} cy={boxY} r="4.5" fill="var(--ink)" />
      </g>
      <g {...handle}>
        <rect x={BRACKET_X + 24} y={boxY - 44} width="130" height="88" fill="transparent" />
        <rect
          x={BRACKET_X + 32}
          y={boxY - 24}
          width="46"
          height="48"
          fill="var(--chalk)"
          stroke="var(--heart)"
          strokeWidth="3"
        />
        <g
          transform={`translate(${String(BRACKET_X + 38)} ${(boxY - 19).toFixed(1)}) scale(0.82 0.78)`}
          style={{ color: 'var(--ink)' }}
        >
          <PieceOutlineShape outline="tall" />
        </g>
        <path
          d={`M${String(BRACKET_X + 55)} ${(boxY - 29).toFixed(1)}v-12m-5 5l5 -5l5 5M${String(BRACKET_X + 55)} ${(boxY + 29).toFixed(1)}v12m-5 -5l5 5l5 -5`}
          stroke="var(--heart)"
          strokeWidth="2.25"
          fill="none"
        />
      </g>
      <g aria-hidden="true">
        <text className="halo" x={BRACKET_X + 86} y={boxY - 3} fontWeight="600" fill="var(--ink)">
          Drag the box
        </text>
        <text className="halo" x={BRACKET_X + 86} y={boxY + 14} fill="var(--ink-soft)">
          ash, 62 mm
        </text>
      </g>
    </svg>
  )
}

function Flag({
  at,
  name,
  emcPct,
  mark,
  isHeart = false,
}: {
  at: number
  name: string
  emcPct: number
  mark: number
  isHeart?: boolean
}) {
  const colour = isHeart ? 'var(--heart)' : 'var(--ink)'
  return (
    <g style={{ color: colour }}>
      <path
        d={`M${String(LEFT - 24)} ${at.toFixed(1)}H${String(LEFT)}`}
        stroke={colour}
        strokeWidth={isHeart ? 3 : 1.5}
      />
      <g transform={`translate(${String(LEFT - 8)} ${at.toFixed(1)})`}>
        <RoomMarkShape mark={mark} />
      </g>
      <text className="halo" x={LEFT - 30} y={at - 2} textAnchor="end" fontWeight="600" fill={colour}>
        {name}
      </text>
      <text className="halo" x={LEFT - 30} y={at + 15} textAnchor="end" fill="var(--ink)">
        {formatEmc(emcPct)}
      </text>
    </g>
  )
}
