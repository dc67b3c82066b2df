import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { referenceRows } from '@/tests/support/reference'
import { cylinderRoots } from './bessel'
import { cylinderResponse } from './cylinder-response'
import { LONGITUDINAL_RATIO, transverseDiffusionM2PerS } from './diffusion'
import { plugLidFractionChanged, ringFractionChanged, type RingSize } from './joint'
import { slabResponse, slabRoots } from './slab-response'

const responses = { slab: slabResponse, cylinder: cylinderResponse }
const responseOf = (shape: string, biot: number) => responses[shape === 'slab' ? 'slab' : 'cylinder'](biot)

describe('diffusion coefficient, against computed values (0.1 %)', () => {
  it.each(
    referenceRows('diffusion_coefficient_values.csv').map(
      (row) =>
        [
          row.number('temp_c'),
          row.number('mc_pct'),
          row.number('density_12_kg_m3'),
          row.number('dt_m2_s'),
        ] as const,
    ),
  )('%d °C, %d %% MC, %d kg/m³', (temperatureC, mcPct, densityKgM3, expected) => {
    const found = transverseDiffusionM2PerS(temperatureC, mcPct, densityKgM3)
    expect(Math.abs(found / expected - 1)).toBeLessThan(0.001)
  })

  it('rises with warmth and moisture, falls with density, and does not jump at the caps', () => {
    const degree = fc.double({ min: -10, max: 49, noNaN: true })
    const mc = fc.double({ min: 0, max: 24, noNaN: true })
    const density = fc.double({ min: 200, max: 1200, noNaN: true })
    fc.assert(
      fc.property(degree, mc, density, (temperatureC, mcPct, densityKgM3) => {
        const here = transverseDiffusionM2PerS(temperatureC, mcPct, densityKgM3)
        expect(transverseDiffusionM2PerS(temperatureC + 1, mcPct, densityKgM3)).toBeGreaterThan(here)
        expect(transverseDiffusionM2PerS(temperatureC, mcPct, densityKgM3 + 20)).toBeLessThan(here)
        expect(transverseDiffusionM2PerS(temperatureC, mcPct + 1, densityKgM3)).toBeGreaterThan(here)
      }),
    )
    expect(transverseDiffusionM2PerS(20, 30, 640)).toBe(transverseDiffusionM2PerS(20, 25, 640))
    expect(transverseDiffusionM2PerS(20, 25, 1300)).toBe(transverseDiffusionM2PerS(20, 25, 1400))
  })

  it('names the input that is wrong', () => {
    expect(() => transverseDiffusionM2PerS(NaN, 10, 640)).toThrow(/temperatureC/)
    expect(() => transverseDiffusionM2PerS(20, NaN, 640)).toThrow(/mcPct/)
    expect(() => transverseDiffusionM2PerS(20, 10, NaN)).toThrow(/densityKgM3/)
  })
})

describe('step responses, against the full series', () => {
  it.each(
    referenceRows('diffusion_roots.csv').map((row) => [row.text('shape'), row.number('biot'), row] as const),
  )('first roots of a %s, Bi %d', (shape, biot, row) => {
    const roots = shape === 'slab' ? slabRoots(biot, 6) : cylinderRoots(biot, 6)
    roots.forEach((root, n) => {
      expect(Math.abs(root - row.number(`b${String(n + 1)}`))).toBeLessThan(1e-5)
    })
  })

  it.each(
    referenceRows('diffusion_series.csv').map(
      (row) => [row.text('shape'), row.number('biot'), row.number('fo'), row.number('e')] as const,
    ),
  )('%s, Bi %d, Fo %d', (shape, biot, fourier, expected) => {
    expect(Math.abs(responseOf(shape, biot)(fourier) - expected)).toBeLessThan(1e-4)
  })

  it.each(
    referenceRows('diffusion_fourier_for_fraction.csv').map(
      (row) => [row.text('shape'), row.number('biot'), row] as const,
    ),
  )('reaches each printed fraction at its Fourier number: %s, Bi %d', (shape, biot, row) => {
    for (const percent of [10, 25, 50, 75, 90, 95, 99]) {
      const printed = row.number(`fo_e${String(percent)}`)
      const response = responseOf(shape, biot)
      // The Fourier number is printed to 4 places, so the fraction is good to the slope over half of the last one.
      expect(response(printed - 6e-5)).toBeLessThan(percent / 100)
      expect(response(printed + 6e-5)).toBeGreaterThan(percent / 100)
    }
  })

  it('at first follows 2 √(Fo / π) where the surface is at once in step with the air', () => {
    for (const fourier of [0.0005, 0.001, 0.01, 0.05, 0.15]) {
      expect(Math.abs(slabResponse(Infinity)(fourier) - 2 * Math.sqrt(fourier / Math.PI))).toBeLessThan(0.001)
    }
  })

  it('what is left, summed over time, is 1/3 + 1/Bi for a slab and 1/8 + 1/(2 Bi) for a cylinder', () => {
    const summed = (response: (fourier: number) => number): number => {
      let sum = 0
      let from = 0
      // Steps that grow with the square keep the steep beginning and the long end equally fine.
      for (let n = 1; n <= 4000; n += 1) {
        const to = 40 * (n / 4000) ** 2
        sum += ((1 - response(from) + (1 - response(to))) / 2) * (to - from)
        from = to
      }
      return sum
    }
    for (const biot of [1, 3, 30, Infinity]) {
      expect(Math.abs(summed(slabResponse(biot)) - (1 / 3 + 1 / biot))).toBeLessThan(1e-4)
      expect(Math.abs(summed(cylinderResponse(biot)) - (1 / 8 + 1 / (2 * biot)))).toBeLessThan(1e-4)
    }
  })

  it('starts at nothing, rises, and ends at all', () => {
    const biot = fc.oneof(fc.double({ min: 0.01, max: 1e5, noNaN: true }), fc.constant(Infinity))
    const fourier = fc.double({ min: 0, max: 20, noNaN: true })
    fc.assert(
      fc.property(biot, fourier, fourier, (bi, one, other) => {
        const response = slabResponse(bi)
        expect(response(0)).toBe(0)
        expect(response(Math.min(one, other))).toBeLessThanOrEqual(response(Math.max(one, other)) + 1e-12)
        expect(response(one)).toBeGreaterThanOrEqual(0)
        expect(response(one)).toBeLessThanOrEqual(1)
        expect(response(1e6 / Math.min(bi, 1))).toBeCloseTo(1, 9)
      }),
    )
  })

  it('a freer surface is never slower', () => {
    const fourier = fc.double({ min: 0.0005, max: 5, noNaN: true })
    fc.assert(
      fc.property(fourier, fc.double({ min: 0.05, max: 200, noNaN: true }), (fo, biot) => {
        expect(slabResponse(biot * 1.2)(fo)).toBeGreaterThanOrEqual(slabResponse(biot)(fo) - 1e-6)
      }),
    )
  })

  it('refuses what is not a number', () => {
    expect(() => slabResponse(NaN)).toThrow(/biot/)
    expect(() => slabResponse(0)).toThrow(/biot/)
    expect(() => cylinderResponse(NaN)).toThrow(/biot/)
    expect(() => slabResponse(1)(NaN)).toThrow(/fourier/)
  })
})

describe('typical pieces (20 °C, 10 % MC, bare surface 5e-7 m/s; derived, 1 %)', () => {
  const S = 5e-7
  const DAY_S = 86_400
  /** The piece in words to the fraction that it has followed after some seconds. */
  function fractionOf(piece: string, densityKgM3: number): (elapsedS: number) => number {
    const across = transverseDiffusionM2PerS(20, 10, densityKgM3)
    const along = LONGITUDINAL_RATIO * across
    const slab = (d: number, depthM: number) => (s: number) =>
      slabResponse((S * depthM) / d)((d * s) / depthM ** 2)
    const round = (s: number): number => cylinderResponse((S * 0.0375) / across)((across * s) / 0.0375 ** 2)
    if (piece.startsWith('box wall 5 mm, both')) return slab(across, 0.0025)
    if (piece.startsWith('box wall 5 mm, lid on')) return slab(across, 0.005)
    if (piece.startsWith('box base or lid 6 mm')) return slab(along, 0.006)
    if (piece.startsWith('roughed blank')) return slab(across, 0.01)
    if (piece.includes('ends sealed')) return round
    if (piece.includes('ends open')) return (s) => 1 - (1 - round(s)) * (1 - slab(along, 0.05)(s))
    throw new Error(`no model for ${piece}`)
  }

  it.each(
    referenceRows('typical_response_times.csv').map(
      (row) => [row.text('piece'), row.number('density_12_kg_m3'), row] as const,
    ),
  )('%s, %d kg/m³', (piece, densityKgM3, row) => {
    const fraction = fractionOf(piece, densityKgM3)
    for (const percent of [50, 90, 95]) {
      const days = row.number(`days_${String(percent)}`)
      // Printed to 0.01 day, which is more than 1 % for the quickest.
      const slack = 0.01 * days + 0.005
      expect(fraction((days - slack) * DAY_S)).toBeLessThan(percent / 100)
      expect(fraction((days + slack) * DAY_S)).toBeGreaterThan(percent / 100)
    }
  })
})

describe('ring and lid of a joint (700 kg/m³, 10 °C, 11 % MC; derived check values)', () => {
  const wood = { densityKgM3: 700, temperatureC: 10, mcPct: 11 }
  const size: RingSize = { wallMm: 4, spigotMm: 6, grain: 'end-grain' }
  const hours = [1, 3, 8, 14]

  it('takes the stated diffusion coefficient', () => {
    expect(transverseDiffusionM2PerS(10, 11, 700)).toBeCloseTo(1.562e-11, 14)
    expect(LONGITUDINAL_RATIO).toBe(10)
  })

  it.each([
    [2, 'open', [0.1847, 0.3468, 0.5628, 0.7109]],
    [1, 'open', [0.1339, 0.2613, 0.4433, 0.5802]],
  ] as const)('ring, %d faces, rim %s', (faces, rim, expected) => {
    const fraction = ringFractionChanged(size, { faces, rim }, wood)
    hours.forEach((hour, n) => {
      expect(Math.abs(fraction(hour * 3600) - (expected[n] ?? NaN))).toBeLessThan(1e-4)
    })
  })

  it('lid of 8 mm, both faces', () => {
    const fraction = plugLidFractionChanged(8, 2, wood)
    ;[0.1245, 0.2637, 0.4842, 0.6575].forEach((expected, n) => {
      expect(Math.abs(fraction((hours[n] ?? NaN) * 3600) - expected)).toBeLessThan(1e-4)
    })
  })

  it('a thicker wall, a longer spigot, a denser wood or a closed rim is never faster', () => {
    const wallMm = fc.double({ min: 1, max: 12, noNaN: true })
    const elapsed = fc.double({ min: 60, max: 30 * 86_400, noNaN: true })
    fc.assert(
      fc.property(
        wallMm,
        wallMm,
        elapsed,
        fc.double({ min: 0.05, max: 3, noNaN: true }),
        (wall, spigot, s, more) => {
          const open = { faces: 2, rim: 'open' } as const
          const ring: RingSize = { wallMm: wall, spigotMm: spigot, grain: 'end-grain' }
          const here = ringFractionChanged(ring, open, wood)(s)
          expect(ringFractionChanged({ ...ring, wallMm: wall + more }, open, wood)(s)).toBeLessThanOrEqual(
            here + 1e-6,
          )
          expect(
            ringFractionChanged({ ...ring, spigotMm: spigot + more }, open, wood)(s),
          ).toBeLessThanOrEqual(here + 1e-6)
          expect(
            ringFractionChanged(ring, open, { ...wood, densityKgM3: 700 + 100 * more })(s),
          ).toBeLessThanOrEqual(here + 1e-6)
          expect(ringFractionChanged(ring, { faces: 1, rim: 'open' }, wood)(s)).toBeLessThanOrEqual(
            here + 1e-6,
          )
          expect(ringFractionChanged(ring, { faces: 2, rim: 'shielded' }, wood)(s)).toBeLessThanOrEqual(
            here + 1e-6,
          )
        },
      ),
    )
  })

  it('a side-grain ring takes the air through its wall along the grain', () => {
    const side = ringFractionChanged({ ...size, grain: 'side-grain' }, { faces: 2, rim: 'shielded' }, wood)
    const end = ringFractionChanged(size, { faces: 2, rim: 'shielded' }, wood)
    expect(side(3600)).toBeGreaterThan(2 * end(3600))
  })

  it('names the input that is wrong', () => {
    const open = { faces: 2, rim: 'open' } as const
    expect(() => ringFractionChanged({ ...size, wallMm: NaN }, open, wood)).toThrow(/wallMm/)
    expect(() => ringFractionChanged({ ...size, spigotMm: 0 }, open, wood)).toThrow(/spigotMm/)
    expect(() => plugLidFractionChanged(NaN, 2, wood)).toThrow(/lidMm/)
  })
})
