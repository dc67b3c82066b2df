import { TZDate } from '@date-fns/tz'
import { format } from 'date-fns'

/** What a `datetime-local` field shows for an instant, in the site's zone: "2026-03-05T14:00". */
export function localFieldValue(at: Date | string, timeZone: string): string {
  return format(new TZDate(new Date(at), timeZone), "yyyy-MM-dd'T'HH:mm")
}

/**
 * The instant that a `datetime-local` field means in the site's zone; `undefined` for anything else.
 * A time that the clocks skip in spring is read as the hour after.
 */
export function instantOfLocalField(text: string, timeZone: string): Date | undefined {
  const parts = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})(?::\d{2})?$/.exec(text)
  if (!parts) return undefined
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0] = parts.slice(1).map(Number)
  const at = new TZDate(year, month - 1, day, hour, minute, timeZone)
  return Number.isNaN(at.getTime()) || at.getMonth() !== month - 1 ? undefined : new Date(at.getTime())
}

/** The next full hour that lies at least half an hour off: a fair guess at when something will go. */
export function nextFullHour(now: Date, timeZone: string): Date {
  const at = new TZDate(now.getTime() + 30 * 60_000, timeZone)
  if (at.getMinutes() > 0 || at.getSeconds() > 0 || at.getMilliseconds() > 0)
    at.setHours(at.getHours() + 1, 0, 0, 0)
  return new Date(at.getTime())
}
