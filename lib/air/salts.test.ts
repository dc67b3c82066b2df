import { describe, expect, it } from 'vitest'
import { referenceRows } from '@/tests/support/reference'
import { saltFixedPoints } from './salts'

describe('saturated salts, against Greenspan (1977), Table 2', () => {
  const confirmed = referenceRows('saturated_salts.csv').filter((row) =>
    row.text('status').startsWith('confirmed'),
  )

  it.each(confirmed.map((row) => [row.text('salt'), row.number('temp_c'), row.number('rh_pct')] as const))(
    '%s at %d °C: %d % RH, to 0.1',
    (salt, temperatureC, humidityPct) => {
      const point = saltFixedPoints(temperatureC).find((one) => one.salt === salt)
      expect(Math.abs((point?.humidityPct ?? NaN) - humidityPct)).toBeLessThan(0.1)
    },
  )

  it('lists the six salts from dry to damp, with their uncertainties', () => {
    for (const temperatureC of [5, 12.3, 20, 35]) {
      const points = saltFixedPoints(temperatureC)
      expect(points.map((point) => point.salt)).toEqual(['LiCl', 'MgCl2', 'Mg(NO3)2', 'NaCl', 'KCl', 'K2SO4'])
      expect(
        points.every((point, n) => n === 0 || point.humidityPct > (points[n - 1]?.humidityPct ?? 0)),
      ).toBe(true)
      expect(points.every((point) => point.doubtPct > 0.1 && point.doubtPct < 1)).toBe(true)
    }
    expect(saltFixedPoints(20)[0]?.doubtPct).toBeCloseTo(0.31, 9)
  })

  it('names the input that is wrong', () => {
    expect(() => saltFixedPoints(NaN)).toThrow(/temperatureC/)
    expect(() => saltFixedPoints(4)).toThrow(/temperatureC/)
  })
})
