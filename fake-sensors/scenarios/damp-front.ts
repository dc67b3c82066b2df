import { HOUR_MS } from '../climates/outdoor'
import { normalDay } from './normal-day'
import type { Scenario } from './scenario'

/** Hours after the start, and how much of the front is there: rain comes in, stays a day and a night, and leaves. */
const course = [
  { afterH: 0, share: 0 },
  { afterH: 1.5, share: 0.7 },
  { afterH: 5, share: 1 },
  { afterH: 30, share: 1 },
  { afterH: 40, share: 0 },
] as const

const WARMER_C = 3
const DAMPER = 0.85

/** How much of the front has arrived, 0 to 1. */
export function frontShare(hours: number): number {
  const next = course.findIndex(({ afterH }) => afterH > hours)
  const to = course[next]
  const from = course[next - 1]
  if (to === undefined || from === undefined) return 0
  return from.share + ((to.share - from.share) * (hours - from.afterH)) / (to.afterH - from.afterH)
}

/** A warm, wet front from the sea: the shop, still cold, takes up its damp for a day and a half. */
export const dampFront: Scenario = {
  name: 'damp-front',
  weatherFrom: (startedAtMs) => (atMs) => {
    const share = frontShare((atMs - startedAtMs) / HOUR_MS)
    return { warmerC: WARMER_C * share, damper: DAMPER * share }
  },
  isAway: normalDay.isAway,
}
