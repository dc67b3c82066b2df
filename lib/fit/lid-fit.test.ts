import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { referenceJson } from '@/tests/support/reference'
import { LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import {
  allowedChange,
  allowedChangeAnyAngle,
  allowedMcChangePct,
  clearanceExactMm,
  clearanceFirstOrderMm,
  type Joint,
  type JointPart,
} from './lid-fit'
import { ovalOfJoint } from './ovality'

const part = z
  .object({ ct: z.number(), cr: z.number(), dmc: z.number() })
  .transform((p): JointPart => ({ tangentialPerPct: p.ct, radialPerPct: p.cr, mcChangePct: p.dmc }))

const joint = {
  diameter_mm: z.number(),
  clearance_mm: z.number(),
  ct_per_pct: z.number(),
}

const examples = z
  .object({
    cases: z.array(
      z.object({
        ...joint,
        id: z.string(),
        cr_per_pct: z.number(),
        delta_mc_pct: z.number(),
        theta_deg: z.number(),
        clearance_first_order_mm: z.number(),
        clearance_exact_mm: z.number(),
        axis_t_mm: z.number(),
        axis_r_mm: z.number(),
        ovality_mm: z.number(),
      }),
    ),
    allowed_delta_mc: z.array(
      z.object({ ...joint, cr_per_pct: z.number(), theta_deg: z.number(), allowed_pct: z.number() }),
    ),
    different_pieces: z.array(
      z.object({
        note: z.string(),
        diameter_mm: z.number(),
        clearance_mm: z.number(),
        base: part,
        lid: part,
        theta_0_mm: z.number(),
        theta_90_mm: z.number(),
      }),
    ),
    cross_grain: z.array(
      z.object({
        ...joint,
        note: z.string(),
        cl_per_pct: z.number(),
        delta_mc_pct: z.number(),
        clearance_90_first_order_mm: z.number(),
      }),
    ),
  })
  .parse(referenceJson('ovality_examples.json'))

function jointOfOneWood(
  diameterMm: number,
  clearanceMm: number,
  tangentialPerPct: number,
  radialPerPct: number,
  mcChangePct: number,
): Joint {
  const both: JointPart = { tangentialPerPct, radialPerPct, mcChangePct }
  return { diameterMm, clearanceMm, spigot: both, socket: both }
}

describe('lid fit, against derived examples (first order to 1e-4 mm, exact to 2e-4 mm)', () => {
  it.each(examples.cases)('$id', (example) => {
    const case_ = jointOfOneWood(
      example.diameter_mm,
      example.clearance_mm,
      example.ct_per_pct,
      example.cr_per_pct,
      example.delta_mc_pct,
    )
    const firstOrderMm = clearanceFirstOrderMm(case_, example.theta_deg)
    const exactMm = clearanceExactMm(case_, example.theta_deg)
    expect(Math.abs(firstOrderMm - example.clearance_first_order_mm)).toBeLessThan(1e-4)
    expect(Math.abs(exactMm - example.clearance_exact_mm)).toBeLessThan(2e-4)
    const oval = ovalOfJoint(example.diameter_mm, case_.spigot, example.delta_mc_pct)
    expect(oval.tangentialDiameterMm).toBeCloseTo(example.axis_t_mm, 4)
    expect(oval.radialDiameterMm).toBeCloseTo(example.axis_r_mm, 4)
    expect(oval.outOfRoundMm).toBeCloseTo(example.ovality_mm, 4)
  })

  it.each(examples.allowed_delta_mc)(
    '$diameter_mm mm with $clearance_mm mm allows $allowed_pct % MC',
    (example) => {
      const movement = { tangentialPerPct: example.ct_per_pct, radialPerPct: example.cr_per_pct }
      const allowedPct = allowedMcChangePct(
        example.diameter_mm,
        example.clearance_mm,
        movement,
        example.theta_deg,
      )
      expect(allowedPct).toBeCloseTo(example.allowed_pct, 3)
    },
  )

  it.each(examples.different_pieces)('$note', (example) => {
    const case_: Joint = {
      diameterMm: example.diameter_mm,
      clearanceMm: example.clearance_mm,
      spigot: example.base,
      socket: example.lid,
    }
    expect(Math.abs(clearanceFirstOrderMm(case_, 0) - example.theta_0_mm)).toBeLessThan(1e-4)
    expect(Math.abs(clearanceFirstOrderMm(case_, 90) - example.theta_90_mm)).toBeLessThan(1e-4)
    expect(Math.abs(clearanceExactMm(case_, 0) - example.theta_0_mm)).toBeLessThan(0.004)
    expect(Math.abs(clearanceExactMm(case_, 90) - example.theta_90_mm)).toBeLessThan(0.004)
  })

  it.each(examples.cross_grain)('$note', (example) => {
    expect(example.cl_per_pct).toBe(LONGITUDINAL_PER_PCT)
    const case_ = jointOfOneWood(
      example.diameter_mm,
      example.clearance_mm,
      example.ct_per_pct,
      LONGITUDINAL_PER_PCT,
      example.delta_mc_pct,
    )
    expect(Math.abs(clearanceFirstOrderMm(case_, 90) - example.clearance_90_first_order_mm)).toBeLessThan(
      1e-4,
    )
  })
})

describe('lid fit, properties', () => {
  const diameter = fc.double({ min: 20, max: 100, noNaN: true })
  const clearance = fc.double({ min: 0.02, max: 0.4, noNaN: true })
  const change = fc.double({ min: -8, max: 8, noNaN: true })
  const angle = fc.integer({ min: 0, max: 180 })
  const wood = fc
    .record({
      radialPerPct: fc.double({ min: 0.0008, max: 0.0025, noNaN: true }),
      more: fc.double({ min: 0.0003, max: 0.0025, noNaN: true }),
    })
    .map(({ radialPerPct, more }) => ({ radialPerPct, tangentialPerPct: radialPerPct + more }))

  it('half a turn changes nothing', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, change, angle, (d, c, w, m, a) => {
        const case_ = jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, m)
        expect(clearanceFirstOrderMm(case_, a + 180)).toBeCloseTo(clearanceFirstOrderMm(case_, a), 9)
        expect(clearanceExactMm(case_, a + 180)).toBeCloseTo(clearanceExactMm(case_, a), 6)
      }),
    )
    const case_ = jointOfOneWood(60, 0.2, 0.00353, 0.00165, 4)
    expect(clearanceFirstOrderMm(case_, 180)).toBe(0.2)
    expect(clearanceExactMm(case_, 180)).toBeCloseTo(clearanceExactMm(case_, 0), 9)
  })

  it('swelling and drying lose the same, to first order', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, change, angle, (d, c, w, m, a) => {
        const swollen = clearanceFirstOrderMm(jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, m), a)
        const dried = clearanceFirstOrderMm(jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, -m), a)
        expect(swollen).toBeCloseTo(dried, 10)
      }),
    )
  })

  it('first order misses the exact by no more than what the clearance itself changes, for parts that change alike', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, change, angle, (d, c, w, m, a) => {
        const case_ = jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, m)
        const missMm = Math.abs(clearanceExactMm(case_, a) - clearanceFirstOrderMm(case_, a))
        expect(missMm).toBeLessThanOrEqual(c * w.tangentialPerPct * Math.abs(m) + 1e-9)
      }),
      { numRuns: 1000 },
    )
  })

  it('is tightest a quarter turn on and loses nothing with the grain lined up', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, change, angle, (d, c, w, m, a) => {
        const case_ = jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, m)
        expect(clearanceFirstOrderMm(case_, 90)).toBeLessThanOrEqual(clearanceFirstOrderMm(case_, a) + 1e-12)
        expect(clearanceFirstOrderMm(case_, 0)).toBe(c)
      }),
    )
  })

  it('at the allowed change exactly what was to be kept is left', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, fc.integer({ min: 30, max: 150 }), (d, c, w, a) => {
        const keepMm = c / 3
        const allowedPct = allowedMcChangePct(d, c, w, a, keepMm)
        fc.pre(allowedPct !== undefined && allowedPct <= 30)
        const left = clearanceFirstOrderMm(
          jointOfOneWood(d, c, w.tangentialPerPct, w.radialPerPct, allowedPct ?? NaN),
          a,
        )
        expect(left).toBeCloseTo(keepMm, 9)
      }),
    )
  })

  it('has no limit with the grain lined up, and none to give where the clearance is already gone', () => {
    const maple = { tangentialPerPct: 0.00353, radialPerPct: 0.00165 }
    expect(allowedMcChangePct(60, 0.2, maple, 0)).toBeUndefined()
    expect(allowedMcChangePct(60, 0.2, maple, 180)).toBeUndefined()
    expect(allowedMcChangePct(60, 0.2, maple, 90, 0.3)).toBe(0)
  })

  it('what is allowed however it is turned is allowed at every angle, and no more would be', () => {
    fc.assert(
      fc.property(diameter, clearance, wood, wood, change, change, (d, c, base, lid, m, n) => {
        const case_: Joint = {
          diameterMm: d,
          clearanceMm: c,
          spigot: { ...base, mcChangePct: m },
          socket: { ...lid, mcChangePct: n },
        }
        const any = allowedChangeAnyAngle(case_, 0) ?? Infinity
        const each = Array.from({ length: 19 }, (_, n) => allowedChange(case_, n * 5, 0) ?? Infinity)
        expect(any).toBeLessThanOrEqual(Math.min(...each) + 1e-9)
        expect(each).toContain(any)
      }),
    )
    // Derived example: hard maple, 60 mm, 0.2 mm, any angle: 1.77 % MC.
    expect(allowedChangeAnyAngle(jointOfOneWood(60, 0.2, 0.00353, 0.00165, 4), 0)).toBeCloseTo(1.773, 3)
    expect(() => allowedChangeAnyAngle(jointOfOneWood(60, 0.2, 0.00353, 0.00165, 4), NaN)).toThrow(/keepMm/)
  })

  it('a change too small to have a proportion counts as none', () => {
    const case_ = jointOfOneWood(60, 0.2, 0.00353, 0.00165, 0)
    const hardly: Joint = { ...case_, socket: { ...case_.socket, mcChangePct: -5e-324 } }
    expect(allowedChange(hardly, 90, 0)).toBe(allowedChange(case_, 90, 0))
  })

  it('parts that changed oppositely still have a clearance at every angle', () => {
    const case_ = jointOfOneWood(60, 0.2, 0.00353, 0.00165, 1.3)
    const opposite: Joint = { ...case_, socket: { ...case_.socket, mcChangePct: -1.3 } }
    for (let angleDeg = 0; angleDeg <= 180; angleDeg += 1) {
      expect(clearanceFirstOrderMm(opposite, angleDeg)).toBeLessThan(0)
    }
  })

  it('works at the ends of its range', () => {
    const widest = jointOfOneWood(1000, 10, 0.00353, 0.00165, 0)
    expect(clearanceExactMm(widest, 90)).toBeCloseTo(10, 9)
    expect(() => clearanceExactMm({ ...widest, diameterMm: 5, clearanceMm: -5 }, 0)).toThrow(/clearanceMm/)
  })

  it('names the input that is wrong', () => {
    const case_ = jointOfOneWood(60, 0.2, 0.00353, 0.00165, 4)
    expect(() => clearanceFirstOrderMm(case_, NaN)).toThrow(/angleDeg/)
    expect(() => clearanceExactMm({ ...case_, diameterMm: NaN }, 0)).toThrow(/diameterMm/)
    expect(() => clearanceExactMm({ ...case_, clearanceMm: NaN }, 0)).toThrow(/clearanceMm/)
    expect(() =>
      clearanceFirstOrderMm({ ...case_, socket: { ...case_.socket, mcChangePct: NaN } }, 0),
    ).toThrow(/mcChangePct/)
    expect(() => ovalOfJoint(60, { tangentialPerPct: NaN, radialPerPct: 0.001 }, 1)).toThrow(
      /tangentialPerPct/,
    )
    expect(() => allowedMcChangePct(60, 0.2, case_.spigot, 90, NaN)).toThrow(/keepMm/)
  })
})
