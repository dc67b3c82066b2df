import { COVER_LEAK_FACTOR } from '@/lib/doubt/causes'
import { logSpreadNineInTen } from '@/lib/doubt/spread'
import {
  type AirFrom,
  type AirStep,
  copyState,
  isEnclosed,
  type PieceFilter,
  stepWood,
  type WoodState,
} from '@/lib/follow/wood-state'

/**
 * Wood that is quicker and slower than the middle by so many standard deviations of the logarithm: the three points at
 * which a smooth function of a normal variable tells its mean and spread best. Source: Gauss-Hermite, three points.
 */
export const PACE_NODE = Math.sqrt(3)

export type MoistureRun = { readonly ring: Float64Array; readonly lid: Float64Array }

export type StayRun = {
  /** Hours since the start. */
  readonly hours: Float64Array
  readonly slow: MoistureRun
  readonly middle: MoistureRun
  readonly fast: MoistureRun
  /** The middle, had the air been one point damper throughout, less the middle. */
  readonly perPoint: MoistureRun
  /** The middle in a cover that leaks less and more, less the middle; null where nothing closes the piece in. */
  readonly leak: { readonly tight: MoistureRun; readonly leaky: MoistureRun } | null
}

const MS_PER_HOUR = 3_600_000

/** The moments looked at: close together at first, as changes go with the root of time, further apart later. */
export function momentsOf(horizonHours: number): Float64Array {
  const moments = [0]
  let hour = 0
  while (hour < horizonHours) {
    const step =
      hour < 1 ? 1 / 12 : hour < 3 ? 0.25 : hour < 12 ? 0.5 : hour < 48 ? 1 : Math.max(6, 0.08 * hour)
    hour = Math.min(horizonHours, hour + step)
    moments.push(hour)
  }
  return Float64Array.from(moments)
}

/** Airs with a step at every moment looked at, so that each part of the way between two of them has one air. */
export function stepsBetween(airs: readonly AirFrom[], startsAt: number, hours: Float64Array): AirStep[][] {
  let index = 0
  const steps: AirStep[][] = []
  for (let n = 1; n < hours.length; n += 1) {
    let at = startsAt + (hours[n - 1] ?? 0) * MS_PER_HOUR
    const until = startsAt + (hours[n] ?? 0) * MS_PER_HOUR
    const parts: AirStep[] = []
    while (at < until) {
      while (index + 1 < airs.length && (airs[index + 1]?.at ?? Infinity) <= at) index += 1
      const air = airs[index]
      if (air === undefined) break
      const end = Math.min(until, airs[index + 1]?.at ?? Infinity)
      parts.push({
        hours: (end - at) / MS_PER_HOUR,
        emcPct: air.emcPct,
        temperatureC: air.temperatureC,
        cover: air.cover,
        isKnown: air.isKnown,
      })
      at = end
    }
    steps.push(merged(parts))
  }
  return steps
}

/** Hours of one cover within a long step become one: the mean of the air that they are. */
function merged(parts: readonly AirStep[]): AirStep[] {
  const out: AirStep[] = []
  for (const part of parts) {
    const last = out.at(-1)
    if (last?.cover !== part.cover || last.hours + part.hours > 6.01) {
      out.push(part)
      continue
    }
    const hours = last.hours + part.hours
    const mean = (a: number, b: number) => (a * last.hours + b * part.hours) / hours
    out[out.length - 1] = {
      hours,
      emcPct: mean(last.emcPct, part.emcPct),
      temperatureC: mean(last.temperatureC, part.temperatureC),
      cover: part.cover,
      isKnown: last.isKnown && part.isKnown,
    }
  }
  return out
}

function run(
  filter: PieceFilter,
  start: WoodState,
  steps: readonly (readonly AirStep[])[],
  diffusionFactor: number,
  damperPct: number,
  leakFactor = 1,
): MoistureRun {
  const state = copyState(start)
  const ring = new Float64Array(steps.length + 1)
  const lid = new Float64Array(steps.length + 1)
  ring[0] = state.ringPct
  lid[0] = state.lidPct
  steps.forEach((parts, n) => {
    for (const part of parts) {
      stepWood(
        filter,
        state,
        damperPct === 0 ? part : { ...part, emcPct: part.emcPct + damperPct },
        diffusionFactor,
        leakFactor,
      )
    }
    ring[n + 1] = state.ringPct
    lid[n + 1] = state.lidPct
  })
  return { ring, lid }
}

/** As far out as the pace's, so that the same parabola goes through them. */
const LEAK_NODE = Math.exp(PACE_NODE * logSpreadNineInTen(COVER_LEAK_FACTOR))

const less = (one: Float64Array, other: Float64Array): Float64Array =>
  one.map((value, n) => value - (other[n] ?? 0))
const runLess = (one: MoistureRun, other: MoistureRun): MoistureRun => ({
  ring: less(one.ring, other.ring),
  lid: less(one.lid, other.lid),
})

/**
 * A piece's wood through a stay, for wood of a middling pace and for quicker and slower.
 * @param start its wood at the start; left as it is
 * @param airs from `startsAt` on, at least one
 * @param pace middle factor on diffusion, and the standard deviation of its logarithm
 */
export function stayRun(
  filter: PieceFilter,
  start: WoodState,
  airs: readonly AirFrom[],
  startsAt: number,
  horizonHours: number,
  pace: { readonly factor: number; readonly logSpread: number },
): StayRun {
  const hours = momentsOf(horizonHours)
  const steps = stepsBetween(airs, startsAt, hours)
  const node = Math.exp(PACE_NODE * pace.logSpread)
  const middle = run(filter, start, steps, pace.factor, 0)
  const damper = run(filter, start, steps, pace.factor, 1)
  const leaking = (factor: number): MoistureRun =>
    runLess(run(filter, start, steps, pace.factor, 0, factor), middle)
  return {
    hours,
    middle,
    slow: run(filter, start, steps, pace.factor / node, 0),
    fast: run(filter, start, steps, pace.factor * node, 0),
    perPoint: runLess(damper, middle),
    leak: airs.some(({ cover }) => isEnclosed(cover))
      ? { tight: leaking(1 / LEAK_NODE), leaky: leaking(LEAK_NODE) }
      : null,
  }
}
