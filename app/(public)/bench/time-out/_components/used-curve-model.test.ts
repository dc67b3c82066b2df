import { describe, expect, it } from 'vitest'
import type { TimeOutAnswer } from '@/lib/bench/time-out'
import { curveEndHours, pointsTo } from './used-curve-model'

const curve = {
  hours: [0, 1, 2, 4, 8],
  used: [0, 0.4, 0.6, 0.95, 1.2],
  usedEarly: [0, 0.7, 1, 1.4, 1.8],
  usedLate: [0, 0.2, 0.3, 0.5, 0.7],
}
const rest = { words: '', flags: [], assumed: [], curve }
const binds: TimeOutAnswer = { ...rest, binds: true, minutesEarly: 60, minutes: 150, lateBinds: false }

describe('the curve of what is used', () => {
  it('reaches past the middle, and its lines to the edge', () => {
    expect(curveEndHours(binds)).toBeCloseTo(4, 9)
    expect(pointsTo(3, binds).map((point) => point.hours)).toEqual([0, 1, 2, 4])
    expect(pointsTo(3, binds)[1]).toEqual({ hours: 1, used: 0.4, early: 0.7, late: 0.2 })
    expect(pointsTo(100, binds)).toHaveLength(5)
  })

  it('reaches past the early edge where the middle never binds, else until it has settled', () => {
    expect(curveEndHours({ ...rest, binds: false, minutesEarly: 90 })).toBe(3)
    expect(curveEndHours({ ...rest, binds: false })).toBe(8)
    expect(
      curveEndHours({ ...rest, binds: false, curve: { hours: [], used: [], usedEarly: [], usedLate: [] } }),
    ).toBe(24)
  })
})
