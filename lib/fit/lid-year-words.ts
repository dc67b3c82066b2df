import { formatEmc, formatEmcFigure } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import { spareWords } from './feel'
import type { MonthClearance } from './lid-place'

const MONTHS = [
  ...['January', 'February', 'March', 'April', 'May', 'June', 'July'],
  ...['August', 'September', 'October', 'November', 'December'],
]

/** "August", of the first of it. */
export const monthName = (monthOn: string): string => MONTHS[Number(monthOn.slice(5, 7)) - 1] ?? monthOn

/** "in June and July", "from May to October", "in every month" that there is. */
function monthsWords(months: readonly MonthClearance[], year: readonly MonthClearance[]): string {
  const names = months.map(({ monthOn }) => monthName(monthOn))
  const [first, last] = [names[0] ?? '', names.at(-1) ?? '']
  if (names.length === 1) return `in ${last}`
  if (months.length === year.length) return 'in every month'
  const from = year.findIndex(({ monthOn }) => monthOn === months[0]?.monthOn)
  const isOneRun = months.every(({ monthOn }, n) => year[from + n]?.monthOn === monthOn)
  return isOneRun && names.length > 2
    ? `from ${first} to ${last}`
    : `in ${names.slice(0, -1).join(', ')} and ${last}`
}

/**
 * How a lid goes through a room's year at a quarter turn, worst first.
 * @param roomName of the room that it is kept in
 * @param year oldest first, not empty
 * @param isSnap cut too tight on purpose: then tight is not told as binding
 */
export function lidYearSentence(
  roomName: string,
  year: readonly MonthClearance[],
  isSnap: boolean,
  units: UnitSystem = 'metric',
): readonly TextPart[] {
  const [first] = year.toSorted((one, other) => one.middleMm - other.middleMm)
  if (first === undefined) return []
  const emcs = year.map(({ emcPct }) => emcPct)
  const span =
    year.length < 2
      ? say` The room stood at ${formatEmc(first.emcPct)}.`
      : say` The room’s months run from ${formatEmcFigure(Math.min(...emcs))} to ${formatEmc(Math.max(...emcs))}.`
  const when = monthName(first.monthOn)
  const spare = spareWords(first.middleMm, units)
  if (isSnap) return [...say`Left in ${roomName}, the lid is tightest in ${strong(when)}: ${spare}.`, ...span]
  const binding = year.filter(({ middleMm }) => middleMm < 0)
  if (binding.length > 0)
    return [
      ...say`Left in ${roomName}, it ${strong(`may bind ${monthsWords(binding, year)}`)} at a quarter turn.`,
      ...span,
    ]
  const doubtful = first.lowMm < 0 ? '; 1 in 10 like it would bind for a while' : ''
  return [
    ...say`Left in ${roomName}, the lid is snuggest in ${strong(when)}, with ${spare} at a quarter turn${doubtful}.`,
    ...span,
  ]
}
