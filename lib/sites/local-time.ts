import { TZDate } from '@date-fns/tz'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'

/**
 * The instant at which the clocks of a zone show a time on a day, epoch ms.
 * A time that a change of the clocks leaves out is taken as that much later; one that comes twice, as the first.
 * @param day  calendar day, YYYY-MM-DD
 * @param time time of day, HH:mm
 */
export function instantOfLocalTime(day: string, time: string, timeZone: string): number {
  const [year = 1970, month = 1, date = 1] = day.split('-').map(Number)
  const [hour = 0, minute = 0] = time.split(':').map(Number)
  return new TZDate(year, month - 1, date, hour, minute, timeZone).getTime()
}

export interface QuietHours {
  timeZone: string
  /** HH:mm; equal times mean no quiet hours at all. */
  quietFrom: string
  quietTo: string
}

/** The end of the quiet hours that `at` lies in, epoch ms; null outside them. They may run over midnight. */
export function quietUntil(at: number, { timeZone, quietFrom, quietTo }: QuietHours): number | null {
  if (quietFrom === quietTo) return null
  const today = dayOfInstant(new Date(at), timeZone)
  for (const startDay of [daysAfter(today, -1), today]) {
    const from = instantOfLocalTime(startDay, quietFrom, timeZone)
    const to = instantOfLocalTime(quietTo > quietFrom ? startDay : daysAfter(startDay, 1), quietTo, timeZone)
    if (at >= from && at < to) return to
  }
  return null
}
