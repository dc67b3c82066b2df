import type { KeepsHour } from '@/lib/carry/carry-answer'

export type KeepsBar = {
  at: string
  /** Minutes to the early edge; null: past the stay and half an hour more. */
  keptMinutes: number | null
  /** The same if the room is lit; undefined where no lighting would make it longer. */
  ifLitMinutes: number | null | undefined
}

const lengthOf = (minutes: number | null): number => minutes ?? Infinity
/** Less of a difference than this, and no hour is told as the best, minutes. */
const TELLING_MINUTES = 15

/** One bar an hour, the lit one behind the unlit; the top of the axis; and which hour keeps the piece longest. */
export function keepsBars(
  hours: readonly KeepsHour[],
  stayMinutes: number,
): { bars: KeepsBar[]; topHours: number; best: number | null } {
  const bars = hours
    .filter((hour) => hour.ifLitAt === null)
    .map(({ at, keepsMinutes }): KeepsBar => {
      const lit = hours.find((other) => other.ifLitAt !== null && other.at === at)
      const isLonger = lit !== undefined && lengthOf(lit.keepsMinutes) > lengthOf(keepsMinutes)
      return { at, keptMinutes: keepsMinutes, ifLitMinutes: isLonger ? lit.keepsMinutes : undefined }
    })
  const reach = bars.map(({ keptMinutes, ifLitMinutes }) => {
    const ifLit = ifLitMinutes === undefined ? 0 : lengthOf(ifLitMinutes)
    return Math.min(stayMinutes + 30, Math.max(lengthOf(keptMinutes), ifLit))
  })
  const most = Math.max(...reach)
  const isTelling = bars.length > 0 && most - Math.min(...reach) >= TELLING_MINUTES
  // An even number, so that the middle of the axis is a whole one.
  const topHours = 2 * Math.max(1, Math.ceil((stayMinutes + 30) / 120))
  return { bars, topHours, best: isTelling ? reach.indexOf(most) : null }
}
