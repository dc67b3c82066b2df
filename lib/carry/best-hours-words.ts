import { HOUR_MS } from '@/lib/follow/record'
import { formatClock, formatMoment, formatRelativeDay, formatWeekday } from '@/lib/format/times'
import type { BetterHour } from './better-hours'

/** More days are a list that nobody reads. */
const DAYS_TOLD = 3

interface Clock {
  timeZone: string
  now: Date
}

/**
 * The best hours of the week in one sentence: by the forecast as far as that goes, then what is usual.
 * @param hours of the least forgiving piece, best first, as the forecast has them
 * @param usual one hour a day past the forecast, best first; told as what is usual, never as a forecast
 * @returns null where nothing is known, or any hour will do: the strip of hours says that itself
 */
export function bestHoursWords(
  hours: readonly BetterHour[],
  usual: readonly BetterHour[],
  clock: Clock,
): string | null {
  if (hours.length > 0 && hours.every((hour) => hour.worst === 'fine')) return null
  const told = forecastWords(hours, clock)
  const later = usualWords(usual, clock)
  if (told === null && later === null)
    return usual.length > 0 ? 'As a rule no hour later this week is good for it either.' : null
  return `Best hours this week: ${[told, later].filter((part) => part !== null).join('; ')}.`
}

/** The stretch of like hours that the best one stands in; null where no hour is good. */
function forecastWords(hours: readonly BetterHour[], clock: Clock): string | null {
  const [best] = hours
  if (best === undefined || best.worst === 'leave') return null
  const like = new Set(
    hours
      .filter((hour) => hour.worst === best.worst && hour.ifLitAt === best.ifLitAt)
      .map((hour) => Date.parse(hour.startsAt)),
  )
  let from = Date.parse(best.startsAt)
  let until = from
  while (like.has(from - HOUR_MS)) from -= HOUR_MS
  while (like.has(until + HOUR_MS)) until += HOUR_MS
  const lit =
    best.ifLitAt === null ? '' : ` if it is lit ${formatMoment(best.ifLitAt, clock.timeZone, clock.now)}`
  return `${spanWords(from, until, clock)}${lit}${shortWords(best)}`
}

const shortWords = ({ worst }: BetterHour): string => (worst === 'keep-short' ? ', for a short stay' : '')

/** "tomorrow 10:00 to 14:00": hours to set out in, the last one with it. */
function spanWords(from: number, until: number, { timeZone, now }: Clock): string {
  const start = from <= now.getTime() ? 'now' : formatMoment(new Date(from), timeZone, now)
  if (from === until) return start
  const isOneDay =
    formatRelativeDay(new Date(from), timeZone, now) === formatRelativeDay(new Date(until), timeZone, now)
  const end = isOneDay ? formatClock(new Date(until), timeZone) : formatMoment(new Date(until), timeZone, now)
  return `${start} to ${end}`
}

function usualWords(usual: readonly BetterHour[], { timeZone }: Clock): string | null {
  const [best] = usual
  if (best === undefined || best.worst === 'leave') return null
  const days = usual
    .filter((hour) => hour.worst === best.worst)
    .slice(0, DAYS_TOLD)
    .toSorted((one, other) => one.startsAt.localeCompare(other.startsAt))
    .map((hour) => `${formatWeekday(hour.startsAt, timeZone)} from ${formatClock(hour.startsAt, timeZone)}`)
  return `as a rule ${listOf(days)}${shortWords(best)}, by the last week’s hours and no forecast`
}

const listOf = (words: readonly string[]): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
