import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { clearanceFirstOrderMm, type Joint } from '@/lib/fit/lid-fit'
import { jointLoss, lossMm } from './joint-loss'

const movement = { tangentialPerPct: 0.00353, radialPerPct: 0.00165 }

describe('clearance lost by two parts, each at its own moisture', () => {
  it('is the least that the first-order clearance comes to at any angle', () => {
    const change = fc.double({ min: -6, max: 6, noNaN: true })
    fc.assert(
      fc.property(change, change, (ring, lid) => {
        const joint: Joint = {
          diameterMm: 60,
          clearanceMm: 0.2,
          spigot: { ...movement, mcChangePct: ring },
          socket: { ...movement, mcChangePct: lid },
        }
        const tightest = Math.min(
          ...Array.from({ length: 91 }, (_, angle) => clearanceFirstOrderMm(joint, angle)),
        )
        expect(lossMm(jointLoss(60, movement, 'base'), ring, lid)).toBeCloseTo(0.2 - tightest, 9)
      }),
    )
  })

  it('parts in step lose diameter × (C_T - C_R) × change, swelling and drying the same', () => {
    const loss = jointLoss(60, movement, 'base')
    expect(lossMm(loss, 4, 4)).toBeCloseTo(60 * 0.00188 * 4, 12)
    expect(lossMm(loss, -4, -4)).toBeCloseTo(60 * 0.00188 * 4, 12)
  })

  it('a lid behind its ring binds on the way to damp, and sits loose first on the way to dry', () => {
    const loss = jointLoss(60, movement, 'base')
    expect(lossMm(loss, 2, 1)).toBeGreaterThan(lossMm(loss, 2, 2))
    expect(lossMm(loss, -2, -1)).toBeLessThan(lossMm(loss, -2, -2))
    // A lid that drops in carries the spigot: it is the other way round.
    const dropIn = jointLoss(60, movement, 'lid')
    expect(lossMm(dropIn, 2, 1)).toBeLessThan(lossMm(dropIn, 2, 2))
    expect(lossMm(dropIn, -2, -1)).toBeGreaterThan(lossMm(dropIn, -2, -2))
  })
})
