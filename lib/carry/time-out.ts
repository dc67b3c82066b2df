import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { diffusionMcPct } from './diffusion'
import {
  EXPOSURE_OF_COVER,
  plugLidFractionChanged,
  ringFractionChanged,
  type FractionChanged,
  type RingSize,
  type WoodAt,
} from './joint'
import type { PlaceCover } from '@/lib/pieces/piece'

/**
 * The early edge (by when 1 in 10 would have used up its allowance) and the late one, as parts of the middle time.
 * Status: derived. Factors of 2 in diffusion, 1.4 to 0.65 for the grain's ratio, 20 % in movement and 30 % in the
 * allowance, each 9 in 10, combined as logarithms.
 */
export const EARLY_OF_MIDDLE = 0.45
export const LATE_OF_MIDDLE = 2.2

/**
 * How much more than the middle 1 in 10 would have used at the same time: what the early edge comes to for wood that
 * has only begun to change, which follows the root of time. Status: derived; movement and allowance alone give the same.
 */
export const USED_EARLY_OVER_MIDDLE = 1 / Math.sqrt(EARLY_OF_MIDDLE)

const MINUTE_MS = 60_000
const HOUR_MS = 3_600_000
const TOLERANCE_MS = 1000

/** Coarser the further off, as a time told is: quarter hours for half a day, hours for two days, then by tenths. */
function nextAfter(elapsedMs: number): number {
  if (elapsedMs < 12 * HOUR_MS) return elapsedMs + 15 * MINUTE_MS
  if (elapsedMs < 48 * HOUR_MS) return elapsedMs + HOUR_MS
  return elapsedMs * 1.1
}

/**
 * The first moment at which a changing figure reaches a level.
 * @param valueAfter the figure, of the ms elapsed
 * @param level what it must reach
 * @param horizonMs how far to look
 * @returns ms, to the second; 0 where it is there to begin with; undefined where it isn't within the horizon
 */
export function firstReachedMs(
  valueAfter: (elapsedMs: number) => number,
  level: number,
  horizonMs: number,
): number | undefined {
  if (valueAfter(0) >= level) return 0
  let low = 0
  while (low < horizonMs) {
    const high = Math.min(horizonMs, nextAfter(low))
    if (valueAfter(high) >= level) return halved(valueAfter, level, low, high)
    low = high
  }
  return undefined
}

function halved(
  valueAfter: (elapsedMs: number) => number,
  level: number,
  below: number,
  reached: number,
): number {
  let low = below
  let high = reached
  while (high - low > TOLERANCE_MS) {
    const middle = (low + high) / 2
    if (valueAfter(middle) >= level) high = middle
    else low = middle
  }
  return high
}

/** A lid over the spigot: a plug with end grain above and below, or hollow with its recess's own wall. */
export type LidOver =
  | { readonly form: 'plug'; readonly lidMm: number; readonly swellMmPerPct: number }
  | { readonly form: 'hollow'; readonly wallMm: number; readonly swellMmPerPct: number }

export type SteadyAirInput = {
  readonly size: RingSize
  readonly densityKgM3: number
  readonly cover: PlaceCover
  /** Clearance lost a quarter turn on for each % MC, mm. */
  readonly lossMmPerPct: number
  readonly allowanceMm: number
  readonly fromMcPct: number
  readonly toEmcPct: number
  readonly temperatureC: number
  /** Left out: the lid is taken to keep step with the ring. `swellMmPerPct` is the mean growth of the diameter. */
  readonly lid?: LidOver
}

export type TimeOut =
  | { readonly binds: false; /** Used in the end, as a fraction under 1. */ readonly usedInTheEnd: number }
  | {
      readonly binds: true
      readonly minutesEarly: number
      readonly minutes: number
      readonly minutesLate: number
      readonly usedInTheEnd: number
    }

/** Ten years, beyond which no figure here means anything. */
const STEADY_HORIZON_MS = 3650 * 24 * HOUR_MS

/**
 * How long until a joint has used up its allowance in air that does not change.
 * @param input sizes in mm, density in kg/m³ (200 to 1400), loss in mm per % MC (0 to 10), allowance in mm above 0, moisture
 *   contents in % MC (0 to 30), temperature in °C (-10 to 50)
 * @returns minutes: the early edge, the middle and the late edge; or that it never uses it up there
 * @throws RangeError for an input out of range or NaN
 *
 * Swelling and drying count alike. With a lid of its own pace, a ring ahead of it on the way to damp binds sooner, at
 * every angle; on the way to dry it eases first.
 * Source: derived from Crank, The Mathematics of Diffusion (1975), ch. 4; early and late edge derived.
 */
export function timeOutInSteadyAir(input: SteadyAirInput): TimeOut {
  assertInRange('lossMmPerPct', input.lossMmPerPct, 0, 10)
  assertFiniteAbove('allowanceMm', input.allowanceMm, 0)
  assertInRange('fromMcPct', input.fromMcPct, 0, 30)
  assertInRange('toEmcPct', input.toEmcPct, 0, 30)
  const change = input.toEmcPct - input.fromMcPct
  const usedInTheEnd = (input.lossMmPerPct * Math.abs(change)) / input.allowanceMm
  if (usedInTheEnd <= 1 && input.lid === undefined) return { binds: false, usedInTheEnd }
  const wood: WoodAt = {
    densityKgM3: input.densityKgM3,
    temperatureC: input.temperatureC,
    mcPct: diffusionMcPct(input.fromMcPct, input.toEmcPct),
  }
  const ring = ringFractionChanged(input.size, EXPOSURE_OF_COVER[input.cover], wood)
  const lid = input.lid === undefined ? ring : lidFractionChanged(input.lid, input, wood)
  const swellMm = input.lid === undefined ? 0 : input.lid.swellMmPerPct * change
  const skewMm = Math.abs(input.lossMmPerPct * change) / 2
  const usedAfter = (elapsedMs: number): number => {
    const ofRing = ring(elapsedMs / 1000)
    const ofLid = lid(elapsedMs / 1000)
    return (swellMm * (ofRing - ofLid) + skewMm * (ofRing + ofLid)) / input.allowanceMm
  }
  const middleMs = firstReachedMs(usedAfter, 1, STEADY_HORIZON_MS)
  if (middleMs === undefined) return { binds: false, usedInTheEnd }
  const minutes = middleMs / MINUTE_MS
  return {
    binds: true,
    minutesEarly: EARLY_OF_MIDDLE * minutes,
    minutes,
    minutesLate: LATE_OF_MIDDLE * minutes,
    usedInTheEnd,
  }
}

function lidFractionChanged(lid: LidOver, { size, cover }: SteadyAirInput, wood: WoodAt): FractionChanged {
  const exposure = EXPOSURE_OF_COVER[cover]
  return lid.form === 'plug'
    ? plugLidFractionChanged(lid.lidMm, exposure.faces, wood)
    : ringFractionChanged({ ...size, wallMm: lid.wallMm }, exposure, wood)
}
