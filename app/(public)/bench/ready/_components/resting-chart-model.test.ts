import { describe, expect, it } from 'vitest'
import { dayMs } from '@/lib/seasoning/policy'
import { timeMarks, weightTicks } from './resting-chart-model'

const frame = {
  fromAt: Date.UTC(2026, 0, 5),
  toAt: Date.UTC(2026, 0, 5) + 300 * dayMs,
  lowG: 404.2,
  highG: 474.8,
}

describe('the axes of the resting curve', () => {
  it.each([
    [404.2, 474.8],
    [82.1, 83.9],
    [1000, 9000],
  ])('have a handful of round weights from %d to %d g, inside the frame', (lowG, highG) => {
    for (const units of ['metric', 'imperial'] as const) {
      const ticks = weightTicks({ ...frame, lowG, highG }, units)
      expect(ticks.length).toBeGreaterThan(1)
      expect(ticks.length).toBeLessThan(9)
      for (const { grams } of ticks) expect(grams >= lowG && grams <= highG).toBe(true)
    }
  })

  it('have weeks from the first weighing, or days of the calendar', () => {
    expect(timeMarks(frame, false, 8).map((mark) => mark.text)).toEqual([
      '0 wk',
      '8 wk',
      '16 wk',
      '24 wk',
      '32 wk',
      '40 wk',
    ])
    expect(timeMarks(frame, true, 8)[1]).toEqual({ at: Date.UTC(2026, 2, 2), text: '2 Mar' })
    expect(timeMarks({ ...frame, toAt: frame.fromAt + 2000 * dayMs }, false, 5).length).toBeLessThan(7)
  })
})
