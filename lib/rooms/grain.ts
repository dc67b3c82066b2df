const minuteMs = 60_000
const hourMs = 60 * minuteMs
const dayMs = 24 * hourMs

/** Longest range that is drawn from single readings. Longer ones are drawn from the hourly or daily figures. */
const rawSpanMsMax = 49 * hourMs
/** Widths that divide an hour, so that a step never straddles two. */
const rawStepsMin = [1, 2, 3, 5, 6, 10, 12, 15, 20, 30] as const

export const pointsDefault = 500
export const pointsMax = 2000
/** 100 years and their leap days: nothing was ever measured over longer. */
export const spanMsMax = 36_525 * dayMs

export type SeriesGrain =
  { grain: 'raw'; stepMs: number } | { grain: 'hour' } | { grain: 'day'; days: number }

/** The finest grain that shows a range in so many points at most. */
export function seriesGrain(spanMs: number, points: number): SeriesGrain {
  if (spanMs <= rawSpanMsMax) {
    const step = rawStepsMin.find((minutes) => spanMs / (minutes * minuteMs) <= points)
    if (step !== undefined) return { grain: 'raw', stepMs: step * minuteMs }
  }
  // A range that begins within a step touches one step more than its length.
  if (Math.ceil(spanMs / hourMs) + 1 <= points) return { grain: 'hour' }
  return { grain: 'day', days: Math.max(1, Math.ceil((Math.ceil(spanMs / dayMs) + 1) / points)) }
}
