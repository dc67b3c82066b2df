import { describe, expect, it } from 'vitest'
import { workedExamples } from '@/lib/method/examples'
import { STATUS_WORDS } from '@/lib/method/status'
import { contents, methodSections } from './sections'
import { polynomial, powerOfTen } from './formula-facts'
import { mathOf } from './math-notation'

const formulas = methodSections.flatMap((section) => section.formulas)

describe('the method page', () => {
  it.each(formulas)('$id: its lines are formulas, and it has all its papers', (facts) => {
    expect(facts.lines.length).toBeGreaterThan(0)
    for (const line of facts.lines) {
      expect(mathOf(line).length).toBeGreaterThan(2)
      expect(line).not.toMatch(/NaN|undefined|e-\d/)
    }
    const { plain, letters, source, status, range, limits, doubt } = facts
    for (const words of [plain, letters, source, range, limits, doubt])
      expect(words.length).toBeGreaterThan(3)
    expect(STATUS_WORDS.map((row) => row.status)).toContain(status)
  })

  it('no two formulas or parts have the same name', () => {
    const ids = [...formulas.map(({ id }) => `formula-${id}`), ...contents.map(({ id }) => id)]
    expect(new Set(ids).size).toBe(ids.length)
  })

  it('has a worked example in every part with formulas', () => {
    expect(workedExamples().map(({ id }) => id)).toEqual(methodSections.map(({ id }) => id))
  })
})

describe('coefficients in notation', () => {
  it.each([
    [[349, 1.29, 0.0135], '349 + 1.29 T + 0.0135 T^2'],
    [[0.805, -0.00000273], '0.805 − 2.73 × 10^{−6} T'],
    [[98.7, 0, 2], '98.7 + 2 T^2'],
  ])('%j', (coefficients, expected) => {
    expect(polynomial(coefficients, 'T')).toBe(expected)
  })

  it('keeps every digit of a small figure', () => {
    expect(powerOfTen(-9.484024e-13)).toBe('−9.484024 × 10^{−13}')
  })
})
