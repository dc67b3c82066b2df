import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { LONGITUDINAL_PER_PCT } from '@/lib/wood/movement'
import { referenceJson } from '@/tests/support/reference'
import { clearanceFirstOrderMm } from './lid-fit'
import { jointMovement, sizeChangesMm } from './piece-size'
import { movementOfKind } from './wood-kind'

const MAPLE = { tangentialPerPct: 0.00353, radialPerPct: 0.00165 }

const { cross_grain } = z
  .object({
    cross_grain: z.array(
      z.object({
        diameter_mm: z.number(),
        clearance_mm: z.number(),
        ct_per_pct: z.number(),
        delta_mc_pct: z.number(),
        clearance_90_first_order_mm: z.number(),
      }),
    ),
  })
  .parse(referenceJson('ovality_examples.json'))

describe('a whole piece', () => {
  it('70 mm of height change by 0.028 mm in 8 points', () => {
    // Derived: 0.15 % from green to dry over 30 % MC.
    const { heightMm } = sizeChangesMm({ grain: 'end-grain', heightMm: 70, diameterMm: 60 }, MAPLE, 8)
    expect(heightMm).toBeCloseTo(0.028, 6)
  })

  it('an end-grain box grows most along the rings', () => {
    const changes = sizeChangesMm({ grain: 'end-grain', heightMm: 70, diameterMm: 60 }, MAPLE, 4)
    expect(changes.diameterMostMm).toBeCloseTo(60 * 0.00353 * 4, 9)
    expect(changes.diameterLeastMm).toBeCloseTo(60 * 0.00165 * 4, 9)
    expect(changes.words.most).toBe('along the rings')
  })

  it('a side-grain box hardly grows along the grain, and much across it', () => {
    const changes = sizeChangesMm({ grain: 'side-grain', heightMm: 70, diameterMm: 60 }, MAPLE, 4)
    expect(changes.diameterMostMm).toBeCloseTo(60 * 0.00353 * 4, 9)
    expect(changes.diameterLeastMm).toBeCloseTo(60 * LONGITUDINAL_PER_PCT * 4, 9)
    expect(changes.heightMm).toBeCloseTo(70 * 0.00353 * 4, 9)
    expect(changes.words.least).toBe('along the grain')
  })

  it('drying takes what swelling gave', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('end-grain', 'side-grain' as const),
        fc.double({ min: 0, max: 12, noNaN: true }),
        (grain, mc) => {
          const size = { grain, heightMm: 80, diameterMm: 70 }
          const grown = sizeChangesMm(size, MAPLE, mc)
          const shrunk = sizeChangesMm(size, MAPLE, -mc)
          expect(grown.heightMm + shrunk.heightMm).toBeCloseTo(0, 12)
          expect(grown.diameterMostMm + shrunk.diameterMostMm).toBeCloseTo(0, 12)
        },
      ),
    )
  })

  it.each(cross_grain)('a side-grain joint of $diameter_mm mm at a quarter turn', (example) => {
    const plane = jointMovement({ tangentialPerPct: example.ct_per_pct, radialPerPct: 0.0015 }, 'side-grain')
    const both = { ...plane, mcChangePct: example.delta_mc_pct }
    const joint = {
      diameterMm: example.diameter_mm,
      clearanceMm: example.clearance_mm,
      spigot: both,
      socket: both,
    }
    expect(clearanceFirstOrderMm(joint, 90)).toBeCloseTo(example.clearance_90_first_order_mm, 4)
  })

  it('names the input that is wrong', () => {
    const size = { grain: 'end-grain', heightMm: 70, diameterMm: 60 } as const
    expect(() => sizeChangesMm({ ...size, heightMm: NaN }, MAPLE, 1)).toThrow(/heightMm/)
    expect(() => sizeChangesMm({ ...size, diameterMm: 0 }, MAPLE, 1)).toThrow(/diameterMm/)
    expect(() => sizeChangesMm(size, MAPLE, 31)).toThrow(/mcChangePct/)
    expect(() => jointMovement({ ...MAPLE, tangentialPerPct: NaN }, 'side-grain')).toThrow(/tangentialPerPct/)
  })
})

describe('what kind of wood', () => {
  it('plain wood moves as its figures say', () => {
    expect(movementOfKind('plain', MAPLE, 0.3)).toMatchObject({ kind: 'worked-out', movement: MAPLE })
  })

  it('of a hybrid only the plain part moves', () => {
    const half = movementOfKind('hybrid', MAPLE, 0.5)
    expect(half).toMatchObject({
      kind: 'worked-out',
      movement: { tangentialPerPct: 0.001765, radialPerPct: 0.000825 },
    })
    expect(half.words).toContain('plain part')
    expect(movementOfKind('hybrid', MAPLE)).toMatchObject({ movement: MAPLE })
  })

  it('wild grain gets no ovals and stabilised wood is not worked out to move', () => {
    expect(movementOfKind('wild', MAPLE)).toEqual({
      kind: 'not-worked-out',
      words: 'It moves its own way: fit it easy, test it.',
    })
    expect(movementOfKind('stabilised', MAPLE).words).toMatch(/not worked out to move; its plain parts do/)
  })

  it('names the input that is wrong', () => {
    expect(() => movementOfKind('hybrid', MAPLE, 1.1)).toThrow(/plainShare/)
    expect(() => movementOfKind('plain', { ...MAPLE, radialPerPct: NaN })).toThrow(/radialPerPct/)
  })
})
