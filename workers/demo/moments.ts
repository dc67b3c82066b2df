import { dayAfter, instantOfLocalTime, localDay } from '@/lib/sites/local-time'
import type { Moment } from './carries'

/** The instant of a moment that is told as seen from now. */
export function instantOf(moment: Moment, now: Date, timeZone: string): Date {
  if ('minutes' in moment) return new Date(now.getTime() + moment.minutes * 60_000)
  const day = dayAfter(localDay(now.getTime(), timeZone), moment.days)
  return new Date(instantOfLocalTime(day, moment.time, timeZone))
}

export const daysBefore = (now: Date, days: number): Date => new Date(now.getTime() - days * 86_400_000)
