import { describe, expect, it } from 'vitest'
import { weighingDue, weighingGapMs } from './due'
import { dryMass, moistureOfWeight } from './dry-mass'
import { dayMs } from './policy'
import { currentSeries } from './series'

const now = 1000 * dayMs
const at = (day: number) => ({ at: day * dayMs, grams: 300 - day / 10 })

describe('the current series', () => {
  it.each(['cut', 'oil', 'wax', 'label', 'near-final', 'roughed', 'final-fit', 're-true'])(
    'begins anew after %s',
    (kind) => {
      const series = currentSeries([at(1), at(20), at(5)], [{ kind, at: 4 * dayMs }], now)
      expect(series.weighings).toEqual([at(5), at(20)])
      expect(series.openedBy).toEqual({ kind, at: 4 * dayMs })
      expect(series.earlierCount).toBe(1)
    },
  )

  it.each(['meter', 'oven-dry', 'note'])('goes on through %s', (kind) => {
    const series = currentSeries([at(1), at(5)], [{ kind, at: 4 * dayMs }], now)
    expect(series).toEqual({ weighings: [at(1), at(5)], earlierCount: 0 })
  })

  it('counts from the latest of several events, and from none that is still to come', () => {
    const events = [
      { kind: 'near-final', at: 10 * dayMs },
      { kind: 'roughed', at: 2 * dayMs },
      { kind: 'wax', at: now + dayMs },
    ]
    const series = currentSeries([at(1), at(5), at(10), at(12)], events, now)
    expect(series.weighings).toEqual([at(10), at(12)])
    expect(series.openedBy?.kind).toBe('near-final')
    expect(series.earlierCount).toBe(2)
  })
})

describe('a weighing is due', () => {
  it('monthly; weekly under 100 g on a scale that shows 0.1 g', () => {
    expect(weighingGapMs(300, 0.1)).toBe(30 * dayMs)
    expect(weighingGapMs(99, 0.1)).toBe(7 * dayMs)
    expect(weighingGapMs(99, 0.01)).toBe(7 * dayMs)
    expect(weighingGapMs(99, 1)).toBe(30 * dayMs)
    expect(weighingGapMs(100, 0.1)).toBe(30 * dayMs)
    expect(() => weighingGapMs(NaN, 1)).toThrow(/grams/)
    expect(() => weighingGapMs(1, 0)).toThrow(/stepG/)
  })

  it('at once in a new series, else counted from the last weight', () => {
    expect(weighingDue(undefined, now - 1, now)).toEqual({ dueAt: now - 1, isDue: true })
    const last = { at: now - 29 * dayMs, grams: 300, stepG: 1 }
    expect(weighingDue(last, 0, now)).toEqual({ dueAt: now + dayMs, isDue: false })
    expect(weighingDue(last, 0, now + dayMs).isDue).toBe(true)
  })
})

describe('the oven-dry mass of a series', () => {
  const weights = [
    { at: 0, grams: 236 },
    { at: 30 * dayMs, grams: 224 },
  ]

  it('is the latest that was told', () => {
    const told = [
      { at: 5 * dayMs, grams: 199 },
      { at: 9 * dayMs, grams: 200 },
    ]
    expect(dryMass(weights, [{ at: 0, mcPct: 30 }], told, 0.1)).toEqual({
      grams: 200,
      doubtG: 0.1,
      from: 'oven-dry',
    })
  })

  it('else comes from meter readings beside weights, with the meter’s doubt', () => {
    const meters = [
      { at: dayMs, mcPct: 18 },
      { at: 31 * dayMs, mcPct: 12 },
      { at: 15 * dayMs, mcPct: 29 },
    ]
    const dry = dryMass(weights, meters, [], 0.1)
    if (dry === undefined) throw new Error('there is one')
    expect(dry.from).toBe('meter')
    expect(dry.grams).toBeCloseTo(200, 6)
    // One point at 12 to 18 % MC is 1/112 to 1/118 of the mass.
    expect(dry.doubtG).toBeCloseTo(200 * (1 / 112 + 1 / 118) * 0.5, 2)
    const now18 = moistureOfWeight(236, dry)
    expect(now18.pct).toBeCloseTo(18, 6)
    expect(now18.doubtPct).toBeGreaterThan(0.9)
    expect(now18.doubtPct).toBeLessThan(1.2)
  })

  it('is not known without either', () => {
    expect(dryMass(weights, [{ at: 15 * dayMs, mcPct: 12 }], [], 1)).toBeUndefined()
  })
})
