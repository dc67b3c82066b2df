import { RoomMarkShape } from '../ui/room-mark'
import { moistureColour } from './moisture-colour'
import { type RuleModel, ruleDomain } from './rule-model'

const WIDTH = 320

/** The rule folded to a line: its band and its rooms' marks. What it shows is said in the words beside it. */
export function RuleStrip({ model }: { model: RuleModel }) {
  const [low, high] = ruleDomain(model)
  const x = (mcPct: number) => 8 + ((mcPct - low) / (high - low)) * (WIDTH - 16)
  const whole = Array.from({ length: high - low }, (_, step) => low + step)
  const shown = model.flags.filter((flag) => flag.tone !== 'soft')
  return (
    <svg aria-hidden="true" viewBox={`0 0 ${String(WIDTH)} 34`} className="block w-full">
      <rect x="0.5" y="18.5" width={WIDTH - 1} height="14" fill="var(--steel)" stroke="var(--edge)" />
      {whole.map((pct) => (
        <rect
          key={pct}
          x={x(pct)}
          y="19"
          width={x(pct + 1) - x(pct) + 0.3}
          height="4"
          fill={moistureColour(pct)}
        />
      ))}
      <path
        d={whole.map((pct) => `M${String(x(pct))} 32v-6`).join('')}
        stroke="var(--ink)"
        strokeWidth="1"
        fill="none"
      />
      {shown.map((flag) => (
        <g
          key={flag.id}
          transform={`translate(${String(x(flag.emcPct))} 10)`}
          style={{ color: flag.tone === 'heart' ? 'var(--heart)' : 'var(--ink)' }}
        >
          <RoomMarkShape mark={flag.mark} r={5} />
        </g>
      ))}
    </svg>
  )
}
