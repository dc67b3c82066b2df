import { describe, expect, it } from 'vitest'
import { nextNumber } from './next-number'

describe('the number offered for the next piece', () => {
  it.each([
    [undefined, '1'],
    ['214', '215'],
    ['24-07', '24-08'],
    ['099', '100'],
    ['B9', 'B10'],
    ['burr', ''],
  ])('after %j comes %j', (last, next) => {
    expect(nextNumber(last)).toBe(next)
  })
})
