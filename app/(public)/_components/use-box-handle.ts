'use client'

import type { KeyboardEvent, PointerEvent } from 'react'

type BoxHandle = {
  mcPct: number
  range: readonly [number, number]
  /** Where on the scale a pointer stands, % MC. */
  mcAt: (event: PointerEvent<SVGGElement>) => number | undefined
  onMove: (mcPct: number) => void
  valueText: string
  orientation: 'horizontal' | 'vertical'
}

const STEP_PCT = 0.1
const PAGE_PCT = 0.5

/** A handle on a scale that answers to the finger, the mouse and the arrow keys. */
export function useBoxHandle({ mcPct, range, mcAt, onMove, valueText, orientation }: BoxHandle) {
  const [low, high] = range
  const moveTo = (wanted: number) => {
    onMove(Math.min(high, Math.max(low, wanted)))
  }
  const follow = (event: PointerEvent<SVGGElement>) => {
    const wanted = mcAt(event)
    if (wanted !== undefined) moveTo(wanted)
  }
  const targets: Record<string, number> = {
    ArrowRight: mcPct + STEP_PCT,
    ArrowUp: mcPct + STEP_PCT,
    ArrowLeft: mcPct - STEP_PCT,
    ArrowDown: mcPct - STEP_PCT,
    PageUp: mcPct + PAGE_PCT,
    PageDown: mcPct - PAGE_PCT,
    Home: low,
    End: high,
  }
  return {
    role: 'slider',
    tabIndex: 0,
    'aria-label': 'The box, by the moisture content of its joint',
    'aria-orientation': orientation,
    'aria-valuemin': Math.round(low * 10) / 10,
    'aria-valuemax': Math.round(high * 10) / 10,
    'aria-valuenow': Math.round(mcPct * 10) / 10,
    'aria-valuetext': valueText,
    onPointerDown: (event: PointerEvent<SVGGElement>) => {
      event.currentTarget.setPointerCapture(event.pointerId)
      follow(event)
    },
    onPointerMove: (event: PointerEvent<SVGGElement>) => {
      if (event.currentTarget.hasPointerCapture(event.pointerId)) follow(event)
    },
    onKeyDown: (event: KeyboardEvent<SVGGElement>) => {
      const target = targets[event.key]
      if (target === undefined) return
      event.preventDefault()
      moveTo(target)
    },
    // A drag along the scale must not scroll the page away under the finger.
    style: { touchAction: orientation === 'horizontal' ? 'pan-y' : 'none', cursor: 'grab' },
  } as const
}
