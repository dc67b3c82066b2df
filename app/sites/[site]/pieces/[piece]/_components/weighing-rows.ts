import { formatCount, formatEmcFigure, formatMass } from '@/lib/format/figures'
import { formatDate } from '@/lib/format/times'
import { eventKindWords, type Weighing } from '@/lib/pieces/event'
import { dayMs } from '@/lib/seasoning/policy'
import type { RestView } from '@/lib/seasoning/rest-view'
import type { UnitSystem } from '@/lib/sites/site'
import { weighedMcPct } from './resting-figure'

export type WeighingRow = {
  readonly id: string
  readonly when: string
  readonly mass: string
  /** Against the weight before it, within the same series; empty where there is none. */
  readonly change: string
  /** Empty where the oven-dry mass is not known, or was that of another series. */
  readonly mc: string
  readonly isUndone: boolean
  readonly note: string
  /** Of a series that was closed by something that adds or takes mass. */
  readonly isEarlier: boolean
}

type Reader = { readonly units: UnitSystem; readonly timeZone: string }

/** The weighings as lines of a list, the newest first. */
export function weighingRows(
  items: readonly Weighing[],
  rest: RestView | null,
  { units, timeZone }: Reader,
  now: Date,
): WeighingRow[] {
  const openedAt = rest?.series.openedBy?.at
  const isEarlier = (at: string): boolean => openedAt !== undefined && Date.parse(at) < Date.parse(openedAt)
  return items.map((item, n) => {
    const before = item.isUndone
      ? undefined
      : items.slice(n + 1).find((one) => !one.isUndone && isEarlier(one.at) === isEarlier(item.at))
    const mcPct =
      rest === null || item.isUndone || isEarlier(item.at) ? undefined : weighedMcPct(item.grams, rest)
    return {
      id: item.id,
      when: formatDate(item.at, timeZone, now),
      mass: formatMass(item.grams, units),
      change: before === undefined ? '' : changeWords(item, before, units),
      mc: mcPct === undefined ? '' : formatEmcFigure(mcPct),
      isUndone: item.isUndone,
      note: item.note,
      isEarlier: isEarlier(item.at),
    }
  })
}

function changeWords(item: Weighing, before: Weighing, units: UnitSystem): string {
  const changeG = item.grams - before.grams
  const days = Math.round((Date.parse(item.at) - Date.parse(before.at)) / dayMs)
  const over = days >= 14 ? formatCount(Math.round(days / 7), 'week') : formatCount(days, 'day')
  const sign = changeG > 0 ? '+' : changeG < 0 ? '−' : ''
  return `${sign}${formatMass(Math.abs(changeG), units)} in ${over}`
}

/** "since it was cut on 4 May; 3 earlier weights don’t compare": what the current series is. */
export function seriesWords(
  { series }: RestView,
  { timeZone }: Pick<Reader, 'timeZone'>,
  now: Date,
): string | null {
  if (series.openedBy === null) return null
  const what = eventKindWords[series.openedBy.kind]
  const on = formatDate(series.openedBy.at, timeZone, now)
  const earlier =
    series.earlierWeights === 0
      ? ''
      : ` ${formatCount(series.earlierWeights, 'earlier weight')} can’t be compared with those since.`
  return `A new series began on ${on} (${what}).${earlier}`
}
