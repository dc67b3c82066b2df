import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Moment } from './carries'

const minuteMs = 60_000
/** People plan by five minutes. */
const planMs = 5 * minuteMs

/** The instant of a moment that is told as seen from now: to the minute, and to five minutes where it is a plan. */
export function instantOf(moment: Moment, now: Date, timeZone: string): Date {
  if ('minutes' in moment) {
    const at = now.getTime() + moment.minutes * minuteMs
    return new Date(
      moment.minutes > 0 ? Math.round(at / planMs) * planMs : Math.floor(at / minuteMs) * minuteMs,
    )
  }
  const day = daysAfter(dayOfInstant(now, timeZone), moment.days)
  return new Date(instantOfLocalTime(day, moment.time, timeZone))
}

export const daysBefore = (now: Date, days: number): Date => new Date(now.getTime() - days * 86_400_000)
