import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { lastCallBeforeQuietMs } from '@/lib/notices/policy'
import { instantOfLocalTime } from '@/lib/sites/local-time'

export interface Evening {
  dayOn: string
  /** Epoch ms, all of them. */
  lockUpAt: number
  /** Null without quiet hours that begin after lock-up. */
  lastCallAt: number | null
  /** The end of quiet hours; without any, 07:00. */
  morningAt: number
  /** From an hour before lock-up on, until the small hours: when Now speaks of it. */
  isEvening: boolean
}

/** Whoever locks up after midnight closes the day that has just ended. Common practice, no source. */
const smallHoursMs = 4 * 3_600_000
/** Some lock up before they are asked. A guess. */
const earlyMs = 3_600_000
const usualMorning = '07:00'

/** The evening that a moment belongs to, by the site's own clock. */
export function eveningOf(
  now: Date,
  site: { timeZone: string; lockUpAt: string; quietFrom: string; quietTo: string },
): Evening {
  const { timeZone, quietFrom, quietTo } = site
  const dayOn = dayOfInstant(new Date(now.getTime() - smallHoursMs), timeZone)
  const at = (day: string, time: string): number => instantOfLocalTime(day, time, timeZone)
  const lockUpAt = at(dayOn, site.lockUpAt)
  const hasQuiet = quietFrom !== quietTo
  const isQuietLater = hasQuiet && quietFrom > site.lockUpAt
  return {
    dayOn,
    lockUpAt,
    lastCallAt: isQuietLater ? at(dayOn, quietFrom) - lastCallBeforeQuietMs : null,
    morningAt: at(daysAfter(dayOn, 1), hasQuiet ? quietTo : usualMorning),
    isEvening: now.getTime() >= lockUpAt - earlyMs,
  }
}
