import type { UnitSystem } from '@/lib/sites/site'
import { gramsFromOunces } from '@/lib/units'
import { formatMassFigure } from './mass-entry'

/** Steps that scales for wood have, for a list to choose from. */
const METRIC_G = [0.01, 0.1, 0.5, 1, 2, 5] as const
const IMPERIAL_OZ = [0.005, 0.01, 0.05, 0.1, 0.25] as const

/**
 * The steps to choose from in the reader's unit, with the one that was told among them.
 * @param toldG step in force, g, above 0; null where none was told
 */
export function scaleSteps(units: UnitSystem, toldG: number | null): { stepG: number; words: string }[] {
  const unit = units === 'metric' ? 'g' : 'oz'
  const usual = units === 'metric' ? METRIC_G : IMPERIAL_OZ.map(roundedFromOunces)
  const all = toldG === null || usual.some((stepG) => isSame(stepG, toldG)) ? usual : [...usual, toldG]
  return all
    .toSorted((one, other) => one - other)
    .map((usualG) => {
      const stepG = toldG !== null && isSame(usualG, toldG) ? toldG : usualG
      return { stepG, words: `${formatMassFigure(stepG, units)} ${unit}` }
    })
}

const roundedFromOunces = (ounces: number): number => Math.round(gramsFromOunces(ounces) * 1e4) / 1e4

/** Stored in single precision. */
const isSame = (one: number, other: number): boolean => Math.abs(one - other) < 1e-3 * other
