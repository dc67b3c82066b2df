import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  angleOfPoint,
  clearanceScale,
  FRAME,
  handleAt,
  outlinePath,
  RECESS_RADIUS,
} from './lid-drawing-model'

describe('the handle on the protractor', () => {
  it('a pointer on the handle means the angle that the handle stands at', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 90 }),
        fc.double({ min: 20, max: 300, noNaN: true }),
        (angleDeg, radius) => {
          expect(angleOfPoint(handleAt(angleDeg, radius))).toBe(angleDeg)
        },
      ),
    )
  })

  it('stays within a quarter turn wherever the pointer goes', () => {
    expect(angleOfPoint({ x: FRAME.x - 50, y: FRAME.y - 50 })).toBe(0)
    expect(angleOfPoint({ x: FRAME.x + 50, y: FRAME.y + 50 })).toBe(90)
    expect(angleOfPoint({ x: FRAME.x - 1, y: FRAME.y + 50 })).toBe(90)
    expect(angleOfPoint({ x: FRAME.x - 50, y: FRAME.y + 1 })).toBe(0)
  })

  it('stands at the top with the grain lined up and at the right a quarter turn on', () => {
    expect(handleAt(0, 100)).toMatchObject({ x: expect.closeTo(FRAME.x), y: expect.closeTo(FRAME.y - 100) })
    expect(handleAt(90, 100)).toMatchObject({ x: expect.closeTo(FRAME.x + 100), y: expect.closeTo(FRAME.y) })
  })
})

describe('an outline', () => {
  const places = (path: string) =>
    path
      .slice(1, -1)
      .split('L')
      .map((pair) => pair.split(' ').map(Number))
  const widest = (path: string) => Math.max(...places(path).map(([x = 0]) => x)) - FRAME.x
  const highest = (path: string) => Math.max(...places(path).map(([, y = 0]) => y)) - FRAME.y
  const oval = { alongRingsMm: 30.3, acrossRingsMm: 29.7 }

  it('is wider along the rings, too large by the factor', () => {
    const path = outlinePath(oval, 30, 10, 0)
    expect(widest(path)).toBeCloseTo(RECESS_RADIUS * 1.1, 1)
    expect(highest(path)).toBeCloseTo(RECESS_RADIUS * 0.9, 1)
  })

  it('lies the other way a quarter turn on', () => {
    expect(widest(outlinePath(oval, 30, 10, 90))).toBeCloseTo(RECESS_RADIUS * 0.9, 1)
  })
})

describe('the scale of clearances', () => {
  const value = (lowMm: number, highMm: number) => ({ lowMm, middleMm: (lowMm + highMm) / 2, highMm })

  it('always shows nought and some room in which it binds', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -3, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.constantFrom(1, 25.4),
        (lowMm, more, perUnitMm) => {
          const { low, high, ticks } = clearanceScale([value(lowMm, lowMm + more)], perUnitMm)
          expect(low).toBeLessThan(0)
          expect(high * perUnitMm).toBeGreaterThanOrEqual(lowMm + more)
          expect(low * perUnitMm).toBeLessThan(lowMm + more / 2)
          expect(ticks).toContainEqual({ value: 0, label: '0' })
          expect(new Set(ticks.map((tick) => tick.label)).size).toBe(ticks.length)
          expect(ticks.length).toBeLessThanOrEqual(8)
        },
      ),
    )
  })
})
