import { readyOverMs, readyWeights, sameWeightShare } from './policy'
import type { Weight } from './weighing'

/** How far weights may lie apart and still be the same, g: the larger of one step of the scale and 0.3 % of the mass. */
export const sameWeightToleranceG = (grams: number, stepG: number): number =>
  Math.max(stepG, sameWeightShare * grams)

/** The newest weights that reach over eight weeks, and whether they are the same. */
export type Steadiness = {
  readonly count: number
  readonly overMs: number
  /** From the lightest to the heaviest, g. */
  readonly apartG: number
  readonly toleranceG: number
  readonly isLongEnough: boolean
  readonly isSame: boolean
}

/** Weights put down in decimals are not exact in binary; this is far below any scale's step. */
const ROUNDING_G = 1e-6

/**
 * The shortest run of newest weights with at least three of them over at least eight weeks; all of them where there is
 * no such run.
 * @param weights in order of time
 * @param stepG step of the scale, g
 */
export function steadinessOf(weights: readonly Weight[], stepG: number): Steadiness {
  const run = newestRun(weights)
  const first = run[0]
  const last = run.at(-1)
  if (first === undefined || last === undefined)
    return { count: 0, overMs: 0, apartG: 0, toleranceG: stepG, isLongEnough: false, isSame: false }
  const grams = run.map((weight) => weight.grams)
  const apartG = Math.max(...grams) - Math.min(...grams)
  const toleranceG = sameWeightToleranceG(last.grams, stepG)
  const isLongEnough = run.length >= readyWeights && last.at - first.at >= readyOverMs
  return {
    count: run.length,
    overMs: last.at - first.at,
    apartG,
    toleranceG,
    isLongEnough,
    isSame: apartG <= toleranceG + ROUNDING_G,
  }
}

function newestRun(weights: readonly Weight[]): readonly Weight[] {
  const last = weights.at(-1)
  if (last === undefined) return []
  const from = weights.findLastIndex((weight) => last.at - weight.at >= readyOverMs)
  if (from === -1) return weights
  return weights.slice(Math.max(0, Math.min(from, weights.length - readyWeights)))
}
