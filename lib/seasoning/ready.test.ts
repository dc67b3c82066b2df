import { describe, expect, it } from 'vitest'
import { dayMs } from './policy'
import { readiness } from './ready'
import type { ReadyQuestion } from './ready-question'
import type { RestingWeight } from './resting-curve'

const now = 400 * dayMs

/** Weights so many days ago, corrected and as weighed alike. */
const weighed = (...ago: readonly (readonly [daysAgo: number, grams: number])[]): RestingWeight[] =>
  ago.map(([daysAgo, grams]) => ({ at: now - daysAgo * dayMs, grams, correctedG: grams }))

const ready: ReadyQuestion = {
  now,
  weights: weighed([90, 310], [56, 300], [30, 300.4], [0, 300.9]),
  stepG: 0.1,
  mc: { pct: 9.2, doubtPct: 0.8 },
  target: { pct: 8.6, of: 'home' },
  roughedAt: now - 200 * dayMs,
  nearFinalAt: now - 20 * dayMs,
  readyByWeight: false,
}

const codes = (change: Partial<ReadyQuestion>): string[] =>
  readiness({ ...ready, ...change }).missing.map(({ code }) => code)
const wordsOf = (change: Partial<ReadyQuestion>): string => readiness({ ...ready, ...change }).words

describe('a blank is ready', () => {
  it('when all of it holds', () => {
    expect(readiness(ready)).toEqual({
      ready: true,
      byWeightAlone: false,
      missing: [],
      span: undefined,
      words: 'Ready: it weighs the same, its MC matches, and it has rested.',
    })
  })

  it('also when it was never turned near its final size', () => {
    expect(codes({ nearFinalAt: undefined })).toEqual([])
  })

  it('not before three weights over eight weeks', () => {
    expect(codes({ weights: [] })).toEqual(['too-few-weights'])
    expect(codes({ weights: weighed([56, 300], [0, 300]) })).toEqual(['too-few-weights'])
    expect(codes({ weights: weighed([55, 300], [30, 300], [0, 300]) })).toEqual(['too-few-weights'])
    expect(codes({ weights: weighed([56, 300], [30, 300], [0, 300]) })).toEqual([])
    expect(wordsOf({ weights: weighed([30, 300], [0, 300]) })).toContain('has 2 over 4 weeks so far')
  })

  it('not while those lie further apart than 0.3 % of the mass', () => {
    expect(codes({ weights: weighed([56, 300.9], [30, 300.4], [0, 300]) })).toEqual([])
    expect(codes({ weights: weighed([56, 301], [30, 300.4], [0, 300]) })).toEqual(['weights-differ'])
    // One that strays in the middle counts too.
    expect(codes({ weights: weighed([56, 300], [30, 302], [0, 300]) })).toEqual(['weights-differ'])
    expect(wordsOf({ weights: weighed([56, 302], [30, 301], [0, 300]) })).toMatch(
      /The last 3 weights lie 2.g apart; 0\.9.g is allowed/,
    )
  })

  it('nor further than one step of the scale, where that is the larger', () => {
    const light = weighed([56, 81], [30, 80], [0, 80])
    expect(codes({ weights: light, stepG: 1 })).toEqual([])
    expect(codes({ weights: light, stepG: 0.1 })).toEqual(['weights-differ'])
  })

  it('by corrected weights: level ones may be made of weights that wander with the room, and the other way round', () => {
    const wander = weighed([56, 300], [30, 304], [0, 302])
    expect(codes({ weights: wander.map((weight) => ({ ...weight, correctedG: 300 })) })).toEqual([])
    const seemsLevel = weighed([56, 300], [30, 300], [0, 300])
    const falling = seemsLevel.map((weight, n) => ({ ...weight, correctedG: 300 - 2 * n }))
    expect(codes({ weights: falling })).toEqual(['weights-differ'])
  })

  it('not where weights cannot be corrected', () => {
    const uncorrected = ready.weights.map((weight) => ({ ...weight, correctedG: undefined }))
    expect(codes({ weights: uncorrected })).toEqual(['weights-not-corrected'])
    const newest = ready.weights.map((weight, n) => (n === 3 ? { ...weight, correctedG: undefined } : weight))
    expect(codes({ weights: newest })).toContain('weights-not-corrected')
  })

  it('not unless its MC is within 0.7 points of the middle', () => {
    expect(codes({ mc: { pct: 9.3, doubtPct: 1 } })).toEqual([])
    expect(codes({ mc: { pct: 9.31, doubtPct: 1 } })).toEqual(['mc-off'])
    expect(codes({ mc: { pct: 7.89, doubtPct: 1 } })).toEqual(['mc-off'])
    expect(wordsOf({ mc: { pct: 10.7, doubtPct: 1 } })).toMatch(
      /At about 10\.7.%.MC it is 2\.1.points damper than the middle of its home’s year/,
    )
    expect(wordsOf({ mc: { pct: 6, doubtPct: 1 }, target: { pct: 8, of: 'keep-room' } })).toMatch(
      /2\.0.points drier than the middle of its keep room’s year/,
    )
  })

  it('not unless its MC is known to a point', () => {
    expect(codes({ mc: { pct: 8.6, doubtPct: 1.06 } })).toEqual(['doubt-too-wide'])
    expect(codes({ mc: undefined })).toEqual(['mc-unknown'])
    expect(codes({ target: undefined })).toEqual(['target-unknown'])
  })

  it('not before 60 days since roughing and 14 since near-final turning', () => {
    expect(codes({ roughedAt: now - 60 * dayMs })).toEqual([])
    expect(codes({ roughedAt: now - 60 * dayMs + 1 })).toEqual(['rest-after-roughing'])
    expect(codes({ nearFinalAt: now - 14 * dayMs })).toEqual([])
    expect(codes({ nearFinalAt: now - 14 * dayMs + 1 })).toEqual(['rest-after-near-final'])
    expect(codes({ roughedAt: undefined })).toEqual(['roughed-unknown'])
    expect(wordsOf({ roughedAt: now - 34 * dayMs })).toContain('rests another 26 days')
  })

  it('names everything that is missing', () => {
    const answer = readiness({ ...ready, weights: [], mc: undefined, roughedAt: now, nearFinalAt: now })
    expect(answer.missing.map(({ code }) => code)).toEqual([
      'too-few-weights',
      'mc-unknown',
      'rest-after-roughing',
      'rest-after-near-final',
    ])
    expect(answer.words).toMatch(/^Not ready yet\. /)
  })
})

describe('ready by weight alone', () => {
  const alone = { readyByWeight: true, mc: undefined, target: undefined }

  it('lets the weights decide where the maker says so, and is marked', () => {
    const answer = readiness({ ...ready, ...alone })
    expect(answer).toMatchObject({ ready: true, byWeightAlone: true, missing: [] })
    expect(answer.words).toContain('by weight alone')
  })

  it('takes weights as weighed where the room has no record', () => {
    const uncorrected = ready.weights.map((weight) => ({ ...weight, correctedG: undefined }))
    expect(codes({ ...alone, weights: uncorrected })).toEqual([])
  })

  it('still asks for the weights and the rests', () => {
    expect(codes({ ...alone, weights: weighed([56, 320], [30, 310], [0, 305]) })).toEqual(['weights-differ'])
    expect(codes({ ...alone, roughedAt: now - dayMs })).toEqual(['rest-after-roughing'])
  })

  it('is not marked where nothing had to be let pass', () => {
    expect(readiness({ ...ready, readyByWeight: true })).toMatchObject({ ready: true, byWeightAlone: false })
  })
})

describe('when it is likely to be ready', () => {
  /** Oven-dry 275 g, drying to 300 g, which is 9.1 % MC. */
  const drying = (tauDays: number, amplitudeG: number, endG = 300): RestingWeight[] =>
    weighed(
      ...[120, 90, 60, 30, 0].map(
        (daysAgo) => [daysAgo, endG + amplitudeG * Math.exp((daysAgo - 120) / tauDays)] as const,
      ),
    )
  const stillDrying: ReadyQuestion = {
    ...ready,
    weights: drying(60, 40),
    mc: { pct: 11.1, doubtPct: 0.9 },
    target: { pct: 9.1, of: 'home' },
  }

  it('is a range round the moment that the curve itself gives', () => {
    const { span } = readiness(stillDrying)
    if (span === undefined) throw new Error('it has a range')
    // Level within 0.92 g over eight weeks: 40 exp(-t/60) (1 - exp(-56/60)) = 0.92 at t = 197 d, and 56 d on.
    const middle = now + (197 + 56 - 120) * dayMs
    expect(span.fromAt).toBeLessThan(middle + 2 * dayMs)
    expect(span.toAt).toBeGreaterThan(middle - 2 * dayMs)
    expect(span.toAt - span.fromAt).toBeGreaterThanOrEqual(7 * dayMs)
    expect(span.toAt - span.fromAt).toBeLessThan(40 * dayMs)
  })

  it('is wider on a coarser scale', () => {
    const width = (stepG: number) => {
      const { span } = readiness({ ...stillDrying, stepG, readyByWeight: true })
      return span === undefined ? NaN : span.toAt - span.fromAt
    }
    expect(width(0.5)).toBeGreaterThan(1.5 * width(0.1))
  })

  it('does not begin before the rests are over', () => {
    const { span } = readiness({ ...stillDrying, nearFinalAt: now, roughedAt: now + 300 * dayMs })
    expect(span?.fromAt).toBeGreaterThanOrEqual(now + 360 * dayMs)
  })

  it('is not told where it would end away from its home, unless weight alone decides', () => {
    const damper = { ...stillDrying, target: { pct: 7, of: 'home' } } as const
    expect(readiness(damper).span).toBeUndefined()
    expect(readiness({ ...damper, readyByWeight: true }).span).toBeDefined()
  })

  it('is not told before the loss has slowed to half', () => {
    expect(readiness({ ...stillDrying, weights: drying(300, 40) }).span).toBeUndefined()
    expect(readiness({ ...stillDrying, weights: [] }).span).toBeUndefined()
  })

  it('is when the waiting is over, for weights that are level already', () => {
    const level = weighed([30, 300], [15, 300], [0, 300])
    expect(readiness({ ...ready, weights: level }).span).toEqual({
      fromAt: now + 26 * dayMs,
      toAt: now + 33 * dayMs,
    })
    expect(readiness({ ...ready, weights: level, mc: { pct: 12, doubtPct: 1 } }).span).toBeUndefined()
  })
})

describe('inputs of the ready rule', () => {
  it.each([
    ['now', { now: NaN }],
    ['stepG', { stepG: 0 }],
    ['mcPct', { mc: { pct: NaN, doubtPct: 1 } }],
    ['doubtPct', { mc: { pct: 9, doubtPct: NaN } }],
    ['targetPct', { target: { pct: 40, of: 'home' as const } }],
    ['grams', { weights: [{ at: 0, grams: NaN }] }],
    ['correctedG', { weights: [{ at: 0, grams: 1, correctedG: -1 }] }],
    ['roughedAt', { roughedAt: NaN }],
    ['nearFinalAt', { nearFinalAt: Infinity }],
  ])('names %s when it is no number or out of range', (name, change) => {
    expect(() => readiness({ ...ready, ...change })).toThrow(new RegExp(name))
  })
})
