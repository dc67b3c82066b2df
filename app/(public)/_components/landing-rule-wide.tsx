'use client'

import { type PointerEvent, useRef } from 'react'
import { RULE_HEIGHT, RuleBody } from '@/app/_components/charts/rule-body'
import { PieceOutlineShape } from '@/app/_components/ui/piece-outline'
import { RoomMarkShape } from '@/app/_components/ui/room-mark'
import { formatEmc, formatEmcFigure } from '@/lib/format/figures'
import { bindingEnd, boxRange, type LandingModel } from './landing-model'
import { useBoxHandle } from './use-box-handle'

const BEFORE = 56
const AFTER = 62
const RULE_TOP = 46
const RULE_BOTTOM = RULE_TOP + RULE_HEIGHT
const BRACKET_Y = RULE_BOTTOM + 20
const SHELF_Y = RULE_BOTTOM + 142
const HEIGHT = SHELF_Y + 46

type LandingRuleProps = {
  model: LandingModel
  width: number
  sentence: string
  valueText: string
  onMove: (mcPct: number) => void
}

/** The moisture rule with one box on its shelf that can be dragged from the house's air towards the shop's. */
export function LandingRuleWide({ model, width, sentence, valueText, onMove }: LandingRuleProps) {
  const svg = useRef<SVGSVGElement>(null)
  const { carry, mcPct, domain } = model
  const [low, high] = domain
  const x = (value: number) => BEFORE + ((value - low) / (high - low)) * (width - BEFORE - AFTER)
  const mcAt = (event: PointerEvent<SVGGElement>) => {
    const box = svg.current?.getBoundingClientRect()
    if (!box || box.width === 0) return undefined
    const at = ((event.clientX - box.left) / box.width) * width
    return low + ((at - BEFORE) / (width - BEFORE - AFTER)) * (high - low)
  }
  const handle = useBoxHandle({
    mcPct,
    range: boxRange(carry),
    mcAt,
    onMove,
    valueText,
    orientation: 'horizontal',
  })
  const isDamper = carry.shopEmcPct >= carry.houseEmcPct
  const end = bindingEnd(carry)
  const endX = x(Math.min(high, Math.max(low, end)))
  const from = Math.max(x(carry.lowMcPct), 8)
  const to = Math.min(x(carry.highMcPct), width - 8)
  const boxX = x(mcPct)

  return (
    <svg
      ref={svg}
      role="group"
      aria-label={sentence}
      viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
      className="block w-full select-none"
      fontSize="14"
    >
      <g aria-hidden="true">
        <Flag
          at={x(carry.houseEmcPct)}
          name="The house"
          emcPct={carry.houseEmcPct}
          mark={0}
          isHeart
          side={isDamper ? 'left' : 'right'}
        />
        <Flag
          at={x(carry.shopEmcPct)}
          name="The shop"
          emcPct={carry.shopEmcPct}
          mark={3}
          side={isDamper ? 'right' : 'left'}
        />
        <RuleBody width={width} top={RULE_TOP} domain={domain} x={x} isPlain={false} isNarrow={false} />
        <path
          d={`M${from.toFixed(1)} ${String(BRACKET_Y)}H${to.toFixed(1)}m0 -6v12M${from.toFixed(1)} ${String(BRACKET_Y - 6)}v12M${x(carry.houseEmcPct).toFixed(1)} ${String(BRACKET_Y - 5)}v10`}
          stroke="var(--ink)"
          strokeWidth="1.5"
        />
        <text
          className="halo"
          x={endX + (isDamper ? 8 : -8)}
          y={BRACKET_Y + 5}
          textAnchor={isDamper ? 'start' : 'end'}
          fontWeight="600"
          fill="var(--ink)"
        >
          its lid may bind past {formatEmcFigure(end)}
        </text>
        <ShopDrop model={model} x={x} />
        <path d={`M0 ${String(SHELF_Y)}H${String(width)}`} stroke="var(--edge)" />
        <path
          d={`M${boxX.toFixed(1)} ${String(BRACKET_Y)}V${String(SHELF_Y - 66)}`}
          stroke="var(--ink-soft)"
        />
        <circle cx={boxX} cy={BRACKET_Y} r="4.5" fill="var(--ink)" />
        <text x={boxX} y={SHELF_Y + 20} textAnchor="middle" fontWeight="600" fill="var(--ink)">
          Drag the box
        </text>
        <text x={boxX} y={SHELF_Y + 38} textAnchor="middle" fill="var(--ink-soft)">
          ash, 62 mm joint
        </text>
      </g>
      <g {...handle}>
        <rect x={boxX - 52} y={SHELF_Y - 78} width="104" height="84" fill="transparent" />
        <rect
          x={boxX - 27}
          y={SHELF_Y - 70}
          width="54"
          height="72"
          fill="var(--chalk)"
          stroke="var(--heart)"
          strokeWidth="3"
        />
        <g
          transform={`translate(${(boxX - 20).toFixed(1)} ${String(SHELF_Y - 58)}) scale(1 1.18)`}
          style={{ color: 'var(--ink)' }}
        >
          <PieceOutlineShape outline="tall" />
        </g>
        <path
          d={`M${(boxX - 34).toFixed(1)} ${String(SHELF_Y - 26)}h-13m5 -5l-5 5l5 5M${(boxX + 34).toFixed(1)} ${String(SHELF_Y - 26)}h13m-5 -5l5 5l-5 5`}
          stroke="var(--heart)"
          strokeWidth="2.25"
          fill="none"
        />
      </g>
    </svg>
  )
}

function ShopDrop({ model, x }: { model: LandingModel; x: (mcPct: number) => number }) {
  const { carry } = model
  if (!carry.timeOut.binds) return null
  const isDamper = carry.shopEmcPct >= carry.houseEmcPct
  const at = x(carry.shopEmcPct)
  const textX = at + (isDamper ? 10 : -10)
  const anchor = isDamper ? 'start' : 'end'
  return (
    <>
      <path
        d={`M${at.toFixed(1)} ${String(RULE_BOTTOM)}V${String(SHELF_Y)}`}
        stroke="var(--warn)"
        strokeWidth="1.5"
        strokeDasharray="5 4"
      />
      <text
        className="halo"
        x={textX}
        y={BRACKET_Y + 34}
        textAnchor={anchor}
        fontWeight="600"
        fill="var(--ink)"
      >
        Given time, wood in the shop ends here:
      </text>
      <text className="halo" x={textX} y={BRACKET_Y + 53} textAnchor={anchor} fill="var(--ink-soft)">
        past where this lid may bind.
      </text>
    </>
  )
}

type FlagProps = {
  at: number
  name: string
  emcPct: number
  mark: number
  isHeart?: boolean
  side: 'left' | 'right'
}

function Flag({ at, name, emcPct, mark, isHeart = false, side }: FlagProps) {
  const colour = isHeart ? 'var(--heart)' : 'var(--ink)'
  const textX = at + (side === 'right' ? 9 : -9)
  const anchor = side === 'right' ? 'start' : 'end'
  return (
    <g style={{ color: colour }}>
      <path d={`M${at.toFixed(1)} 4V${String(RULE_TOP)}`} stroke={colour} strokeWidth={isHeart ? 3 : 1.5} />
      <g transform={`translate(${at.toFixed(1)} ${String(RULE_TOP - 5)})`}>
        <RoomMarkShape mark={mark} />
      </g>
      <text className="halo" x={textX} y="14" textAnchor={anchor} fontWeight="600" fill={colour}>
        {name}
      </text>
      <text className="halo" x={textX} y="31" textAnchor={anchor} fill="var(--ink)">
        {formatEmc(emcPct)}
      </text>
    </g>
  )
}
