import { TZDate } from '@date-fns/tz'
import { differenceInCalendarDays, format } from 'date-fns'

/** "14:05" in the site's time zone. */
export function formatClock(at: Date | string, timeZone: string): string {
  return format(inZone(at, timeZone), 'HH:mm')
}

/** "14:05:09", for readings that come seconds apart. */
export function formatClockSeconds(at: Date | string, timeZone: string): string {
  return format(inZone(at, timeZone), 'HH:mm:ss')
}

/** The calendar day in the site's zone, for grouping and for date fields: "2026-03-05". */
export function dayOn(at: Date | string, timeZone: string): string {
  return format(inZone(at, timeZone), 'yyyy-MM-dd')
}

/** "Thursday" in the site's time zone. */
export function formatWeekday(at: Date | string, timeZone: string): string {
  return format(inZone(at, timeZone), 'EEEE')
}

/** "Thu 5 Mar", with the year only when it is another one. */
export function formatDay(at: Date | string, timeZone: string, now: Date): string {
  const local = inZone(at, timeZone)
  const sameYear = local.getFullYear() === inZone(now, timeZone).getFullYear()
  return format(local, sameYear ? 'EEE d MMM' : 'EEE d MMM yyyy')
}

/** "8 December", with the year only when it is another one: for sentences. */
export function formatDate(at: Date | string, timeZone: string, now: Date): string {
  const local = inZone(at, timeZone)
  const sameYear = local.getFullYear() === inZone(now, timeZone).getFullYear()
  return format(local, sameYear ? 'd MMMM' : 'd MMMM yyyy')
}

/** The day as one would say it: "today", "tomorrow", "yesterday", "on Friday" within six days, else "on Thu 5 Mar". */
export function formatRelativeDay(at: Date | string, timeZone: string, now: Date): string {
  const days = differenceInCalendarDays(inZone(at, timeZone), inZone(now, timeZone))
  if (days === 0) return 'today'
  if (days === 1) return 'tomorrow'
  if (days === -1) return 'yesterday'
  if (days > 1 && days < 7) return `on ${format(inZone(at, timeZone), 'EEEE')}`
  return `on ${formatDay(at, timeZone, now)}`
}

/** A moment as one would say it: "14:00" today, "tomorrow 09:00", "Friday 10:00", "Thu 5 Mar, 13:10". */
export function formatMoment(at: Date | string, timeZone: string, now: Date): string {
  const clock = formatClock(at, timeZone)
  const days = differenceInCalendarDays(inZone(at, timeZone), inZone(now, timeZone))
  if (days === 0) return clock
  if (days === 1) return `tomorrow ${clock}`
  if (days === -1) return `yesterday ${clock}`
  if (days > 1 && days < 7) return `${format(inZone(at, timeZone), 'EEEE')} ${clock}`
  return `${formatDay(at, timeZone, now)}, ${clock}`
}

/** A moment in a figure: "14:00" today, "Tue 14:00" on another day. */
export function formatShortMoment(at: Date | string, timeZone: string, now: Date): string {
  const local = inZone(at, timeZone)
  return format(local, dayOn(at, timeZone) === dayOn(now, timeZone) ? 'HH:mm' : 'EEE HH:mm')
}

/** The whole moment, for titles and tables: "Thu 5 Mar 2026, 13:10:42 GMT". */
export function formatFullMoment(at: Date | string, timeZone: string): string {
  const zone = new Intl.DateTimeFormat('en-GB', { timeZone, timeZoneName: 'short' })
    .formatToParts(new Date(at))
    .find((part) => part.type === 'timeZoneName')
  return `${format(inZone(at, timeZone), 'EEE d MMM yyyy, HH:mm:ss')}${zone ? ` ${zone.value}` : ''}`
}

/** A length of time: to the minute under an hour, else to ten minutes: "25 min", "2 h 10 min", "3 h", "2 days". */
export function formatDuration(minutes: number): string {
  const whole = Math.max(0, Math.round(minutes))
  if (whole < 60) return `${String(whole)}\u00a0min`
  const tens = Math.round(whole / 10) * 10
  if (tens >= 48 * 60) return `${String(Math.round(tens / (24 * 60)))} days`
  const hours = Math.floor(tens / 60)
  const rest = tens % 60
  return rest === 0 ? `${String(hours)}\u00a0h` : `${String(hours)}\u00a0h ${String(rest)}\u00a0min`
}

/** How long ago: "just now", "2 min ago", "3 h ago", "4 days ago". */
export function formatAge(ageMs: number): string {
  const minutes = Math.floor(Math.max(0, ageMs) / 60_000)
  if (minutes < 1) return 'just now'
  if (minutes < 60) return `${String(minutes)}\u00a0min ago`
  const hours = Math.floor(minutes / 60)
  if (hours < 48) return `${String(hours)}\u00a0h ago`
  return `${String(Math.floor(hours / 24))} days ago`
}

function inZone(at: Date | string, timeZone: string): TZDate {
  return new TZDate(new Date(at), timeZone)
}
