import { litForecast } from '@/lib/forecast/room-forecast'
import {
  type BetterHour,
  betterHours,
  type BetterHoursAsked,
  byLeastHarm,
  judgedHour,
  leastForgiving,
  withForecast,
} from './better-hours'
import type { BetterHourShown, KeepsHour } from './carry-answer'
import type { Verdict } from './carry-check'
import type { CarryMaterial } from './material'

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }

export interface BetterWays {
  /** Every coming hour for the least forgiving piece, best first. */
  hours: BetterHour[]
  /** Null where nothing is short as asked, or no hour betters it. */
  betterHour: BetterHourShown | null
  /** The least forgiving piece by the hour that it goes; null without a forecast. */
  keeps: { id: string; hours: KeepsHour[] } | null
}

/** So many of the best hours of the least forgiving piece are looked at with all the others. Status: guess. */
const LOOKED_AT = 4

/**
 * The same carry at a better hour, and how long the least forgiving piece would keep by the hour it goes.
 * @param asked as the carry is asked about; `startsAt` is what the hour has to better
 * @param codeOf public ids by piece
 *
 * An hour betters it if the worst verdict of the chosen pieces is better there. The hours are gone through with the piece
 * that is least forgiving at the hour asked about; only the best of them are judged for all, which keeps many pieces quick.
 */
export function betterWays(
  material: CarryMaterial,
  asked: BetterHoursAsked & { startsAt: Date },
  codeOf: ReadonlyMap<number, string>,
): BetterWays {
  const startsAt = Math.max(asked.startsAt.getTime(), material.now.getTime())
  const least = leastForgiving(material, asked, startsAt)
  const hours = least === undefined ? [] : betterHours(material, { ...asked, pieceIds: [least.pieceId] })
  if (least === undefined || hours.length === 0) return { hours: [], betterHour: null, keeps: null }
  const id = codeOf.get(least.pieceId) ?? ''
  const keeps = hours
    .toSorted(
      (a, b) =>
        a.startsAt.localeCompare(b.startsAt) || Number(a.ifLitAt !== null) - Number(b.ifLitAt !== null),
    )
    .flatMap((hour) => keepsHour(hour, least.pieceId))
  const nearest = nearestUnlit(hours, startsAt)
  const now = nearest && forAll(material, asked, nearest)
  const best =
    now === undefined
      ? undefined
      : hours
          .filter((hour) => RANK[hour.worst] < RANK[now.worst])
          .slice(0, LOOKED_AT)
          .flatMap((hour) => forAll(material, asked, hour) ?? [])
          .filter((hour) => RANK[hour.worst] < RANK[now.worst])
          .toSorted(byLeastHarm)[0]
  return { hours, betterHour: best === undefined ? null : shown(best, codeOf), keeps: { id, hours: keeps } }
}

/** The unlit hour nearest to the one asked about. */
function nearestUnlit(hours: readonly BetterHour[], startsAt: number): BetterHour | undefined {
  const apart = (hour: BetterHour) => Math.abs(Date.parse(hour.startsAt) - startsAt)
  return hours.filter((hour) => hour.ifLitAt === null).toSorted((a, b) => apart(a) - apart(b))[0]
}

/** An hour of the least forgiving piece, judged for all the pieces asked about. */
function forAll(
  material: CarryMaterial,
  asked: BetterHoursAsked,
  { startsAt, ifLitAt }: BetterHour,
): BetterHour | undefined {
  const litAt = ifLitAt === null ? null : Date.parse(ifLitAt)
  const forecast = material.rooms.get(asked.toRoomId)?.forecast
  const air =
    litAt !== null && forecast ? withForecast(material, asked.toRoomId, litForecast(forecast)) : material
  return judgedHour(air, asked, Date.parse(startsAt), litAt)
}

function keepsHour({ startsAt, ifLitAt, verdicts }: BetterHour, pieceId: number): KeepsHour[] {
  const own = verdicts.find((one) => one.pieceId === pieceId)
  if (own === undefined) return []
  const { verdict, earlyAt } = own
  const keepsMinutes =
    earlyAt === null ? null : (new Date(earlyAt).getTime() - new Date(startsAt).getTime()) / 60_000
  return [{ at: startsAt, ifLitAt, keepsMinutes, verdict }]
}

function shown(hour: BetterHour, codeOf: ReadonlyMap<number, string>): BetterHourShown {
  return {
    startsAt: hour.startsAt,
    ifLitAt: hour.ifLitAt,
    emcPct: hour.emcPct,
    pieces: hour.verdicts.map(({ pieceId, verdict, earlyAt }) => ({
      id: codeOf.get(pieceId) ?? '',
      verdict,
      earlyAt,
    })),
  }
}
