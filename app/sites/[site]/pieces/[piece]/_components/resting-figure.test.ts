import { describe, expect, it } from 'vitest'
import type { RestView } from '@/lib/seasoning/rest-view'
import { monthTicks, restingFigure, restingSentence, sideTicks, weighedMcPct } from './resting-figure'

const now = Date.parse('2026-03-05T13:10:00Z')
const day = (days: number): string => new Date(now + days * 86_400_000).toISOString()

const bare: RestView = {
  words: 'Not ready: it needs 3 weights over 8 weeks, and has none so far.',
  next: 'Weigh it now, and then once a month.',
  state: 'not-ready',
  missing: [],
  met: [],
  readyFromAt: null,
  readyToAt: null,
  series: { openedBy: null, weights: 0, earlierWeights: 0 },
  stepG: 1,
  isStepAssumed: true,
  forecast: null,
  noForecast: null,
  mc: { pct: 11, doubtPct: 0.6, from: 'model' },
  dryMass: null,
  target: { pct: 9, room: 'Study', days: 365 },
  nextWeighing: { at: day(0), isDue: true },
  weighings: { at: [], grams: [], correctedG: [] },
  fit: null,
  forecastCurve: null,
  model: { at: [day(-60), day(0)], mcPct: [13, 11] },
}
const weighed: RestView = {
  ...bare,
  dryMass: { grams: 400, doubtG: 1, from: 'oven-dry' },
  weighings: {
    at: [day(-90), day(-60), day(-30)],
    grams: [460, 450, 446],
    correctedG: [460, 449, 444],
  },
  fit: { at: [day(-90), day(-30)], grams: [460, 444] },
  forecastCurve: { at: [day(-30), day(170)], grams: [444, 436], lowG: [442, 432], highG: [446, 440] },
  readyFromAt: day(20),
  readyToAt: day(50),
}

describe('the resting curve', () => {
  it('is the model alone, in % MC, before the first weighing', () => {
    const figure = restingFigure(bare, 'metric', now)
    expect(figure).toMatchObject({ scale: 'mc', unit: '% MC', weighed: [], fit: [], forecast: [] })
    expect(figure?.model.map(({ value }) => value)).toEqual([13, 11])
    expect(figure?.ribbon?.low).toBeCloseTo(8.3, 9)
    expect(figure?.ribbon?.high).toBeCloseTo(9.7, 9)
    expect(restingFigure({ ...bare, model: null }, 'metric', now)).toBeUndefined()
  })

  it('is in % MC where an oven or a meter tells the oven-dry mass, without the room’s drift', () => {
    const figure = restingFigure(weighed, 'metric', now)
    expect(figure?.isCorrected).toBe(true)
    expect(figure?.weighed.map(({ value }) => value)).toEqual([
      expect.closeTo(15, 6),
      expect.closeTo(12.25, 6),
      expect.closeTo(11, 6),
    ])
    expect(weighedMcPct(446, weighed)).toBeCloseTo(11.5, 6)
  })

  it('is in the reader’s own unit of weight where only the model tells it, ribbon and model with it', () => {
    const rest: RestView = { ...weighed, dryMass: { grams: 400, doubtG: 4, from: 'model' } }
    const figure = restingFigure(rest, 'metric', now)
    expect(figure).toMatchObject({ scale: 'mass', unit: 'g' })
    expect(figure?.ribbon?.high).toBeCloseTo(438.8, 6)
    expect(figure?.model[0]?.value).toBeCloseTo(452, 6)
    expect(restingFigure(rest, 'imperial', now)?.weighed[0]?.value).toBeCloseTo(16.23, 2)
    expect(weighedMcPct(446, rest)).toBeUndefined()
  })

  it('shows weights as weighed where the drift of too few is known', () => {
    const rest = { ...weighed, weighings: { ...weighed.weighings, correctedG: [null, 449, 444] } }
    const figure = restingFigure(rest, 'metric', now)
    expect(figure?.isCorrected).toBe(false)
    expect(figure?.weighed[2]?.value).toBeCloseTo(11.5, 6)
  })

  it('looks ahead to the end of the ready range, and cuts the forecast where it ends', () => {
    const figure = restingFigure(weighed, 'metric', now)
    expect(figure?.toAt).toBeGreaterThan(Date.parse(day(50)))
    expect(figure?.toAt).toBeLessThan(Date.parse(day(120)))
    expect(figure?.forecast.at(-1)?.at).toBe(figure?.toAt)
    const ends = figure?.doubt.at(-1)
    expect(ends?.low).toBeLessThan(ends?.high ?? 0)
    expect(figure?.high).toBeGreaterThan(15)
    expect(figure?.low).toBeLessThan(8.3)
  })

  it('has round figures up its side and the firsts of months along its foot', () => {
    expect(sideTicks({ low: 7.7, high: 15.6 })).toEqual([8, 10, 12, 14])
    const ticks = monthTicks({ fromAt: Date.parse(day(-120)), toAt: Date.parse(day(60)) }, 'Europe/London', 9)
    expect(ticks.map(({ text }) => text)).toEqual(['Dec 2025', 'Jan 2026', 'Feb', 'Mar', 'Apr', 'May'])
    expect(ticks[4]?.at).toBe(Date.parse('2026-03-31T23:00:00Z'))
    expect(monthTicks({ fromAt: Date.parse(day(-700)), toAt: now }, 'UTC', 6).length).toBeLessThanOrEqual(6)
  })

  it('is said in a sentence', () => {
    const words = restingSentence(weighed, 'metric', 'Europe/London', new Date(now))
    expect(words).toMatch(
      /3 weighings, from 460\sg to 446\sg, the last on Tue 3 Feb\. It stands at about 11\.0/,
    )
    expect(restingSentence(bare, 'metric', 'UTC', new Date(now))).toMatch(/not weighed yet/)
  })
})
