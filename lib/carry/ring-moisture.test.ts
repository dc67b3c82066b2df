import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { HourOfAir } from './carry-check'
import { diffusionMcPct } from './diffusion'
import { ringFractionChanged } from './joint'
import { jointOfPiece, ringOfPiece, type JointFacts, type Ring } from './joint-defaults'
import { ringMoisture } from './ring-moisture'
import { tabulated } from './tabulated'

const HOUR_MS = 3_600_000
const NOW = Date.UTC(2026, 2, 5, 13)
const ring: Ring = {
  size: { wallMm: 4, spigotMm: 6, grain: 'end-grain' },
  densityKgM3: 700,
  assumed: [],
}

/** Hours up to now, oldest first. */
function hours(
  values: readonly (number | null)[],
  cover: HourOfAir['cover'] = 'closed',
  temperatureC = 10,
): HourOfAir[] {
  return values.map((emcPct, n) => ({
    at: NOW - (values.length - n) * HOUR_MS,
    emcPct,
    temperatureC: emcPct === null ? null : temperatureC,
    cover,
  }))
}

const steady = (count: number, emcPct: number | null): (number | null)[] =>
  Array.from({ length: count }, () => emcPct)

function moistureOrThrow(history: HourOfAir[], baselineEmcPct: number | null, of: Ring = ring) {
  const moisture = ringMoisture(of, { history, baselineEmcPct }, NOW)
  if (moisture === undefined) throw new Error('nothing known')
  return moisture
}

describe('moisture of a ring, from the air it was in', () => {
  it('stays where it is in air that holds it there', () => {
    expect(moistureOrThrow(hours(steady(1440, 8.5)), 8.5).mcPct).toBeCloseTo(8.5, 9)
  })

  it.each([1, 3, 8, 14])('after one step of the air %d h ago it has followed the step response', (count) => {
    const wood = { densityKgM3: 700, temperatureC: 10, mcPct: diffusionMcPct(8.5, 13.6) }
    const fraction = ringFractionChanged(ring.size, { faces: 2, rim: 'open' }, wood)(count * 3600)
    const moisture = moistureOrThrow(hours(steady(count, 13.6), 'open'), 8.5)
    expect(Math.abs(moisture.mcPct - (8.5 + 5.1 * fraction))).toBeLessThan(1e-3)
  })

  it('two short steps that cancel leave next to nothing after weeks', () => {
    const values = [...steady(3, 14), ...steady(60 * 24 - 3, 8.5)]
    expect(moistureOrThrow(hours(values), 8.5).mcPct).toBeCloseTo(8.5, 2)
  })

  it('is never outside the airs that it met', () => {
    const emc = fc.double({ min: 5, max: 22, noNaN: true })
    const covers = fc.constantFrom<HourOfAir['cover']>('open', 'lid-on', 'closed', 'bagged', 'tub')
    fc.assert(
      fc.property(fc.array(fc.tuple(emc, covers), { minLength: 1, maxLength: 80 }), emc, (airs, baseline) => {
        const history = airs.map(([emcPct, cover], n) => ({
          at: NOW - (airs.length - n) * HOUR_MS,
          emcPct,
          temperatureC: 12,
          cover,
        }))
        const { mcPct, unknownShare } = moistureOrThrow(history, baseline)
        const met = [baseline, ...airs.map(([emcPct]) => emcPct)]
        expect(mcPct).toBeGreaterThanOrEqual(Math.min(...met) - 1e-6)
        expect(mcPct).toBeLessThanOrEqual(Math.max(...met) + 1e-6)
        expect(unknownShare).toBeGreaterThanOrEqual(-1e-9)
        expect(unknownShare).toBeLessThanOrEqual(1 + 1e-9)
      }),
    )
  })

  it('a thicker wall is never further on its way', () => {
    const wall = fc.double({ min: 1.5, max: 10, noNaN: true })
    fc.assert(
      fc.property(
        wall,
        fc.double({ min: 0.1, max: 4, noNaN: true }),
        fc.integer({ min: 1, max: 200 }),
        (thin, more, n) => {
          const history = hours(steady(n, 14), 'open')
          const inThin = moistureOrThrow(history, 8, { ...ring, size: { ...ring.size, wallMm: thin } })
          const inThick = moistureOrThrow(history, 8, {
            ...ring,
            size: { ...ring.size, wallMm: thin + more },
          })
          expect(inThick.mcPct).toBeLessThanOrEqual(inThin.mcPct + 1e-4)
        },
      ),
    )
  })

  it('open it follows sooner than with the lid on, and that sooner than bagged', () => {
    const after = (cover: HourOfAir['cover']) => moistureOrThrow(hours(steady(6, 14), cover), 8).mcPct
    expect(after('open')).toBeGreaterThan(after('lid-on'))
    expect(after('lid-on')).toBeGreaterThan(after('bagged'))
    expect(after('bagged')).toBe(after('tub'))
    expect(after('bagged')).toBe(after('closed'))
  })
})

describe('gaps', () => {
  it('hold the last value known, and widen the doubt', () => {
    const whole = moistureOrThrow(hours([...steady(300, 8), ...steady(48, 12)]), 8)
    const gap = moistureOrThrow(hours([...steady(300, 8), 12, ...steady(47, null)]), 8)
    expect(gap.mcPct).toBeCloseTo(whole.mcPct, 9)
    expect(gap.gapHours).toBe(47)
    expect(whole.gapHours).toBe(0)
    expect(gap.doubtPct).toBeGreaterThan(whole.doubtPct)
  })

  it('count the same whether the hours are null or not there at all', () => {
    const history = hours([...steady(100, 8), ...steady(20, null), ...steady(5, 12)])
    const nulls = moistureOrThrow(history, 8)
    const absent = moistureOrThrow(
      history.filter((hour) => hour.emcPct !== null),
      8,
    )
    expect(absent.mcPct).toBeCloseTo(nulls.mcPct, 9)
    expect(absent.gapHours).toBe(nulls.gapHours)
    expect(absent.unknownShare).toBeCloseTo(nulls.unknownShare, 9)
  })

  it('more of them never narrow the doubt', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 99 }), fc.integer({ min: 0, max: 99 }), (one, other) => {
        const values = steady(100, 9)
        values[one] = null
        const before = moistureOrThrow(hours(values), 9).doubtPct
        values[other] = null
        expect(moistureOrThrow(hours(values), 9).doubtPct).toBeGreaterThanOrEqual(before - 1e-12)
      }),
    )
  })

  it('before the record the keep room counts, else the first hour known', () => {
    expect(moistureOrThrow([], 9.3)).toMatchObject({ mcPct: 9.3, unknownShare: 1 })
    expect(moistureOrThrow(hours([null, null, 9.1]), null).mcPct).toBeCloseTo(9.1, 9)
  })

  it('with nothing known at all there is no figure', () => {
    expect(ringMoisture(ring, { history: hours([null, null]), baselineEmcPct: null }, NOW)).toBeUndefined()
    expect(ringMoisture(ring, { history: [], baselineEmcPct: null }, NOW)).toBeUndefined()
  })

  it('names the input that is not a number', () => {
    expect(() => ringMoisture(ring, { history: hours([NaN]), baselineEmcPct: 9 }, NOW)).toThrow(/mcPct/)
    expect(() =>
      ringMoisture({ ...ring, densityKgM3: NaN }, { history: hours([9]), baselineEmcPct: 9 }, NOW),
    ).toThrow(/densityKgM3/)
  })
})

describe('a response read from its table', () => {
  it('is within 2e-4 of the response itself', () => {
    const wall = fc.double({ min: 1, max: 20, noNaN: true })
    fc.assert(
      fc.property(
        wall,
        wall,
        fc.double({ min: 0, max: 60 * 86_400, noNaN: true }),
        (wallMm, spigotMm, elapsedS) => {
          const wood = { densityKgM3: 650, temperatureC: 15, mcPct: 10 }
          const direct = ringFractionChanged(
            { wallMm, spigotMm, grain: 'end-grain' },
            { faces: 2, rim: 'open' },
            wood,
          )
          expect(Math.abs(tabulated(direct)(elapsedS) - direct(elapsedS))).toBeLessThan(2e-4)
        },
      ),
      { numRuns: 50 },
    )
  })
})

describe('what was not told of a joint', () => {
  const told: JointFacts = {
    wood: 'acer-saccharum',
    grain: 'end-grain',
    wallMm: 3,
    spigotMm: 5,
    bodyWallMm: null,
    jointDiameterMm: 60,
    lidForm: 'plug',
    lidMm: 7,
    fitGrade: null,
    clearanceMm: 0.25,
    allowanceMm: 0.2,
  }

  it('nothing is assumed where everything was told', () => {
    const joint = jointOfPiece(told)
    expect(joint?.assumed).toEqual([])
    expect(joint?.size).toEqual({ wallMm: 3, spigotMm: 5, grain: 'end-grain' })
    expect(joint?.lossMmPerPct).toBeCloseTo(60 * 0.00188, 9)
    expect(joint?.allowedMcPct).toBeCloseTo(0.2 / (60 * 0.00188), 9)
  })

  it('the wall is 2.5 mm, or six tenths of the body wall within 2 and 4 mm', () => {
    const wallMm = (bodyWallMm: number | null) =>
      ringOfPiece({ ...told, wallMm: null, bodyWallMm }).size.wallMm
    expect(wallMm(null)).toBe(2.5)
    expect(wallMm(5)).toBe(3)
    expect(wallMm(2)).toBe(2)
    expect(wallMm(12)).toBe(4)
  })

  it('the spigot is 6 mm long, a plug lid 8 mm thick, the allowance 0.15 mm, the wood of medium movement; all said', () => {
    const joint = jointOfPiece({
      ...told,
      wood: null,
      wallMm: null,
      spigotMm: null,
      lidMm: null,
      clearanceMm: null,
      allowanceMm: null,
    })
    expect(joint).toMatchObject({ size: { wallMm: 2.5, spigotMm: 6 }, lidMm: 8, densityKgM3: 650 })
    expect(joint?.allowance.allowanceMm).toBe(0.15)
    expect(joint?.lossMmPerPct).toBeCloseTo(60 * 0.0019, 9)
    expect(joint?.assumed).toHaveLength(5)
    for (const word of ['wood', 'wall', 'spigot', 'lid', 'allowance']) {
      expect(joint?.assumed.join('; ')).toContain(word)
    }
  })

  it('a side-grain joint counts with the movement along the grain', () => {
    const side = jointOfPiece({ ...told, grain: 'side-grain' })
    expect(side?.lossMmPerPct).toBeCloseTo(60 * (0.00353 - 0.00005), 9)
  })

  it('there is no joint without a diameter, nor for a threaded lid', () => {
    expect(jointOfPiece({ ...told, jointDiameterMm: null })).toBeUndefined()
    expect(jointOfPiece({ ...told, fitGrade: 'threaded' })).toBeUndefined()
  })
})
