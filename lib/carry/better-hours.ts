import { FORECAST_HOURS, litForecast, type RoomForecast } from '@/lib/forecast/room-forecast'
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

/** One hour of going: as the room is by itself, and lit where a lighting still to come would change it. */
export interface JudgedHour {
  asItIs: BetterHour
  ifLit: BetterHour | null
}

/**
 * The coming hours of a room, each judged by the pieces chosen, in the order in which they come.
 * @returns empty without a forecast, a fresh reading or a piece that can be judged
 *
 * Looks no further ahead than the stay itself.
 */
export function judgedHours(material: CarryMaterial, asked: BetterHoursAsked): JudgedHour[] {
  const room = material.rooms.get(asked.toRoomId)
  const forecast = room?.forecast ?? null
  if (room === undefined || forecast === null || room.air.kind !== 'fresh') return []
  const now = material.now.getTime()
  const from = asked.fromAt?.getTime() ?? now
  const lit = withForecast(material, asked.toRoomId, litForecast(forecast))
  return Array.from({ length: FORECAST_HOURS }, (_, n) => forecast.madeAt + n * HOUR_MS).flatMap(
    (startsAt, n) => {
      if (startsAt < from) return []
      const asItIs = judgedHour(material, asked, startsAt, null)
      if (asItIs === undefined) return []
      const litAt = forecast.warmed?.litAt.findLast((at) => at <= startsAt)
      const isLit = litAt !== undefined && litAt >= now && (forecast.warmed?.emcPct[n] ?? null) !== null
      return { asItIs, ifLit: isLit ? (judgedHour(lit, asked, startsAt, litAt) ?? null) : null }
    },
  )
}

/** The same material with another forecast for one of its rooms. */
export function withForecast(material: CarryMaterial, roomId: number, forecast: RoomForecast): CarryMaterial {
  const room = material.rooms.get(roomId)
  return room === undefined
    ? material
    : { ...material, rooms: new Map(material.rooms).set(roomId, { ...room, forecast }) }
}

/**
 * When in the coming 48 hours a carry does least, best first, judged by the least forgiving piece chosen.
 * @returns every whole hour that is neither past nor beyond the forecast, once as the room is by itself and, where a
 *   lighting would change it, once lit; empty without a forecast, a fresh reading or a piece that can be judged
 *
 * Between hours that come to the same the sooner one stands first, and an unlit room before one that has to be lit.
 */
export function betterHours(material: CarryMaterial, asked: BetterHoursAsked): BetterHour[] {
  const from = Math.max(material.now.getTime(), asked.fromAt?.getTime() ?? 0)
  return judgedHours(material, { ...asked, fromAt: new Date(from) })
    .flatMap(({ asItIs, ifLit }) => (ifLit === null ? [asItIs] : [asItIs, ifLit]))
    .toSorted(byLeastHarm)
}

/** Steps of the allowance that are told apart, so that the order is one and the same from any side. */
const usedStep = ({ usedAtEnd }: BetterHour): number => Math.round(usedAtEnd / NO_BETTER_USED)

export const byLeastHarm = (one: BetterHour, other: BetterHour): number =>
  RANK[one.worst] - RANK[other.worst] ||
  usedStep(one) - usedStep(other) ||
  Number(one.ifLitAt !== null) - Number(other.ifLitAt !== null) ||
  one.startsAt.localeCompare(other.startsAt)

/** One hour of going, judged; undefined where no piece of them can be. */
export function judgedHour(
  material: CarryMaterial,
  asked: BetterHoursAsked,
  startsAt: number,
  litAt: number | null,
): BetterHour | undefined {
  // Of an hour that has begun the rest is judged.
  const goesAt = Math.max(startsAt, material.now.getTime())
  const verdicts = asked.pieceIds.flatMap((pieceId) => {
    const input = carryCheckInput(material, { ...asked, pieceId, startsAt: new Date(goesAt) })
    const brief = input && briefCheck(input)
    if (brief === undefined) return []
    return {
      pieceId,
      verdict: brief.verdict,
      earlyAt:
        brief.earlyHours === undefined
          ? null
          : new Date(goesAt + Math.round(brief.earlyHours * HOUR_MS)).toISOString(),
      usedAtEnd: brief.usedAtEnd,
    }
  })
  const [first] = verdicts
  const emcPct = airOfHour(material, asked.toRoomId, goesAt)?.emcPct
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

/** Of the pieces chosen, the one with the worst verdict that would have used most by the end; undefined where none has one. */
export function leastForgiving(
  material: CarryMaterial,
  asked: BetterHoursAsked,
  startsAt: number,
): { pieceId: number; of: number } | undefined {
  const judged = judgedHour(material, asked, startsAt, null)
  const [least] = (judged?.verdicts ?? []).toSorted(
    (one, other) => RANK[other.verdict] - RANK[one.verdict] || other.usedAtEnd - one.usedAtEnd,
  )
  return least && { pieceId: least.pieceId, of: judged?.verdicts.length ?? 1 }
}
