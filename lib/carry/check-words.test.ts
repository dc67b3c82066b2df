import { describe, expect, it } from 'vitest'
import { airAt, carry, hoursUntil, judged, NOW, HOUR_MS } from '@/tests/support/carry'
import { carryCheck } from './check'
import { pieceCheckSchema, type CarryCheckInput } from './carry-check'

describe('the second line', () => {
  it('says when it may bind: later than the allowance, before the clearance is gone in the middle', () => {
    const second = judged(carry({}, { fitGrade: 'easy', clearanceMm: 0.2, allowanceMm: 0.1 })).second
    expect(second).toMatch(/may bind at a quarter turn after about/)
  })

  it('says that a suction lid’s sigh goes first', () => {
    const second = judged(carry({}, { fitGrade: 'suction', allowanceMm: null })).second
    expect(second).toContain('sigh goes long before it may bind')
  })

  it('says where a fit allows less than any sensor can tell', () => {
    expect(judged(carry({}, { allowanceMm: 0.04 })).second).toContain('less than any sensor can tell')
    expect(judged(carry()).second).not.toContain('sensor')
  })

  it('calls airs closer than 0.7 points no telling difference', () => {
    expect(judged(carry({ there: airAt(9.1) })).reason).toContain('no telling difference')
    expect(judged(carry({ there: airAt(9.3) })).reason).not.toContain('no telling difference')
  })
})

describe('words instead of a verdict', () => {
  it.each([
    ['blank', { stage: 'blank' }, 'blank'],
    ['roughed pair', { stage: 'roughed' }, 'blank'],
    ['threaded lid', { fitGrade: 'threaded' }, "Threads aren't worked out"],
    ['wild grain', { woodKind: 'wild' }, 'its own way'],
    ['stabilised wood', { woodKind: 'stabilised' }, 'Not worked out to move'],
    ['hybrid', { woodKind: 'hybrid' }, 'Not worked out to move'],
    ['joint of unknown size', { jointDiameterMm: null }, 'measure the spigot'],
  ] as const)('for a %s', (_name, piece, words) => {
    const check = carryCheck(carry({}, piece))
    expect(check.kind).toBe('words')
    expect(check.words).toContain(words)
    expect(pieceCheckSchema.parse(check)).toEqual(check)
  })

  it('the plain parts of a stabilised or hybrid piece do move', () => {
    const check = carryCheck(carry({}, { woodKind: 'hybrid' }))
    expect(check).toMatchObject({ kind: 'words', reason: 'stabilised', second: 'Its plain parts do.' })
  })
})

describe('ring and lid out of step', () => {
  it('tells that a lagging plug lid tightens all round, and one of the ring’s own pace by the quarter turn', () => {
    const lagging = judged(carry({}, { lidForm: 'plug', lidMm: 20 }))
    expect(lagging.reason).toContain('whichever way it is turned')
    expect(lagging.second).toContain('tightens all round')
    expect(lagging.lidMcPct).toBeCloseTo(lagging.ringMcPct, 6)
    const inStep = judged(carry())
    expect(inStep.reason).toContain('turned a quarter')
    expect(inStep.second).not.toContain('not in step')
  })

  it('tells that it sits looser first on the way to dry', () => {
    const drying = carry(
      {
        history: hoursUntil(NOW, 480, 13.6, 'closed', 10),
        baselineEmcPct: 13.6,
        cutMcPct: 13.6,
        there: airAt(8.5, 19),
      },
      { lidForm: 'plug', lidMm: 20 },
    )
    expect(judged(drying).second).toContain('sits looser all round')
  })
})

describe('without a fresh reading there is no verdict', () => {
  it('says since when, or that it was never read', () => {
    const since = NOW - 4 * HOUR_MS
    const stale: CarryCheckInput['there'] = {
      kind: 'stale',
      at: since,
      emcPct: 8.5,
      temperatureC: 18,
      humidityPct: 45,
    }
    const check = carryCheck(carry({ there: stale }))
    expect(check).toMatchObject({
      kind: 'unknown',
      reason: 'no-reading',
      since: new Date(since).toISOString(),
    })
    expect(check.words).toContain('unknown')
    expect(check.words).not.toMatch(/\bsafe\b|\bfine\b/i)
    expect(carryCheck(carry({ there: { kind: 'never' } }))).toMatchObject({
      kind: 'unknown',
      reason: 'never-read',
      since: null,
    })
  })

  it('nor where nothing is known of the air that it comes from, though the hours out are', () => {
    const nothing = { baselineEmcPct: null, history: hoursUntil(NOW, 30, null, 'closed' as const) }
    expect(carryCheck(carry(nothing))).toMatchObject({ kind: 'unknown', reason: 'no-history' })
    const startsAt = NOW - 2 * HOUR_MS
    const onlyOut = { startsAt, baselineEmcPct: null, history: hoursUntil(NOW, 2, 13.6, 'open' as const, 8) }
    expect(carryCheck(carry(onlyOut))).toMatchObject({ kind: 'unknown', reason: 'no-history' })
  })

  it('a figure that is not a number is a bug, and is named', () => {
    expect(() => carryCheck(carry({ there: airAt(NaN) }))).toThrow(/emcPct/)
    expect(() => carryCheck(carry({ baselineEmcPct: NaN, history: [] }))).toThrow(/ringPct/)
    expect(() => carryCheck(carry({}, { jointDiameterMm: NaN }))).toThrow(/diameterMm/)
    expect(() => carryCheck(carry({ there: airAt(13.6, NaN) }))).toThrow(/temperatureC/)
  })
})
