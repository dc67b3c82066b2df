import { TZDate } from '@date-fns/tz'
import { formatClock, formatDay } from '@/lib/format/times'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS

export type TimeTick = { at: number; isLong: boolean; label: string | null }

/** Steps between ticks, in minutes: short ones, and the long ones that carry a label. */
const STEPS: readonly { upToHours: number; short: number; long: number }[] = [
  { upToHours: 3, short: 10, long: 60 },
  { upToHours: 8, short: 30, long: 120 },
  { upToHours: 16, short: 60, long: 240 },
  { upToHours: 36, short: 120, long: 360 },
  { upToHours: 96, short: 360, long: 1440 },
  { upToHours: 24 * 16, short: 1440, long: 2880 },
  { upToHours: Infinity, short: 1440, long: 1440 * 7 },
]

/** Ticks along a time axis on round local times, with a label on each long one. */
export function timeTicks(fromMs: number, toMs: number, timeZone: string): TimeTick[] {
  const hours = (toMs - fromMs) / HOUR_MS
  const step = STEPS.find((candidate) => hours <= candidate.upToHours)
  if (!step || !(hours > 0)) return []
  const ticks: TimeTick[] = []
  const midnight = new TZDate(fromMs, timeZone)
  midnight.setHours(0, 0, 0, 0)
  const stepsPerDay = Math.max(1, Math.floor(1440 / step.short))
  const dayStep = Math.max(1, Math.round(step.short / 1440))
  for (let day = 0; ; day += dayStep) {
    const dayStart = new TZDate(midnight.getTime(), timeZone)
    dayStart.setDate(dayStart.getDate() + day)
    if (dayStart.getTime() > toMs) break
    for (let index = 0; index < stepsPerDay; index += 1) {
      const minutes = index * step.short
      const local = new TZDate(dayStart.getTime(), timeZone)
      local.setMinutes(minutes)
      const at = local.getTime()
      if (at < fromMs || at > toMs || at <= (ticks.at(-1)?.at ?? -Infinity)) continue
      const isLong =
        step.long >= 1440 ? minutes === 0 && day % (step.long / 1440) === 0 : minutes % step.long === 0
      ticks.push({ at, isLong, label: isLong ? labelOf(at, minutes === 0, hours, timeZone, toMs) : null })
    }
  }
  return ticks
}

function labelOf(at: number, isMidnight: boolean, hours: number, timeZone: string, toMs: number): string {
  const day = () => formatDay(new Date(at), timeZone, new Date(toMs))
  if (hours > 96) return day().replace(/^\w+ /, '')
  if (isMidnight && hours > 16) return day()
  return formatClock(new Date(at), timeZone)
}
