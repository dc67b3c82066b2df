import { textWidth } from './rule-layout'
import type { RuleBracket } from './rule-model'

/** How far a piece may move from where its joint was cut, and where it is now. */
export function RuleBracketLine({
  bracket,
  x,
  width,
  y,
}: {
  bracket: RuleBracket
  x: (mcPct: number) => number
  width: number
  y: number
}) {
  const edge = { low: 8, high: width - 8 }
  const from = Math.max(x(bracket.lowPct), edge.low)
  const to = Math.min(x(bracket.highPct), edge.high)
  const endOf = (at: number, isOpen: boolean, direction: 1 | -1) =>
    isOpen
      ? `M${String(at + 5 * direction)} ${String(y - 5)}L${String(at)} ${String(y)}L${String(at + 5 * direction)} ${String(y + 5)}`
      : `M${String(at)} ${String(y - 6)}v12`
  const words = textWidth(bracket.label, true)
  const onRight = to + 10 + words <= width
  const dot = x(bracket.atPct)
  return (
    <g>
      <path
        d={`M${String(from)} ${String(y)}H${String(to)}${endOf(from, x(bracket.lowPct) < edge.low, 1)}${endOf(to, x(bracket.highPct) > edge.high, -1)}`}
        stroke="var(--ink)"
        strokeWidth="1.5"
        fill="none"
      />
      {bracket.cutPct === undefined ? null : (
        <path d={`M${String(x(bracket.cutPct))} ${String(y - 4)}v8`} stroke="var(--ink)" strokeWidth="1.5" />
      )}
      {bracket.leftToPct === undefined ? null : (
        <path
          className="moves"
          d={`M${String(dot)} ${String(y)}H${String(Math.min(x(bracket.leftToPct), edge.high))}`}
          stroke="var(--damp)"
          strokeWidth="4"
        />
      )}
      <circle className="moves" cx={dot} cy={y} r="4.5" fill="var(--ink)" />
      <text
        className="halo"
        x={onRight ? to + 10 : from - 10}
        y={y + 5}
        textAnchor={onRight ? 'start' : 'end'}
        fontWeight="600"
        fill="var(--ink)"
      >
        {bracket.label}
      </text>
    </g>
  )
}
