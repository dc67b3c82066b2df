import { type BetterHour, type BetterHoursAsked, betterHours, leastForgiving } from './better-hours'
import type { Verdict } from './carry-check'
import type { CarryMaterial } from './material'

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }

/** So much less of the allowance is worth another hour. Status: guess. */
const WORTH_USED = 0.05

/**
 * The hour that one press puts a plan off to: the best that needs nothing done, if it betters the one planned.
 * @param hours as `betterHours` gives them, best first
 * @param plannedAt the hour that it is down for
 * @returns undefined where no hour is better. One that has to be lit for is never chosen unasked: a press must not
 *   count on somebody lighting the stove.
 */
export function hourToPutOffTo(hours: readonly BetterHour[], plannedAt: Date): Date | undefined {
  const asItIs = hours.filter(({ ifLitAt }) => ifLitAt === null)
  const best = asItIs.find(({ startsAt }) => new Date(startsAt).getTime() !== plannedAt.getTime())
  if (best === undefined) return undefined
  const planned = nearest(asItIs, plannedAt)
  if (planned === undefined) return RANK[best.worst] < RANK.leave ? new Date(best.startsAt) : undefined
  const isBetter =
    RANK[best.worst] < RANK[planned.worst] ||
    (best.worst === planned.worst &&
      best.worst !== 'leave' &&
      best.usedAtEnd + WORTH_USED < planned.usedAtEnd)
  return isBetter ? new Date(best.startsAt) : undefined
}

const HOUR_MS = 3_600_000

/** What is known of the hour planned: the whole hour next to it, if that is within the hour. */
function nearest(hours: readonly BetterHour[], at: Date): BetterHour | undefined {
  const away = (hour: BetterHour): number => Math.abs(new Date(hour.startsAt).getTime() - at.getTime())
  const [first] = hours.toSorted((a, b) => away(a) - away(b))
  return first !== undefined && away(first) < HOUR_MS ? first : undefined
}

/**
 * The hour that one press would put a plan off to. The hours are gone through with the piece that is least forgiving at
 * the hour planned.
 * @returns undefined where the forecast knows of no better one, or where nothing can be judged
 */
export function betterHourOfPlan(
  material: CarryMaterial,
  asked: BetterHoursAsked,
  plannedAt: Date,
): Date | undefined {
  const startsAt = new Date(Math.max(plannedAt.getTime(), material.now.getTime()))
  const least = leastForgiving(material, asked, startsAt.getTime())
  if (least === undefined) return undefined
  return hourToPutOffTo(betterHours(material, { ...asked, pieceIds: [least.pieceId] }), startsAt)
}
