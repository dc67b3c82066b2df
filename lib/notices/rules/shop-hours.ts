import { dayOfInstant, daysAfter, startOfDayAt } from '@/lib/climate/days'
import { formatClock } from '@/lib/format/times'
import { instantOfLocalTime } from '@/lib/sites/local-time'
import type { Episode, NoticeInputs, NoticeState, RulePart } from '../inputs'
import { makers, recipients } from '../people'
import { choiceOf, isInScope } from '../rule-settings'
import type { NoticeStrip, StripKind } from '../surroundings'

const nothing: RulePart = { episodes: [], notices: [] }
const hourMs = 3_600_000
/** After this long past its hour a day's word is no news any more. A guess. */
const staleAfterMs = 4 * hourMs
/** The hours in which anybody would work. A guess. */
const dayFrom = '07:00'
const dayTo = '19:00'

/** The evening before a day on which a shop will be unfit throughout: told on the first such evening of a spell. */
export function shopUnfit(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'shop-unfit')
  if (!isOn) return nothing
  const { timeZone } = inputs.site
  const today = dayOfInstant(new Date(now), timeZone)
  const isHour = isWithin(now, instantOfLocalTime(today, values.at, timeZone), staleAfterMs)
  const parts = stripsOf(inputs, values.rooms).map((strip): RulePart => {
    const subject = `room ${strip.roomCode}`
    const open = (state.known ?? []).find(
      (one) => one.rule === 'shop-unfit' && one.subject === subject && one.isOpen,
    )
    const cells = cellsOn(strip, daysAfter(today, 1), timeZone)
    const isUnfit = cells.length >= 6 && cells.every(({ kind }) => kind === 'unfit')
    // Between two evenings a spell goes on as it was; only the hour itself ends it.
    if (!isUnfit && (isHour || open === undefined)) return nothing
    if (open === undefined && !isHour) return nothing
    const episode: Episode = {
      rule: 'shop-unfit',
      subject,
      key: open?.key ?? today,
      state: 'telling',
      beganAt: open?.beganAt ?? now,
    }
    return {
      episodes: [episode],
      notices: [
        {
          key: `shop-unfit/${strip.roomCode}/${episode.key}`,
          rule: 'shop-unfit',
          urgency: 'whenever',
          mark: 'keep-short',
          title: `${strip.roomName} will be unfit for finishing all day tomorrow.`,
          body: 'As far as its forecast tells. You are told again when a new spell begins. Warm it if you can attend to it, or bring only what must be.',
          link: `/rooms/${strip.roomCode}`,
          episode,
          roomCode: strip.roomCode,
          to: recipients(makers(inputs.people)),
        },
      ],
    }
  })
  return joined(parts)
}

/** Good hours today: told in the morning, each day that has them. */
export function goodHours(now: number, _state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values, isOn } = choiceOf(inputs.rules, 'good-hours')
  if (!isOn) return nothing
  const { timeZone } = inputs.site
  const today = dayOfInstant(new Date(now), timeZone)
  if (!isWithin(now, instantOfLocalTime(today, values.at, timeZone), staleAfterMs)) return nothing
  const good: readonly StripKind[] =
    values.kind === 'lit'
      ? ['fit', 'fit-if-lit']
      : values.kind === 'tolerable'
        ? ['fit', 'tolerable']
        : ['fit']
  const parts = stripsOf(inputs, values.rooms).map((strip): RulePart => {
    const run = longestRun(
      cellsOn(strip, today, timeZone).filter(({ at }) => at + hourMs > now),
      good,
    )
    if (run === undefined || run.hours < values.hours) return nothing
    const episode: Episode = {
      rule: 'good-hours',
      subject: `room ${strip.roomCode}`,
      key: today,
      state: 'telling',
      beganAt: now,
    }
    const span = `${formatClock(new Date(run.at), timeZone)} to ${formatClock(new Date(run.at + run.hours * hourMs), timeZone)}`
    return {
      episodes: [episode],
      notices: [
        {
          key: `good-hours/${strip.roomCode}/${today}`,
          rule: 'good-hours',
          urgency: 'whenever',
          mark: 'fine',
          title: `Good hours in ${strip.roomName} today: about ${span}.`,
          body: values.kind === 'lit' ? 'Some of them only once it is lit.' : 'As far as its forecast tells.',
          link: `/rooms/${strip.roomCode}`,
          episode,
          roomCode: strip.roomCode,
          to: recipients(makers(inputs.people)),
        },
      ],
    }
  })
  return joined(parts)
}

const joined = (parts: readonly RulePart[]): RulePart => ({
  episodes: parts.flatMap((part) => part.episodes),
  notices: parts.flatMap((part) => part.notices),
})

const isWithin = (now: number, from: number, ms: number): boolean => now >= from && now < from + ms

const stripsOf = (inputs: NoticeInputs, rooms: readonly string[]): NoticeStrip[] =>
  (inputs.surroundings?.strips ?? []).filter((strip) => isInScope(rooms, strip.roomCode, true))

/** The working hours of one of the site's days; of a day that is partly beyond the forecast, what is known. */
function cellsOn(strip: NoticeStrip, dayOn: string, timeZone: string): NoticeStrip['cells'] {
  const from = Math.max(startOfDayAt(dayOn, timeZone).getTime(), instantOfLocalTime(dayOn, dayFrom, timeZone))
  const to = instantOfLocalTime(dayOn, dayTo, timeZone)
  return strip.cells.filter(({ at, kind }) => at >= from && at < to && kind !== 'unknown')
}

function longestRun(
  cells: NoticeStrip['cells'],
  good: readonly StripKind[],
): { at: number; hours: number } | undefined {
  let best: { at: number; hours: number } | undefined
  let run: { at: number; hours: number } | undefined
  for (const cell of cells) {
    const goesOn = run !== undefined && run.at + run.hours * hourMs === cell.at
    if (!good.includes(cell.kind)) run = undefined
    else run = goesOn && run !== undefined ? { ...run, hours: run.hours + 1 } : { at: cell.at, hours: 1 }
    if (run !== undefined && run.hours > (best?.hours ?? 0)) best = run
  }
  return best
}
