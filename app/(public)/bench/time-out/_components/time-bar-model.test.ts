import { describe, expect, it } from 'vitest'
import { barEndMinutes, barTicksMinutes, tickText } from './time-bar-model'

describe('the scale of the time-out bar', () => {
  it.each([12, 47, 130, 600, 3000, 40_000, 700_000])('has a handful of round ticks up to %d min', (end) => {
    const ticks = barTicksMinutes(end)
    expect(ticks.length).toBeGreaterThan(1)
    expect(ticks.length).toBeLessThan(9)
    expect(ticks.at(-1)).toBeLessThanOrEqual(end)
  })

  it('ends past the middle, and never at nothing', () => {
    expect(barEndMinutes(200)).toBeGreaterThan(200)
    expect(barEndMinutes(0)).toBe(10)
  })

  it('writes minutes, hours and days', () => {
    expect([0, 30, 240, 1440, 2880].map(tickText)).toEqual(['0', '30 min', '4 h', '1 day', '2 days'])
  })
})
