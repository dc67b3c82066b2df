import { TZDate } from '@date-fns/tz'
import { HOUR_MS, type RoomHours } from '@/lib/follow/record'
import { FORECAST_HOURS, type RoomForecast } from '@/lib/forecast/room-forecast'
import {
  type BetterHour,
  type BetterHoursAsked,
  byLeastHarm,
  judgedHour,
  leastForgiving,
  withForecast,
} from './better-hours'
import type { CarryMaterial } from './material'

const DAY_MS = 24 * HOUR_MS
/** Hours that are told beyond the forecast: to the end of the week. */
const HOURS_AHEAD = 5 * 24
/** Fewer days of the sort make nothing usual. */
const DAYS_MIN = 2
/** Hours at which nobody sets out are left out. Status: common practice, no source. */
const EARLIEST_HOUR = 6
const LATEST_HOUR = 21

interface UsualAir {
  emcPct: number
  temperatureC: number
  lowPct: number
  highPct: number
}

const localOf = (at: number, timeZone: string) => {
  const local = new TZDate(at, timeZone)
  return { hour: local.getHours(), isWeekend: local.getDay() % 6 === 0 }
}

/** What a room's hours usually are: over the last days of the same sort, weekdays or weekends, at the same hour. */
function usualAirOf(hours: RoomHours, timeZone: string): (at: number) => UsualAir | undefined {
  const byKey = new Map<string, { emcPct: number; temperatureC: number }[]>()
  const keyOf = (at: number) => {
    const { hour, isWeekend } = localOf(at, timeZone)
    return `${String(isWeekend)} ${String(hour)}`
  }
  for (const [at, air] of hours) {
    const own = byKey.get(keyOf(at)) ?? []
    own.push(air)
    byKey.set(keyOf(at), own)
  }
  return (at) => {
    const own = byKey.get(keyOf(at)) ?? []
    if (own.length < DAYS_MIN) return undefined
    const mean = (of: 'emcPct' | 'temperatureC') => own.reduce((sum, one) => sum + one[of], 0) / own.length
    const emc = own.map((one) => one.emcPct)
    return {
      emcPct: mean('emcPct'),
      temperatureC: mean('temperatureC'),
      lowPct: Math.min(...emc),
      highPct: Math.max(...emc),
    }
  }
}

/** A stay's air as it usually is, in the shape that carries are judged on. */
function usualForecast(startsAt: number, airs: readonly (UsualAir | undefined)[]): RoomForecast | undefined {
  const known = airs.flatMap((air) => air ?? [])
  if (known.length < FORECAST_HOURS) return undefined
  const emcPct = known.map((air) => air.emcPct)
  return {
    madeAt: startsAt,
    emcPct,
    temperatureC: known.map((air) => air.temperatureC),
    humidityPct: known.map(() => 0),
    emcPctLow: known.map((air) => air.lowPct),
    emcPctHigh: known.map((air) => air.highPct),
    method: known.map(() => 'record'),
    recordPct: emcPct,
    sameAsNowPct: emcPct[0] ?? 0,
    yesterdayPct: known.map(() => null),
    usesOutdoors: false,
    usesLastYear: false,
    warmed: null,
  }
}

/**
 * The best hours of the week past the forecast, best first, by what the room usually is at that hour on that sort of day.
 * To be told as what is usual, never as a forecast: nothing here knows the weather.
 * @returns one a day at most, the best of its hours; empty where too few days are on record
 */
export function usualHours(
  material: CarryMaterial,
  asked: BetterHoursAsked & { timeZone: string },
): BetterHour[] {
  const room = material.rooms.get(asked.toRoomId)
  if (room === undefined || room.air.kind !== 'fresh') return []
  const first = Math.ceil(material.now.getTime() / HOUR_MS) * HOUR_MS + 2 * DAY_MS
  const least = leastForgiving(material, asked, first)
  if (least === undefined) return []
  const usualAt = usualAirOf(room.hours, asked.timeZone)
  const airs = Array.from({ length: HOURS_AHEAD + FORECAST_HOURS }, (_, n) => usualAt(first + n * HOUR_MS))
  const byDay = new Map<string, { judged: BetterHour; usual: CarryMaterial }>()
  for (let n = 0; n < HOURS_AHEAD; n += 1) {
    const at = first + n * HOUR_MS
    const local = new TZDate(at, asked.timeZone)
    const forecast =
      local.getHours() < EARLIEST_HOUR || local.getHours() > LATEST_HOUR
        ? undefined
        : usualForecast(at, airs.slice(n, n + FORECAST_HOURS))
    if (forecast === undefined) continue
    const usual = withForecast(material, asked.toRoomId, forecast)
    const judged = judgedHour(usual, { ...asked, pieceIds: [least.pieceId] }, at, null)
    const day = local.toDateString()
    const best = byDay.get(day)
    if (judged !== undefined && (best === undefined || byLeastHarm(judged, best.judged) < 0))
      byDay.set(day, { judged, usual })
  }
  // The others can only be better off; their verdicts are told with it.
  return [...byDay.values()]
    .map(({ judged, usual }) => judgedHour(usual, asked, Date.parse(judged.startsAt), null) ?? judged)
    .toSorted(byLeastHarm)
}
