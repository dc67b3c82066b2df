import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { plainText, strongTexts } from '@/lib/format/sentence'
import { clearanceCurve, clearanceWithDoubt, type DoubtfulJoint } from './clearance-curve'
import { clearanceExactMm, closestExact } from './lid-fit'
import { drawnShare } from './lid-outline'
import { lidShape, lidTurned } from './lid-view'
import { workedFigures } from './worked-figures'

const MAPLE = { tangentialPerPct: 0.00353, radialPerPct: 0.00165 }
const sure = { mcChangeDoubtPct: 0, movementDoubt: 0 }

/** Hard maple, 60 mm, 0.2 mm: the joint of the derived examples (tests/fixtures/reference/ovality_examples.json). */
const mapleBox = (
  spigotChange: number,
  socketChange = spigotChange,
  doubts: typeof sure = sure,
): DoubtfulJoint => ({
  diameterMm: 60,
  clearanceMm: 0.2,
  clearanceDoubtMm: 0,
  spigot: { ...MAPLE, mcChangePct: spigotChange, ...doubts },
  socket: { ...MAPLE, mcChangePct: socketChange, ...doubts },
})

const part = fc.record({
  radialPerPct: fc.double({ min: 0.0008, max: 0.0025, noNaN: true }),
  tangentialPerPct: fc.double({ min: 0.0015, max: 0.0045, noNaN: true }),
  mcChangePct: fc.double({ min: -8, max: 8, noNaN: true }),
  mcChangeDoubtPct: fc.double({ min: 0, max: 2, noNaN: true }),
  movementDoubt: fc.double({ min: 0, max: 0.4, noNaN: true }),
})
const anyJoint = fc.record({
  diameterMm: fc.double({ min: 20, max: 100, noNaN: true }),
  clearanceMm: fc.double({ min: 0.02, max: 0.5, noNaN: true }),
  clearanceDoubtMm: fc.double({ min: 0, max: 0.2, noNaN: true }),
  spigot: part,
  socket: part,
})
const anyAngle = fc.integer({ min: 0, max: 90 })

describe('clearance against the turn', () => {
  it('is the exact clearance of the derived examples, for each degree of a quarter turn', () => {
    const curve = clearanceCurve(mapleBox(4))
    expect(curve).toHaveLength(91)
    // Exact figures of the examples: 0.2013 lined up, -0.0239 at 30 degrees, -0.2499 at 90.
    expect(curve[0]?.middleMm).toBeCloseTo(0.2013, 3)
    expect(curve[30]?.middleMm).toBeCloseTo(-0.0239, 3)
    expect(curve[90]?.middleMm).toBeCloseTo(-0.2499, 3)
  })

  it('has no width where nothing is doubted', () => {
    for (const { lowMm, middleMm, highMm } of clearanceCurve(mapleBox(4))) {
      expect(lowMm).toBeCloseTo(middleMm, 9)
      expect(highMm).toBeCloseTo(middleMm, 9)
    }
  })

  it('a doubt of one point moves a quarter turn by what one point takes', () => {
    const { lowMm, middleMm, highMm } = clearanceWithDoubt(
      mapleBox(4, 4, { mcChangeDoubtPct: 1, movementDoubt: 0 }),
      90,
    )
    expect(middleMm - lowMm).toBeCloseTo(60 * (0.00353 - 0.00165), 6)
    expect(highMm - middleMm).toBeCloseTo(60 * (0.00353 - 0.00165), 6)
  })

  it('where nothing has changed yet, doubt can only take clearance', () => {
    const { lowMm, middleMm, highMm } = clearanceWithDoubt(
      mapleBox(0, 0, { mcChangeDoubtPct: 1, movementDoubt: 0.2 }),
      90,
    )
    expect(highMm).toBeCloseTo(middleMm, 4)
    expect(lowMm).toBeLessThan(middleMm - 0.1)
  })

  it('more doubt in, more doubt out', () => {
    fc.assert(
      fc.property(anyJoint, anyAngle, fc.double({ min: 1, max: 2, noNaN: true }), (joint, angleDeg, more) => {
        const wider = (of: DoubtfulJoint['spigot']) => ({
          ...of,
          mcChangeDoubtPct: of.mcChangeDoubtPct * more,
          movementDoubt: of.movementDoubt * more,
        })
        const less = clearanceWithDoubt(joint, angleDeg)
        const doubted = clearanceWithDoubt(
          {
            ...joint,
            clearanceDoubtMm: joint.clearanceDoubtMm * more,
            spigot: wider(joint.spigot),
            socket: wider(joint.socket),
          },
          angleDeg,
        )
        expect(doubted.middleMm).toBe(less.middleMm)
        expect(doubted.lowMm).toBeLessThanOrEqual(less.lowMm + 1e-9)
        // The summit is found by thirds, to a hundred-thousandth of the span.
        expect(doubted.highMm).toBeGreaterThanOrEqual(less.highMm - 1e-5)
        expect(less.lowMm).toBeLessThanOrEqual(less.middleMm)
        expect(less.highMm).toBeGreaterThanOrEqual(less.middleMm)
      }),
    )
  })

  it('half a turn changes nothing', () => {
    fc.assert(
      fc.property(anyJoint, anyAngle, (joint, angleDeg) => {
        const one = clearanceWithDoubt(joint, angleDeg)
        const other = clearanceWithDoubt(joint, angleDeg + 180)
        expect(other.middleMm).toBeCloseTo(one.middleMm, 6)
        expect(other.lowMm).toBeCloseTo(one.lowMm, 6)
      }),
    )
  })

  it('names the input that is wrong', () => {
    const joint = mapleBox(4)
    expect(() => clearanceCurve({ ...joint, clearanceDoubtMm: NaN })).toThrow(/clearanceDoubtMm/)
    expect(() => clearanceCurve({ ...joint, spigot: { ...joint.spigot, mcChangeDoubtPct: -1 } })).toThrow(
      /mcChangeDoubtPct/,
    )
    expect(() => clearanceCurve({ ...joint, socket: { ...joint.socket, movementDoubt: NaN } })).toThrow(
      /movementDoubt/,
    )
    expect(() => clearanceWithDoubt(joint, NaN)).toThrow(/angleDeg/)
    expect(() => lidShape({ ...joint, diameterMm: 0 })).toThrow(/diameterMm/)
  })
})

describe('lid view', () => {
  it('the two are closest where the gap is least, there and opposite', () => {
    fc.assert(
      fc.property(anyJoint, anyAngle, (joint, angleDeg) => {
        const [one, other] = lidTurned(lidShape(joint), angleDeg).contacts
        expect(one.clearanceMm).toBeCloseTo(clearanceExactMm(joint, angleDeg), 9)
        expect(other.directionDeg - one.directionDeg).toBeCloseTo(180, 9)
        expect(one.directionDeg).toBeGreaterThanOrEqual(0)
        expect(one.directionDeg).toBeLessThan(180)
      }),
      { numRuns: 25 },
    )
  })

  it('at a quarter turn on the swollen spigot is closest along its own rings', () => {
    expect(closestExact(mapleBox(4), 90).directionDeg).toBeCloseTo(90, 3)
    // Turned by 40 degrees the longest way of the spigot lies past the turn, by half of what is left to a quarter.
    expect(closestExact(mapleBox(4), 40).directionDeg).toBeCloseTo(40 + (90 - 40) / 2, 0)
  })

  it('draws gaps too large by the factor that it tells', () => {
    fc.assert(
      fc.property(anyJoint, anyAngle, (joint, angleDeg) => {
        const shape = lidShape(joint)
        const [contact] = lidTurned(shape, angleDeg).contacts
        const at = contact.directionDeg
        const share = (outline: typeof shape.spigotOutline, directionDeg: number) =>
          drawnShare(outline, shape.radiusMm, shape.exaggeration, directionDeg)
        const drawn = share(shape.socketOutline, at) - share(shape.spigotOutline, at - angleDeg)
        const trueShare = contact.clearanceMm / 2 / shape.radiusMm
        expect(drawn).toBeCloseTo(trueShare * shape.exaggeration, 9)
      }),
      { numRuns: 25 },
    )
  })

  it('keeps every drawn oval convex', () => {
    fc.assert(
      fc.property(anyJoint, (joint) => {
        const { spigotOutline, socketOutline, radiusMm, exaggeration } = lidShape(joint)
        for (const outline of [spigotOutline, socketOutline]) {
          for (const directionDeg of [0, 90]) {
            expect(
              Math.abs(drawnShare(outline, radiusMm, exaggeration, directionDeg) - 1),
            ).toBeLessThanOrEqual(exaggeration === 1 ? 1 : 0.14 + 1e-9)
          }
        }
      }),
      { numRuns: 25 },
    )
  })

  it('says how it goes round, strong where it may bind', () => {
    const headline = lidShape(mapleBox(4)).headline
    expect(plainText(headline)).toBe('Free to about 15°, tight from there, may bind past about 25°')
    expect(strongTexts(headline)).toEqual(['may bind past about 25°'])
    expect(plainText(lidShape(mapleBox(0)).headline)).toBe('Free all the way round')
    expect(plainText(lidShape(mapleBox(4, 1)).headline)).toBe('May bind however it is turned')
    expect(plainText(lidShape(mapleBox(1, 1, { mcChangeDoubtPct: 1, movementDoubt: 0.2 })).headline)).toMatch(
      /^Free all the way round; 1 in 10 like it may bind/,
    )
  })

  it('a snap lid is tight on purpose: it says how much tighter', () => {
    const { headline } = lidShape({ ...mapleBox(1), clearanceMm: -0.05 })
    expect(plainText(headline).replaceAll('\u00a0', ' ')).toBe(
      'Cut about 0.05 mm too tight, as a snap lid is; a quarter turn on about 0.15 mm',
    )
  })

  it('tells the lid by the quarter turn, then in mm', () => {
    expect(lidShape(mapleBox(1.5)).quarterTurnWords.replaceAll('\u00a0', ' ')).toBe(
      'easy, tight, easy, tight: about 0.20 mm to spare with the grain lined up, about 0.05 mm to spare a quarter turn on',
    )
    expect(lidShape(mapleBox(1.5), 'imperial').quarterTurnWords).toContain('in to spare')
  })

  it('speaks as it is heard', () => {
    const shape = lidShape(mapleBox(4))
    expect(lidTurned(shape, 20).words).toEqual({
      feel: 'tight',
      turned: 'turned 20°',
      spoken: 'turned 20 degrees, tight',
    })
    expect(lidTurned(shape, 60).words.spoken).toBe('turned 60 degrees, may bind')
    expect(lidTurned(shape, 1).words.spoken).toBe('turned 1 degree, easy')
  })

  it('works out sizes to 0.01 mm, with doubt where there is some', () => {
    const shape = lidShape(mapleBox(4))
    const figures = new Map(workedFigures(shape, lidTurned(shape, 90)).map(({ of, value }) => [of, value]))
    // Axes of the derived example: 60.8472 and 60.396 mm, 0.4512 mm out of round.
    expect(figures.get('spigot')?.replaceAll('\u00a0', ' ')).toBe('60.85 × 60.40 mm')
    expect(figures.get('spigot-oval')?.replaceAll('\u00a0', ' ')).toBe('0.45 mm')
    expect(figures.get('clearance')?.replaceAll('\u00a0', ' ')).toBe('−0.25 mm')
    const doubted = lidShape(mapleBox(4, 4, { mcChangeDoubtPct: 1, movementDoubt: 0.2 }))
    const spans = workedFigures(doubted, lidTurned(doubted, 90), 'imperial').map(({ value }) => value)
    expect(spans[3]).toMatch(/^0\.0178\u00a0in \(0\.0121 to 0\.0235\)$/)
  })
})
