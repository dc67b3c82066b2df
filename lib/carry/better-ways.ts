import { type BetterHour, betterHours, type BetterHoursAsked } from './better-hours'
import type { BetterHourShown, KeepsHour } from './carry-answer'
import type { Verdict } from './carry-check'
import type { CarryMaterial } from './material'

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }

export interface BetterWays {
  /** Null where nothing is short as asked, or no hour betters it. */
  betterHour: BetterHourShown | null
  /** The least forgiving piece by the hour that it goes; null without a forecast. */
  keeps: { id: string; hours: KeepsHour[] } | null
}

/**
 * The same carry at a better hour, and how long the least forgiving piece would keep by the hour it goes.
 * @param asked as the carry is asked about; `startsAt` is what the hour has to better
 * @param codeOf public ids by piece
 *
 * An hour betters it if the worst verdict of the chosen pieces is better there.
 */
export function betterWays(
  material: CarryMaterial,
  asked: BetterHoursAsked & { startsAt: Date },
  codeOf: ReadonlyMap<number, string>,
): BetterWays {
  const hours = betterHours(material, asked)
  const least = leastForgiving(hours)
  if (least === undefined) return { betterHour: null, keeps: null }
  const id = codeOf.get(least) ?? ''
  const keeps = hours
    .toSorted(
      (a, b) =>
        a.startsAt.localeCompare(b.startsAt) || Number(a.ifLitAt !== null) - Number(b.ifLitAt !== null),
    )
    .flatMap((hour) => keepsHour(hour, least))
  const now = worstNear(hours, asked.startsAt)
  const [best] = hours
  const isBetter = best !== undefined && now !== undefined && RANK[best.worst] < RANK[now]
  return { betterHour: isBetter ? shown(best, codeOf) : null, keeps: { id, hours: keeps } }
}

/** The piece that uses most of its allowance over all hours. */
function leastForgiving(hours: readonly BetterHour[]): number | undefined {
  const used = new Map<number, number>()
  for (const { verdicts } of hours)
    for (const { pieceId, usedAtEnd } of verdicts) used.set(pieceId, (used.get(pieceId) ?? 0) + usedAtEnd)
  return [...used].toSorted(([, a], [, b]) => b - a)[0]?.[0]
}

/** The worst verdict in the unlit hour nearest to the one asked about. */
function worstNear(hours: readonly BetterHour[], startsAt: Date): Verdict | undefined {
  const apart = (hour: BetterHour) => Math.abs(new Date(hour.startsAt).getTime() - startsAt.getTime())
  return hours.filter((hour) => hour.ifLitAt === null).toSorted((a, b) => apart(a) - apart(b))[0]?.worst
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
