import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { referenceJson, referenceRows } from '@/tests/support/reference'
import {
  LONGITUDINAL_PER_PCT,
  perPctFromShrinkage,
  shrinkageToMcPct,
  sizeChangeFromShrinkageMm,
  sizeChangeMm,
} from './movement'

/** The two tables name some woods in different orders, and Table 13-5 gives these three a relative's figure. */
const CARRIES_A_RELATIVES_FIGURE = new Set(['Ash green', 'Birch sweet', 'Elm cedar'])

describe('coefficients per % MC, against Wood Handbook Tables 4-3 and 13-5', () => {
  const coefficients = new Map(
    referenceRows('dimensional_change_table_13_5.csv').map((row) => [row.text('species'), row]),
  )
  const both = referenceRows('shrinkage_domestic_table_4_3.csv').flatMap((row) => {
    const name = row.text('species')
    const coefficient = coefficients.get(name)
    if (coefficient === undefined || CARRIES_A_RELATIVES_FIGURE.has(name)) return []
    return [
      [name, 'radial', row.number('radial_pct'), coefficient.number('cr_per_pct')] as const,
      [name, 'tangential', row.number('tangential_pct'), coefficient.number('ct_per_pct')] as const,
    ]
  })

  it('has a good number of woods in both tables', () => {
    expect(both.length).toBeGreaterThan(50)
  })

  // One printed figure differs by one in its last digit.
  it.each(both)('%s, %s: %d %% shrinkage goes with %d', (_name, _direction, shrinkagePct, perPct) => {
    expect(Math.abs(perPctFromShrinkage(shrinkagePct) - perPct)).toBeLessThan(1.5e-5)
  })

  // Two printed digits of shrinkage leave the third digit of the coefficient open.
  it.each(
    referenceRows('shrinkage_imported_table_4_4.csv')
      .filter((row) => row.text('status') === 'read')
      .map((row) => [row.text('species'), row] as const),
  )('%s moves more along the rings than across them', (_name, row) => {
    expect(perPctFromShrinkage(row.number('tangential_pct'))).toBeGreaterThan(
      perPctFromShrinkage(row.number('radial_pct')),
    )
  })

  it.each(
    referenceRows('species.csv')
      .filter((row) => row.text('cr_ct_basis') === 'computed Eq.15')
      .map((row) => [row.text('common_name'), row] as const),
  )('%s: the tabled coefficients follow from the tabled shrinkage', (_name, row) => {
    const radial = perPctFromShrinkage(row.number('shrink_radial_pct'))
    const tangential = perPctFromShrinkage(row.number('shrink_tangential_pct'))
    expect(Math.abs(radial - row.number('cr_per_pct'))).toBeLessThan(1e-5)
    expect(Math.abs(tangential - row.number('ct_per_pct'))).toBeLessThan(1e-5)
  })
})

describe('change of size', () => {
  it('60 mm of 9.9 % wood grows 0.8540 mm from 8 to 12 % MC; 0.8472 mm by the short form', () => {
    expect(sizeChangeFromShrinkageMm(60, 9.9, 8, 12)).toBeCloseTo(0.854, 4)
    expect(sizeChangeMm(60, 0.00353, 4)).toBeCloseTo(0.8472, 4)
  })

  const { length } = z
    .object({
      length: z.array(z.object({ length_mm: z.number(), delta_mc_pct: z.number(), change_mm: z.number() })),
    })
    .parse(referenceJson('ovality_examples.json'))

  it.each(length)('along the grain, $length_mm mm over $delta_mc_pct % MC', (example) => {
    const changeMm = sizeChangeMm(example.length_mm, LONGITUDINAL_PER_PCT, example.delta_mc_pct)
    expect(changeMm).toBeCloseTo(example.change_mm, 4)
  })

  const mc = fc.double({ min: 0, max: 60, noNaN: true })
  const shrinkage = fc.double({ min: 1, max: 15, noNaN: true })

  it('there and back again is no change', () => {
    fc.assert(
      fc.property(mc, mc, shrinkage, (from, to, shrinkagePct) => {
        const grown = 60 + sizeChangeFromShrinkageMm(60, shrinkagePct, from, to)
        expect(grown + sizeChangeFromShrinkageMm(grown, shrinkagePct, to, from)).toBeCloseTo(60, 8)
      }),
    )
  })

  it('agrees with what is left of the green size', () => {
    fc.assert(
      fc.property(mc, mc, shrinkage, (from, to, shrinkagePct) => {
        const before = 100 - shrinkageToMcPct(shrinkagePct, from)
        const after = 100 - shrinkageToMcPct(shrinkagePct, to)
        expect(before + sizeChangeFromShrinkageMm(before, shrinkagePct, from, to)).toBeCloseTo(after, 8)
      }),
    )
  })

  it('nothing moves above fibre saturation', () => {
    expect(sizeChangeFromShrinkageMm(60, 8, 35, 80)).toBe(0)
    expect(shrinkageToMcPct(8, 45)).toBe(0)
    expect(shrinkageToMcPct(8, 0)).toBe(8)
  })

  it('names the input that is wrong', () => {
    expect(() => sizeChangeMm(NaN, 0.002, 1)).toThrow(/dimensionMm/)
    expect(() => sizeChangeMm(60, NaN, 1)).toThrow(/perPct/)
    expect(() => sizeChangeMm(60, 0.002, NaN)).toThrow(/mcChangePct/)
    expect(() => perPctFromShrinkage(NaN)).toThrow(/shrinkagePct/)
    expect(() => perPctFromShrinkage(0)).toThrow(/shrinkagePct/)
    expect(() => sizeChangeFromShrinkageMm(60, 8, NaN, 10)).toThrow(/fromMcPct/)
    expect(() => shrinkageToMcPct(8, -1)).toThrow(/mcPct/)
  })
})
