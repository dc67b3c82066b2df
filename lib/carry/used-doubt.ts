import { type Draws, DRAWS, drawsOf } from '@/lib/doubt/draws'
import { quantileOfSorted } from '@/lib/doubt/spread'
import { type JointLoss, lossMm } from './joint-loss'
import { PACE_NODE, type StayRun } from './stay-run'

/** What is not known exactly, as standard deviations: of logarithms for factors, in points of % MC for the rest. */
export type Spreads = {
  readonly movementLog: number
  readonly allowanceLog: number
  /** Of the air there against the air that the joint was cut in. */
  readonly airPct: number
  /** Of the wood at the start against its cut. */
  readonly startPct: number
}

export type UsedQuestion = {
  readonly run: StayRun
  readonly loss: JointLoss
  readonly allowanceMm: number
  /** Where the ring and the lid were cut, % MC. */
  readonly cut: { readonly ring: number; readonly lid: number }
  readonly spreads: Spreads
  /** How much of the pace's spread counts, 0 to 1; all of it when left out. */
  readonly paceShare?: number
}

/** Allowance used in the middle, 0 and up, at each of the run's moments. */
export function usedInTheMiddle({ run, loss, allowanceMm, cut }: UsedQuestion): Float64Array {
  return run.middle.ring.map((ring, n) =>
    Math.max(0, lossMm(loss, ring - cut.ring, (run.middle.lid[n] ?? ring) - cut.lid) / allowanceMm),
  )
}

const NONE = new Float64Array()
const NO_LEAK = { tight: { ring: NONE, lid: NONE }, leaky: { ring: NONE, lid: NONE } }

/**
 * Allowance used at each of the run's moments, row by row, in as many ways as there are draws in which everything could
 * be, each of equal chance.
 */
function usedInAllWays(question: UsedQuestion, draws: Draws): Float64Array {
  const { run, loss, allowanceMm, cut, spreads, paceShare = 1 } = question
  const moments = run.hours.length
  const table = new Float64Array(DRAWS * moments)
  const sign = loss.isRingInside ? 1 : -1
  const { tight: tightRun, leaky: leakyRun } = run.leak ?? NO_LEAK
  for (let way = 0; way < DRAWS; way += 1) {
    // The three runs lie at -√3, 0 and √3 deviations: a parabola through them, held at its ends.
    const node = Math.min(1, Math.max(-1, (paceShare * (draws.diffusion[way] ?? 0)) / PACE_NODE))
    const slow = (node * (node - 1)) / 2
    const middle = 1 - node * node
    const fast = (node * (node + 1)) / 2
    const damper = spreads.airPct * (draws.airThere[way] ?? 0)
    const start = spreads.startPct * (draws.start[way] ?? 0)
    const perMm =
      Math.exp(
        spreads.movementLog * (draws.movement[way] ?? 0) - spreads.allowanceLog * (draws.allowance[way] ?? 0),
      ) / allowanceMm
    const swell = sign * loss.swellMmPerPct * perMm
    const skew = loss.skewMmPerPct * perMm
    const leak = run.leak === null ? 0 : Math.min(1, Math.max(-1, (draws.leak[way] ?? 0) / PACE_NODE))
    const tight = (leak * (leak - 1)) / 2
    const leaky = (leak * (leak + 1)) / 2
    const ringZero = start - cut.ring
    const lidZero = start - cut.lid
    for (let n = 0; n < moments; n += 1) {
      const ring =
        slow * (run.slow.ring[n] ?? 0) +
        middle * (run.middle.ring[n] ?? 0) +
        fast * (run.fast.ring[n] ?? 0) +
        damper * (run.perPoint.ring[n] ?? 0) +
        tight * (tightRun.ring[n] ?? 0) +
        leaky * (leakyRun.ring[n] ?? 0) +
        ringZero
      const lid =
        slow * (run.slow.lid[n] ?? 0) +
        middle * (run.middle.lid[n] ?? 0) +
        fast * (run.fast.lid[n] ?? 0) +
        damper * (run.perPoint.lid[n] ?? 0) +
        tight * (tightRun.lid[n] ?? 0) +
        leaky * (leakyRun.lid[n] ?? 0) +
        lidZero
      // `lossMm`, written out: this line is met a hundred thousand times for a shelf of boxes.
      table[way * moments + n] = swell * (ring - lid) + skew * (Math.abs(ring) + Math.abs(lid))
    }
  }
  return table
}

/** Between two moments the figure is taken to go straight. */
const hoursAt = (hours: Float64Array, n: number, before: number, after: number, level: number): number => {
  const from = hours[n - 1] ?? 0
  return from + (((hours[n] ?? from) - from) * (level - before)) / (after - before)
}

/** Hours until a middling figure reaches a level; undefined where it doesn't within the run. */
export function firstReachedHours(
  used: Float64Array,
  hours: Float64Array,
  level: number,
): number | undefined {
  if ((used[0] ?? 0) >= level) return 0
  for (let n = 1; n < used.length; n += 1) {
    const after = used[n] ?? 0
    if (after >= level) return hoursAt(hours, n, used[n - 1] ?? 0, after, level)
  }
  return undefined
}

/**
 * Rows of the ways in which everything could be, less those in which the fit would be gone before the start although
 * nobody has said so: that the lid still turns is something that is known.
 */
function rowsOf({ run, loss, cut, allowanceMm }: UsedQuestion, table: Float64Array): number[] {
  const moments = run.hours.length
  const all = Array.from({ length: DRAWS }, (_, way) => way * moments)
  const atStart = lossMm(loss, (run.middle.ring[0] ?? 0) - cut.ring, (run.middle.lid[0] ?? 0) - cut.lid)
  if (atStart >= allowanceMm) return all
  const still = all.filter((row) => (table[row] ?? 0) < 1)
  return still.length === 0 ? all : still
}

export type UsedSpread = {
  /** Hours by which 1 in 10 has reached the level, and 9 in 10; undefined beyond the run. */
  readonly early: (level: number) => number | undefined
  readonly late: (level: number) => number | undefined
  /** Allowance used after some hours: the least of 9 in 10, and of 1 in 10. */
  readonly at: (hours: number) => { readonly low: number; readonly high: number }
}

/**
 * How allowance used and the times that follow from it spread, over everything that is not known exactly.
 * @param seed which draws; the same seed gives the same figures
 *
 * Source: derived; the causes and their spreads in `lib/doubt/causes.ts`, drawn together, none of them as its worst case.
 */
export function usedSpread(question: UsedQuestion, seed?: number): UsedSpread {
  const table = usedInAllWays(question, drawsOf(seed))
  const rows = rowsOf(question, table)
  const { hours } = question.run
  const byLevel = new Map<number, Float64Array>()
  const timesOf = (level: number): Float64Array => {
    const before = byLevel.get(level)
    if (before !== undefined) return before
    const times = Float64Array.from(rows, (row) => reachedInRow(table, row, hours, level)).sort()
    byLevel.set(level, times)
    return times
  }
  const edge = (level: number, share: number): number | undefined => {
    const time = quantileOfSorted(timesOf(level), share)
    return Number.isFinite(time) ? time : undefined
  }
  return {
    early: (level) => edge(level, 0.1),
    late: (level) => edge(level, 0.9),
    at: (elapsed) => {
      const { n, share } = placeOf(hours, elapsed)
      const used = new Float64Array(rows.length)
      rows.forEach((row, way) => {
        const below = table[row + n] ?? 0
        const value = share === 0 ? below : below + ((table[row + n + 1] ?? below) - below) * share
        used[way] = Math.max(0, value)
      })
      used.sort()
      return { low: quantileOfSorted(used, 0.1), high: quantileOfSorted(used, 0.9) }
    },
  }
}

function reachedInRow(table: Float64Array, row: number, hours: Float64Array, level: number): number {
  let before = table[row] ?? 0
  if (before >= level) return 0
  for (let n = 1; n < hours.length; n += 1) {
    const after = table[row + n] ?? 0
    if (after >= level) return hoursAt(hours, n, before, after, level)
    before = after
  }
  return Infinity
}

/** The moment at or before some hours, and how far on the way to the next they are. */
export function placeOf(hours: Float64Array, elapsed: number): { n: number; share: number } {
  let low = 0
  let high = hours.length - 1
  if (elapsed >= (hours[high] ?? 0)) return { n: high, share: 0 }
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((hours[middle] ?? 0) <= elapsed) low = middle
    else high = middle
  }
  const from = hours[low] ?? 0
  return { n: low, share: Math.max(0, elapsed - from) / ((hours[low + 1] ?? from + 1) - from) }
}

/** A figure of the run between its moments. */
export function valueAt(values: Float64Array, hours: Float64Array, elapsed: number): number {
  const { n, share } = placeOf(hours, elapsed)
  const below = values[n] ?? 0
  return share === 0 ? below : below + ((values[n + 1] ?? below) - below) * share
}
