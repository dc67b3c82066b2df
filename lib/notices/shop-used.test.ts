import { describe, expect, it } from 'vitest'
import { OPENED_BY_PCT, type ShopHour, shopWasUsed } from './shop-used'

const hourMs = 3_600_000
const day = Date.UTC(2026, 1, 10)

/** A shut winter shop: a day that swings by 3 K in all, with the least at dawn. */
const shutHour = (hour: number): ShopHour => ({
  at: day + hour * hourMs,
  temperatureC: 6 - 1.5 * Math.cos(((hour - 3) / 12) * Math.PI),
  emcPctMin: 13.4,
  emcPctMax: 13.7,
})
const shut = Array.from({ length: 19 }, (_, hour) => shutHour(hour))

describe('whether the shop was used', () => {
  it('does not take the swing of a shut day for a stove', () => {
    expect(shopWasUsed([shut], 0)).toEqual({ isUsed: false, why: null })
    expect(shopWasUsed([], 0).isUsed).toBe(false)
  })

  it('is told by a carry, whatever the air says', () => {
    expect(shopWasUsed([shut], 1).why).toBe('carried')
  })

  it('is told by a stove in any of the shops', () => {
    const warmed = shut.map((hour, n) => (n < 9 ? hour : { ...hour, temperatureC: hour.temperatureC + 6 }))
    expect(shopWasUsed([shut, warmed], 0).why).toBe('warmed')
  })

  it('is told by an hour in which the air swung, not by a slow change of the day', () => {
    const opened = shut.map((hour, n) =>
      n === 11 ? { ...hour, emcPctMax: hour.emcPctMin + OPENED_BY_PCT + 0.1 } : hour,
    )
    expect(shopWasUsed([opened], 0).why).toBe('opened')
    const slow = shut.map((hour, n) => ({ ...hour, emcPctMin: 10 + n / 5, emcPctMax: 10.2 + n / 5 }))
    expect(shopWasUsed([slow], 0).isUsed).toBe(false)
  })
})
