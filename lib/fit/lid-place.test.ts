import { describe, expect, it } from 'vitest'
import { clearanceWithDoubt } from './clearance-curve'
import { allowanceOfFit } from './grades'
import {
  clearanceByMonth,
  cutClearance,
  jointAt,
  type LidJoint,
  paceDoubtPct,
  placeGivenTime,
} from './lid-place'
import { lidYearSentence } from './lid-year-words'
import { plainText } from '@/lib/format/sentence'

/** An easy lid cut at 8.5 % MC, of a wood of medium movement: figures made up for the test. */
const joint: LidJoint = {
  diameterMm: 60,
  clearanceMm: 0.25,
  clearanceDoubtMm: 0.02,
  movement: { tangentialPerPct: 0.0032, radialPerPct: 0.0017 },
  movementDoubt: 0.2,
  spigotOn: 'base',
  cut: { ringMcPct: 8.5, lidMcPct: 8.5 },
}
const quarter = (ringMcPct: number, lidMcPct: number, of: LidJoint = joint) =>
  clearanceWithDoubt(jointAt(of, { ringMcPct, lidMcPct, doubtPct: 0.5 }), 90).middleMm

describe('a lid where its wood stands', () => {
  it('has the clearance that it was cut with where it was cut', () => {
    expect(quarter(8.5, 8.5)).toBeCloseTo(0.25, 9)
  })

  it('loses diameter × (C_T − C_R) × change a quarter turn on, either way', () => {
    const lossMm = 60 * 0.0015 * 2
    expect(quarter(10.5, 10.5)).toBeCloseTo(0.25 - lossMm, 2)
    expect(quarter(6.5, 6.5)).toBeCloseTo(0.25 - lossMm, 2)
  })

  it('is tighter where the part inside is ahead on the way to damp, whichever that is', () => {
    const dropsIn: LidJoint = { ...joint, spigotOn: 'lid' }
    expect(quarter(10.5, 9.5)).toBeLessThan(quarter(9.5, 10.5))
    expect(quarter(10.5, 9.5, dropsIn)).toBeGreaterThan(quarter(9.5, 10.5, dropsIn))
  })

  it('is the more doubtful the less its wood is known', () => {
    const at = (doubtPct: number) =>
      clearanceWithDoubt(jointAt(joint, { ringMcPct: 10, lidMcPct: 10, doubtPct }), 90)
    expect(at(1.5).lowMm).toBeLessThan(at(0.5).lowMm)
    expect(placeGivenTime(10, 0.4, 0.3)).toEqual({ ringMcPct: 10, lidMcPct: 10, doubtPct: 0.5 })
  })
})

describe('the clearance as cut', () => {
  const of = (told: { fitGrade: 'easy' | null; clearanceMm: number | null }) => {
    const allowance = allowanceOfFit({ ...told, allowanceMm: null })
    if (allowance === undefined) throw new Error('no allowance')
    return cutClearance(told, allowance)
  }

  it('is known best where it was measured, and worst where nobody has said how the lid fits', () => {
    const [measured, graded, untold] = [
      of({ fitGrade: 'easy', clearanceMm: 0.2 }),
      of({ fitGrade: 'easy', clearanceMm: null }),
      of({ fitGrade: null, clearanceMm: null }),
    ]
    expect(measured).toEqual({ clearanceMm: 0.2, clearanceDoubtMm: 0.02 })
    expect(graded).toEqual({ clearanceMm: 0.25, clearanceDoubtMm: 0.125 })
    expect(untold.clearanceMm).toBe(0.15)
    expect(untold.clearanceDoubtMm).toBeGreaterThan(0.09)
  })
})

describe('the pace', () => {
  it('is ± 1.28 deviations where slow and quick wood lie √3 of them off', () => {
    expect(paceDoubtPct(9, 11, Math.sqrt(3))).toBeCloseTo(1.2816 / Math.sqrt(3), 6)
    expect(paceDoubtPct(11, 9, Math.sqrt(3))).toBe(paceDoubtPct(9, 11, Math.sqrt(3)))
  })
})

describe('the year of a lid', () => {
  const year = (emcs: readonly number[], of: LidJoint = joint) =>
    clearanceByMonth(
      of,
      emcs.map((emcPct, n) => ({ monthOn: `2026-${String(n + 5).padStart(2, '0')}-01`, emcPct })),
      0.7,
    )

  it('names the snuggest month, and what 1 in 10 like it would do', () => {
    const words = plainText(lidYearSentence('Landing cupboard', year([9, 10, 11, 10.5]), false))
    expect(words).toMatch(
      /^Left in Landing cupboard, the lid is snuggest in July, with about 0\.05\smm to spare/,
    )
    expect(words).toMatch(/1 in 10 like it would bind for a while\. The room’s months run from 9\.0 to 11\.0/)
  })

  it('names the months in which it may bind', () => {
    const words = (emcs: readonly number[]) => plainText(lidYearSentence('Shop', year(emcs), false))
    expect(words([9, 12, 13, 9])).toMatch(/it may bind in June and July at a quarter turn/)
    expect(words([9, 12, 13, 12, 9])).toMatch(/it may bind from June to August at a quarter turn/)
    expect(words([9, 12, 9, 12, 13])).toMatch(/it may bind in June, August and September at/)
    expect(words([12, 13, 12])).toMatch(/it may bind in every month at/)
  })

  it('does not call a snap lid binding for being tight', () => {
    const snap = year([9, 9.4], { ...joint, clearanceMm: -0.05 })
    expect(plainText(lidYearSentence('Shop', snap, true))).toMatch(/tightest in June/)
  })
})
