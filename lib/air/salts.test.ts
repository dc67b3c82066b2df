import { describe, expect, it } from 'vitest'
import { referenceRows } from '@/tests/support/reference'
import { saltFixedPoints, SALTS } from './salts'

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

describe('the polynomials of saturated salts, against Greenspan (1977), Table 1', () => {
  const rows = referenceRows('saturated_salts_polynomials.csv')

  it('are those of the file, salt by salt and term by term, as printed there', () => {
    expect(SALTS.map(({ salt, polynomial }) => [salt, ...polynomial])).toEqual(
      rows.map((row) => [row.text('salt'), ...['a0', 'a1', 'a2', 'a3'].map((term) => row.number(term))]),
    )
  })

  it('give the same humidity at every degree from 5 to 35 °C, to 1e-9 % RH', () => {
    for (let temperatureC = 5; temperatureC <= 35; temperatureC += 1) {
      const points = saltFixedPoints(temperatureC)
      for (const row of rows) {
        const humidityPct = [0, 1, 2, 3].reduce(
          (sum, power) => sum + row.number(`a${String(power)}`) * temperatureC ** power,
          0,
        )
        const point = points.find((one) => one.salt === row.text('salt'))
        expect(point?.humidityPct).toBeCloseTo(humidityPct, 9)
      }
    }
  })
})
