import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { PACE_LOG_SPREAD } from '@/lib/doubt/causes'
import { learnedPace, type PaceOutcome } from './learned-pace'

/** A carry after which the model had 0.9 of the allowance used. */
const carry: PaceOutcome = { turned: 'binds', usedSlow: 0.45, usedMiddle: 0.9, usedFast: 1.7 }
const times = (count: number, outcome: PaceOutcome): PaceOutcome[] =>
  Array.from({ length: count }, () => outcome)

describe('what outcomes teach', () => {
  it('without any the factor is 1, and its doubt the whole', () => {
    const pace = learnedPace([])
    expect(pace.factor).toBeCloseTo(1, 6)
    expect(pace.logSpread).toBeCloseTo(PACE_LOG_SPREAD, 2)
    expect(pace.outcomes).toBe(0)
  })

  it('lids that bind sooner than reckoned make the wood quicker, lids that turn as before slower', () => {
    expect(learnedPace(times(4, carry)).factor).toBeGreaterThan(1.2)
    expect(learnedPace(times(4, { ...carry, turned: 'as-before' })).factor).toBeLessThan(0.85)
  })

  it('each outcome narrows the doubt, and what lies along the grain stays in it', () => {
    const spreads = [0, 2, 6, 20].map(
      (count) => learnedPace(times(count, { ...carry, turned: 'tighter' })).logSpread,
    )
    for (let n = 1; n < spreads.length; n += 1) expect(spreads[n]).toBeLessThan(spreads[n - 1] ?? 0)
    expect(spreads.at(-1)).toBeGreaterThan(0.2)
  })

  it('one slip of the pen among many does not turn it round', () => {
    const many = times(8, { ...carry, turned: 'tighter' })
    const slipped = learnedPace([...many, { ...carry, turned: 'as-before' }])
    expect(slipped.factor / learnedPace(many).factor).toBeGreaterThan(0.7)
  })

  it('stays within what wood does, whatever is logged', () => {
    const outcome = fc.record({
      turned: fc.constantFrom('as-before', 'tighter', 'binds', 'looser' as const),
      usedMiddle: fc.double({ min: 0, max: 3, noNaN: true }),
    })
    fc.assert(
      fc.property(fc.array(outcome, { maxLength: 60 }), (drawn) => {
        const pace = learnedPace(
          drawn.map(({ turned, usedMiddle }) => ({
            turned,
            usedMiddle,
            usedSlow: usedMiddle * 0.5,
            usedFast: usedMiddle * 1.8,
          })),
        )
        expect(pace.factor).toBeGreaterThan(0.15)
        expect(pace.factor).toBeLessThan(7)
        expect(pace.logSpread).toBeLessThan(PACE_LOG_SPREAD + 0.1) // what contradicts itself narrows nothing
      }),
    )
  })

  it('says nothing of a lid that sits looser', () => {
    expect(learnedPace(times(5, { ...carry, turned: 'looser' })).factor).toBeCloseTo(1, 6)
  })
})
