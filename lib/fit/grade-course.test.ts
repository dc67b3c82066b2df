import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  EASY_BELOW_MM,
  feelOf,
  feelOfCut,
  quarterTurnWords,
  SNUG_BELOW_MM,
  spareWords,
  TIGHT_BELOW_MM,
} from './feel'
import { gradeCourse, gradeCourses, GRADES } from './grade-course'
import { clearanceFirstOrderMm } from './lid-fit'

const MAPLE = { tangentialPerPct: 0.00353, radialPerPct: 0.00165 }
/** 60 mm of hard maple lose 60 × 0.00188 mm at a quarter turn for each % MC. */
const LOSS_MM_PER_PCT = 0.1128

const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('grade by grade', () => {
  it.each([
    ['suction', 0.03, 0.05],
    ['snug', 0.08, 0.1],
    ['easy', 0.2, 0.25],
    ['loose', 0.4, 0.5],
  ] as const)('%s: gone after %d mm, binds after %d mm', (grade, allowanceMm, clearanceMm) => {
    const course = gradeCourse(60, MAPLE, grade)
    expect(course.goneAtPct).toBeCloseTo(allowanceMm / LOSS_MM_PER_PCT, 6)
    expect(course.bindsAtPct).toBeCloseTo(clearanceMm / LOSS_MM_PER_PCT, 6)
  })

  it('the sigh of a suction lid goes long before the lid binds, and no sensor can call it', () => {
    const course = gradeCourse(60, MAPLE, 'suction')
    expect(course.goneAtPct ?? Infinity).toBeLessThan(0.7 * (course.bindsAtPct ?? 0))
    expect(course.isBeyondSensors).toBe(true)
    expect(plain(course.words)).toBe(
      'Its sigh goes at a quarter turn about 0.3 points of % MC from where it was cut; it may bind at about 0.4 points. No sensor can call so little.',
    )
  })

  it('a snap lid has no moment at which it binds: it is tight from the start', () => {
    const course = gradeCourse(60, MAPLE, 'snap')
    expect(course.goneAtPct).toBeCloseTo(0.05 / LOSS_MM_PER_PCT, 6)
    expect(course.bindsAtPct).toBeUndefined()
  })

  it("threads aren't worked out", () => {
    const course = gradeCourse(60, MAPLE, 'threaded')
    expect(course.goneAtPct).toBeUndefined()
    expect(course.words).toContain("aren't worked out")
  })

  it('a wood that stays round loses no grade', () => {
    const round = { tangentialPerPct: 0.002, radialPerPct: 0.002 }
    for (const course of gradeCourses(60, round)) expect(course.goneAtPct).toBeUndefined()
  })

  it('at the change at which it binds, a quarter turn has nothing left, swollen or dried', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('suction', 'snug', 'easy', 'loose' as const),
        fc.double({ min: 30, max: 120, noNaN: true }),
        (grade, diameterMm) => {
          const { bindsAtPct, clearanceMm } = gradeCourse(diameterMm, MAPLE, grade)
          for (const mcChangePct of [bindsAtPct ?? NaN, -(bindsAtPct ?? NaN)]) {
            const both = { ...MAPLE, mcChangePct }
            const joint = { diameterMm, clearanceMm, spigot: both, socket: both }
            expect(clearanceFirstOrderMm(joint, 90)).toBeCloseTo(0, 9)
          }
        },
      ),
    )
  })

  it('a measured clearance moves only the moment at which it binds', () => {
    const course = gradeCourse(60, MAPLE, 'snug', 0.14)
    expect(course.goneAtPct).toBeCloseTo(0.08 / LOSS_MM_PER_PCT, 6)
    expect(course.bindsAtPct).toBeCloseTo(0.14 / LOSS_MM_PER_PCT, 6)
  })

  it('lists every grade, and names the input that is wrong', () => {
    expect(gradeCourses(60, MAPLE).map((course) => course.grade)).toEqual(GRADES)
    expect(() => gradeCourse(NaN, MAPLE, 'snug')).toThrow(/diameterMm/)
    expect(() => gradeCourse(60, { ...MAPLE, radialPerPct: NaN }, 'snug')).toThrow(/radialPerPct/)
  })
})

describe('how a lid feels', () => {
  it('changes halfway between the clearances of two grades', () => {
    expect([TIGHT_BELOW_MM, SNUG_BELOW_MM, EASY_BELOW_MM].map((mm) => Math.round(mm * 1000))).toEqual([
      75, 175, 375,
    ])
    expect([-0.01, 0, 0.05, 0.1, 0.25, 0.5].map(feelOf)).toEqual([
      'binds',
      'tight',
      'tight',
      'snug',
      'easy',
      'loose',
    ])
  })

  it('never gets tighter with more clearance', () => {
    const order = ['binds', 'tight', 'snug', 'easy', 'loose']
    fc.assert(
      fc.property(
        fc.double({ min: -1, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (clearanceMm, more) => {
          expect(order.indexOf(feelOf(clearanceMm + more))).toBeGreaterThanOrEqual(
            order.indexOf(feelOf(clearanceMm)),
          )
        },
      ),
    )
    expect(() => feelOf(NaN)).toThrow(/clearanceMm/)
  })

  it('a lid that snaps is tight until it has lost what a snap may lose', () => {
    expect([-0.05, -0.09, -0.11].map((mm) => feelOfCut(mm, -0.05))).toEqual(['tight', 'tight', 'binds'])
    expect(feelOfCut(-0.01, 0.1)).toBe('binds')
    expect(feelOfCut(0.1, -0.05)).toBe('snug')
    expect(() => feelOfCut(0, NaN)).toThrow(/cutMm/)
  })

  it('is told by the quarter turn, then in mm to 0.05', () => {
    expect(plain(quarterTurnWords(0.25, 0.06))).toBe(
      'easy, tight, easy, tight: about 0.25 mm to spare with the grain lined up, about 0.05 mm to spare a quarter turn on',
    )
    expect(plain(quarterTurnWords(0.25, 0.25))).toBe(
      'easy, easy, easy, easy: about 0.25 mm to spare all the way round',
    )
    expect(plain(spareWords(-0.13))).toBe('about 0.15 mm too tight')
    expect(spareWords(0.01)).toBe('nothing to spare')
    expect(plain(spareWords(0.254, 'imperial'))).toBe('about 0.010 in to spare')
  })
})
