import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { fitCheck, mostExtraMm, type FitCheckInput } from './fit-check'
import { fitCheckWords } from './fit-check-words'

/** Black cherry, Wood Handbook (FPL-GTR-190, 2010), Table 13-5: 58 mm lose 58 × 0.00122 = 0.0708 mm for each % MC. */
const cherryBox: FitCheckInput = {
  mcPct: 9.6,
  mcDoubtPct: 0.5,
  target: { basis: 'home', middleMcPct: 9.6, lowMcPct: 8.6, highMcPct: 10.6, months: 12 },
  diameterMm: 58,
  movement: { tangentialPerPct: 0.00248, radialPerPct: 0.00126 },
  movementDoubt: 0.2,
  grade: 'snug',
  woodKind: 'plain',
}
const LOSS_MM_PER_PCT = 58 * 0.00122

function verdictOf(input: FitCheckInput) {
  const check = fitCheck(input)
  if (check.kind !== 'verdict') throw new Error('only words')
  return check
}
const plain = (text: string) => text.replaceAll('\u00a0', ' ')
const headline = (input: FitCheckInput) => plain(plainText(fitCheckWords(input, fitCheck(input)).headline))

describe('fit check', () => {
  it('cut it, where the year takes no more than the grade may lose', () => {
    const check = verdictOf(cherryBox)
    expect(check).toMatchObject({ verdict: 'cut', reason: 'within', extraMm: 0 })
    expect(check.lossMm).toBeCloseTo(LOSS_MM_PER_PCT * 1, 9)
    expect(headline(cherryBox)).toBe("Cut it: its home's year leaves a snug lid its fit.")
  })

  it('cut it easy, and by how much, where it is a little too damp', () => {
    const damp = { ...cherryBox, mcPct: 10.6 }
    const check = verdictOf(damp)
    // Two points from the driest of the year: 0.1415 mm, of which a snug lid may lose 0.08: 0.0615 to leave more.
    expect(check.lossMm).toBeCloseTo(2 * LOSS_MM_PER_PCT, 9)
    expect(check).toMatchObject({ verdict: 'cut-easy' })
    expect(check.extraMm).toBeCloseTo(0.1, 9)
    expect(headline(damp)).toBe(
      'Cut it easy: leave about 0.10 mm more than you want, because it is about 1.0 point of % MC damper than its home.',
    )
  })

  it('let it rest, where more than the next grade would have to be left, and until when', () => {
    const wet = { ...cherryBox, mcPct: 13 }
    const check = verdictOf(wet)
    expect(check).toMatchObject({ verdict: 'rest', reason: 'far', extraMm: 0 })
    expect(headline(wet)).toBe('Let it rest: it is about 3.4 points of % MC damper than its home.')
    expect(plain(fitCheckWords(wet, check).second)).toMatch(/Cut it when it reads 9\.5 to 9\.7 % MC\.$/)
  })

  it('let it rest, where its moisture content is known to no better than a point', () => {
    expect(verdictOf({ ...cherryBox, mcDoubtPct: 1 }).verdict).toBe('cut')
    const doubted = { ...cherryBox, mcDoubtPct: 1.1 }
    expect(verdictOf(doubted)).toMatchObject({ verdict: 'rest', reason: 'doubt' })
    expect(headline(doubted)).toContain('Weigh it.')
  })

  it('says so where the year itself takes more than any cut could stand', () => {
    const coast = { ...cherryBox, target: { ...cherryBox.target, lowMcPct: 5, highMcPct: 14 } }
    const check = verdictOf(coast)
    expect(check).toMatchObject({ verdict: 'rest', reason: 'year', gradesThatHold: ['loose'] })
    expect(check.cutBetween).toBeUndefined()
    expect(headline(coast)).toContain('choose a looser fit')
  })

  it('a piece that is too dry is judged like one that is too damp', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 6, noNaN: true }), (away) => {
        const damp = verdictOf({ ...cherryBox, mcPct: 9.6 + away })
        const dry = verdictOf({ ...cherryBox, mcPct: 9.6 - away })
        expect(dry.lossMm).toBeCloseTo(damp.lossMm, 9)
        expect(dry.verdict).toBe(damp.verdict)
      }),
    )
    expect(headline({ ...cherryBox, mcPct: 8.6 })).toContain('drier than its home')
  })

  it('what it is judged against is named: the home, else the keep room', () => {
    const kept = { ...cherryBox, target: { ...cherryBox.target, basis: 'keep-room', months: 5 } as const }
    const words = fitCheckWords(kept, fitCheck(kept), 'metric', ['The wood is taken to be cherry.'])
    expect(plainText(words.headline)).toContain("its keep room's year")
    expect(plain(words.restsOn[0] ?? '')).toBe("The keep room's year: 8.6 to 10.6 % MC, its middle 9.6.")
    expect(words.assumed).toContain('A year is told from 5 months of record.')
    expect(words.assumed[0]).toBe('The wood is taken to be cherry.')
  })

  it.each([
    [{ woodKind: 'wild' }, 'It moves its own way: fit it easy, test it.'],
    [{ woodKind: 'stabilised' }, 'Stabilised wood is not worked out to move; its plain parts do.'],
    [{ grade: 'threaded' }, "Threads aren't worked out: leave them easy, and log how they turn."],
  ] as const)('%o gets words, no verdict', (facts, words) => {
    const input = { ...cherryBox, ...facts }
    expect(fitCheck(input).kind).toBe('words')
    expect(strongTexts(fitCheckWords(input, fitCheck(input)).headline)).toEqual([words])
  })

  it('leaves no more than makes it the next looser grade, and 0.2 mm at most', () => {
    expect((['suction', 'snap', 'snug', 'easy', 'loose'] as const).map(mostExtraMm)).toEqual([
      expect.closeTo(0.05),
      expect.closeTo(0.15),
      expect.closeTo(0.15),
      0.2,
      0.2,
    ])
  })

  it('names the input that is wrong', () => {
    expect(() => fitCheck({ ...cherryBox, mcPct: NaN })).toThrow(/mcPct/)
    expect(() => fitCheck({ ...cherryBox, mcDoubtPct: -1 })).toThrow(/mcDoubtPct/)
    expect(() => fitCheck({ ...cherryBox, diameterMm: 0 })).toThrow(/diameterMm/)
    const { target } = cherryBox
    expect(() => fitCheck({ ...cherryBox, target: { ...target, middleMcPct: 11 } })).toThrow(/middleMcPct/)
    expect(() => fitCheck({ ...cherryBox, target: { ...target, highMcPct: 8 } })).toThrow(/highMcPct/)
    expect(() => fitCheck({ ...cherryBox, target: { ...target, months: 0 } })).toThrow(/months/)
  })
})

describe('fit check, over any joint', () => {
  const anyInput = fc
    .record({
      lowMcPct: fc.double({ min: 5, max: 12, noNaN: true }),
      widthPct: fc.double({ min: 0, max: 5, noNaN: true }),
      mcPct: fc.double({ min: 4, max: 18, noNaN: true }),
      mcDoubtPct: fc.double({ min: 0, max: 1, noNaN: true }),
      diameterMm: fc.double({ min: 20, max: 100, noNaN: true }),
      grade: fc.constantFrom('suction', 'snap', 'snug', 'easy', 'loose' as const),
    })
    .map(({ lowMcPct, widthPct, ...rest }): FitCheckInput => ({
      ...cherryBox,
      ...rest,
      target: {
        ...cherryBox.target,
        lowMcPct,
        middleMcPct: lowMcPct + widthPct / 2,
        highMcPct: lowMcPct + widthPct,
      },
    }))

  it('stretches follow one another from dry to damp without gaps', () => {
    fc.assert(
      fc.property(anyInput, (input) => {
        const { stretches } = verdictOf(input)
        expect(stretches[0]?.fromMcPct).toBe(0)
        expect(stretches.at(-1)?.toMcPct).toBe(30)
        stretches.slice(1).forEach((stretch, index) => {
          expect(stretch.fromMcPct).toBe(stretches[index]?.toMcPct)
          expect(stretch.kind).not.toBe(stretches[index]?.kind)
        })
      }),
    )
  })

  it('the verdict is that of the stretch the piece stands on', () => {
    fc.assert(
      fc.property(anyInput, (input) => {
        const check = verdictOf(input)
        const near = check.stretches.some((stretch) => Math.abs(stretch.toMcPct - input.mcPct) < 1e-6)
        fc.pre(!near)
        const stretch = check.stretches.find(
          ({ fromMcPct, toMcPct }) => input.mcPct > fromMcPct && input.mcPct < toMcPct,
        )
        expect(check.verdict).toBe(stretch?.kind === 'cut-snug' ? 'cut' : stretch?.kind)
      }),
    )
  })

  it('what is left more is enough, in whole steps of 0.05 mm, and no step too many', () => {
    fc.assert(
      fc.property(anyInput, (input) => {
        const { verdict, extraMm, lossMm, allowanceMm } = verdictOf(input)
        if (verdict !== 'cut-easy') {
          expect(extraMm).toBe(0)
          return
        }
        expect(allowanceMm + extraMm).toBeGreaterThanOrEqual(lossMm - 1e-6)
        expect(allowanceMm + extraMm - 0.05).toBeLessThan(lossMm)
        expect(extraMm).toBeLessThanOrEqual(mostExtraMm(input.grade) + 1e-9)
      }),
    )
  })

  it('more doubt in, more doubt out', () => {
    fc.assert(
      fc.property(anyInput, fc.double({ min: 0, max: 2, noNaN: true }), (input, more) => {
        const less = verdictOf(input)
        const doubted = verdictOf({ ...input, mcDoubtPct: input.mcDoubtPct + more })
        expect(doubted.lossHighMm).toBeGreaterThanOrEqual(less.lossHighMm)
        expect(less.lossHighMm).toBeGreaterThanOrEqual(less.lossMm)
        if (less.verdict === 'rest') expect(doubted.verdict).toBe('rest')
      }),
    )
  })

  it('a looser fit is never judged more strictly', () => {
    const order = ['rest', 'cut-easy', 'cut']
    fc.assert(
      fc.property(anyInput, (input) => {
        const [snug, easy] = (['snug', 'easy'] as const).map(
          (grade) => verdictOf({ ...input, grade }).verdict,
        )
        expect(order.indexOf(easy ?? '')).toBeGreaterThanOrEqual(order.indexOf(snug ?? ''))
      }),
    )
  })

  it('an easy lid in a steady room may even be cut snug', () => {
    const { stretches } = verdictOf({ ...cherryBox, grade: 'easy' })
    expect(stretches.map((stretch) => stretch.kind)).toEqual([
      'rest',
      'cut-easy',
      'cut',
      'cut-snug',
      'cut',
      'cut-easy',
      'rest',
    ])
  })
})
