import { quantileOfSorted } from '@/lib/doubt/spread'
import type { Prepared } from './prepare'
import { HOUR_MS } from './record'
import { FORECAST_HOURS, type RoomForecast, type WarmedForecast } from './room-forecast'
import { LIT_BELOW_C, type WarmedCourse } from './warmings'

/** Fewer warmings on record promise nothing. */
const WARMINGS_MIN = 3
/** The newest ones, as they had the most alike weather. Status: guess. */
const WARMINGS_MOST = 12

const middleOf = (values: readonly number[]): number =>
  quantileOfSorted(Float64Array.from(values).sort(), 0.5)

interface Effect {
  warmthC: number
  emcPct: number
  emcPctLow: number
  emcPctHigh: number
}

/** What so many hours after the lighting have done, over the warmings that lasted as long. */
function effectAt(courses: readonly WarmedCourse[], hour: number): Effect | undefined {
  const emc = Float64Array.from(courses.flatMap(({ effects }) => effects.emcPct[hour] ?? []))
    .filter((value) => !Number.isNaN(value))
    .sort()
  const warmth = courses.flatMap(({ effects }) => effects.temperatureC[hour] ?? [])
  if (emc.length < WARMINGS_MIN) return undefined
  const mean = (values: ArrayLike<number>) =>
    Array.from(values).reduce((sum, one) => sum + one, 0) / values.length
  return {
    warmthC: mean(warmth),
    emcPct: mean(emc),
    emcPctLow: quantileOfSorted(emc, 0.1),
    emcPctHigh: quantileOfSorted(emc, 0.9),
  }
}

/**
 * What a room would be if it were lit at its usual hour, from its own warmings on record with their spread.
 * @returns null with fewer than three warmings on record: nothing is promised that the room has not shown
 */
export function warmedForecast(
  { courses, input, hourOfDay }: Prepared,
  unlit: Pick<RoomForecast, 'temperatureC' | 'emcPct' | 'emcPctLow' | 'emcPctHigh'>,
): WarmedForecast | null {
  const newest = courses.slice(-WARMINGS_MOST)
  if (newest.length < WARMINGS_MIN) return null
  const { firstAt } = input.record
  const litHour = Math.floor(
    middleOf(newest.map(({ warming }) => hourOfDay(firstAt + warming.from * HOUR_MS))),
  )
  const lengthHours = Math.round(middleOf(newest.map(({ warming }) => warming.until - warming.from)))
  const told = () => Array.from({ length: FORECAST_HOURS }, (): number | null => null)
  const columns = { temperatureC: told(), emcPct: told(), emcPctLow: told(), emcPctHigh: told() }
  const litAt: number[] = []
  for (let n = 0; n < FORECAST_HOURS; n += 1) {
    const at = input.madeAt + n * HOUR_MS
    if (Math.floor(hourOfDay(at)) !== litHour || (unlit.temperatureC[n] ?? Infinity) >= LIT_BELOW_C) continue
    litAt.push(at)
    for (let hour = 0; hour < lengthHours && n + hour < FORECAST_HOURS; hour += 1) {
      const effect = effectAt(newest, hour)
      if (effect === undefined) break
      fill(columns, unlit, n + hour, effect)
    }
  }
  if (litAt.length === 0) return null
  const litAtTime = `${String(litHour).padStart(2, '0')}:00`
  return { litAtTime, litAt, warmings: courses.length, lengthHours, ...columns }
}

type Columns = Record<'temperatureC' | 'emcPct' | 'emcPctLow' | 'emcPctHigh', (number | null)[]>

function fill(
  columns: Columns,
  unlit: Pick<RoomForecast, 'temperatureC' | 'emcPct' | 'emcPctLow' | 'emcPctHigh'>,
  n: number,
  effect: Effect,
): void {
  const emc = unlit.emcPct[n] ?? 0
  const held = (value: number) => Math.min(30, Math.max(0, value))
  // The room's own doubt and the fire's have nothing to do with each other.
  const below = Math.hypot(emc - (unlit.emcPctLow[n] ?? emc), effect.emcPct - effect.emcPctLow)
  const above = Math.hypot((unlit.emcPctHigh[n] ?? emc) - emc, effect.emcPctHigh - effect.emcPct)
  columns.temperatureC[n] = (unlit.temperatureC[n] ?? 0) + effect.warmthC
  columns.emcPct[n] = held(emc + effect.emcPct)
  columns.emcPctLow[n] = held(emc + effect.emcPct - below)
  columns.emcPctHigh[n] = held(emc + effect.emcPct + above)
}
