import { describe, expect, it } from 'vitest'
import { fitAnswer, fitQuerySchema } from './fit'

const mapleBox = {
  diameterMm: '60',
  clearanceMm: '0.2',
  angleDeg: '30',
  mcChangePct: '4',
  species: 'acer-saccharum',
}
const answer = (more: Record<string, string> = {}) =>
  fitAnswer(fitQuerySchema.parse({ ...mapleBox, ...more }))

describe('fit: the ends of its range', () => {
  it('answers for the widest joint and clearance', () => {
    expect(answer({ diameterMm: '1000', clearanceMm: '10', mcChangePct: '0' }).clearanceMm).toBeCloseTo(10, 9)
  })

  it('refuses a clearance that leaves no recess, and names it', () => {
    const refused = fitQuerySchema.safeParse({ ...mapleBox, diameterMm: '4', clearanceMm: '-4.5' })
    expect(refused.error?.issues.map(({ path }) => path)).toEqual([['clearanceMm']])
  })
})

describe('fit: what is allowed, how it feels, grade by grade', () => {
  it('allows at any angle what it allows at a quarter turn, and more where it is turned less', () => {
    const { allowedMcChangePct, allowedAnyAngleMcChangePct, limitedAnyAngle } = answer()
    expect(limitedAnyAngle).toBe(true)
    // Derived example: hard maple, 60 mm, 0.2 mm, any angle: 1.773 % MC; at 30 degrees twice that.
    expect(allowedAnyAngleMcChangePct).toBeCloseTo(1.773, 3)
    expect(allowedMcChangePct).toBeCloseTo(2 * 1.773, 2)
  })

  it('has no limit at any angle where the wood stays round', () => {
    const { species: _species, ...sizes } = mapleBox
    const round = fitAnswer(
      fitQuerySchema.parse({ ...sizes, tangentialPerPct: '0.002', radialPerPct: '0.002' }),
    )
    expect(round).not.toHaveProperty('allowedAnyAngleMcChangePct')
    expect(round.limitedAnyAngle).toBe(false)
  })

  it('tells how it feels there, and by the quarter turn', () => {
    const { feel, quarterTurn } = answer()
    expect(feel).toBe('may bind')
    expect(quarterTurn).toMatch(/^easy, may bind, easy, may bind: about 0\.20/)
    expect(answer({ angleDeg: '0' }).feel).toBe('easy')
  })

  it('lists every grade for a joint of one wood, and none where the lid is another', () => {
    const { grades } = answer()
    expect(grades?.map((course) => course.grade)).toEqual([
      'suction',
      'snap',
      'snug',
      'easy',
      'loose',
      'threaded',
    ])
    expect(grades?.find((course) => course.grade === 'snug')?.goneAtPct).toBeCloseTo(0.08 / 0.1128, 3)
    expect(answer({ lidTangentialPerPct: '0.00248', lidRadialPerPct: '0.00126' })).not.toHaveProperty(
      'grades',
    )
  })
})
