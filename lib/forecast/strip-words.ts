import { formatClock, formatRelativeDay } from '@/lib/format/times'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { HourState, HourStrip, StripCell } from './strip-view'

const HOUR_MS = 3_600_000

interface Clock {
  timeZone: string
  now: Date
}

interface Run {
  from: number
  /** Up to but without this moment. */
  until: number
  isToEnd: boolean
}

/** The first hours on end of which something holds. */
function firstRun(cells: readonly StripCell[], holds: (cell: StripCell) => boolean): Run | undefined {
  const start = cells.findIndex(holds)
  if (start < 0) return undefined
  let end = start
  while (end + 1 < cells.length && holds(cells[end + 1] ?? cells[end] ?? NEVER)) end += 1
  const from = new Date(cells[start]?.at ?? 0).getTime()
  const until = new Date(cells[end]?.at ?? 0).getTime() + HOUR_MS
  return { from, until, isToEnd: end === cells.length - 1 }
}

const NEVER: StripCell = { at: '', state: 'unfit', emcPct: 0, temperatureC: 0, ifLit: null }

/** "now until 15:00", "from 10:00 to 15:00 tomorrow", "from 11:00 on Saturday". */
export function runWords(run: Run, { timeZone, now }: Clock): string {
  const clock = (at: number) => formatClock(new Date(at), timeZone)
  const day = (at: number) => formatRelativeDay(new Date(at), timeZone, now)
  const from = clock(run.from)
  const isNow = run.from <= now.getTime()
  // An hour that ends at midnight belongs to the day that is over.
  const isOneDay = day(run.from) === day(run.until - 1)
  if (isNow && run.isToEnd) return 'now and for the 48 hours to come'
  if (isNow) return `now until ${clock(run.until)}${isOneDay ? '' : ` ${day(run.until)}`}`
  if (run.isToEnd) return `from ${from} ${day(run.from)}`
  return isOneDay
    ? `from ${from} to ${clock(run.until)} ${day(run.from)}`
    : `from ${from} ${day(run.from)} to ${clock(run.until)} ${day(run.until)}`
}

const stateIfLit = (cell: StripCell): HourState => cell.ifLit?.state ?? cell.state

/** When a room is fit, as it is and if lit, in one sentence. */
export function stripWords(strip: Pick<HourStrip, 'kind' | 'cells' | 'lit'>, clock: Clock): TextPart[] {
  const { cells, lit, kind } = strip
  if (kind === 'none') return say`No reading there now, so nothing is said of the coming hours.`
  const tolerable = firstRun(cells, (cell) => cell.state !== 'unfit')
  if (kind === 'repeated')
    return tolerable === undefined
      ? say`No forecast yet. If the last two days came again, no hour would do.`
      : say`No forecast yet. If the last two days came again, it might do ${strong(runWords(tolerable, clock))}.`
  const fit = firstRun(cells, (cell) => cell.state === 'fit')
  const litFit = lit && firstRun(cells, (cell) => cell.state !== 'fit' && stateIfLit(cell) === 'fit')
  const ifLit =
    lit && litFit && litFit.from < (fit?.from ?? Infinity)
      ? say`if you light it at ${lit.atTime}, ${strong(runWords(litFit, clock))}`
      : null
  if (fit !== undefined)
    return ifLit === null
      ? say`Fit as it is ${strong(runWords(fit, clock))}.`
      : say`Fit as it is ${strong(runWords(fit, clock))}; ${ifLit}.`
  if (ifLit !== null) return say`Fit ${ifLit}. As it is, not in the next 48 hours.`
  if (tolerable?.isToEnd === true && tolerable.from <= clock.now.getTime())
    return say`${strong('Tolerable for a short stay')} now and for the 48 hours to come; none of them is fit.`
  return tolerable === undefined
    ? say`${strong('Not fit')} for finished boxes in the next 48 hours.`
    : say`${strong('Not fit')} in the next 48 hours; tolerable for a short stay ${strong(runWords(tolerable, clock))}.`
}
