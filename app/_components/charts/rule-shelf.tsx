import { PieceOutlineShape } from '../ui/piece-outline'
import { spread, textWidth } from './rule-layout'
import type { RuleModel } from './rule-model'

type RuleShelfProps = {
  model: RuleModel
  x: (mcPct: number) => number
  width: number
  bottom: number
  below: number
  shelfAt: number
}

/** Pieces on their shelf line, each led up to its place on the scale by a line that bends once. */
export function RuleShelf({ model, x, width, bottom, below, shelfAt }: RuleShelfProps) {
  const items = [...model.shelf].sort((a, b) => a.mcPct - b.mcPct)
  const middles = spread(
    items.map((item) => ({
      at: x(item.mcPct),
      size: Math.max(60, textWidth(item.label, true) + 16, textWidth(item.sub) + 16),
    })),
    0,
    width,
  )
  return (
    <g>
      <path d={`M0 ${String(shelfAt)}H${String(width)}`} stroke="var(--edge)" />
      {items.map((item, index) => {
        const at = middles[index] ?? x(item.mcPct)
        const mc = x(item.mcPct)
        const capTop = shelfAt - (item.outline === 'low' ? 40 : 48)
        return (
          <g key={item.id} className="moves" style={{ color: 'var(--ink)' }}>
            <path
              d={`M${mc.toFixed(1)} ${String(bottom)}V${String(below + 38)}L${at.toFixed(1)} ${String(capTop)}`}
              stroke="var(--ink-soft)"
              strokeWidth="1"
              fill="none"
            />
            {item.count > 1 ? (
              <g
                transform={`translate(${String(at - 9)} ${String(shelfAt - 44)}) scale(0.9)`}
                style={{ color: 'var(--edge)' }}
              >
                <PieceOutlineShape outline={item.outline} />
              </g>
            ) : null}
            <g transform={`translate(${String(at - 20)} ${String(shelfAt - 48)})`}>
              <PieceOutlineShape outline={item.outline} isOut={item.isOut} />
            </g>
            <text
              className="halo"
              x={at}
              y={shelfAt + 19}
              textAnchor="middle"
              fontWeight="600"
              fill="var(--ink)"
            >
              {item.label}
            </text>
            <text className="halo" x={at} y={shelfAt + 37} textAnchor="middle" fill="var(--ink-soft)">
              {item.sub}
            </text>
          </g>
        )
      })}
    </g>
  )
}
