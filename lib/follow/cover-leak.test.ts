import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { coverDriftPerH, leakGPerH, USUAL_BAG, USUAL_TUB } from './cover-leak'

describe('closed covers, against worked figures (derived)', () => {
  const across = (gramsM3: number) =>
    [
      { absoluteHumidityGM3: gramsM3, vapourPressurePa: 392 },
      { absoluteHumidityGM3: 0, vapourPressurePa: 0 },
    ] as const

  it('20 L across 3 g/m³ lets in 0.03 g an hour at rest, and 0.06 g more for each opening', () => {
    const [outside, inside] = across(3)
    const tub = { kind: 'tub', volumeL: 20, massG: 300 } as const
    expect(leakGPerH({ ...tub, openingsPerHour: 0 }, outside, inside)).toBeCloseTo(0.03, 6)
    expect(leakGPerH({ ...tub, openingsPerHour: 1 }, outside, inside)).toBeCloseTo(0.09, 6)
    // In 8 h with ten openings 0.84 g: 0.28 points on 0.3 kg.
    const grams = 8 * leakGPerH({ ...tub, openingsPerHour: 10 / 8 }, outside, inside)
    expect(grams).toBeCloseTo(0.84, 6)
    expect((100 * grams) / 300).toBeCloseTo(0.28, 6)
  })

  it('a thin bag of 0.05 m² lets in 0.15 g a day across the full difference: 0.19 points on 80 g', () => {
    const [outside, inside] = across(3)
    const gramsADay = 24 * leakGPerH(USUAL_BAG, outside, inside)
    expect(gramsADay).toBeCloseTo(0.15, 6)
    expect((100 * gramsADay) / 80).toBeCloseTo(0.19, 2)
  })

  it('more wood in a cover drifts less, and openings more', () => {
    fc.assert(
      fc.property(fc.double({ min: 1.1, max: 10, noNaN: true }), (times) => {
        const tub = coverDriftPerH(USUAL_TUB, 10)
        expect(coverDriftPerH({ ...USUAL_TUB, massG: USUAL_TUB.massG * times }, 10)).toBeCloseTo(
          tub / times,
          9,
        )
        if (USUAL_TUB.kind === 'tub')
          expect(coverDriftPerH({ ...USUAL_TUB, openingsPerHour: times }, 10)).toBeGreaterThan(tub)
      }),
    )
  })

  it('names what is out of range', () => {
    expect(() => coverDriftPerH({ ...USUAL_BAG, massG: 0 }, 10)).toThrow(/massG/)
    expect(() => coverDriftPerH(USUAL_BAG, Number.NaN)).toThrow(/temperatureC/)
  })
})
