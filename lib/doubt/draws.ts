/**
 * The draws behind every doubt: a fixed number of standard normal ones for each cause, the same each time they are asked
 * for with the same seed, so that a figure never jumps between two looks at it, and more doubt in is always more out.
 */

/** Enough that the early edge is steady to a few percent. */
export const DRAWS = 128

/** The seed that the product uses everywhere. Any other does as well. */
export const DOUBT_SEED = 20261201

/** The things that a stated time hangs on, each drawn by itself. */
export const CAUSES = ['diffusion', 'movement', 'allowance', 'airThere', 'start', 'leak'] as const
export type Cause = (typeof CAUSES)[number]
export type Draws = Readonly<Record<Cause, Float64Array>>

/** A small generator of even numbers from 0 to 1. Source: xorshift32 (Marsaglia, Journal of Statistical Software, 2003). */
function evenNumbers(seed: number): () => number {
  let state = seed | 0 || 1
  return () => {
    state ^= state << 13
    state ^= state >>> 17
    state ^= state << 5
    return (state >>> 0) / 4294967296
  }
}

const GRID_FROM = -5
const GRID_STEP = 1 / 512
const GRID_CELLS = 5120

/** The normal distribution, summed up once by the trapezium rule: good to 1e-6, far beyond what any doubt is known to. */
const CUMULATIVE: Float64Array = (() => {
  const density = (x: number) => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI)
  const cumulative = new Float64Array(GRID_CELLS + 1)
  for (let n = 1; n <= GRID_CELLS; n += 1) {
    const x = GRID_FROM + n * GRID_STEP
    cumulative[n] = (cumulative[n - 1] ?? 0) + (GRID_STEP * (density(x - GRID_STEP) + density(x))) / 2
  }
  return cumulative
})()

/** Where a standard normal variable stays below with a given probability. */
export function normalQuantile(probability: number): number {
  let low = 0
  let high = GRID_CELLS
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((CUMULATIVE[middle] ?? 0) < probability) low = middle
    else high = middle
  }
  const below = CUMULATIVE[low] ?? 0
  const above = CUMULATIVE[high] ?? 1
  const share = above > below ? (probability - below) / (above - below) : 0
  return GRID_FROM + (low + share) * GRID_STEP
}

/** The probability that a standard normal variable stays below a value. */
export function normalBelow(value: number): number {
  const place = (value - GRID_FROM) / GRID_STEP
  if (place <= 0) return 0
  if (place >= GRID_CELLS) return 1
  const cell = Math.floor(place)
  const below = CUMULATIVE[cell] ?? 0
  return below + ((CUMULATIVE[cell + 1] ?? 1) - below) * (place - cell)
}

const made = new Map<number, Draws>()

/**
 * Standard normal draws for every cause, spread evenly over the distribution and shuffled against one another.
 * @param seed any whole number
 * @returns `DRAWS` of them for each cause
 *
 * Source: Latin hypercube sampling (McKay, Beckman and Conover, Technometrics, 1979).
 */
export function drawsOf(seed: number = DOUBT_SEED): Draws {
  const before = made.get(seed)
  if (before !== undefined) return before
  const next = evenNumbers(seed)
  for (let n = 0; n < 16; n += 1) next() // the first numbers of a small seed are small
  const even = Array.from({ length: DRAWS }, (_, n) => normalQuantile((n + 0.5) / DRAWS))
  const column = () => {
    const shuffled = Float64Array.from(even)
    for (let n = DRAWS - 1; n > 0; n -= 1) {
      const other = Math.floor(next() * (n + 1))
      const held = shuffled[n] ?? 0
      shuffled[n] = shuffled[other] ?? 0
      shuffled[other] = held
    }
    return shuffled
  }
  const draws: Draws = {
    diffusion: column(),
    movement: column(),
    allowance: column(),
    airThere: column(),
    start: column(),
    leak: column(),
  }
  made.set(seed, draws)
  return draws
}
