import { assertInRange } from '@/lib/assert'
import { diffusionUncheckedM2PerS } from '@/lib/carry/diffusion'
import { PACE_LOG_SPREAD } from '@/lib/doubt/causes'
import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import { mcDoubtPct, startDoubtPct } from './doubt'
import { partFilter } from './part'
import { airsOf, HOUR_MS, type RoomHours } from './record'
import { type AirFrom, evenState, type PieceFilter, stepWood, type WoodState } from './wood-state'

/** Felt EMC: what wood of a thickness, open on both faces, has followed so far of a room's changing air. */

export const FELT_THICKNESS_MIN_MM = 0.5
export const FELT_THICKNESS_MAX_MM = 100
/** What may be left in the wood of a step of the air that is too old to be looked at. */
export const FELT_FORGOTTEN_SHARE = 0.01
const DAY_MS = 24 * HOUR_MS
/** However slow the wood, no further back than this: the walls of a year come round again. Status: guess. */
export const FELT_MEMORY_MAX_MS = 400 * DAY_MS
/** The cold and dry end of rooms that wood is kept in, where it is slowest. Status: guess. */
const SLOW_C = 0
const SLOW_MC_PCT = 6
/** Points of a course, so that a chart of it stays light. */
export const FELT_POINTS_MAX = 200

export type FeltWood = {
  /** Between its two open faces, mm, 0.5 to 100. */
  readonly thicknessMm: number
  /** At 12 % MC, kg/m³, 200 to 1400. */
  readonly densityKgM3: number
  /** On the diffusion of the formula, as the site's outcomes have it; 1 and the formula's own doubt when left out. */
  readonly pace?: { readonly factor: number; readonly logSpread: number }
}

export type FeltRoom = {
  readonly hours: RoomHours
  /** Over its own last twelve months; null where there is none, and then the mean of the hours counts. */
  readonly emcPctMean: number | null
}

export type FeltPoint = {
  /** Epoch ms. */
  readonly at: number
  readonly mcPct: number
  /** ± % MC, 8 in 10: the sensor's, the pace of the wood, and what was not heard. */
  readonly doubtPct: number
  /** How much of the figure rests on hours without a reading or before the record, 0 to 1. */
  readonly unknownShare: number
}

const filterOf = ({ thicknessMm, densityKgM3 }: FeltWood): PieceFilter => {
  assertInRange('thicknessMm', thicknessMm, FELT_THICKNESS_MIN_MM, FELT_THICKNESS_MAX_MM)
  return { ring: partFilter({ kind: 'wall', wallMm: thicknessMm }, densityKgM3), lid: null }
}

/**
 * How far back the air still shows in the wood: after this at most 1 % is left of an older step.
 * @param wood thickness 0.5 to 100 mm, density 200 to 1400 kg/m³
 * @returns ms, 400 days at most; reckoned for wood at 0 °C and 6 % MC, so that warmer or damper wood has forgotten more
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived; the slowest term of the series for a sheet (Crank, 1975, ch. 4). Good to a factor of two, as diffusion is.
 */
export function feltMemoryMs(wood: FeltWood): number {
  const { slowestPerM2, gravity } = filterOf(wood).ring
  const perS =
    slowestPerM2 * diffusionUncheckedM2PerS(SLOW_C, SLOW_MC_PCT, gravity) * (wood.pace?.factor ?? 1)
  return Math.min(FELT_MEMORY_MAX_MS, (-Math.log(FELT_FORGOTTEN_SHARE) / perS) * 1000)
}

/** Moments from one to another, both ends among them, whole hours apart and 200 at most, for a course. */
export function courseTimes(fromMs: number, untilMs: number): number[] {
  const hours = Math.max(0, (untilMs - fromMs) / HOUR_MS)
  const stepMs = Math.max(1, Math.ceil(hours / (FELT_POINTS_MAX - 2))) * HOUR_MS
  const times: number[] = []
  for (let at = untilMs; at > fromMs; at -= stepMs) times.unshift(at)
  return [fromMs, ...times]
}

/**
 * What wood has felt of a room, at each of some moments.
 * @param room its hourly air, as far back as is known; older than `feltMemoryMs` before the first moment is not looked at
 * @param atMs moments, epoch ms, oldest first
 * @returns a point for each moment, null for those before the room's first hour; a gap holds the last air known (the
 *   room's own mean beyond three days), and each of its hours widens the doubt
 * @throws RangeError for a thickness or density out of range or NaN
 *
 * Before its record the wood is taken to have been even at the room's own mean, which counts as not known.
 * Source: derived from Crank (1975), ch. 4; good to a factor of two in time, which is in the doubt.
 */
export function feltAt(
  room: FeltRoom,
  wood: FeltWood,
  atMs: readonly number[],
): readonly (FeltPoint | null)[] {
  const filter = filterOf(wood)
  const [first] = atMs
  const last = atMs.at(-1)
  const recordMs = firstHourMs(room.hours)
  if (first === undefined || last === undefined || recordMs === undefined) return atMs.map(() => null)
  const startMs = Math.max(recordMs, first - feltMemoryMs(wood))
  const mean = room.emcPctMean ?? meanEmcPct(room.hours)
  const airs = airsOf(
    [{ roomId: 0, fromAt: new Date(startMs), toAt: null, cover: 'open' }],
    () => ({ hours: room.hours, emcPctMean: mean }),
    startMs,
    last,
  )
  const points = walk(filter, airs, mean, { atMs, ...(wood.pace && { pace: wood.pace }) })
  return atMs.map((at) => points.get(at) ?? null)
}

type Wanted = { readonly atMs: readonly number[]; readonly pace?: FeltWood['pace'] }

/** Steps middling, slow and quick wood through the same air together, and notes what they hold at the moments wanted. */
function walk(
  filter: PieceFilter,
  airs: readonly AirFrom[],
  startPct: number,
  { atMs, pace }: Wanted,
): Map<number, FeltPoint> {
  const factor = pace?.factor ?? 1
  const far = Math.exp(EDGE_OF_EIGHT_IN_TEN * (pace?.logSpread ?? PACE_LOG_SPREAD))
  const wood = [factor, factor / far, factor * far].map((diffusionFactor) => ({
    diffusionFactor,
    state: evenState(filter, startPct, 'open'),
  }))
  const points = new Map<number, FeltPoint>()
  const wanted = atMs.filter((at) => at >= (airs[0]?.at ?? Infinity))
  const last = wanted.at(-1)
  if (last === undefined) return points
  const states = wood.map(({ state }) => state)
  let next = 0
  /** The widest doubt of the pace since the room was last heard; 0 while it is. */
  let heldDoubtPct = 0
  airs.forEach((air, n) => {
    const end = airs[n + 1]?.at ?? last
    let at = air.at
    const stepTo = (to: number) => {
      if (to > at)
        for (const { state, diffusionFactor } of wood)
          stepWood(filter, state, { ...air, hours: (to - at) / HOUR_MS }, diffusionFactor)
      at = to
    }
    const paceNowPct = () => {
      const pacePct = paceDoubtPct(states)
      heldDoubtPct = air.isKnown ? 0 : Math.max(heldDoubtPct, pacePct)
      return Math.max(pacePct, heldDoubtPct)
    }
    if (!air.isKnown) paceNowPct()
    for (let stop = wanted[next]; stop !== undefined && stop <= end; stop = wanted[next]) {
      stepTo(stop)
      next += 1
      const point = pointOf(states, stop, paceNowPct())
      if (point !== undefined) points.set(stop, point)
    }
    stepTo(end)
    paceNowPct()
  })
  return points
}

/** How far slow and quick wood are from the middling one, % MC. */
function paceDoubtPct([middle, ...others]: readonly WoodState[]): number {
  return Math.max(0, ...others.map((other) => Math.abs(other.ringPct - (middle?.ringPct ?? 0))))
}

/**
 * The doubt of the pace is added to that of what was not heard, not squared with it: over a gap slow and quick wood close
 * in on the air that is only held to have been, and that must not look like knowledge.
 */
function pointOf([middle]: readonly WoodState[], at: number, pacePct: number): FeltPoint | undefined {
  if (middle === undefined) return undefined
  const { ringPct: mcPct, unknownShare } = middle
  const sensorPct = mcDoubtPct({ unknownShare: 0 })
  return { at, mcPct, unknownShare, doubtPct: Math.hypot(sensorPct, startDoubtPct(middle) + pacePct) }
}

function firstHourMs(hours: RoomHours): number | undefined {
  let first: number | undefined
  for (const at of hours.keys()) if (first === undefined || at < first) first = at
  return first
}

function meanEmcPct(hours: RoomHours): number {
  let sum = 0
  for (const { emcPct } of hours.values()) sum += emcPct
  return sum / hours.size
}
