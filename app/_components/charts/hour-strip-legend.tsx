import { useId } from 'react'
import type { HourState, StripCell } from '@/lib/forecast/strip-view'
import { Hatch } from './hatch'
import { stripKinds } from './hour-strip-model'

const WORDS: Readonly<Record<HourState, string>> = {
  fit: 'fit as it is',
  tolerable: 'tolerable',
  unfit: 'unfit',
}

/** Only what is in the strip is explained. */
export function HourStripLegend({
  cells,
  litAtTime,
}: {
  cells: readonly StripCell[]
  litAtTime: string | null
}) {
  const { states, ifLit } = stripKinds(cells)
  return (
    <ul className="mt-2 flex flex-wrap gap-x-5 gap-y-1 text-label">
      {states.map((state) => (
        <li key={state} className="flex items-center gap-2">
          <Key state={state} />
          {WORDS[state]}
        </li>
      ))}
      {ifLit.map((state) => (
        <li key={`${state} lit`} className="flex items-center gap-2">
          <Key state={state} isLit />
          {state} if you light it at {litAtTime}
        </li>
      ))}
    </ul>
  )
}

const HIGH: Readonly<Record<HourState, number>> = { fit: 18, tolerable: 9, unfit: 5 }
const COLOUR: Readonly<Record<HourState, string>> = {
  fit: 'var(--good)',
  tolerable: 'var(--mid)',
  unfit: 'var(--ink-soft)',
}

function Key({ state, isLit = false }: { state: HourState; isLit?: boolean }) {
  const id = useId()
  const high = HIGH[state]
  const isHatched = isLit || state === 'unfit'
  return (
    <svg width="14" height="18" aria-hidden="true">
      <defs>
        <Hatch id={id} colour={COLOUR[state]} gap={5} />
      </defs>
      <rect y={18 - high} width="14" height={high} fill={isHatched ? `url(#${id})` : COLOUR[state]} />
      {isLit ? (
        <rect x="0.5" y={18.5 - high} width="13" height={high - 1} fill="none" stroke={COLOUR[state]} />
      ) : null}
    </svg>
  )
}
