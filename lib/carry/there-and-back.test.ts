import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { airAt, carry, HOUR_MS, judged, MINUTE_MS, msAt, NOW } from '@/tests/support/carry'
import type { Cover } from '@/lib/pieces/piece'
import type { Cause } from './carry-answer'
import { bestCover, coverEdge, otherCovers } from './best-cover'
import type { CarryCheckInput, PieceFacts } from './carry-check'
import { isReckoned, prepared } from './check'
import { edgeWithout, hangsOn } from './hangs-on'
import { judgeInput } from './judge'
import type { Reckoned } from './reckon'
import { moistureOfToldAir, toldAirSchema } from './told-air'

function run(input: CarryCheckInput): Reckoned {
  const one = prepared(input)
  if (!isReckoned(one)) throw new Error(one.words)
  return one
}

/** Home holds still at so much EMC, the parts side by side. */
const withHome = (input: CarryCheckInput, emcPct = 8.5): CarryCheckInput => ({
  ...input,
  home: [{ at: input.startsAt, emcPct, temperatureC: 19, cover: 'open', isKnown: true }],
})

const CAUSES: readonly Cause[] = ['allowance', 'sizes', 'cut', 'before', 'air', 'movement', 'pace']
const RANK = { fine: 0, 'keep-short': 1, leave: 2 }

const drawnPiece: fc.Arbitrary<Partial<PieceFacts>> = fc.record({
  wallMm: fc.option(fc.double({ min: 1.5, max: 6, noNaN: true })),
  spigotMm: fc.option(fc.double({ min: 3, max: 12, noNaN: true })),
  jointDiameterMm: fc.double({ min: 25, max: 120, noNaN: true }),
  allowanceMm: fc.option(fc.double({ min: 0.04, max: 0.5, noNaN: true })),
  fitGrade: fc.constantFrom('snug', 'easy', 'loose', null),
  lidForm: fc.constantFrom('plug', 'hollow'),
  wood: fc.constantFrom('fraxinus-excelsior', null),
})
const drawn = fc.record({
  piece: drawnPiece,
  emcThere: fc.double({ min: 5, max: 18, noNaN: true }),
  stayMinutes: fc.integer({ min: 20, max: 900 }),
  airDoubtPct: fc.constantFrom(0, 0.7, 1.5),
  cutDoubtPct: fc.constantFrom(0, 0.5, 1.5),
})
type Drawn = typeof drawn extends fc.Arbitrary<infer T> ? T : never
const carryOf = ({ piece, emcThere, ...told }: Drawn, cover: Cover = 'open'): CarryCheckInput =>
  carry({ ...told, there: airAt(emcThere), cover }, piece)

describe('air as told', () => {
  const told = { name: 'the show', temperatureC: 18, humidityPct: 70 }
  const { emcPct, emcDoubtPct } = moistureOfToldAir(told)

  it('gives the same middle as a room of the same air, and never counts as a fresh reading', () => {
    const there: CarryCheckInput['there'] = { ...told, kind: 'told', emcPct }
    const typed = judged(carry({ there, airDoubtPct: emcDoubtPct }))
    const room = judged(carry({ there: airAt(emcPct, 18) }))
    expect(typed.middleAt).toBe(room.middleAt)
    expect(typed.usedAtEnd).toBe(room.usedAtEnd)
  })

  it('is taken no narrower than a typed reading, so that its early edge comes sooner', () => {
    const there: CarryCheckInput['there'] = { ...told, kind: 'told', emcPct }
    const wide = judged(carry({ there, airDoubtPct: emcDoubtPct }))
    const known = judged(carry({ there }))
    expect(emcDoubtPct).toBeGreaterThan(0.8)
    expect(msAt(wide.earlyAt)).toBeLessThan(msAt(known.earlyAt))
  })

  it.each([
    { ...told, name: ' ' },
    { ...told, humidityPct: 100 },
    { ...told, temperatureC: 51 },
    { ...told, kind: 'fresh' },
  ])('is refused where it can not be: %o', (air) => {
    expect(toldAirSchema.safeParse(air).success).toBe(false)
  })
})

describe('home again', () => {
  const back = (input: CarryCheckInput) => judgeInput(input).backHome

  it('waits some hours after three in a damp shop, and not at all after air like home', () => {
    const damp = back(withHome(carry()))
    expect(damp?.waitMinutes).toBeGreaterThan(120)
    expect(damp?.waitMinutes).toBeLessThan(24 * 60)
    expect(damp?.words).toMatch(/^Wait about .* at home/)
    const like = back(withHome(carry({ there: airAt(8.5, 19) })))
    expect(like?.waitMinutes).toBe(0)
    expect(like?.words).toContain('as soon as it is home')
  })

  it('is not told where nothing is known of the air at home', () => {
    expect(back(carry())).toBeNull()
  })

  it('waits longer after a longer stay in damp air', () => {
    fc.assert(
      fc.property(fc.integer({ min: 20, max: 400 }), fc.integer({ min: 1, max: 400 }), (short, more) => {
        const wait = (stayMinutes: number) => back(withHome(carry({ stayMinutes })))?.waitMinutes ?? Infinity
        // Moments are looked at a quarter to two hours apart.
        expect(wait(short + more)).toBeGreaterThanOrEqual(wait(short) - 120)
      }),
      { numRuns: 12, endOnFailure: true },
    )
  })

  it('comes to about the same for slow wood and for quick, which took up more and gives it off sooner', () => {
    const waitAt = (factor: number) =>
      back({ ...withHome(carry()), pace: { factor, logSpread: 0.4 } })?.waitMinutes ?? Infinity
    expect(waitAt(0.5) / waitAt(2)).toBeGreaterThan(0.6)
    expect(waitAt(0.5) / waitAt(2)).toBeLessThan(1.7)
  })

  it('coming home never makes the greatest loss less than it was out there', () => {
    fc.assert(
      fc.property(drawn, (told) => {
        const input = withHome(carryOf(told))
        const { check, backHome } = judgeInput(input)
        if (check.kind !== 'verdict' || backHome === null) throw new Error('no way home')
        expect(backHome.greatestMm ?? 0).toBeGreaterThanOrEqual(check.usedAtEnd * check.allowanceMm - 1e-9)
        const endsAt = NOW + told.stayMinutes * MINUTE_MS
        expect(msAt(backHome.greatestAt) > endsAt).toBe(backHome.isGreatestAfter)
      }),
      { numRuns: 20, endOnFailure: true },
    )
  })

  it('tells where the lid is tightest after it has come in', () => {
    // A thick lid over a thin ring: back in dry air the recess shrinks first, and grips what it holds.
    const gripping = judgeInput(
      withHome(carry({ stayMinutes: 24 * 60 }, { spigotOn: 'lid', lidForm: 'plug', lidMm: 25, wallMm: 2 })),
    ).backHome
    expect(gripping?.isGreatestAfter).toBe(true)
    expect(gripping?.words).toContain('tightest about')
  })
})

describe('what a time hangs on', () => {
  it('is the cause whose removal moves the early edge most', () => {
    fc.assert(
      fc.property(drawn, (told) => {
        const one = run(carryOf(told))
        const ruling = hangsOn(one)
        if (ruling === null) return
        const near = (cause: Cause) => edgeWithout(one, cause)
        const best = Math.max(...CAUSES.map(near))
        expect(near(ruling.cause)).toBe(best)
      }),
      { numRuns: 25, endOnFailure: true },
    )
  })

  it.each([
    [
      'how the lid fits, where nobody said',
      { allowanceMm: null, clearanceMm: null },
      'Tell us how the lid fits',
    ],
    [
      'the clearance, where only the grade is known',
      { allowanceMm: null, fitGrade: 'snug' },
      'Measure the clearance',
    ],
  ] as const)('asks for %s', (_name, piece, words) => {
    const told = hangsOn(run(carry({}, { ...piece, jointDiameterMm: 62 })))
    expect(told?.cause).toBe('allowance')
    expect(told?.ask).toContain(words)
  })

  it('asks for the wall where that alone is open', () => {
    const one = run({ ...carry({}, { wallMm: null, spigotMm: null }), pace: { factor: 1, logSpread: 0.01 } })
    const known = {
      ...one,
      question: {
        ...one.question,
        spreads: { ...one.question.spreads, movementLog: 0.01, allowanceLog: 0.01 },
      },
    }
    expect(hangsOn({ ...known })?.cause).toBe('sizes')
  })

  it('asks for nothing where the edge never comes or is past', () => {
    expect(hangsOn(run(carry({}, { jointDiameterMm: 20, allowanceMm: 0.9 })))).toBeNull()
    expect(hangsOn(run(carry({ cutMcPct: 12 })))).toBeNull()
  })

  it('sizes that nobody measured widen the doubt', () => {
    const told = judged(carry({}, { wallMm: 2.5, spigotMm: 6 }))
    const assumed = judged(carry({}, { wallMm: null, spigotMm: null }))
    expect(Math.abs(msAt(assumed.middleAt) - msAt(told.middleAt))).toBeLessThan(MINUTE_MS)
    expect(msAt(assumed.earlyAt)).toBeLessThan(msAt(told.earlyAt))
  })
})

describe('the best cover', () => {
  it('is never worse than the one asked about, and only offered where it betters it', () => {
    fc.assert(
      fc.property(drawn, fc.constantFrom<Cover>('open', 'lid-on', 'bagged'), (told, cover) => {
        const one = run(carryOf(told, cover))
        const asked = coverEdge(one)
        const best = bestCover(asked, otherCovers(one), undefined)
        if (asked.verdict === 'fine') expect(best).toBeNull()
        if (best === null) return
        expect(RANK[best.verdict]).toBeLessThanOrEqual(RANK[asked.verdict])
        if (best.verdict === asked.verdict)
          expect(msAt(best.earlyAt) - msAt(asked.earlyAt)).toBeGreaterThanOrEqual(30 * MINUTE_MS)
      }),
      { numRuns: 25, endOnFailure: true },
    )
  })

  it('shuts a box away that would be short in the open, and offers nothing to one that is fine or past it', () => {
    expect(judgeInput(carry()).bestCover?.verdict).toBe('fine')
    expect(judgeInput(carry({}, { jointDiameterMm: 30, allowanceMm: 0.4 })).bestCover).toBeNull()
    expect(judgeInput(carry({ cutMcPct: 12 })).bestCover).toBeNull()
  })

  it('goes by a tub’s own readings where it has them, whichever way they tell', () => {
    const day = carry({ stayMinutes: 20 * 60 }, { allowanceMm: 0.06 })
    const tubIn = (emcPct: number) =>
      judgeInput({ ...day, tub: { name: 'Lidded tub', emcPct, temperatureC: 9 } }).covers.find(
        (one) => one.cover === 'tub',
      )
    expect(tubIn(8.5)?.verdict).toBe('fine')
    expect(tubIn(13.6)?.verdict).not.toBe('fine')
  })

  it('covers only what is still to come', () => {
    const startsAt = NOW - HOUR_MS
    const out = carry({ startsAt })
    const [bagged] = otherCovers(run(out)).filter((one) => one.cover === 'bagged')
    const fromTheStart = otherCovers(run({ ...out, now: startsAt })).filter(
      (one) => one.cover === 'bagged',
    )[0]
    expect(msAt(bagged?.earlyAt ?? null)).toBeLessThanOrEqual(msAt(fromTheStart?.earlyAt ?? null))
  })
})
