import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { airAt, carry, HOUR_MS, hoursUntil, judged, MINUTE_MS, msAt, NOW } from '@/tests/support/carry'
import { carryCheck } from './check'
import { pieceCheckSchema } from './carry-check'
import { verdictOf } from './verdict'

describe('the verdict', () => {
  it.each([
    ['fine with exactly half an hour to spare', 0.2, 210, 180, 'fine'],
    ['short with a minute less', 0.2, 209, 180, 'keep-short'],
    ['short for exactly half an hour', 0.2, 30, 180, 'keep-short'],
    ['left with a minute less', 0.2, 29, 180, 'leave'],
    ['fine where the early edge never comes', 0.2, undefined, 43_200, 'fine'],
    ['left where the allowance is used up before it goes', 1, undefined, 10, 'leave'],
    ['fine up to just under that', 0.999, undefined, 10, 'fine'],
  ] as const)('is %s', (_name, used, earlyMin, stayMin, verdict) => {
    const earlyMs = earlyMin === undefined ? undefined : earlyMin * MINUTE_MS
    expect(verdictOf(used, earlyMs, stayMin * MINUTE_MS)).toBe(verdict)
  })
})

describe('carry check of a box, house to damp shop', () => {
  it('answers in the form of the contract', () => {
    const check = carryCheck(carry())
    expect(pieceCheckSchema.parse(check)).toEqual(check)
  })

  it('tells an early edge of about 0.45 of the middle for a joint that is well known, a late one of about 2.2', () => {
    const check = judged(carry())
    const middleMs = msAt(check.middleAt) - NOW
    expect(Math.abs((msAt(check.earlyAt) - NOW) / middleMs - 0.45)).toBeLessThan(0.08)
    expect(Math.abs((msAt(check.lateAt) - NOW) / middleMs - 2.2)).toBeLessThan(0.4)
    expect(check.verdict).toBe('keep-short')
    expect(check.words).toBe('Keep it short')
  })

  it('says the same of the joint as its figures: loss at a quarter turn, allowed points, part used', () => {
    const check = judged(carry())
    const lossMmPerPct = 62 * (0.00282 - 0.00172)
    expect(check.allowedMcPct).toBeCloseTo(0.15 / lossMmPerPct, 6)
    expect(check.lossMm).toBeCloseTo(lossMmPerPct * check.changePct, 6)
    expect(check.usedAtEnd).toBeCloseTo(check.lossMm / 0.15, 9)
    expect(check.usedAtStart).toBeCloseTo(0, 6)
    expect(check.ringMcPct).toBeCloseTo(8.5, 6)
    expect(check.thereEmcPct).toBe(13.6)
  })

  it('tells why in points, in the quarter turn and in mm, and never says that it is safe', () => {
    const check = judged(carry())
    expect(check.reason).toMatch(/5\.1\u00a0points damper/)
    expect(check.reason).toContain('turned a quarter')
    expect(check.reason).toMatch(/0\.15\u00a0mm/)
    expect(`${check.words} ${check.reason} ${check.second}`).not.toMatch(/\bsafe\b|guarantee|[^y] binds/i)
  })

  it('is fine for a loose small joint, and left for a wide snug one with a thin wall', () => {
    expect(judged(carry({}, { jointDiameterMm: 30, allowanceMm: 0.4 })).verdict).toBe('fine')
    expect(judged(carry({}, { jointDiameterMm: 88, fitGrade: 'snug', allowanceMm: null })).verdict).toBe(
      'leave',
    )
  })

  it('the curve begins at the start, reaches past the stay and passes 1 at the middle time', () => {
    const { curve, middleAt, earlyAt, lateAt } = judged(carry())
    expect(curve.at[0]).toBe(new Date(NOW).toISOString())
    expect(msAt(curve.at.at(-1) ?? null)).toBeGreaterThan(NOW + 180 * MINUTE_MS)
    for (const [used, edge] of [
      [curve.used, middleAt],
      [curve.usedEarly, earlyAt],
      [curve.usedLate, lateAt],
    ] as const) {
      curve.at.forEach((at, n) => {
        if (Math.abs(msAt(at) - msAt(edge)) < 2 * MINUTE_MS) return
        expect((used[n] ?? NaN) >= 1, `${at} against ${String(edge)}`).toBe(msAt(at) > msAt(edge))
      })
    }
  })

  it('names what it assumed', () => {
    const check = judged(carry({}, { wood: null, wallMm: null, allowanceMm: null }))
    for (const word of ['wood', 'wall', 'allowance']) expect(check.assumed.join('; ')).toContain(word)
    expect(judged(carry()).assumed).toEqual([])
  })
})

describe('both directions', () => {
  it('a lid fitted in the damp shop goes past its allowance indoors just as surely', () => {
    const fittedDamp = carry({
      history: hoursUntil(NOW, 480, 13.6, 'closed', 10),
      baselineEmcPct: 13.6,
      cutMcPct: 13.6,
      there: airAt(8.5, 19),
      stayMinutes: 7 * 24 * 60,
      cover: 'lid-on',
    })
    const check = judged(fittedDamp)
    expect(check.verdict).not.toBe('fine')
    expect(check.changePct).toBeLessThan(0)
    expect(check.reason).toMatch(/5\.1\u00a0points drier/)
    expect(check.reason).toContain('gives off')
  })

  it('to first order as much is lost by drying as by swelling', () => {
    const swelling = judged(carry({ cutMcPct: 9, baselineEmcPct: 9, history: [], there: airAt(12, 15) }))
    const drying = judged(carry({ cutMcPct: 12, baselineEmcPct: 12, history: [], there: airAt(9, 15) }))
    expect(drying.usedAtEnd / swelling.usedAtEnd).toBeGreaterThan(0.85)
    expect(drying.usedAtEnd / swelling.usedAtEnd).toBeLessThan(1.15)
  })

  it('counts from the moisture at the cut, not from where the piece is now', () => {
    const driedOut = carry({ cutMcPct: 10.5 })
    const check = judged(driedOut)
    // On its way back to the cut it loses nothing: the time is longer than for a piece cut at 8.5 % MC.
    expect(check.usedAtStart).toBeGreaterThan(0.5)
    expect(msAt(check.middleAt)).toBeGreaterThan(msAt(judged(carry()).middleAt))
  })

  it('a piece that never had a fit recorded counts from its present moisture', () => {
    const check = judged(carry({ cutMcPct: null }))
    expect(check.cutMcPct).toBeCloseTo(8.5, 6)
    expect(check.usedAtStart).toBeCloseTo(0, 9)
  })

  it('one that is past its allowance already is left where it is, whatever the air there', () => {
    for (const there of [airAt(13.6), airAt(5), airAt(8.5)]) {
      const check = judged(carry({ cutMcPct: 12, there }))
      expect(check.verdict).toBe('leave')
      expect(check.usedAtStart).toBeGreaterThan(1)
      expect(check.reason).toContain('already')
      expect(check.second).toContain('Never force it')
      expect(msAt(check.earlyAt)).toBe(NOW)
    }
  })
})

describe('never', () => {
  const emc = fc.double({ min: 4, max: 20, noNaN: true })
  const drawn = fc.record({
    wallMm: fc.double({ min: 1.5, max: 6, noNaN: true }),
    jointDiameterMm: fc.double({ min: 25, max: 110, noNaN: true }),
    allowanceMm: fc.double({ min: 0.04, max: 0.4, noNaN: true }),
    emcThere: emc,
  })
  const more = fc.double({ min: 0.05, max: 3, noNaN: true })

  it('more used up by a thicker wall than by a thin one', () => {
    fc.assert(
      fc.property(drawn, more, ({ emcThere, ...piece }, thicker) => {
        const thin = judged(carry({ there: airAt(emcThere) }, piece))
        const thick = judged(carry({ there: airAt(emcThere) }, { ...piece, wallMm: piece.wallMm + thicker }))
        // The ladder of rates comes within 0.0065 of each wall's own way: of the whole change, and for each of the two.
        const wholeChange = Math.abs(emcThere - 8.5) / thin.allowedMcPct
        expect(thick.usedAtEnd).toBeLessThanOrEqual(thin.usedAtEnd + 0.013 * wholeChange)
      }),
      { numRuns: 60, endOnFailure: true },
    )
  })

  it('shorter for a smaller joint or in a closed cover', () => {
    fc.assert(
      fc.property(drawn, ({ emcThere, ...piece }) => {
        const there = airAt(emcThere)
        const open = judged(carry({ there }, piece))
        const small = judged(carry({ there }, { ...piece, jointDiameterMm: piece.jointDiameterMm * 0.8 }))
        const bagged = judged(carry({ there, cover: 'bagged' }, piece))
        const tub = judged(carry({ there, cover: 'tub' }, piece))
        expect(msAt(small.middleAt)).toBeGreaterThanOrEqual(msAt(open.middleAt) - 2000)
        expect(msAt(bagged.earlyAt)).toBeGreaterThanOrEqual(msAt(open.earlyAt) - 2000)
        // A tub that is opened now and then lets in more than a bag.
        expect(msAt(tub.earlyAt)).toBeGreaterThanOrEqual(msAt(open.earlyAt) - 2000)
        expect(msAt(bagged.earlyAt)).toBeGreaterThanOrEqual(msAt(tub.earlyAt) - 2000)
      }),
      { numRuns: 30 },
    )
  })

  it('fine while the early edge comes within the stay and half an hour', () => {
    fc.assert(
      fc.property(drawn, fc.integer({ min: 10, max: 3000 }), ({ emcThere, ...piece }, stayMinutes) => {
        const check = judged(carry({ there: airAt(emcThere), stayMinutes }, piece))
        const earlyMs = msAt(check.earlyAt) - NOW
        expect(check.verdict === 'fine').toBe(earlyMs >= (stayMinutes + 30) * MINUTE_MS)
      }),
      { numRuns: 40 },
    )
  })

  it('fine for weeks where the doubt alone would use up the allowance', () => {
    // Given time it would use 0.9 of its allowance: by the middle never all of it.
    const lossMm = 62 * 0.0011 * 5.1
    const check = judged(carry({ stayMinutes: 20 * 24 * 60 }, { allowanceMm: lossMm / 0.9 }))
    expect(check.middleAt).toBeNull()
    expect(check.earlyAt).not.toBeNull()
    expect(check.verdict).toBe('keep-short')
    expect(check.second).toContain('doubt')
  })
})

describe('a plan, and a piece that is out', () => {
  it('a plan for tonight is judged by the air of tonight', () => {
    const startsAt = NOW + 8 * HOUR_MS
    const forecast = Array.from({ length: 48 }, (_, n) => ({
      at: startsAt + n * HOUR_MS,
      emcPct: 17,
      temperatureC: 5,
    }))
    const tonight = judged(carry({ startsAt, forecast }))
    const now = judged(carry())
    expect(msAt(tonight.middleAt) - startsAt).toBeLessThan(msAt(now.middleAt) - NOW)
    expect(msAt(tonight.earlyAt)).toBeGreaterThan(startsAt)
  })

  it('an hour that dries out in time never uses the allowance up', () => {
    const forecast = Array.from({ length: 48 }, (_, n) => ({
      at: NOW + n * HOUR_MS,
      emcPct: n < 1 ? 13.6 : 8.5,
      temperatureC: 15,
    }))
    expect(judged(carry({ forecast })).middleAt).toBeNull()
  })

  it('a piece out is judged from the moment it went: waiting changes nothing while the air holds', () => {
    const startsAt = NOW - 2 * HOUR_MS
    const history = [...hoursUntil(startsAt, 480, 8.5, 'closed'), ...hoursUntil(NOW, 2, 13.6, 'open', 8)]
    const out = judged(carry({ startsAt, history }))
    const planned = judged(carry())
    expect(Math.abs(msAt(out.middleAt) - startsAt - (msAt(planned.middleAt) - NOW))).toBeLessThan(MINUTE_MS)
    expect(out.ringMcPct).toBeGreaterThan(9)
    expect(out.verdict).toBe(planned.verdict)
  })

  it('once bagged it keeps longer than left open', () => {
    const startsAt = NOW - HOUR_MS
    const history = [...hoursUntil(startsAt, 480, 8.5, 'closed'), ...hoursUntil(NOW, 1, 13.6, 'open', 8)]
    const open = judged(carry({ startsAt, history }))
    const bagged = judged(carry({ startsAt, history, cover: 'bagged' }))
    expect(msAt(bagged.middleAt)).toBeGreaterThan(msAt(open.middleAt))
    expect(bagged.ringMcPct).toBeCloseTo(open.ringMcPct, 6)
  })

  it('one that was just out is wetter than one that was not, and has less time', () => {
    const history = [
      ...hoursUntil(NOW - 2 * HOUR_MS, 480, 8.5, 'closed'),
      ...hoursUntil(NOW, 2, 13.6, 'open', 8),
    ]
    const again = judged(carry({ history }))
    expect(again.usedAtStart).toBeGreaterThan(0.3)
    expect(msAt(again.earlyAt)).toBeLessThan(msAt(judged(carry()).earlyAt))
  })
})
