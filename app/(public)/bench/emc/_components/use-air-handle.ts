'use client'

import type { KeyboardEvent, PointerEvent } from 'react'
import type { AirPoint } from './air-chart-model'

type AirHandle = {
  air: AirPoint
  /** The air under a pointer. */
  airAt: (event: PointerEvent<SVGElement>) => AirPoint | undefined
  onPlace: (air: AirPoint) => void
  onStep: (warmer: number, damper: number) => void
  words: string
}

/** Warmer or colder, damper or drier, in steps. */
const steps: Readonly<Record<string, readonly [number, number]>> = {
  ArrowRight: [1, 0],
  ArrowLeft: [-1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
  PageUp: [0, 5],
  PageDown: [0, -5],
  Home: [-5, 0],
  End: [5, 0],
}

/** A point on the chart that answers to the finger, the mouse and the arrow keys. */
export function useAirHandle({ air, airAt, onPlace, onStep, words }: AirHandle) {
  return {
    role: 'slider',
    tabIndex: 0,
    'aria-label': 'The air: left and right for its temperature, up and down for its humidity',
    'aria-valuemin': 0,
    'aria-valuemax': 100,
    'aria-valuenow': Math.round(air.humidityPct),
    'aria-valuetext': words,
    onPointerDown: (event: PointerEvent<SVGGElement>) => {
      event.currentTarget.setPointerCapture(event.pointerId)
    },
    onPointerMove: (event: PointerEvent<SVGGElement>) => {
      if (!event.currentTarget.hasPointerCapture(event.pointerId)) return
      const wanted = airAt(event)
      if (wanted !== undefined) onPlace(wanted)
    },
    onKeyDown: (event: KeyboardEvent<SVGGElement>) => {
      const step = steps[event.key]
      if (step === undefined) return
      event.preventDefault()
      onStep(step[0], step[1])
    },
    style: { touchAction: 'none', cursor: 'grab' },
  } as const
}
