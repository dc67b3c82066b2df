import { describe, expect, it } from 'vitest'
import { allowanceOfFit, GRADE_FIGURES } from './grades'

const untold = { fitGrade: null, clearanceMm: null, allowanceMm: null }

describe('allowance of a fit', () => {
  it.each([
    ['suction', 0.05, 0.03],
    ['snap', -0.05, 0.05],
    ['snug', 0.1, 0.08],
    ['easy', 0.25, 0.2],
    ['loose', 0.5, 0.4],
  ] as const)(
    '%s: %d mm clearance, %d mm allowance, half either way',
    (fitGrade, clearanceMm, allowanceMm) => {
      const allowance = allowanceOfFit({ ...untold, fitGrade })
      expect(allowance).toMatchObject({ clearanceMm, allowanceMm, basis: 'grade' })
      expect(allowance?.lowMm).toBeCloseTo(allowanceMm / 2, 10)
      expect(allowance?.highMm).toBeCloseTo(allowanceMm * 1.5, 10)
    },
  )

  it('threaded lids have none', () => {
    expect(allowanceOfFit({ fitGrade: 'threaded', clearanceMm: 0.3, allowanceMm: 0.1 })).toBeUndefined()
  })

  it('is 0.15 mm, 0.08 to 0.27, where nobody said how the lid fits', () => {
    expect(allowanceOfFit(untold)).toEqual({ allowanceMm: 0.15, lowMm: 0.08, highMm: 0.27, basis: 'unknown' })
  })

  it('what the maker told goes before what was measured, and that before the grade', () => {
    expect(allowanceOfFit({ fitGrade: 'snug', clearanceMm: 0.2, allowanceMm: 0.1 })).toMatchObject({
      allowanceMm: 0.1,
      clearanceMm: 0.2,
      basis: 'told',
    })
    expect(
      allowanceOfFit({ fitGrade: 'snug', clearanceMm: 0.2, allowanceMm: null })?.allowanceMm,
    ).toBeCloseTo(0.16)
  })

  it('is never the whole of a clearance that can be shared out', () => {
    for (const clearanceMm of [0.05, 0.1, 0.5, 1]) {
      expect(allowanceOfFit({ ...untold, clearanceMm })?.allowanceMm).toBeLessThan(clearanceMm)
    }
    for (const { clearanceMm, allowanceMm } of Object.values(GRADE_FIGURES)) {
      if (allowanceMm !== undefined && clearanceMm > 0) expect(allowanceMm).toBeLessThan(clearanceMm)
    }
  })
})
