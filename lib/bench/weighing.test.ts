import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { weighingAnswer, weighingQuerySchema, type WeighingAnswer } from './weighing'

const ask = (grams: string, everyDays = '7', more: Record<string, string> = {}) =>
  weighingAnswer(weighingQuerySchema.parse({ grams, everyDays, ...more }))

function answered(...asked: Parameters<typeof ask>): WeighingAnswer {
  const answer = ask(...asked)
  if (!answer.ok) throw new Error(answer.error.message)
  return answer.value
}

function refused(...asked: Parameters<typeof ask>): string {
  const answer = ask(...asked)
  if (answer.ok) throw new Error('it was not refused')
  expect(answer.error).toMatchObject({ code: 'not-possible', path: 'grams' })
  return answer.error.message
}

describe('/bench/weighing', () => {
  it('182.0, 167.9 and 160.0 g a week apart head for 149.93 g with 12.08 days', () => {
    const answer = answered('182.0,167.9,160.0')
    expect(answer).toMatchObject({
      direction: 'drying',
      finalGrams: expect.closeTo(149.93, 2),
      timeConstantDays: expect.closeTo(12.08, 2),
      gramsPerWeekFirst: expect.closeTo(14.1, 2),
      gramsPerWeekNow: expect.closeTo(7.9, 2),
    })
    expect(answer.finalGramsLow).toBeLessThan(answer.finalGrams)
    expect(answer.finalGramsHigh).toBeGreaterThan(answer.finalGrams)
  })

  it('holds a forecast back until the loss has halved, and says why', () => {
    const early = answered('182.0,167.9,160.0')
    expect(early).toMatchObject({ mayForecast: false, flags: ['not-half-yet', 'wide-doubt'] })
    expect(early.words).toContain('looks closer to done than it is')
    expect(answered('182.0,167.9,163.0')).toMatchObject({ mayForecast: true, flags: [] })
  })

  it('is mirrored for wood that takes up water', () => {
    expect(answered('118.0,132.1,140.0')).toMatchObject({
      direction: 'gaining',
      finalGrams: expect.closeTo(150.07, 2),
      timeConstantDays: expect.closeTo(12.08, 2),
    })
  })

  it('takes more than three weights, by least squares', () => {
    const grams = Array.from({ length: 8 }, (_, n) => (150 + 40 * Math.exp(-n / 2)).toFixed(2)).join(',')
    const answer = answered(grams, '10')
    expect(answer.finalGrams).toBeCloseTo(150, 1)
    expect(answer.timeConstantDays).toBeCloseTo(20, 1)
    expect(answer.mayForecast).toBe(true)
  })

  it('goes by the last decimal written, unless the step of the scale is told', () => {
    const width = (answer: WeighingAnswer) => (answer.finalGramsHigh ?? NaN) - (answer.finalGramsLow ?? NaN)
    expect(width(answered('182,167.9,160.0'))).toBeCloseTo(width(answered('182.0,167.9,160.0')), 9)
    expect(width(answered('182,168,165'))).toBeGreaterThan(2 * width(answered('182.0,168.0,165.0')))
    expect(width(answered('182,168,160', '7', { stepG: '0.1' }))).toBeCloseTo(
      width(answered('182.0,168.0,160.0')),
      9,
    )
    expect(answered('100,95,92', '7', { stepG: '2' }).flags).toContain('wide-doubt')
  })

  it.each([
    ['182,190,188', 'up and down'],
    ['182,167,152', 'as fast as before, or faster'],
    ['182,175,160', 'as fast as before, or faster'],
    ['182,182,182', 'The weight holds'],
    ['182,170,160,150,140', 'as fast as before, or faster'],
    ['180,184,179,183,180', 'up and down'],
  ])('says what is wrong with %s', (grams, words) => {
    expect(refused(grams)).toContain(words)
  })

  it.each([
    '182,167.9',
    '182,,160',
    '182;167;160',
    'a,b,c',
    '182,167.9,-160',
    '182,167.9,0',
    '182,167.9,NaN',
    '',
  ])('refuses %s as weights, naming the unit and the range', (grams) => {
    const parsed = weighingQuerySchema.safeParse({ grams, everyDays: '7' })
    if (parsed.success) throw new Error('it was not refused')
    expect(parsed.error.issues.map((issue) => issue.path.join('.'))).toEqual(['grams'])
    expect(parsed.error.issues[0]?.message).toMatch(/from 0\.001 to 200000 g/)
  })

  it('answers or refuses any weights, without a figure that is none', () => {
    const weights = fc.array(fc.integer({ min: 1, max: 2_000_000 }), { minLength: 3, maxLength: 8 })
    fc.assert(
      fc.property(weights, fc.boolean(), fc.constantFrom('0.01', '7', '366'), (tenths, isFalling, every) => {
        const grams = tenths.map((tenth) => tenth / 10)
        if (isFalling) grams.sort((a, b) => b - a)
        const answer = ask(grams.join(','), every)
        const sent = JSON.stringify(answer)
        expect(sent).not.toMatch(/null|NaN|Infinity/)
        if (!answer.ok) return
        expect(answer.value.finalGrams).toBeGreaterThan(0)
        if (answer.value.finalGramsLow !== undefined) expect(answer.value.finalGramsLow).toBeGreaterThan(0)
        expect(answer.value.timeConstantDays).toBeGreaterThan(0)
      }),
      { numRuns: 40 },
    )
  })
})
