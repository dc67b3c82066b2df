import type { TimeOutAnswer } from '@/lib/bench/time-out'

export type UsedPoint = { hours: number; used: number; early: number; late: number }

const DAY_H = 24
/** Where nothing is used up, the figure ends when so much of what will be used is. */
const SETTLED_SHARE = 0.95

/** How far the figure reaches: past the middle, else past the early edge, else until little more changes. */
export function curveEndHours(answer: TimeOutAnswer): number {
  if (answer.binds) return Math.max(0.25, (answer.minutes / 60) * 1.6)
  if (answer.minutesEarly !== undefined) return Math.max(0.25, (answer.minutesEarly / 60) * 2)
  const { hours, used } = answer.curve
  const last = Math.abs(used.at(-1) ?? 0)
  const at = used.findIndex((value) => Math.abs(value) >= SETTLED_SHARE * last)
  return Math.max(1, hours[at] ?? DAY_H)
}

/** The curve's points as far as the figure reaches, and one beyond it, so that the lines run to its edge. */
export function pointsTo(endHours: number, { curve }: TimeOutAnswer): UsedPoint[] {
  const beyond = curve.hours.findIndex((hours) => hours >= endHours)
  const upTo = beyond === -1 ? curve.hours.length : beyond + 1
  return curve.hours.slice(0, upTo).map((hours, index) => ({
    hours,
    used: curve.used[index] ?? 0,
    early: curve.usedEarly[index] ?? 0,
    late: curve.usedLate[index] ?? 0,
  }))
}

/** Highest share that the figure has room for: a little over all of it. */
export const FULL = 1.28
