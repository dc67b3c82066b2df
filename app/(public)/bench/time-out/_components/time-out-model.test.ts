import { describe, expect, it } from 'vitest'
import { timeOutAnswer, timeOutQuerySchema } from '@/lib/bench/time-out'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { fitFields, fits as lidFits } from '../../fit/_components/fit-fields'
import {
  benchTimeOut,
  covers,
  fits,
  idleFields,
  lidFitAddress,
  lids,
  type TimeOutChoices,
  type TimeOutField,
  timeOutFacts,
  timeOutFields,
  timeOutSentence,
  timeOutTwin,
} from './time-out-model'

const values = Object.fromEntries(
  Object.entries(timeOutFields).map(([key, field]) => [key, Number(field.start)]),
) as Record<TimeOutField, number>
const choices: TimeOutChoices = { wood: 'fraxinus-excelsior', fit: 'easy', cover: 'open', lid: 'plug' }
const asText = (query: Record<string, string | number>) =>
  Object.fromEntries(Object.entries(query).map(([key, value]) => [key, String(value)]))

describe('the time-out bench', () => {
  it('tells the early edge first, and the middle as "more likely"', () => {
    const found = benchTimeOut(values, choices)
    if (!found.answer.binds) throw new Error('it may bind')
    expect(strongTexts(timeOutSentence(found))).toHaveLength(1)
    expect(plainText(timeOutSentence(found))).toMatch(
      /^Bring it in within .*; it is more likely good until about/,
    )
    expect(found.answer.minutesEarly).toBeLessThan(found.answer.minutes)
  })

  it('gives the same minutes by the address that it names, for every choice', () => {
    const asked: TimeOutChoices[] = [
      choices,
      { ...choices, wood: '' },
      ...fits.map((fit) => ({ ...choices, fit })),
      ...covers.map((cover) => ({ ...choices, cover })),
      ...lids.map((lid) => ({ ...choices, lid })),
    ]
    for (const one of asked) {
      const found = benchTimeOut(values, one)
      const query = timeOutQuerySchema.parse(asText(timeOutTwin(found).query))
      expect(timeOutAnswer(query)).toEqual(found.answer)
    }
  })

  it('says in words that it keeps its fit where the airs match', () => {
    const same = benchTimeOut({ ...values, toC: values.fromC, toRh: values.fromRh }, choices)
    expect(same.answer.binds).toBe(false)
    expect(plainText(timeOutSentence(same))).toBe(same.answer.words)
    expect(timeOutFacts(same, 'metric').map((fact) => fact.name)).not.toContain('Early edge')
  })

  it('tells the early edge also where the middle keeps its fit', () => {
    // Enough for the whole change by the middle of the reckoning, with little over.
    const found = benchTimeOut({ ...values, allowanceMm: 0.36 }, { ...choices, fit: 'own', lid: 'any' })
    expect(found.answer).toMatchObject({ binds: false, minutesEarly: expect.any(Number) })
    expect(plainText(timeOutSentence(found))).toMatch(/^Bring it in within .* more likely keeps its fit/)
    expect(timeOutFacts(found, 'metric').map((fact) => fact.name)).toContain('Early edge')
  })

  it('names a wood that is not known, and how far it may be out', () => {
    const unknown = benchTimeOut(values, { ...choices, wood: 'quercus-imaginaria' })
    expect(timeOutFacts(unknown, 'metric').at(-1)).toMatchObject({
      figure: 'not known',
      words: expect.stringContaining('40 %'),
    })
  })

  it('hands the box on to the page that turns its lid, in words which that page knows', () => {
    const texts = Object.fromEntries(
      Object.entries(timeOutFields).map(([key, field]) => [key, field.start]),
    ) as Record<TimeOutField, string>
    const query = new URL(lidFitAddress(texts, choices), 'http://here').searchParams
    const known = [...Object.keys(fitFields), 'tell', 'wood', 'fit']
    for (const key of query.keys()) expect(known).toContain(key)
    expect(lidFits).toContain(query.get('fit'))
    expect(query.get('nowRh')).toBe('71')
    expect(lidFitAddress(texts, { ...choices, fit: 'own' })).not.toContain('fit=own')
  })

  it('asks only for the sizes that the choice needs', () => {
    expect(idleFields(choices)).toEqual(['allowanceMm', 'lidWallMm'])
    expect(idleFields({ ...choices, fit: 'own', lid: 'any' })).toEqual(['lidMm', 'lidWallMm'])
  })

  it.each(['diameterMm', 'wallMm', 'spigotMm', 'lidMm', 'lidWallMm', 'allowanceMm'] as const)(
    'asks %s in the range of the API',
    (key) => {
      const lid = key === 'lidWallMm' ? 'hollow' : 'plug'
      const query = asText(timeOutTwin(benchTimeOut(values, { ...choices, fit: 'own', lid })).query)
      const { min, max } = timeOutFields[key]
      for (const [value, isGood] of [
        [min, true],
        [max, true],
        [min * 0.9, false],
        [max * 1.1, false],
      ] as const)
        expect(timeOutQuerySchema.safeParse({ ...query, [key]: String(value) }).success).toBe(isGood)
    },
  )
})
