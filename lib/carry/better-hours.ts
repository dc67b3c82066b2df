import { FORECAST_HOURS, litForecast } from '@/lib/forecast/room-forecast'
import { HOUR_MS } from '@/lib/follow/record'
import type { Cover } from '@/lib/pieces/piece'
import type { Verdict } from './carry-check'
import { briefCheck } from './brief-check'
import { airOfHour, carryCheckInput, type CarryMaterial } from './material'

export interface BetterHoursAsked {
  pieceIds: readonly number[]
  toRoomId: number
  stayMinutes: number
  cover: Cover
  /** Hours before this are not offered; left out: from the next whole hour on. */
  fromAt?: Date
}

export interface BetterHour {
  startsAt: string
  /** Only worth it if the room is lit then; null: as the room is by itself. */
  ifLitAt: string | null
  /** For each piece that has a verdict, in the order asked. */
  verdicts: { pieceId: number; verdict: Verdict; earlyAt: string | null; usedAtEnd: number }[]
  /** Of the least forgiving piece. */
  worst: Verdict
  /** Allowance that the least forgiving piece would have used at the end, a fraction. */
  usedAtEnd: number
  /** EMC of the room in the hour of going, % MC. */
  emcPct: number
}

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }

/** So little less of the allowance is not worth a later hour. Status: guess. */
const NO_BETTER_USED = 0.03

/**
 * When in the coming 48 hours a carry does least, best first, judged by the least forgiving piece chosen.
 * @returns every whole hour that is neither past nor beyond the forecast, once as the room is by itself and, where a
 *   lighting would change it, once lit; empty without a forecast, a fresh reading or a piece that can be judged
 *
 * Looks no further ahead than the stay itself. Between hours that come to the same the sooner one stands first, and an
 * unlit room before one that has to be lit.
 */
export function betterHours(material: CarryMaterial, asked: BetterHoursAsked): BetterHour[] {
  const room = material.rooms.get(asked.toRoomId)
  const forecast = room?.forecast ?? null
  if (room === undefined || forecast === null || room.air.kind !== 'fresh') return []
  const now = material.now.getTime()
  const from = Math.max(now, asked.fromAt?.getTime() ?? now)
  const lit: CarryMaterial = {
    ...material,
    rooms: new Map(material.rooms).set(asked.toRoomId, { ...room, forecast: litForecast(forecast) }),
  }
  const hours: BetterHour[] = []
  for (let n = 0; n < FORECAST_HOURS; n += 1) {
    const startsAt = forecast.madeAt + n * HOUR_MS
    if (startsAt < from) continue
    const asItIs = hourOf(material, asked, startsAt, null)
    if (asItIs !== undefined) hours.push(asItIs)
    const litAt = forecast.warmed?.litAt.findLast((at) => at <= startsAt)
    if (litAt === undefined || (forecast.warmed?.emcPct[n] ?? null) === null || litAt < now) continue
    const ifLit = hourOf(lit, asked, startsAt, litAt)
    if (ifLit !== undefined) hours.push(ifLit)
  }
  return hours.toSorted(byLeastHarm)
}

/** Steps of the allowance that are told apart, so that the order is one and the same from any side. */
const usedStep = ({ usedAtEnd }: BetterHour): number => Math.round(usedAtEnd / NO_BETTER_USED)

const byLeastHarm = (one: BetterHour, other: BetterHour): number =>
  RANK[one.worst] - RANK[other.worst] ||
  usedStep(one) - usedStep(other) ||
  Number(one.ifLitAt !== null) - Number(other.ifLitAt !== null) ||
  one.startsAt.localeCompare(other.startsAt)

function hourOf(
  material: CarryMaterial,
  asked: BetterHoursAsked,
  startsAt: number,
  litAt: number | null,
): BetterHour | undefined {
  const verdicts = asked.pieceIds.flatMap((pieceId) => {
    const input = carryCheckInput(material, { ...asked, pieceId, startsAt: new Date(startsAt) })
    const brief = input && briefCheck(input)
    if (brief === undefined) return []
    return {
      pieceId,
      verdict: brief.verdict,
      earlyAt:
        brief.earlyHours === undefined
          ? null
          : new Date(startsAt + Math.round(brief.earlyHours * HOUR_MS)).toISOString(),
      usedAtEnd: brief.usedAtEnd,
    }
  })
  const [first] = verdicts
  const emcPct = airOfHour(material, asked.toRoomId, startsAt)?.emcPct
  if (first === undefined || emcPct === undefined) return undefined
  const least = verdicts.reduce(
    (worst, one) =>
      (RANK[one.verdict] - RANK[worst.verdict] || one.usedAtEnd - worst.usedAtEnd) > 0 ? one : worst,
    first,
  )
  return {
    startsAt: new Date(startsAt).toISOString(),
    ifLitAt: litAt === null ? null : new Date(litAt).toISOString(),
    verdicts,
    worst: least.verdict,
    usedAtEnd: least.usedAtEnd,
    emcPct,
  }
}
