import { HOUR_MS, type Stay } from '@/lib/follow/record'
import {
  type AirStep,
  correctRing,
  evenState,
  type PieceFilter,
  stepWood,
  type WoodState,
} from '@/lib/follow/wood-state'
import { driftBetween, type DriftAt, type McAt } from './drift'
import { dayMs, driftMissingShareMax } from './policy'

/** Mean air of one day, room by room; a room without a reading that day is left out. */
export type DayOfRooms = {
  /** When the day begins, epoch ms. */
  readonly at: number
  readonly rooms: ReadonlyMap<number, { readonly emcPct: number; readonly temperatureC: number }>
}

export type CourseQuestion = {
  readonly filter: PieceFilter
  /** Oldest first. */
  readonly stays: readonly Stay[]
  /** In order of time, without a day left out. */
  readonly days: readonly DayOfRooms[]
  /** Middle of each room's own year, % MC: what its drift is counted from. */
  readonly middlePctOf: (roomId: number) => number | undefined
  readonly diffusionFactor: number
  /** Not before this, epoch ms. */
  readonly fromAt: number
  readonly untilAt: number
  /** What the wood was at a moment, where a weight tells it: the course is led through it. */
  readonly known?: { readonly at: number; readonly mcPct: number } | undefined
}

/** The wood as its rooms should have led it, day by day. */
export type WoodCourse = {
  readonly at: readonly number[]
  readonly mcPct: readonly number[]
  readonly mcAt: McAt
  /** What the rooms' straying from their own middles has added. */
  readonly driftAt: DriftAt
}

/** Air of unknown temperature, °C: between a house and a shop. A guess. */
const UNKNOWN_TEMPERATURE_C = 15
/** For so long the last day known stands in for those without a reading. A guess. */
const HELD_DAYS = 3

/**
 * The moisture of a piece by the days of its rooms, for the curve and for what drift is to be taken out of weights. What
 * the piece is judged by is followed hour by hour and kept with it; this is its course in broad strokes.
 * @returns undefined where no room that it was in has a record by `untilAt`. The course begins at the first day with one.
 *
 * Drift is the difference of two courses of the same wood: in the rooms as they were, and in the same rooms held at
 * their own middles. A move to another room is no drift: it stays in the weights. Source: derived, as in `drift.ts`.
 */
export function woodCourse(question: CourseQuestion): WoodCourse | undefined {
  const { filter, diffusionFactor, known } = question
  const steps = stepsOf(question)
  const [first] = steps
  if (first === undefined) return undefined
  const start = question.middlePctOf(first.roomId) ?? first.emcPct
  const was = evenState(filter, start, first.cover, 0)
  const held = evenState(filter, start, first.cover, 0)
  const course = { at: [first.at], mcPct: [start], heldPct: [start], missing: [0] }
  for (const step of steps) {
    if (known !== undefined && known.at >= step.at && known.at < step.at + step.hours * HOUR_MS)
      lead(course, was, held, known.mcPct - was.ringPct)
    stepWood(filter, was, inRoom(step, was, step.emcPct), diffusionFactor)
    stepWood(filter, held, inRoom(step, held, step.middlePct), diffusionFactor)
    course.at.push(step.at + step.hours * HOUR_MS)
    course.mcPct.push(was.ringPct)
    course.heldPct.push(held.ringPct)
    course.missing.push(was.unknownShare)
  }
  const mcAt = between(course.at, course.mcPct)
  const missingAt = between(course.at, course.missing)
  const heldAt = between(course.at, course.heldPct)
  const isKnownAt = (atMs: number): boolean => (missingAt(atMs) ?? 1) <= driftMissingShareMax
  return {
    at: course.at,
    mcPct: course.mcPct,
    mcAt,
    driftAt: driftBetween(
      (atMs) => (isKnownAt(atMs) ? mcAt(atMs) : undefined),
      (atMs) => heldAt(atMs),
    ),
  }
}

type Course = { at: number[]; mcPct: number[]; heldPct: number[]; missing: number[] }

/** Moves both courses alike, those behind too, so that the drift between them stays what it is. */
function lead(course: Course, was: WoodState, held: WoodState, byPct: number): void {
  correctRing(was, byPct)
  correctRing(held, byPct)
  course.mcPct = course.mcPct.map((pct) => pct + byPct)
  course.heldPct = course.heldPct.map((pct) => pct + byPct)
}

type Step = {
  readonly at: number
  readonly hours: number
  readonly roomId: number
  readonly cover: Stay['cover']
  readonly emcPct: number
  readonly middlePct: number
  readonly temperatureC: number
  readonly isKnown: boolean
  readonly isBlind: boolean
}

/** A room of which nothing is known at all leaves the wood as it is. */
const inRoom = (step: Step, state: WoodState, emcPct: number): AirStep => ({
  hours: step.hours,
  emcPct: step.isBlind ? Math.min(30, Math.max(0, state.ringPct)) : emcPct,
  temperatureC: step.temperatureC,
  cover: step.cover,
  isKnown: step.isKnown,
})

function stepsOf({ stays, days, middlePctOf, fromAt, untilAt }: CourseQuestion): Step[] {
  const steps: Step[] = []
  days.forEach((day, n) => {
    const dayEnd = Math.min(days[n + 1]?.at ?? day.at + dayMs, untilAt)
    for (const stay of stays) {
      const begin = Math.max(day.at, stay.fromAt.getTime(), fromAt)
      const end = Math.min(dayEnd, stay.toAt?.getTime() ?? untilAt)
      if (end <= begin) continue
      const today = day.rooms.get(stay.roomId)
      // Before the first day with a record nothing can be counted.
      if (steps.length === 0 && today === undefined) continue
      const air = today ?? lastKnown(days, n, stay.roomId)
      const middlePct = middlePctOf(stay.roomId) ?? air?.emcPct
      steps.push({
        at: begin,
        hours: (end - begin) / HOUR_MS,
        roomId: stay.roomId,
        cover: stay.cover,
        emcPct: air?.emcPct ?? middlePct ?? 0,
        middlePct: middlePct ?? 0,
        temperatureC: air?.temperatureC ?? UNKNOWN_TEMPERATURE_C,
        isKnown: today !== undefined,
        isBlind: middlePct === undefined,
      })
    }
  })
  return steps
}

function lastKnown(days: readonly DayOfRooms[], n: number, roomId: number) {
  for (let back = 1; back <= HELD_DAYS; back += 1) {
    const air = days[n - back]?.rooms.get(roomId)
    if (air !== undefined) return air
  }
  return undefined
}

/** Straight lines between the points; undefined beyond the first and the last. */
function between(at: readonly number[], values: readonly number[]): McAt {
  return (atMs) => {
    const next = at.findIndex((instant) => instant >= atMs)
    const after = values[next]
    const afterAt = at[next]
    if (after === undefined || afterAt === undefined) return undefined
    if (afterAt === atMs) return after
    const before = values[next - 1]
    const beforeAt = at[next - 1]
    if (before === undefined || beforeAt === undefined) return undefined
    return before + ((after - before) * (atMs - beforeAt)) / (afterAt - beforeAt)
  }
}
