import { DIFFUSION_FACTOR, PACE_LOG_SPREAD } from '@/lib/doubt/causes'
import { normalBelow } from '@/lib/doubt/draws'
import { logSpreadNineInTen, together } from '@/lib/doubt/spread'
import { PACE_NODE } from '@/lib/carry/stay-run'

/** How a lid turned when its piece came back. */
export type Turned = 'as-before' | 'tighter' | 'binds' | 'looser'

/** An outcome beside what the model had for it: allowance used by slow, middling and quick wood. */
export type PaceOutcome = {
  readonly turned: Turned
  readonly usedSlow: number
  readonly usedMiddle: number
  readonly usedFast: number
}

export type Pace = {
  /** On the diffusion of the formula. */
  readonly factor: number
  /** Standard deviation of its logarithm, the ratio along the grain and the rest of the doubt with it. */
  readonly logSpread: number
  readonly outcomes: number
}

/** The pace of a site that has learned nothing yet. */
export const UNLEARNED_PACE: Pace = { factor: 1, logSpread: PACE_LOG_SPREAD, outcomes: 0 }

/** Below this part of the allowance a hand feels nothing; above the other the lid binds. Status: guess. */
export const FELT_FROM = 0.4
export const BINDS_FROM = 1.3
/** What else than the pace an outcome hangs on: movement, allowance, the hand that judged. Status: guess. */
export const OUTCOME_LOG_SPREAD = 0.45

const GRID = 81
const GRID_HALF_WIDTH = 4

/** Allowance used by wood of a pace, a parabola in the logarithm through the three that were run, never below 0. */
function usedAtNode({ usedSlow, usedMiddle, usedFast }: PaceOutcome, node: number): number {
  const at = Math.min(1.5, Math.max(-1.5, node))
  const used = (at * (at - 1) * usedSlow) / 2 + (1 - at * at) * usedMiddle + (at * (at + 1) * usedFast) / 2
  return Math.max(1e-3, used)
}

function likelihood(outcome: PaceOutcome, node: number): number {
  if (outcome.turned === 'looser') return 1 // says nothing of how quickly the joint tightens
  const logUsed = Math.log(usedAtNode(outcome, node))
  const above = (level: number): number => normalBelow((logUsed - Math.log(level)) / OUTCOME_LOG_SPREAD)
  // One in fifty outcomes is taken to be a slip of the pen: no single one may rule a pace out.
  const clear = {
    'as-before': 1 - above(FELT_FROM),
    tighter: above(FELT_FROM) - above(BINDS_FROM),
    binds: above(BINDS_FROM),
  }
  return 0.02 + 0.98 * Math.max(0, clear[outcome.turned])
}

/**
 * What a site's own outcomes say of how quickly its wood follows the air.
 * @param outcomes of one site and movement class, in any order
 * @returns a factor on diffusion, from a prior of 1 that lies within a factor of 2 nine times in ten
 *
 * Source: Bayes' rule on a grid; prior derived, what a hand feels a guess. The doubt of the ratio along the grain is not
 * learned and stays.
 */
export function learnedPace(outcomes: readonly PaceOutcome[]): Pace {
  const priorSpread = logSpreadNineInTen(DIFFUSION_FACTOR)
  const restSpread = Math.sqrt(Math.max(0, PACE_LOG_SPREAD ** 2 - priorSpread ** 2))
  let weight = 0
  let sum = 0
  let squares = 0
  for (let n = 0; n < GRID; n += 1) {
    const deviations = GRID_HALF_WIDTH * ((2 * n) / (GRID - 1) - 1)
    const log = deviations * priorSpread
    // The runs were made at -√3, 0 and √3 deviations of the whole pace.
    const node = log / (PACE_NODE * PACE_LOG_SPREAD)
    const probability = outcomes.reduce(
      (product, outcome) => product * likelihood(outcome, node),
      Math.exp((-deviations * deviations) / 2),
    )
    weight += probability
    sum += probability * log
    squares += probability * log * log
  }
  const mean = sum / weight
  const variance = Math.max(0, squares / weight - mean * mean)
  return {
    factor: Math.exp(mean),
    logSpread: together(Math.sqrt(variance), restSpread),
    outcomes: outcomes.length,
  }
}
