import { describe, expect, it } from 'vitest'
import { fitCheck, type FitCheckInput } from '@/lib/fit/fit-check'
import { fitAnswers } from '@/lib/fit/fit-answers'
import { fitCheckSpan, ruleTicks } from './fit-check-model'

const input: FitCheckInput = {
  mcPct: 10.6,
  mcDoubtPct: 0.5,
  target: { basis: 'home', middleMcPct: 9.6, lowMcPct: 8.6, highMcPct: 10.6, months: 12 },
  diameterMm: 58,
  movement: { tangentialPerPct: 0.00248, radialPerPct: 0.00126 },
  movementDoubt: 0.2,
  grade: 'snug',
  woodKind: 'plain',
}
function verdictOf(of: FitCheckInput) {
  const check = fitCheck(of)
  if (check.kind !== 'verdict') throw new Error('only words')
  return check
}
const answersOf = (of: FitCheckInput) =>
  fitAnswers(of, verdictOf(of)).map(({ words }) => words.replaceAll('\u00a0', ' '))

describe('the rule of a fit check', () => {
  it.each([
    ['damp', input],
    ['wet', { ...input, mcPct: 16, mcDoubtPct: 1.5 }],
    ['dry', { ...input, mcPct: 1, mcDoubtPct: 1.5 }],
    ['round', { ...input, movement: { tangentialPerPct: 0.002, radialPerPct: 0.002 } }],
  ])('shows the year and the piece with its doubt: %s', (_name, of) => {
    const { from, to } = fitCheckSpan(of, verdictOf(of))
    expect(from).toBeLessThanOrEqual(Math.max(0, Math.min(of.target.lowMcPct, of.mcPct - of.mcDoubtPct)))
    expect(to).toBeGreaterThanOrEqual(Math.max(of.target.highMcPct, of.mcPct + of.mcDoubtPct))
    expect(from).toBeGreaterThanOrEqual(0)
    expect(to - from).toBeLessThan(20)
  })

  it('labels whole % MC, and leaves out tenths where they would run together', () => {
    const wide = ruleTicks({ from: 7.3, to: 12.1 }, 900)
    expect(wide.filter((tick) => tick.label).map((tick) => tick.label)).toEqual(['8', '9', '10', '11', '12'])
    expect(wide).toHaveLength(49)
    expect(ruleTicks({ from: 7, to: 17 }, 340)).toHaveLength(21)
  })
})

describe('three answers side by side', () => {
  it('one of them holds, and each says when it does', () => {
    const [cut, easy, rest] = answersOf(input)
    expect(fitAnswers(input, verdictOf(input)).map(({ holds }) => holds)).toEqual([false, true, false])
    expect(cut).toBe('When it reads 9.5 to 9.7 % MC.')
    expect(easy).toBe('Now, with about 0.10 mm more left. So from 7.3 to 9.5 or 9.7 to 11.9 % MC.')
    expect(rest).toMatch(/^Any further off/)
  })

  it('an easy lid in a steady room: where even a snug one keeps its fit', () => {
    expect(answersOf({ ...input, grade: 'easy', mcPct: 9.6 })[0]).toBe(
      'When it reads 7.8 to 11.4 % MC. From 9.5 to 9.7 % MC even a snug lid keeps its fit.',
    )
  })

  it('a year that is too wide: resting does not help', () => {
    const coast = { ...input, target: { ...input.target, lowMcPct: 5, highMcPct: 14 } }
    const [cut, easy, rest] = answersOf(coast)
    expect(cut).toMatch(/^At no moisture content/)
    expect(easy).toBe('Leaving more would not do.')
    expect(rest).toContain('choose a looser fit')
  })
})
