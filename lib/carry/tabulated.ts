import type { FractionChanged } from './joint'

/** Cells of the table, equal in the root of time, in which a response is nearly straight. */
const CELLS = 256
/** Where less than this is left of a step, all of it counts as followed. */
const SPENT = 1e-6
const FIRST_GUESS_S = 3600

/**
 * A response read from a table of itself: superposing hundreds of hours asks for it thousands of times.
 * @param fractionChanged a response that rises from 0 towards 1
 * @returns the same within 2e-4, and exactly 1 once less than 1e-6 is left
 */
export function tabulated(fractionChanged: FractionChanged): FractionChanged {
  let spentS = FIRST_GUESS_S
  while (1 - fractionChanged(spentS) > SPENT) spentS *= 1.5
  const cellRoot = Math.sqrt(spentS) / CELLS
  const table = Float64Array.from({ length: CELLS + 2 }, (_, n) => fractionChanged((n * cellRoot) ** 2))
  return (elapsedS) => {
    if (elapsedS >= spentS) return 1
    const place = Math.sqrt(elapsedS) / cellRoot
    const cell = Math.floor(place)
    const low = table[cell] ?? 1
    return low + ((table[cell + 1] ?? 1) - low) * (place - cell)
  }
}
