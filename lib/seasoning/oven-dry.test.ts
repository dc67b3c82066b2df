import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { referenceJson } from '@/tests/support/reference'
import { meterMoisture } from './meter'
import { moistureByWeightPct, ovenDryG, weightAtMoistureG } from './oven-dry'

const weighing = z.object({ weighing: z.array(z.record(z.string(), z.unknown())) })
const number = z.number()

function workedExample(key: string) {
  const row = weighing.parse(referenceJson('worked_examples.json')).weighing.find((one) => key in one)
  if (row === undefined) throw new Error(`no worked example with ${key}`)
  return (column: string): number => number.parse(row[column])
}

describe('moisture by weight, against worked_examples.json', () => {
  it('from the oven-dry mass', () => {
    const row = workedExample('oven_dry_g')
    const found = moistureByWeightPct(row('weight_g'), row('oven_dry_g'))
    expect(found).toEqual({ ok: true, value: expect.closeTo(row('mc_pct'), 3) })
  })

  it('from a meter, and what it is to weigh in its room', () => {
    const row = workedExample('meter_mc_pct')
    const dry = ovenDryG(row('weight_g'), row('meter_mc_pct'))
    expect(dry).toBeCloseTo(row('oven_dry_est_g'), 2)
    expect(weightAtMoistureG(dry, row('target_emc_pct'))).toBeCloseTo(row('target_weight_g'), 2)
  })
})

describe('moisture by weight', () => {
  const mass = fc.double({ min: 0.5, max: 20_000, noNaN: true })
  const mc = fc.double({ min: 0, max: 300, noNaN: true })

  it('goes round from mass to MC and back', () => {
    fc.assert(
      fc.property(mass, mc, (dry, mcPct) => {
        const grams = weightAtMoistureG(dry, mcPct)
        expect(ovenDryG(grams, mcPct) / dry).toBeCloseTo(1, 9)
        fc.pre(grams >= dry)
        expect(moistureByWeightPct(grams, dry)).toEqual({ ok: true, value: expect.closeTo(mcPct, 6) })
      }),
    )
  })

  it('refuses wood that is lighter than itself without water', () => {
    expect(moistureByWeightPct(99, 100)).toEqual({ ok: false, error: { code: 'lighter-than-oven-dry' } })
  })

  it('names the input that is no number or out of range', () => {
    expect(() => moistureByWeightPct(NaN, 100)).toThrow(/grams/)
    expect(() => moistureByWeightPct(100, 0)).toThrow(/ovenDryG/)
    expect(() => ovenDryG(100, -1)).toThrow(/mcPct/)
    expect(() => weightAtMoistureG(Infinity, 8)).toThrow(/ovenDryG/)
    expect(() => weightAtMoistureG(100, NaN)).toThrow(/mcPct/)
  })
})

describe('a meter reading, Wood Handbook (FPL-GTR-190, 2010), p. 13-3', () => {
  const reading = { readingPct: 12, kind: 'resistance', calibrationC: 21 } as const

  it('adds half a point for wood 5.6 K colder than the calibration, and takes it off for warmer', () => {
    expect(meterMoisture({ ...reading, woodC: 21 }).mcPct).toBeCloseTo(12, 9)
    expect(meterMoisture({ ...reading, woodC: 21 - 5.6 }).mcPct).toBeCloseTo(12.5, 9)
    expect(meterMoisture({ ...reading, woodC: 21 + 5.6 }).mcPct).toBeCloseTo(11.5, 9)
    expect(meterMoisture({ ...reading, woodC: 9.8, speciesCorrectionPct: -1 }).mcPct).toBeCloseTo(12, 9)
  })

  it('is flagged outside what its kind can tell: 6 to 30 % for pins, 4 to 30 % for plates', () => {
    const flags = (readingPct: number, kind: 'resistance' | 'dielectric') =>
      meterMoisture({ readingPct, kind, woodC: 21 }).flags
    expect(flags(5, 'resistance')).toEqual(['below-range'])
    expect(flags(5, 'dielectric')).toEqual([])
    expect(flags(6, 'resistance')).toEqual([])
    expect(flags(31, 'dielectric')).toEqual(['above-range'])
  })

  it('names the input that is no number or out of range', () => {
    expect(() => meterMoisture({ ...reading, woodC: NaN })).toThrow(/woodC/)
    expect(() => meterMoisture({ ...reading, readingPct: -1, woodC: 20 })).toThrow(/readingPct/)
    expect(() => meterMoisture({ ...reading, calibrationC: 60, woodC: 20 })).toThrow(/calibrationC/)
    expect(() => meterMoisture({ ...reading, woodC: 20, speciesCorrectionPct: 20 })).toThrow(
      /speciesCorrectionPct/,
    )
  })
})
