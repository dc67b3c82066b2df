import { describe, expect, it } from 'vitest'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import { UNTOLD_JOINT } from '@/lib/carry/joint-defaults'
import type { Stay } from '@/lib/follow/record'
import { dayMs } from './policy'
import { type CourseQuestion, type DayOfRooms, woodCourse } from './wood-course'

const cupboard = 1
const store = 2
const filterOf = (bodyWallMm: number) =>
  woodOfPiece({ ...UNTOLD_JOINT, stage: 'roughed', wood: 'fraxinus-excelsior', bodyWallMm }).filter

const daysOf = (count: number, rooms: (day: number) => Record<number, number>): DayOfRooms[] =>
  Array.from({ length: count }, (_, day) => ({
    at: day * dayMs,
    rooms: new Map(
      Object.entries(rooms(day)).map(([room, emcPct]) => [Number(room), { emcPct, temperatureC: 18 }]),
    ),
  }))
const stay = (roomId: number, from: number, to: number | null): Stay => ({
  roomId,
  fromAt: new Date(from * dayMs),
  toAt: to === null ? null : new Date(to * dayMs),
  cover: 'open',
})
const course = (more: Partial<CourseQuestion>) =>
  woodCourse({
    filter: filterOf(10),
    stays: [stay(cupboard, 0, null)],
    days: daysOf(200, () => ({ [cupboard]: 9 })),
    middlePctOf: () => 9,
    diffusionFactor: 1,
    fromAt: 0,
    untilAt: 200 * dayMs,
    ...more,
  })
const at = (day: number) => day * dayMs

describe('the course of a piece by the days of its rooms', () => {
  it('stays where a room holds its own middle, without any drift', () => {
    const steady = course({})
    expect(steady?.mcAt(at(150))).toBeCloseTo(9, 9)
    expect(steady?.driftAt(at(150))).toBeCloseTo(0, 9)
  })

  it('drifts as far as a thin wall follows a damp spell, and a thick one less', () => {
    const spell = { days: daysOf(200, (day) => ({ [cupboard]: day >= 100 && day < 130 ? 11 : 9 })) }
    const thin = course(spell)?.driftAt(at(130)) ?? NaN
    const thick = course({ ...spell, filter: filterOf(80) })?.driftAt(at(130)) ?? NaN
    expect(thin).toBeGreaterThan(1.7)
    expect(thin).toBeLessThan(2)
    expect(thick).toBeGreaterThan(0)
    expect(thick).toBeLessThan(0.5 * thin)
    expect(Math.abs(course(spell)?.driftAt(at(199)) ?? NaN)).toBeLessThan(0.1)
  })

  it('takes a move to a drier room as drying, not as drift', () => {
    const moved = course({
      stays: [stay(store, 0, 100), stay(cupboard, 100, null)],
      days: daysOf(200, () => ({ [cupboard]: 9, [store]: 14 })),
      middlePctOf: (room) => (room === store ? 14 : 9),
    })
    expect(moved?.mcAt(at(100))).toBeCloseTo(14, 1)
    expect(moved?.mcAt(at(199))).toBeLessThan(9.3)
    for (const day of [50, 101, 130, 199]) expect(moved?.driftAt(at(day))).toBeCloseTo(0, 6)
  })

  it('is led through what a weight told, and its drift is none the different for it', () => {
    const season = { days: daysOf(200, (day) => ({ [cupboard]: 9 + 1.5 * Math.sin(day / 30) })) }
    const plain = course(season)
    const led = course({ ...season, known: { at: at(60), mcPct: 20 } })
    expect(led?.mcAt(at(60))).toBeCloseTo(20, 0)
    expect(plain?.mcAt(at(60))).toBeLessThan(11)
    for (const day of [70, 120, 190])
      expect(Math.abs((led?.driftAt(at(day)) ?? NaN) - (plain?.driftAt(at(day)) ?? NaN))).toBeLessThan(0.25)
  })

  it('begins at the first day with a record, and says nothing of drift after a long gap', () => {
    const gap = course({
      days: daysOf(200, (day): Record<number, number> =>
        day < 20 || (day > 80 && day < 140) ? {} : { [cupboard]: 9 },
      ),
    })
    expect(gap?.driftAt(at(10))).toBeUndefined()
    expect(gap?.driftAt(at(60))).toBeCloseTo(0, 9)
    expect(gap?.driftAt(at(139))).toBeUndefined()
    expect(gap?.driftAt(at(199))).toBeDefined()
    expect(course({ days: daysOf(200, () => ({})) })).toBeUndefined()
  })
})
