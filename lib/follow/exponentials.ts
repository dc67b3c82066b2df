/**
 * A falling curve as a sum of exponentials on a fixed ladder of rates, each twice the one before. Doubling makes the
 * decays of a step cost one exponential and eleven squarings, and lets every cover of a piece share one state.
 */

export const RUNGS = 12
export const RUNG_RATIO = 2

const SAMPLES = 120
/** The curve starts at 1 whatever else is off: the sum of the weights is held to it. */
const WEIGHT_OF_START = 100
/** Below this part of a change a miss no longer counts for more. */
const CHANGED_FROM = 0.05
/** More rounds than rungs only where one leaves and comes back. */
const ROUNDS = 30
const HELPS_FROM = 1e-7
const SPENT = 1e-12

/** What is left of a step of the air, 1 falling to 0, against diffusion time: the integral of D dt, m². */
export type Left = (diffusionTimeM2: number) => number

/** Times at which the curve is met, in units of one over the slowest rate: evenly spread in their logarithm, and 0. */
const TIMES: readonly number[] = (() => {
  const first = Math.log(0.01 / RUNG_RATIO ** (RUNGS - 1))
  const last = Math.log(9)
  return [
    0,
    ...Array.from({ length: SAMPLES }, (_, n) => Math.exp(first + ((last - first) * n) / (SAMPLES - 1))),
  ]
})()
const DECAYS: readonly (readonly number[])[] = TIMES.map((time) =>
  Array.from({ length: RUNGS }, (_, rung) => Math.exp(-(RUNG_RATIO ** rung) * time)),
)
/**
 * Weights of the ladder's exponentials that come nearest to a falling curve.
 * @param left the curve, against diffusion time in m²; 1 at 0
 * @param slowestPerM2 rate of the first rung, 1/m², above 0
 * @returns one weight a rung, none negative, together 1, so that a mean of the rungs lies between the airs it followed
 *
 * Within 0.008 of the curve for joints, lids, walls and solids from the first hundredth on (tested).
 * Source: derived; least squares without negative weights.
 */
export function ladderWeights(left: Left, slowestPerM2: number): Float64Array {
  const aim = new Float64Array(RUNGS)
  const gram = new Float64Array(RUNGS * RUNGS)
  TIMES.forEach((time, n) => {
    const y = time === 0 ? 1 : left(time / slowestPerM2)
    const weight = weightOf(time, y)
    for (let i = 0; i < RUNGS; i += 1) {
      const decay = weight * (DECAYS[n]?.[i] ?? 0)
      aim[i] = (aim[i] ?? 0) + decay * y
      for (let j = 0; j < RUNGS; j += 1) {
        const cell = i * RUNGS + j
        gram[cell] = (gram[cell] ?? 0) + decay * (DECAYS[n]?.[j] ?? 0)
      }
    }
  })
  return scaledToOne(nearest(gram, aim))
}

/** A miss counts against how much has changed by then: early on, a small one moves a time by a lot. */
const weightOf = (time: number, left: number): number =>
  time === 0 ? WEIGHT_OF_START ** 2 : 1 / (1 - left + CHANGED_FROM) ** 2

/**
 * Least squares without negative weights: rungs enter one by one where they help most, and leave when they turn negative.
 * Source: Lawson and Hanson, Solving Least Squares Problems (1974), ch. 23 (from memory).
 */
function nearest(gram: Float64Array, aim: Float64Array): Float64Array {
  let weights: Float64Array = new Float64Array(RUNGS)
  const chosen = new Set<number>()
  for (let round = 0; round < ROUNDS; round += 1) {
    const best = mostHelpful(gram, aim, weights, chosen)
    if (best === undefined) break
    chosen.add(best)
    weights = settled(gram, aim, weights, chosen)
  }
  return weights
}

function mostHelpful(
  gram: Float64Array,
  aim: Float64Array,
  weights: Float64Array,
  chosen: ReadonlySet<number>,
): number | undefined {
  let best: number | undefined
  let most = HELPS_FROM
  for (let i = 0; i < RUNGS; i += 1) {
    if (chosen.has(i)) continue
    let help = aim[i] ?? 0
    for (let j = 0; j < RUNGS; j += 1) help -= (gram[i * RUNGS + j] ?? 0) * (weights[j] ?? 0)
    if (help > most) {
      most = help
      best = i
    }
  }
  return best
}

/** Solves for the chosen rungs; where one would turn negative, goes only as far as it stays at 0 and drops it. */
function settled(
  gram: Float64Array,
  aim: Float64Array,
  from: Float64Array,
  chosen: Set<number>,
): Float64Array {
  let weights = from
  for (;;) {
    const rungs = [...chosen]
    const solved = solve(
      rungs.map((i) => rungs.map((j) => gram[i * RUNGS + j] ?? 0)),
      rungs.map((i) => aim[i] ?? 0),
    )
    let share = 1
    rungs.forEach((rung, n) => {
      const now = weights[rung] ?? 0
      const wanted = solved[n] ?? 0
      if (wanted <= 0) share = Math.min(share, now / (now - wanted))
    })
    const next = new Float64Array(RUNGS)
    rungs.forEach((rung, n) => {
      const now = weights[rung] ?? 0
      next[rung] = now + share * ((solved[n] ?? 0) - now)
    })
    weights = next
    if (share === 1) return weights
    for (const rung of rungs) if ((weights[rung] ?? 0) <= SPENT) chosen.delete(rung)
    if (chosen.size === 0) return new Float64Array(RUNGS)
  }
}

/** Gauss with the largest pivot: at most a dozen unknowns. */
function solve(matrix: number[][], right: number[]): number[] {
  const size = right.length
  const rows = matrix.map((row, n) => [...row, right[n] ?? 0])
  for (let column = 0; column < size; column += 1) {
    const pivot = rows
      .slice(column)
      .reduce((top, row) => (Math.abs(row[column] ?? 0) > Math.abs(top[column] ?? 0) ? row : top))
    rows.splice(rows.indexOf(pivot), 1)
    rows.splice(column, 0, pivot)
    for (const row of rows.slice(column + 1)) {
      const times = (row[column] ?? 0) / (pivot[column] ?? 1)
      for (let k = column; k <= size; k += 1) row[k] = (row[k] ?? 0) - times * (pivot[k] ?? 0)
    }
  }
  const values = new Array<number>(size).fill(0)
  for (let n = size - 1; n >= 0; n -= 1) {
    const row = rows[n] ?? []
    let rest = row[size] ?? 0
    for (let k = n + 1; k < size; k += 1) rest -= (row[k] ?? 0) * (values[k] ?? 0)
    values[n] = rest / (row[n] ?? 1)
  }
  return values
}

function scaledToOne(weights: Float64Array): Float64Array {
  const sum = weights.reduce((total, weight) => total + weight, 0)
  return weights.map((weight) => weight / sum)
}
