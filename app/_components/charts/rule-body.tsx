import { moistureColour } from './moisture-colour'

type RuleBodyProps = {
  /** From where to where the steel reaches, px. */
  width: number
  top: number
  domain: readonly [number, number]
  x: (mcPct: number) => number
  /** No colour while nothing has been read. */
  isPlain: boolean
  /** No hole and no unit, and only the larger ticks. */
  isNarrow: boolean
}

export const RULE_HEIGHT = 54
const BAND = 5

/** The steel: a hanging hole, the moisture band on its top edge, ticks of 0.1, 0.5 and 1 % MC on both edges, numerals. */
export function RuleBody({ width, top, domain, x, isPlain, isNarrow }: RuleBodyProps) {
  const [low, high] = domain
  const bottom = top + RULE_HEIGHT
  const whole = Array.from({ length: high - low + 1 }, (_, step) => low + step)
  const perTenth = x(low + 0.1) - x(low)
  const tenths = Array.from({ length: (high - low) * 10 + 1 }, (_, step) => step)
  const tickTo = (step: number) => (step % 10 === 0 ? 13 : step % 5 === 0 ? 9 : 5)
  const tickPath = (edge: number, direction: 1 | -1) =>
    tenths
      .filter((step) => step % 5 === 0 || perTenth >= 3.5)
      .map((step) => `M${x(low + step / 10).toFixed(1)} ${String(edge)}v${String(direction * tickTo(step))}`)
      .join('')

  return (
    <g>
      <rect
        x="0.5"
        y={top + 0.5}
        width={width - 1}
        height={RULE_HEIGHT - 1}
        fill="var(--steel)"
        stroke="var(--edge)"
      />
      {isNarrow ? null : (
        <circle cx="20" cy={top + RULE_HEIGHT / 2} r="6" fill="var(--chalk)" stroke="var(--edge)" />
      )}
      {isPlain
        ? null
        : whole
            .slice(0, -1)
            .map((pct) => (
              <rect
                key={pct}
                x={x(pct)}
                y={top + 1}
                width={x(pct + 1) - x(pct) + 0.3}
                height={BAND}
                fill={moistureColour(pct)}
              />
            ))}
      <path d={tickPath(top + (isPlain ? 1 : BAND + 1), 1)} stroke="var(--ink)" strokeWidth="1" fill="none" />
      <path d={tickPath(bottom - 1, -1)} stroke="var(--ink)" strokeWidth="1" fill="none" />
      {whole.slice(isNarrow ? 1 : 0, -1).map((pct) => (
        <text
          key={pct}
          x={x(pct)}
          y={top + RULE_HEIGHT / 2 + 7}
          textAnchor="middle"
          fontSize={isNarrow ? 16 : 18}
          fontWeight="600"
          fill="var(--ink)"
        >
          {pct}
        </text>
      ))}
      {isNarrow ? null : (
        <text
          x={width - 8}
          y={top + RULE_HEIGHT / 2 + 6}
          textAnchor="end"
          fontSize="14"
          fontWeight="600"
          fill="var(--ink-soft)"
        >
          % MC
        </text>
      )}
    </g>
  )
}
