import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { correctedForDrift, driftBetween, driftOfRoom, type McAt, type RoomDay } from './drift'
import { dayMs } from './policy'

const tauMs = 40 * dayMs
const referencePct = 9

/** A year of days with a damp autumn in it. */
const yearOf = (emcPct: (day: number) => number | undefined): RoomDay[] =>
  Array.from({ length: 365 }, (_, day) => ({ at: day * dayMs, emcPct: emcPct(day) }))
const season = (day: number): number => referencePct + 2 * Math.sin((2 * Math.PI * day) / 365)

/** The wood itself, stepped hour by hour: an independent way to the same answer. */
function woodCourse(startPct: number, emcPct: (day: number) => number): McAt {
  const hourMs = dayMs / 24
  const hours: number[] = [startPct]
  for (let hour = 0; hour < 365 * 24; hour++) {
    const mc = hours[hour] ?? 0
    hours.push(mc + (1 - Math.exp(-hourMs / tauMs)) * (emcPct(Math.floor(hour / 24)) - mc))
  }
  return (at) => hours[Math.round(at / hourMs)]
}

const weighedOf = (mcAt: McAt, dryG: number, days: readonly number[]) =>
  days.map((day) => ({ at: day * dayMs, grams: dryG * (1 + (mcAt(day * dayMs) ?? NaN) / 100) }))

const days = [0, 30, 60, 90, 120, 150, 200, 250, 300]

describe('weights without the room’s drift', () => {
  it('stay level for wood that is done, while those on the scale wander with the seasons', () => {
    const weights = weighedOf(woodCourse(referencePct, season), 400, days)
    const drift = driftOfRoom(yearOf(season), tauMs, referencePct)
    const corrected = correctedForDrift(weights, drift, { ovenDryG: 400 })
    const spread = (grams: number[]) => Math.max(...grams) - Math.min(...grams)
    expect(spread(weights.map((weight) => weight.grams))).toBeGreaterThan(8)
    expect(spread(corrected.map((weight) => weight.correctedG ?? NaN))).toBeLessThan(0.001)
  })

  it('fall as the wood dries, as though the room had held still', () => {
    fc.assert(
      fc.property(fc.double({ min: 6, max: 28, noNaN: true }), (startPct) => {
        const weights = weighedOf(woodCourse(startPct, season), 400, days)
        const held = weighedOf(
          woodCourse(startPct, () => referencePct),
          400,
          days,
        )
        const corrected = correctedForDrift(weights, driftOfRoom(yearOf(season), tauMs, referencePct), {
          ovenDryG: 400,
        })
        corrected.forEach((weight, n) => {
          expect(weight.correctedG).toBeCloseTo(held[n]?.grams ?? NaN, 3)
        })
      }),
      { numRuns: 15 },
    )
  })

  it('are the same from two courses of one model', () => {
    const wasAt = woodCourse(20, season)
    const heldAt = woodCourse(20, () => referencePct)
    const weights = weighedOf(wasAt, 400, days)
    const corrected = correctedForDrift(weights, driftBetween(wasAt, heldAt), { ovenDryG: 400 })
    corrected.forEach((weight) => {
      expect(weight.correctedG).toBeCloseTo(400 * (1 + (heldAt(weight.at) ?? NaN) / 100), 9)
    })
  })

  it('go down for a room that was damper than the reference, by a point on the oven-dry mass', () => {
    const [weight] = correctedForDrift([{ at: 0, grams: 218 }], () => 1, { ovenDryG: 200 })
    expect(weight?.correctedG).toBeCloseTo(216, 9)
    const [guessed] = correctedForDrift([{ at: 0, grams: 218 }], () => 1, { mcAt: () => 9 })
    expect(guessed?.correctedG).toBeCloseTo(216, 9)
    const [unknown] = correctedForDrift([{ at: 0, grams: 224 }], () => 1)
    expect(unknown?.correctedG).toBeCloseTo(222, 9)
  })
})

describe('the drift of a room', () => {
  it('follows a step as a single lag does', () => {
    const drift = driftOfRoom(
      yearOf(() => referencePct + 1),
      tauMs,
      referencePct,
    )
    expect(drift(0)).toBe(0)
    expect(drift(tauMs)).toBeCloseTo(1 - Math.exp(-1), 9)
    expect(drift(tauMs + dayMs / 2)).toBeCloseTo(1 - Math.exp(-40.5 / 40), 9)
  })

  it('is not known before the first day or after the last', () => {
    const drift = driftOfRoom(yearOf(season), tauMs, referencePct)
    expect(drift(-1)).toBeUndefined()
    expect(drift(364.5 * dayMs)).toBeDefined()
    expect(drift(366 * dayMs)).toBeUndefined()
    expect(driftOfRoom([], tauMs, referencePct)(0)).toBeUndefined()
  })

  it.each([
    ['days without a figure', yearOf((day) => (day >= 100 && day < 120 ? undefined : season(day)))],
    [
      'days that are not there',
      yearOf(season).filter((day) => day.at < 100 * dayMs || day.at >= 120 * dayMs),
    ],
  ])('is not known after a gap of half a time constant, and is again once that fades: %s', (_what, known) => {
    const drift = driftOfRoom(known, tauMs, referencePct)
    expect(drift(99 * dayMs)).toBeDefined()
    expect(drift(118 * dayMs)).toBeUndefined()
    expect(drift(121 * dayMs)).toBeUndefined()
    expect(drift(150 * dayMs)).toBeDefined()
    const corrected = correctedForDrift([{ at: 121 * dayMs, grams: 400 }], drift, {})
    expect(corrected).toEqual([{ at: 121 * dayMs, grams: 400, correctedG: undefined }])
  })

  it('bridges a short gap', () => {
    const gap = yearOf((day) => (day >= 100 && day < 104 ? undefined : season(day)))
    const whole = driftOfRoom(yearOf(season), tauMs, referencePct)(130 * dayMs) ?? NaN
    expect(Math.abs((driftOfRoom(gap, tauMs, referencePct)(130 * dayMs) ?? NaN) - whole)).toBeLessThan(0.15)
  })

  it('names the input that is no number or out of range', () => {
    expect(() => driftOfRoom([], NaN, 9)).toThrow(/tauMs/)
    expect(() => driftOfRoom([], tauMs, 31)).toThrow(/referenceEmcPct/)
    expect(() => driftOfRoom([{ at: 0, emcPct: NaN }], tauMs, 9)).toThrow(/emcPct/)
    expect(() => driftOfRoom([...yearOf(season)].reverse(), tauMs, 9)).toThrow(/order/)
    expect(() => correctedForDrift([{ at: 0, grams: NaN }], () => 1)).toThrow(/grams/)
    expect(() => correctedForDrift([{ at: 0, grams: 1 }], () => NaN)).toThrow(/drift/)
    expect(() => correctedForDrift([], () => 1, { ovenDryG: 0 })).toThrow(/ovenDryG/)
  })
})
