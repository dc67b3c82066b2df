import { TZDate } from '@date-fns/tz'
import { formatEmc, formatTemperature } from '@/lib/format/figures'
import { formatMoment, formatWeekday } from '@/lib/format/times'
import type { HourState, HourStrip, StripCell } from '@/lib/forecast/strip-view'
import type { UnitSystem } from '@/lib/sites/site'

/** Share of the full height that an hour stands to; an unfit one is a low band. */
export const HEIGHT_OF: Readonly<Record<HourState, number>> = { fit: 1, tolerable: 0.5, unfit: 0.2 }

export type StripTick = { index: number; label: string }

/** Every sixth hour of the day, by the clock of the site. */
export function stripTicks(cells: readonly { at: string }[], timeZone: string): StripTick[] {
  return cells.flatMap(({ at }, index) => {
    const hour = new TZDate(at, timeZone).getHours()
    return hour % 6 === 0 ? { index, label: String(hour).padStart(2, '0') } : []
  })
}

/** Where a day begins, with its name: in full where there is room for it, else three letters. */
export function stripDays(
  cells: readonly { at: string }[],
  timeZone: string,
  widthOf: (cells: number) => number,
  letterWidth: number,
): { index: number; label: string; isMidnight: boolean }[] {
  const starts = cells.flatMap(({ at }, index) =>
    index === 0 || new TZDate(at, timeZone).getHours() === 0 ? index : [],
  )
  return starts.flatMap((index, n) => {
    const at = cells[index]?.at
    if (at === undefined) return []
    const space = widthOf((starts[n + 1] ?? cells.length) - index)
    const full = formatWeekday(at, timeZone)
    const label = [full, full.slice(0, 3), ''].find((text) => text.length * letterWidth + 8 <= space) ?? ''
    return { index, label, isMidnight: new TZDate(at, timeZone).getHours() === 0 }
  })
}

/** Which kinds of hours a strip holds: only those are explained beside it. */
export function stripKinds(cells: readonly StripCell[]): {
  states: HourState[]
  ifLit: HourState[]
} {
  const order: HourState[] = ['fit', 'tolerable', 'unfit']
  return {
    states: order.filter((state) => cells.some((cell) => cell.state === state)),
    ifLit: order.filter((state) => state !== 'unfit' && cells.some((cell) => litState(cell) === state)),
  }
}

/** What a lighting makes of an hour; null where it makes it no better. */
export function litState({ state, ifLit }: StripCell): HourState | null {
  return ifLit !== null && HEIGHT_OF[ifLit.state] > HEIGHT_OF[state] ? ifLit.state : null
}

/** "Tomorrow 10:00: fit if you light it at 08:00, else unfit; 13.1 % MC." */
export function cellWords(
  cell: StripCell,
  lit: HourStrip['lit'],
  { timeZone, now, units }: { timeZone: string; now: Date; units: UnitSystem },
): string {
  const moment = formatMoment(cell.at, timeZone, now)
  const better = litState(cell)
  const air = `${formatEmc(cell.emcPct)}, ${formatTemperature(cell.temperatureC, units)}`
  const litWords =
    lit === null || cell.ifLit === null
      ? ''
      : `; if you light it at ${lit.atTime} ${better ?? 'no better'}, ${formatEmc(cell.ifLit.emcPct)}`
  return `${moment}: ${cell.state}, ${air}${litWords}`
}
