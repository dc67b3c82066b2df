import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { readingFigures } from './figures'
import { toStored } from './plausible'

describe('figures of a reading', () => {
  it('are whole thousandths', () => {
    const figures = readingFigures(20, 50)
    expect(figures).toMatchObject({ temperatureMilli: 20_000, humidityMilli: 50_000 })
    // Wood Handbook (FPL-GTR-190, 2010), Eq. 4-5: 9.27 % MC.
    expect(Math.round(figures.emcMilli / 10)).toBe(927)
    expect(Number.isInteger(figures.emcMilli)).toBe(true)
  })

  it('are the same when worked out again from what single precision keeps', () => {
    const value = (min: number, max: number) => fc.double({ min, max, noNaN: true })
    fc.assert(
      fc.property(value(-39.99, 80), value(0, 100), (temperatureC, humidityPct) => {
        const kept = (stored: number): number => Number(Math.fround(stored).toPrecision(6))
        const first = readingFigures(temperatureC, humidityPct)
        const again = readingFigures(kept(toStored(temperatureC)), kept(toStored(humidityPct)))
        expect(again).toEqual(first)
      }),
    )
  })
})
