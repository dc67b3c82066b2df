import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cylinderResponse } from '@/lib/carry/cylinder-response'
import { SURFACE_M_PER_S, transverseDiffusionM2PerS } from '@/lib/carry/diffusion'
import { plugLidFractionChanged, ringFractionChanged } from '@/lib/carry/joint'
import { RUNG_RATIO, RUNGS } from './exponentials'
import { filmOfFinish, restingSurfaceMPerS } from './finish'
import { type PartFilter, partFilter } from './part'

const WOOD = { densityKgM3: 700, temperatureC: 10, mcPct: 11 }
const ACROSS = transverseDiffusionM2PerS(WOOD.temperatureC, WOOD.mcPct, WOOD.densityKgM3)

/** The fraction changed by a filter's ladder after some diffusion time. */
const changed = (part: PartFilter, cover: keyof PartFilter['weights'], timeM2: number): number =>
  1 -
  part.weights[cover].reduce(
    (left, weight, rung) => left + weight * Math.exp(-part.slowestPerM2 * RUNG_RATIO ** rung * timeM2),
    0,
  )

describe('the ladder of a part, against the full series (Crank, 1975, ch. 4 and 5)', () => {
  const sizes = fc.record({
    wallMm: fc.double({ min: 1.5, max: 8, noNaN: true }),
    lengthMm: fc.double({ min: 4, max: 20, noNaN: true }),
    hours: fc.double({ min: 0.2, max: 400, noNaN: true }),
    cover: fc.constantFrom('open', 'lid-on', 'closed' as const),
  })

  it('a ring is within 0.012 at any time and under every cover', () => {
    fc.assert(
      fc.property(sizes, ({ wallMm, lengthMm, hours, cover }) => {
        const part = partFilter({ kind: 'ring', wallMm, lengthMm, grain: 'end-grain' }, WOOD.densityKgM3)
        const exposure = {
          faces: cover === 'open' ? 2 : 1,
          rim: cover === 'closed' ? 'shielded' : 'open',
        } as const
        const full = ringFractionChanged({ wallMm, spigotMm: lengthMm, grain: 'end-grain' }, exposure, WOOD)
        const apart = changed(part, cover, ACROSS * hours * 3600) - full(hours * 3600)
        expect(Math.abs(apart)).toBeLessThan(0.012)
      }),
    )
  })

  it('a plug lid is within 0.008', () => {
    const part = partFilter({ kind: 'disc', thicknessMm: 8, grain: 'end-grain' }, WOOD.densityKgM3)
    const full = plugLidFractionChanged(8, 2, WOOD)
    for (const hours of [0.5, 1, 3, 8, 14, 48])
      expect(Math.abs(changed(part, 'open', ACROSS * hours * 3600) - full(hours * 3600))).toBeLessThan(0.008)
  })

  it('the published joint after 1, 3, 8 and 14 h: ring 0.1847, 0.3468, 0.5628, 0.7109 (derived)', () => {
    const part = partFilter({ kind: 'ring', wallMm: 4, lengthMm: 6, grain: 'end-grain' }, 700)
    for (const [hours, fraction] of [
      [1, 0.1847],
      [3, 0.3468],
      [8, 0.5628],
      [14, 0.7109],
    ] as const)
      expect(Math.abs(changed(part, 'open', 1.562e-11 * hours * 3600) - fraction)).toBeLessThan(0.006)
  })

  it('a solid with sealed ends is within 0.008 of the long cylinder', () => {
    const shape = { kind: 'solid', diameterMm: 75, lengthMm: 150, endsSealed: true } as const
    const part = partFilter(shape, WOOD.densityKgM3)
    const radiusM = 0.0375
    const full = cylinderResponse((SURFACE_M_PER_S * radiusM) / ACROSS)
    for (const fourier of [0.01, 0.05, 0.1, 0.3, 1])
      expect(Math.abs(changed(part, 'open', fourier * radiusM * radiusM) - full(fourier))).toBeLessThan(0.008)
    const unsealed = partFilter({ ...shape, endsSealed: false }, WOOD.densityKgM3)
    expect(changed(unsealed, 'open', 1e-4)).toBeGreaterThan(changed(part, 'open', 1e-4))
  })

  it('weights are shares: none below 0, together 1', () => {
    fc.assert(
      fc.property(sizes, ({ wallMm, lengthMm, cover }) => {
        const part = partFilter({ kind: 'ring', wallMm, lengthMm, grain: 'side-grain' }, 560)
        const weights = [...part.weights[cover]]
        expect(weights).toHaveLength(RUNGS)
        expect(Math.min(...weights)).toBeGreaterThanOrEqual(0)
        expect(weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1, 12)
      }),
    )
  })
})

describe('finish', () => {
  it.each([
    ['Danish oil, two coats', 'oil'],
    ['friction polish: shellac and wax', 'shellac'],
    ['spray lacquer', 'lacquer'],
    ['wipe-on polyurethane', 'varnish'],
    ['microcrystalline wax', undefined],
    ['', undefined],
  ])('%s is a film of %s', (finish, film) => {
    expect(filmOfFinish(finish)).toBe(film)
  })

  it('slows the wood at rest, never while it is handled, and wax does nothing', () => {
    const shape = { kind: 'ring', wallMm: 4, lengthMm: 6, grain: 'end-grain' } as const
    const bare = partFilter(shape, 700)
    const varnished = partFilter(shape, 700, restingSurfaceMPerS('varnish'))
    const week = ACROSS * 7 * 24 * 3600
    expect(changed(varnished, 'closed', week)).toBeLessThan(0.9 * changed(bare, 'closed', week))
    for (const cover of ['open', 'lid-on', 'bagged'] as const)
      expect(Math.abs(changed(varnished, cover, week) - changed(bare, cover, week))).toBeLessThan(0.012)
    expect(restingSurfaceMPerS(filmOfFinish('wax'))).toBe(SURFACE_M_PER_S)
  })
})
