import type { LeadScore } from '@/lib/forecast/goodness'
import { fitForecast, makeForecast } from '@/lib/forecast/make-forecast'
import { hourlyRecord } from '@/lib/forecast/record'
import { type RoomForecast, SCORED_LEADS } from '@/lib/forecast/room-forecast'
import type { RoomRecord } from './record'
import type { ForecastErrors, YearScore } from './score'

/** The product's forecast of the shop, made and looked at again as its worker does; looked at less often. */
export interface ShopForecasts {
  /**
   * To be called at each whole hour, once the hour before is on record.
   * @param isWanted whether anybody may go by a forecast within the hour: then it is made anew, as the product does each hour
   */
  readonly hour: (now: number, isWarmed: (atMs: number) => boolean, isWanted: boolean) => void
  /** The newest, if it is not too old to be used. */
  readonly newest: (now: number) => RoomForecast | null
}

const HOUR_MS = 3_600_000
/** Four a day say as much of how good they are as one an hour: tried for 120 days of one seed, 0.92 against 0.93 at 6 h. */
const SCORED_EVERY_H = 6
const FIT_EVERY_H = 72
/** As much as the product's worker goes by. */
const RECORD_HOURS = 56 * 24
const SCORED_BACK_MS = 60 * 24 * HOUR_MS
const TOLD_LEADS: readonly number[] = [6, 12]

interface Said {
  readonly leadH: number
  readonly usedPct: number
  readonly recordPct: number
  readonly nowPct: number
  readonly yesterdayPct: number | null
  readonly isFromWarm: boolean
}
type Looked = Said & { at: number; camePct: number }

export function shopForecasts(
  rooms: Readonly<Record<'shop' | 'outdoor', { readonly record: RoomRecord }>>,
  timeZone: string,
  score: YearScore,
): ShopForecasts {
  const waiting = new Map<number, Said[]>()
  let looked: Looked[] = []
  let current: RoomForecast | undefined
  let fit: ReturnType<typeof fitForecast>

  const recordOf = (room: 'shop' | 'outdoor', now: number) =>
    hourlyRecord(rooms[room].record.hours().slice(-RECORD_HOURS - 1), now - RECORD_HOURS * HOUR_MS, now)
  const hear = (hourAt: number, camePct: number): void => {
    for (const said of waiting.get(hourAt) ?? []) {
      looked.push({ ...said, at: hourAt, camePct })
      if (!TOLD_LEADS.includes(said.leadH)) continue
      const key = `${String(said.leadH)} h`
      add(score, key, said, camePct)
      if (!said.isFromWarm) add(score, `${key} unwarmed`, said, camePct)
    }
    waiting.delete(hourAt)
  }
  const say = (forecast: RoomForecast, isFromWarm: boolean): void => {
    for (const leadH of SCORED_LEADS) {
      const hourAt = forecast.madeAt + (leadH - 1) * HOUR_MS
      const list = waiting.get(hourAt) ?? []
      list.push({
        leadH,
        usedPct: forecast.emcPct[leadH - 1] ?? 0,
        recordPct: forecast.recordPct[leadH - 1] ?? 0,
        nowPct: forecast.sameAsNowPct,
        yesterdayPct: forecast.yesterdayPct[leadH - 1] ?? null,
        isFromWarm,
      })
      waiting.set(hourAt, list)
    }
  }
  return {
    hour(now, isWarmed, isWanted) {
      const over = now - HOUR_MS
      const hour = rooms.shop.record
        .hours()
        .slice(-2)
        .find(({ at }) => at === over)
      // It speaks of air that nobody warms: hours that were warmed are not held against it.
      if (hour !== undefined && !isWarmed(over + HOUR_MS / 2)) hear(over, hour.emcPct)
      else waiting.delete(over)
      const isScored = now % (SCORED_EVERY_H * HOUR_MS) === 0
      if (!isScored && !isWanted) return
      looked = looked.filter(({ at }) => at >= now - SCORED_BACK_MS)
      const record = recordOf('shop', now)
      const outdoors = recordOf('outdoor', now)
      const input = { madeAt: now, timeZone, record, outdoors, lastYear: [], isWarmedByHand: true }
      if (fit === undefined || now % (FIT_EVERY_H * HOUR_MS) === 0) fit = fitForecast(input) ?? fit
      const made = makeForecast(
        input,
        SCORED_LEADS.flatMap((leadH) => leadScore(looked, leadH)),
        fit,
      )
      if (made === undefined) return
      current = made
      if (isScored) say(made, isWarmed(now - HOUR_MS / 2))
    },
    newest: (now) =>
      current !== undefined && now - current.madeAt <= SCORED_EVERY_H * HOUR_MS ? current : null,
  }
}

function leadScore(looked: readonly Looked[], leadH: number): LeadScore[] {
  const own = looked.filter((one) => one.leadH === leadH)
  if (own.length === 0) return []
  const mean = (of: (one: Looked) => number | null) => {
    const errors = own.flatMap((one) => {
      const value = of(one)
      return value === null ? [] : [Math.abs(value - one.camePct)]
    })
    return errors.length === 0 ? null : errors.reduce((sum, error) => sum + error, 0) / errors.length
  }
  return [
    {
      leadH,
      n: own.length,
      recordPct: mean((one) => one.recordPct) ?? 0,
      sameAsNowPct: mean((one) => one.nowPct) ?? 0,
      yesterdayPct: mean((one) => one.yesterdayPct),
    },
  ]
}

function add(score: YearScore, key: string, said: Said, camePct: number): void {
  const errors: ForecastErrors = score.forecast.get(key) ?? { own: 0, sameAsNow: 0, n: 0 }
  errors.own += Math.abs(said.usedPct - camePct)
  errors.sameAsNow += Math.abs(said.nowPct - camePct)
  errors.n += 1
  score.forecast.set(key, errors)
}
