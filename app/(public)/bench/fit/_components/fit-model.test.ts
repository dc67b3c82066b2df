import { describe, expect, it } from 'vitest'
import { fitAnswer, fitQuerySchema } from '@/lib/bench/fit'
import { clearanceExactMm } from '@/lib/fit/lid-fit'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { fitFields, idleFields, type FitChoices, type FitField, type FitValues } from './fit-fields'
import { benchFit, fitFacts, fitSentence, fitTwins, hasNoRecess, moistureOf } from './fit-model'

const values = Object.fromEntries(
  Object.entries(fitFields).map(([key, field]) => [key, Number(field.start)]),
) as Record<FitField, number>
const choices: FitChoices = {
  wood: 'acer-saccharum',
  kind: 'plain',
  grain: 'end-grain',
  fit: 'own',
  lidWood: '',
  tell: 'mc',
  lid: 'same',
}
const maple: FitValues = { ...values, diameterMm: 60, clearanceMm: 0.2, cutPct: 8, nowPct: 12 }

const plain = (text: string) => text.replaceAll('\u00a0', ' ')
const sentence = (of: FitValues, chosen: FitChoices) =>
  plain(plainText(fitSentence(benchFit(of, chosen), 'metric')))
function jointOf(of: FitValues, chosen: FitChoices) {
  const fit = benchFit(of, chosen)
  if (fit.kind !== 'joint') throw new Error('only words')
  return fit
}

describe('lid fit on the bench', () => {
  it('answers as the derived example does: 60 mm of maple, 0.2 mm, four points', () => {
    const { joint } = jointOf(maple, choices)
    // Exact at a quarter turn -0.2499 mm (tests/fixtures/reference/ovality_examples.json).
    expect(clearanceExactMm(joint, 90)).toBeCloseTo(-0.2499, 3)
    expect(sentence(maple, choices)).toBe(
      'A quarter turn on it may bind: about 0.25 mm too tight. With the grain lined up it is easy, about 0.20 mm to spare.',
    )
    expect(strongTexts(fitSentence(benchFit(maple, choices), 'metric'))).toEqual(['may bind'])
  })

  it.each([
    ['end-grain, one wood', choices],
    ['side-grain', { ...choices, grain: 'side-grain' }],
    ['another wood for the lid', { ...choices, lidWood: 'prunus-serotina' }],
    ['a lid that lags', { ...choices, lid: 'own' }],
    ['a wood not known', { ...choices, wood: '' }],
  ] as const)('the API gives the same for %s', (_name, chosen) => {
    const fit = jointOf(maple, chosen)
    const [twin] = fitTwins(fit, 35)
    const query = Object.fromEntries(
      Object.entries(twin?.query ?? {}).map(([key, value]) => [key, String(value)]),
    )
    expect(fitAnswer(fitQuerySchema.parse(query)).clearanceMm).toBeCloseTo(clearanceExactMm(fit.joint, 35), 3)
  })

  it('a side-grain box holds the direction along the grain in its joint', () => {
    const { joint } = jointOf(maple, { ...choices, grain: 'side-grain' })
    expect(joint.spigot.radialPerPct).toBe(LONGITUDINAL_PER_PCT)
  })

  it('takes moisture contents from two airs, with the doubt of both', () => {
    const moisture = moistureOf(
      { ...maple, cutC: 20, cutRh: 50, nowC: 8, nowRh: 85 },
      { tell: 'air', lid: 'same' },
    )
    // Equation of the table of EMC: 9.2711 % MC at 20 °C and 50 % RH, 18.4128 at 8 °C and 85 % RH.
    expect(moisture.cutPct).toBeCloseTo(9.2711, 3)
    expect(moisture.basePct).toBeCloseTo(18.4128, 3)
    expect(moisture.doubtPct).toBeGreaterThan(1.33)
  })

  it('a grade is doubted by half its clearance, a measured one by little', () => {
    expect(jointOf(maple, { ...choices, fit: 'easy' }).joint).toMatchObject({
      clearanceMm: 0.25,
      clearanceDoubtMm: 0.125,
    })
    expect(jointOf(maple, choices).joint.clearanceDoubtMm).toBe(0.02)
  })

  it.each([
    [{ kind: 'wild' }, 'It moves its own way: fit it easy, test it.'],
    [{ kind: 'stabilised' }, 'Stabilised wood is not worked out to move; its plain parts do.'],
    [{ fit: 'threaded' }, "Threads aren't worked out"],
  ] as const)('%o gets words and no ovals', (more, words) => {
    const fit = benchFit(maple, { ...choices, ...more })
    expect(fit.kind).toBe('words')
    expect(plainText(fitSentence(fit, 'metric'))).toContain(words)
    expect(fitTwins(fit, 30)).toEqual([])
    expect(fitFacts(fit, 'metric')).not.toHaveLength(0)
  })

  it('a base ahead of its lid binds even with the grain lined up', () => {
    expect(sentence({ ...maple, lidPct: 9 }, { ...choices, lid: 'own' })).toMatch(
      /^It may bind even with the grain lined up/,
    )
  })

  it('has grade by grade only where one wood moves as one', () => {
    expect(jointOf(maple, choices).courses).toHaveLength(6)
    expect(jointOf(maple, { ...choices, fit: 'suction' }).course?.words).toContain('Its sigh goes')
    expect(jointOf(maple, { ...choices, lid: 'own' }).courses).toHaveLength(0)
    expect(jointOf(maple, { ...choices, lidWood: 'prunus-serotina' }).courses).toHaveLength(0)
  })

  it('speaks inches to those who read them', () => {
    expect(plainText(fitSentence(benchFit(maple, choices), 'imperial'))).toContain('0.010\u00a0in')
  })

  it.each(['diameterMm', 'clearanceMm'] as const)('%s has the range of the API', (name) => {
    const query = {
      diameterMm: '60',
      clearanceMm: '0.2',
      angleDeg: '30',
      mcChangePct: '4',
      species: 'acer-saccharum',
    }
    const takes = (value: number) => fitQuerySchema.safeParse({ ...query, [name]: String(value) }).success
    const { min, max } = fitFields[name]
    expect([min, max].map(takes)).toEqual([true, true])
    expect([min - 0.01, max + 0.01].map(takes)).toEqual([false, false])
  })

  it('asks again for a clearance that leaves no recess', () => {
    expect(hasNoRecess({ ...maple, diameterMm: 4, clearanceMm: -4.5 }, choices)).toBe(true)
    expect(hasNoRecess({ ...maple, diameterMm: 4, clearanceMm: -4.5 }, { ...choices, fit: 'easy' })).toBe(
      false,
    )
    expect(hasNoRecess(maple, choices)).toBe(false)
  })

  it('leaves idle what the sentence does not ask', () => {
    expect(idleFields(choices)).toEqual(['cutC', 'cutRh', 'nowC', 'nowRh', 'lidPct'])
    expect(idleFields({ ...choices, fit: 'easy', tell: 'air', lid: 'own' })).toEqual([
      'clearanceMm',
      'cutPct',
      'nowPct',
      'doubtPct',
    ])
  })
})
