import { HOUR_MS } from '@/lib/follow/record'
import { formatClock, formatMoment, formatRelativeDay, formatWeekday } from '@/lib/format/times'
import type { BetterHour } from './better-hours'
import type { Verdict } from './carry-check'

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }
/** More days are a list that nobody reads. */
const DAYS_TOLD = 3

interface Clock {
  timeZone: string
  now: Date
}

/**
 * The best hours of the week in one or two sentences: by the forecast as far as that goes, then what is usual.
 * @param hours of the least forgiving piece, best first, as the forecast has them
 * @param usual one hour a day past the forecast, best first; told as what is usual, never as a forecast
 * @returns empty where no hour is known of
 */
export function bestHoursWords(
  hours: readonly BetterHour[],
  usual: readonly BetterHour[],
  clock: Clock,
): string[] {
  const told = forecastWords(hours, clock)
  if (hours.length > 0 && hours.every((hour) => hour.worst === 'fine')) return told
  if (hours[0]?.worst === 'leave' && usual[0]?.worst === 'leave')
    return ['No hour of the next two days is good for it, and as a rule none later this week.']
  return [...told, ...usualWords(usual, hours.length > 0, clock)]
}

function forecastWords(hours: readonly BetterHour[], clock: Clock): string[] {
  const [best] = hours
  if (best === undefined) return []
  if (best.worst === 'leave') return ['No hour of the next two days is good for it.']
  if (hours.every((hour) => hour.worst === 'fine')) return ['Any hour of the next two days will do.']
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
    best.ifLitAt === null ? '' : `, if it is lit ${formatMoment(best.ifLitAt, clock.timeZone, clock.now)}`
  const short = best.worst === 'keep-short' ? ', for a short stay' : ''
  return [`Best hours in the next two days: ${spanWords(from, until, clock)}${lit}${short}.`]
}

/** "tomorrow 10:00 to 14:00": hours to set out in, the last one with it. */
function spanWords(from: number, until: number, { timeZone, now }: Clock): string {
  const start = from <= now.getTime() ? 'now' : formatMoment(new Date(from), timeZone, now)
  if (from === until) return start
  const isOneDay =
    formatRelativeDay(new Date(from), timeZone, now) === formatRelativeDay(new Date(until), timeZone, now)
  const end = isOneDay ? formatClock(new Date(until), timeZone) : formatMoment(new Date(until), timeZone, now)
  return `${start} to ${end}`
}

function usualWords(usual: readonly BetterHour[], isForecast: boolean, { timeZone }: Clock): string[] {
  const [best] = usual
  if (best === undefined) return []
  const after = isForecast ? 'Later this week' : 'This week'
  if (best.worst === 'leave') return [`${after}, as a rule, no hour is good for it.`]
  const days = usual
    .filter((hour) => RANK[hour.worst] === RANK[best.worst])
    .slice(0, DAYS_TOLD)
    .toSorted((one, other) => one.startsAt.localeCompare(other.startsAt))
    .map((hour) => `${formatWeekday(hour.startsAt, timeZone)} from ${formatClock(hour.startsAt, timeZone)}`)
  const short = best.worst === 'keep-short' ? ', for a short stay' : ''
  return [`${after}, as a rule, ${listOf(days)}${short}: by the hours of the last week, not by a forecast.`]
}

const listOf = (words: readonly string[]): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
