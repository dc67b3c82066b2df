/** Steps of a scale of time, minutes, from ten minutes to a hundred days. */
const STEPS_MIN = [10, 30, 60, 120, 240, 480, 1440, 2880, 7200, 14_400, 28_800, 72_000, 144_000] as const
const MOST_TICKS = 7

/** A little past the middle, so that the hatching runs off the end. */
export const barEndMinutes = (middleMinutes: number): number => Math.max(10, middleMinutes * 1.13)

/** Round times from nought to the end of the bar. */
export function barTicksMinutes(endMinutes: number): number[] {
  const step = STEPS_MIN.find((candidate) => endMinutes / candidate <= MOST_TICKS) ?? 365 * 1440
  return Array.from({ length: Math.floor(endMinutes / step) + 1 }, (_, index) => index * step)
}

/** "30 min", "4 h", "12 days": a tick has no minutes beside its hours. */
export function tickText(minutes: number): string {
  if (minutes === 0) return '0'
  if (minutes < 60) return `${String(minutes)} min`
  if (minutes % 1440 === 0) return `${String(minutes / 1440)} ${minutes === 1440 ? 'day' : 'days'}`
  return `${String(minutes / 60)} h`
}
