import { TZDate } from '@date-fns/tz'
import { format, startOfDay } from 'date-fns'

/** The instant at which a calendar day begins in a zone. Some zones have days that begin at 01:00. */
export function startOfDayAt(dayOn: string, timeZone: string): Date {
  const [year = 0, month = 1, day = 1] = dayOn.split('-').map(Number)
  return new Date(new TZDate(year, month - 1, day, timeZone).getTime())
}

/** The calendar day that an instant falls in, in a zone: "2026-03-05". */
export function dayOfInstant(at: Date, timeZone: string): string {
  return format(new TZDate(at, timeZone), 'yyyy-MM-dd')
}

/** The instant at which the day that an instant falls in began. */
export function startOfDayOf(at: Date, timeZone: string): Date {
  return new Date(startOfDay(new TZDate(at, timeZone)).getTime())
}

const dayMs = 86_400_000

/** A calendar day has no zone, so reckoning with days is done on the even days of UTC. */
function countedDay(dayOn: string): number {
  const [year = 0, month = 1, day = 1] = dayOn.split('-').map(Number)
  return Date.UTC(year, month - 1, day) / dayMs
}

const textOf = (counted: number): string => new Date(counted * dayMs).toISOString().slice(0, 10)

export const daysAfter = (dayOn: string, days: number): string => textOf(countedDay(dayOn) + days)

/** The same day of an earlier month, or its last day where it has no such day. */
export function monthsBefore(dayOn: string, months: number): string {
  const [year = 0, month = 1, day = 1] = dayOn.split('-').map(Number)
  const lastDay = new Date(Date.UTC(year, month - months, 0)).getUTCDate()
  return textOf(Date.UTC(year, month - 1 - months, Math.min(day, lastDay)) / dayMs)
}

/** Whole days from one calendar day to another. */
export const daysFrom = (firstOn: string, lastOn: string): number => countedDay(lastOn) - countedDay(firstOn)

/** First and last day of the month that a day is in. */
export function monthOf(dayOn: string): { firstOn: string; nextFirstOn: string } {
  const [year = 0, month = 1] = dayOn.split('-').map(Number)
  const next = month === 12 ? [year + 1, 1] : [year, month + 1]
  const text = (y: number, m: number) => `${String(y).padStart(4, '0')}-${String(m).padStart(2, '0')}-01`
  return { firstOn: text(year, month), nextFirstOn: text(next[0] ?? 0, next[1] ?? 1) }
}
