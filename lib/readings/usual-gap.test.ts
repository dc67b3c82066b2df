import { describe, expect, it } from 'vitest'
import { usualGapAfter } from './usual-gap'

const at = (s: number): Date => new Date(Date.UTC(2026, 0, 1) + s * 1000)

describe('the usual gap', () => {
  it('is not known from one reading, and is the gap of the first two', () => {
    expect(usualGapAfter(null, null, [at(0)])).toBeNull()
    expect(usualGapAfter(null, at(0), [at(300)])).toBe(300)
    expect(usualGapAfter(null, null, [at(300), at(0)])).toBe(300)
  })

  it('follows a sensor that is told to measure more often', () => {
    let usual: number | null = 3600
    for (let i = 1; i <= 30; i += 1) usual = usualGapAfter(usual, at((i - 1) * 60), [at(i * 60)])
    expect(usual).toBeGreaterThan(55)
    expect(usual).toBeLessThan(80)
  })

  it('is hardly moved by a night of silence', () => {
    expect(usualGapAfter(300, at(0), [at(36_000)])).toBe(360)
  })

  it('learns nothing from readings of the past or from the same moment', () => {
    expect(usualGapAfter(300, at(1000), [at(10), at(20), at(1000)])).toBe(300)
    expect(usualGapAfter(300, null, [at(10), at(10)])).toBe(300)
  })
})
