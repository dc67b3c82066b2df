import { describe, expect, it } from 'vitest'
import { weighingQuerySchema } from '@/lib/bench/weighing'
import { plainText } from '@/lib/format/sentence'
import { dayMs, weekMs } from '@/lib/seasoning/policy'
import {
  benchReady,
  type Known,
  readyFacts,
  type ReadyField,
  readyFields,
  readySentence,
  readyTwins,
  spanWords,
} from './ready-model'
import { datesEnding, gramsField, weighingsOf } from './weighings'

const values = Object.fromEntries(
  Object.entries(readyFields).map(([key, field]) => [key, Number(field.start)]),
) as Record<ReadyField, number>
const every = { kind: 'every', days: 28 } as const
const weighed = (...grams: number[]) => {
  const found = weighingsOf(grams.map(String), every, 'metric')
  if (!found.ok) throw new Error(found.error.join(' '))
  return found.value
}
const bench = (grams: number[], known: Known = 'oven', change: Partial<typeof values> = {}) =>
  benchReady(weighed(...grams), { ...values, ...change }, { known, isByDate: false }, 'metric')
const bare = (text: unknown) => String(text).replaceAll('\u00a0', ' ')

describe('weighings as typed', () => {
  it('take days in order of time, and name the one that is not', () => {
    const on = ['2026-01-05', '2026-02-02', '2026-01-30']
    expect(weighingsOf(['420', '410', '405'], { kind: 'dates', on }, 'metric')).toEqual({
      ok: false,
      error: ['Day 3: a day after the one before it.'],
    })
    const good = weighingsOf(['420', '410'], { kind: 'dates', on }, 'metric')
    expect(good.ok && (good.value[1]?.at ?? 0) - (good.value[0]?.at ?? 0)).toBe(28 * dayMs)
  })

  it('name a weight that is none, with its range and unit', () => {
    expect(weighingsOf(['420', 'heavy'], every, 'metric')).toEqual({
      ok: false,
      error: ['Weight 2: a number from 0.001 to 200000 g.'],
    })
  })

  it('ask for weights that the API takes', () => {
    const { min, max } = gramsField(1)
    const query = (grams: number) => ({
      grams: `${String(grams)},${String(grams)},${String(grams)}`,
      everyDays: '7',
    })
    expect(weighingQuerySchema.safeParse(query(min)).success).toBe(true)
    expect(weighingQuerySchema.safeParse(query(max)).success).toBe(true)
    expect(weighingQuerySchema.safeParse(query(max + 1)).success).toBe(false)
  })

  it('go on by date from equal gaps', () => {
    expect(datesEnding(Date.UTC(2026, 2, 30), 3, 28)).toEqual(['2026-02-02', '2026-03-02', '2026-03-30'])
  })
})

describe('the ready bench', () => {
  it('forecasts a span and the weight it ends at, with doubt', () => {
    const found = bench([470, 442, 427, 419, 415, 413])
    expect(found.answer.ready).toBe(false)
    expect(plainText(readySentence(found))).toMatch(
      /^Leave it resting: it should be ready (between|within) .* weeks? /,
    )
    const [end] = readyFacts(found, 'metric')
    expect(bare(end?.figure)).toMatch(/^about 41\d(\.\d)? g$/)
    expect(bare(end?.words)).toMatch(/^8 in 10: 4\d\d(\.\d)? g to 4\d\d(\.\d)? g\.$/)
  })

  it('makes no forecast before the loss has halved, and says why', () => {
    const found = bench([470, 448, 430])
    expect(found.end).toBeUndefined()
    expect(plainText(readySentence(found))).toContain(
      'Until that has halved, it looks closer to done than it is.',
    )
  })

  it('is ready when it weighs the same over eight weeks, matches and has rested', () => {
    const found = bench([411, 410, 410, 410], 'oven', { roughedDays: 60 })
    expect(plainText(readySentence(found))).toMatch(/^Ready:/)
    const unknown = bench([411, 410, 410, 410], 'none', { roughedDays: 60 })
    expect(unknown.answer.missing.map(({ code }) => code)).toEqual(['mc-unknown'])
    expect(plainText(readySentence(unknown))).toContain('its moisture is to be found out')
  })

  it('tells moisture by the oven-dry weight', () => {
    const found = bench([470, 442, 427, 419, 415, 413], 'oven', { ovenDryG: 375 })
    expect(found.mc?.pct).toBeCloseTo(10.13, 2)
    expect(found.target?.lowG).toBeCloseTo(375 * 1.083, 6)
  })

  it('gives spans in days where there are days, else in weeks', () => {
    const lastAt = Date.UTC(2026, 2, 1)
    const span = { fromAt: lastAt + 3 * weekMs, toAt: lastAt + 5.2 * weekMs }
    expect(spanWords(span, lastAt, false)).toBe('between 3 and 6 weeks after the last weighing')
    expect(spanWords(span, lastAt, true)).toBe('between Sun 22 Mar and Mon 6 Apr')
  })

  it('names the query that the API takes, for equal gaps only', () => {
    const [twin] = readyTwins(bench([470, 442, 427]), 28, 1)
    expect(weighingQuerySchema.safeParse({ ...twin?.query, everyDays: '28', stepG: '1' }).success).toBe(true)
    expect(readyTwins({ ...bench([470, 442, 427]), isByDate: true }, 28, 1)).toEqual([])
  })
})
