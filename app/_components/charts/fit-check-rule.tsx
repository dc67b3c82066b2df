'use client'

import type { FitCheck, FitCheckInput } from '@/lib/fit/fit-check'
import { stretchWords } from '@/lib/fit/fit-check-words'
import type { FitStretch } from '@/lib/fit/fit-stretches'
import { formatEmc, formatEmcFigure } from '@/lib/format/figures'
import { FigureFrame, FigureTable } from './figure-frame'
import { fitCheckSpan, ruleTicks } from './fit-check-model'
import { moistureColour } from './moisture-colour'
import { textWidth } from './rule-layout'
import { useWidth } from './use-width'

type FitCheckRuleProps = {
  input: FitCheckInput
  check: FitCheck & { kind: 'verdict' }
  /** What the piece is called beside its dot: "230 now", "the piece now". */
  pieceName?: string
  title?: string
}

const HEIGHT = 196
const BODY = { top: 62, bottom: 108 }
const STRETCH_Y = 124
const EDGE = 14

/** A short rule: the home's year above, what to do at each moisture content below, the piece a dot with its doubt. */
export function FitCheckRule({
  input,
  check,
  pieceName = 'The piece now',
  title = 'May I cut the fit?',
}: FitCheckRuleProps) {
  const [ref, width] = useWidth<HTMLDivElement>(720)
  const span = fitCheckSpan(input, check)
  const x = (mcPct: number) =>
    EDGE +
    ((Math.min(span.to, Math.max(span.from, mcPct)) - span.from) / (span.to - span.from)) * (width - 2 * EDGE)
  const { target, mcPct, mcDoubtPct } = input
  const targetName = target.basis === 'home' ? 'The home it is for' : 'The room it is kept in'
  const inSight = check.stretches.filter(
    ({ fromMcPct, toMcPct }) => toMcPct > span.from && fromMcPct < span.to,
  )
  const pieceWords = `${pieceName}, ${formatEmcFigure(mcPct)} (${formatEmcFigure(Math.max(0, mcPct - mcDoubtPct))} to ${formatEmcFigure(mcPct + mcDoubtPct)})`
  const name = `${targetName}: ${formatEmcFigure(target.lowMcPct)} to ${formatEmc(target.highMcPct)} in a year. ${pieceWords}.`

  return (
    <FigureFrame
      title={title}
      aside={target.basis === 'home' ? 'Judged against the home it is for' : 'Judged against its keep room'}
      tableName="Rule as a table"
      table={
        <FigureTable
          caption="What to do at each moisture content"
          heads={['From', 'To', 'What to do']}
          rows={check.stretches.map(({ kind, fromMcPct, toMcPct }) => [
            formatEmc(fromMcPct),
            formatEmc(toMcPct),
            stretchWords[kind],
          ])}
        />
      }
    >
      <div ref={ref} className="[--figure-ground:var(--board)]">
        <svg
          role="img"
          aria-label={name}
          viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
          className="block w-full"
          fontSize="14"
        >
          <g aria-hidden="true">
            <Year target={target} name={targetName} x={x} width={width} />
            <rect
              x="1"
              y={BODY.top}
              width={width - 2}
              height={BODY.bottom - BODY.top}
              fill="var(--steel)"
              stroke="var(--edge)"
            />
            <MoistureBand span={span} x={x} />
            {ruleTicks(span, width).map(({ mcPct: tick, length, label }) => (
              <g key={tick}>
                <path
                  d={`M${String(x(tick))} ${String(BODY.bottom)}v${String(-length)}`}
                  stroke="var(--ink)"
                />
                {label && x(tick) > 20 && x(tick) < width - 60 ? (
                  <text
                    x={x(tick)}
                    y={BODY.bottom - 19}
                    textAnchor="middle"
                    fontWeight="600"
                    fill="var(--ink)"
                  >
                    {label}
                  </text>
                ) : null}
              </g>
            ))}
            <text x={width - 8} y={BODY.bottom - 19} textAnchor="end" fill="var(--ink)">
              % MC
            </text>
            <Piece mcPct={mcPct} mcDoubtPct={mcDoubtPct} words={pieceWords} x={x} width={width} />
            {inSight.map((stretch) => (
              <Stretch key={`${stretch.kind}-${String(stretch.fromMcPct)}`} stretch={stretch} x={x} />
            ))}
            <circle
              cx={x(mcPct)}
              cy={STRETCH_Y}
              r="6"
              fill="var(--ink)"
              stroke="var(--board)"
              strokeWidth="1.5"
            />
          </g>
        </svg>
      </div>
    </FigureFrame>
  )
}

type X = { x: (mcPct: number) => number }

function Year({
  target,
  name,
  x,
  width,
}: X & { target: FitCheckInput['target']; name: string; width: number }) {
  const at = x(target.middleMcPct)
  const words = `${formatEmcFigure(target.middleMcPct)}, its year’s middle`
  const room = Math.max(textWidth(name, true), textWidth(words, false)) + 12
  const onLeft = at - room > 0 || at > width / 2
  const text = { x: onLeft ? at - 8 : at + 8, textAnchor: onLeft ? 'end' : 'start' } as const
  return (
    <g>
      <text {...text} y="16" fontWeight="600" fill="var(--heart)">
        {name}
      </text>
      <text {...text} y="36" fill="var(--ink)">
        {words}
      </text>
      <rect
        x={x(target.lowMcPct)}
        y="48"
        width={Math.max(2, x(target.highMcPct) - x(target.lowMcPct))}
        height="7"
        fill="var(--wash)"
        stroke="var(--heart)"
        strokeWidth="1.5"
      />
      <path d={`M${String(at)} 6V${String(BODY.top)}`} stroke="var(--heart)" strokeWidth="3" />
    </g>
  )
}

/** The top edge in the colours of moisture, in flat steps of 1 % MC. */
function MoistureBand({ span, x }: X & { span: { from: number; to: number } }) {
  const first = Math.floor(span.from)
  return Array.from({ length: Math.ceil(span.to) - first }, (_, n) => first + n).map((mcPct) => (
    <rect
      key={mcPct}
      x={x(mcPct)}
      y={BODY.top}
      width={Math.max(0, x(mcPct + 1) - x(mcPct))}
      height="5"
      fill={moistureColour(mcPct)}
    />
  ))
}

const looks: Readonly<
  Record<FitStretch['kind'], { colour: string; dash: string | undefined; weight: number }>
> = {
  'cut-snug': { colour: 'var(--good)', dash: '12 3', weight: 600 },
  cut: { colour: 'var(--good)', dash: undefined, weight: 600 },
  'cut-easy': { colour: 'var(--ink)', dash: '7 4', weight: 600 },
  rest: { colour: 'var(--warn)', dash: '2 4', weight: 600 },
}

/** Told apart by dash as well as by colour; named where the name fits. The table names them all. */
function Stretch({ stretch, x }: X & { stretch: FitStretch }) {
  const { colour, dash, weight } = looks[stretch.kind]
  const from = x(stretch.fromMcPct) + 1
  const to = x(stretch.toMcPct) - 1
  const words = stretchWords[stretch.kind]
  return (
    <g>
      <path
        d={`M${String(from)} ${String(STRETCH_Y)}H${String(Math.max(from, to))}`}
        stroke={colour}
        strokeWidth="3"
        strokeDasharray={dash}
      />
      {to - from > textWidth(words, true) + 6 ? (
        <text
          className="halo"
          x={(from + to) / 2}
          y={STRETCH_Y + 20}
          textAnchor="middle"
          fontWeight={weight}
          fill={colour}
        >
          {words}
        </text>
      ) : null}
    </g>
  )
}

type PieceProps = X & { mcPct: number; mcDoubtPct: number; words: string; width: number }

function Piece({ mcPct, mcDoubtPct, words, x, width }: PieceProps) {
  const at = x(mcPct)
  const half = textWidth(words, true) / 2
  const textX = Math.min(width - half - 4, Math.max(half + 4, at))
  return (
    <g>
      <path
        d={`M${String(at)} ${String(STRETCH_Y)}V${String(HEIGHT - 34)}`}
        stroke="var(--ink-soft)"
        strokeWidth="1.5"
      />
      <path
        d={`M${String(x(mcPct - mcDoubtPct))} ${String(HEIGHT - 34)}H${String(x(mcPct + mcDoubtPct))}`}
        stroke="var(--ink)"
        strokeWidth="6"
        opacity="0.35"
      />
      <text className="halo" x={textX} y={HEIGHT - 10} textAnchor="middle" fontWeight="600" fill="var(--ink)">
        {words}
      </text>
    </g>
  )
}
