import { z } from 'zod'
import { diffusionUncheckedM2PerS } from '@/lib/carry/diffusion'
import { type PlaceCover, placeCoverSchema } from '@/lib/pieces/piece'
import { coverDriftPerH, USUAL_BAG, USUAL_TUB } from './cover-leak'
import { RUNGS } from './exponentials'
import type { PartFilter } from './part'

/**
 * The wood of a piece, followed: for each part a ladder of moisture contents, each lagging the air at its own pace, whose
 * weighted mean is the part's own. A step costs two exponentials a part, is exact for air that holds still in it, and
 * never overshoots.
 */

/** The parts of a piece that are followed. A blank is a ring of its own, without a lid. */
export type PieceFilter = { readonly ring: PartFilter; readonly lid: PartFilter | null }

export type WoodState = {
  cover: PlaceCover
  ring: Float64Array
  lid: Float64Array | null
  /** Means over the parts, % MC; the ring's stands for the lid of a piece without one. */
  ringPct: number
  lidPct: number
  /** Moisture content that the air in a bag or a tub holds, % MC; null while the piece is in the room's own air. */
  enclosedPct: number | null
  /** How much of the ring's figure rests on hours without a reading or before the record, 0 to 1. */
  unknownShare: number
}

export type AirStep = {
  readonly hours: number
  readonly emcPct: number
  readonly temperatureC: number
  readonly cover: PlaceCover
  /** False where a gap is bridged. */
  readonly isKnown: boolean
}

/** The air from one moment on, until the next; the last one holds for good. */
export type AirFrom = {
  /** Epoch ms. */
  readonly at: number
  readonly emcPct: number
  readonly temperatureC: number
  readonly cover: PlaceCover
  readonly isKnown: boolean
}

/**
 * The moisture content that diffusion is taken at lies this far from the wood's own towards the air's. Status: derived;
 * against a fine grid whose diffusion varies through the wall it keeps wood that takes up or gives off
 * from even within 0.02 of the fraction changed, and within 0.08 of the span of the air through any history (tested).
 */
export const DIFFUSION_TOWARDS_AIR = 0.35

const SECONDS_PER_HOUR = 3600
const FORGOTTEN = 1e-12
/** Beyond these the diffusion formula is not used, °C. */
const TEMPERATURE_MIN_C = -10
const TEMPERATURE_MAX_C = 50
const usable = (temperatureC: number): number =>
  temperatureC < TEMPERATURE_MIN_C
    ? TEMPERATURE_MIN_C
    : temperatureC > TEMPERATURE_MAX_C
      ? TEMPERATURE_MAX_C
      : temperatureC

/** Evenly moist wood, of which nothing is known yet but that figure. */
export function evenState(
  filter: PieceFilter,
  mcPct: number | { readonly ring: number; readonly lid: number },
  cover: PlaceCover,
  unknownShare = 1,
): WoodState {
  const { ring, lid } = typeof mcPct === 'number' ? { ring: mcPct, lid: mcPct } : mcPct
  return {
    cover,
    ring: new Float64Array(RUNGS).fill(ring),
    lid: filter.lid === null ? null : new Float64Array(RUNGS).fill(lid),
    ringPct: ring,
    lidPct: filter.lid === null ? ring : lid,
    enclosedPct: isEnclosed(cover) ? ring : null,
    unknownShare,
  }
}

export const copyState = (state: WoodState): WoodState => ({
  ...state,
  ring: state.ring.slice(),
  lid: state.lid?.slice() ?? null,
})

function meanPct(weights: Float64Array, rungs: Float64Array): number {
  let mean = 0
  for (let n = 0; n < RUNGS; n += 1) mean += (weights[n] ?? 0) * (rungs[n] ?? 0)
  return mean
}

/** Whether a cover is a small room of its own. */
export const isEnclosed = (cover: PlaceCover): boolean => cover === 'bagged' || cover === 'tub'

/** Rungs further out than wood can be are a sign that too many shifts have piled up. */
const RUNG_MIN_PCT = -4
const RUNG_MAX_PCT = 40

/**
 * Another cover weighs the rungs anew; the mean stays what it was, and what the surface felt last stays its head start.
 * Where covers changed so often that a rung would leave what wood can be, the wood is taken as even again.
 */
function reweigh(part: PartFilter, rungs: Float64Array, from: PlaceCover, to: PlaceCover): void {
  const mean = meanPct(part.weights[from], rungs)
  const jump = mean - meanPct(part.weights[to], rungs)
  let isWithin = true
  for (let n = 0; n < RUNGS; n += 1) {
    const rung = (rungs[n] ?? 0) + jump
    rungs[n] = rung
    isWithin &&= rung >= RUNG_MIN_PCT && rung <= RUNG_MAX_PCT
  }
  if (!isWithin) rungs.fill(mean)
}

export function changeCover(filter: PieceFilter, state: WoodState, cover: PlaceCover): void {
  if (cover === state.cover) return
  reweigh(filter.ring, state.ring, state.cover, cover)
  if (filter.lid !== null && state.lid !== null) reweigh(filter.lid, state.lid, state.cover, cover)
  state.cover = cover
  if (!isEnclosed(cover)) state.enclosedPct = null
  else state.enclosedPct ??= state.ringPct
}

/** Pieces are at rest nearly all of their hours: looking that up by its name is quicker than by any name. */
const weightsUnder = ({ weights }: PartFilter, cover: PlaceCover): Float64Array =>
  cover === 'closed' ? weights.closed : weights[cover]

/** One step of a part's rungs; returns the new mean. `slowest` is what the slowest rung keeps of its distance. */
function stepRungs(rungs: Float64Array, weights: Float64Array, emcPct: number, slowest: number): number {
  let decay = slowest
  // The mean's distance from the air, so that rungs in step with it add nothing.
  let distance = 0
  let n = 0
  for (; n < RUNGS && decay >= FORGOTTEN; n += 1) {
    const apart = ((rungs[n] ?? 0) - emcPct) * decay
    rungs[n] = emcPct + apart
    distance += (weights[n] ?? 0) * apart
    decay *= decay
  }
  // Quicker rungs are in step with the air at once; numbers too small for full precision would only cost time.
  for (; n < RUNGS; n += 1) rungs[n] = emcPct
  return emcPct + distance
}

/**
 * Brings a piece's wood forward through air that holds still, in place.
 * @param filter by `pieceFilter`
 * @param state changed; EMC of the step in % MC (0 to 30), temperature in °C (clamped to -10 to 50), hours above 0
 * @param diffusionFactor on the diffusion of the formula: the site's own, or a doubt's; 1 in the middle
 * @param leakFactor on what a bag or a tub lets through: a doubt's; 1 in the middle
 *
 * In a bag or a tub the wood meets its own moisture, which drifts towards the room's as the cover leaks.
 * Source: derived from Crank, The Mathematics of Diffusion (1975), ch. 4.
 */
export function stepWood(
  filter: PieceFilter,
  state: WoodState,
  step: AirStep,
  diffusionFactor = 1,
  leakFactor = 1,
): void {
  changeCover(filter, state, step.cover)
  const temperatureC = usable(step.temperatureC)
  let emcPct = step.emcPct
  if (state.enclosedPct !== null) {
    const perH = leakFactor * coverDriftPerH(state.cover === 'tub' ? USUAL_TUB : USUAL_BAG, temperatureC)
    state.enclosedPct += (emcPct - state.enclosedPct) * -Math.expm1(-perH * step.hours)
    emcPct = state.enclosedPct
  }
  // The parts share one diffusion, taken at the mean of theirs: they are of one wood and seldom two points apart.
  const mean = (state.ringPct + state.lidPct) / 2
  const atMcPct = mean + DIFFUSION_TOWARDS_AIR * (emcPct - mean)
  const diffusionTimeM2 =
    diffusionUncheckedM2PerS(temperatureC, atMcPct, filter.ring.gravity) *
    step.hours *
    SECONDS_PER_HOUR *
    diffusionFactor
  const left = Math.exp(-filter.ring.slowestPerM2 * diffusionTimeM2)
  const unknown = step.isKnown ? 0 : 1
  state.unknownShare = unknown + (state.unknownShare - unknown) * left
  state.ringPct = stepRungs(state.ring, weightsUnder(filter.ring, step.cover), emcPct, left)
  state.lidPct =
    filter.lid === null || state.lid === null
      ? state.ringPct
      : stepRungs(
          state.lid,
          weightsUnder(filter.lid, step.cover),
          emcPct,
          Math.exp(-filter.lid.slowestPerM2 * diffusionTimeM2),
        )
}

/** Moves the whole of a part's moisture by as much as a weighing says that the reckoning was off. */
export function correctRing(state: WoodState, byPct: number): void {
  for (let n = 0; n < RUNGS; n += 1) state.ring[n] = (state.ring[n] ?? 0) + byPct
  if (state.lid !== null) for (let n = 0; n < RUNGS; n += 1) state.lid[n] = (state.lid[n] ?? 0) + byPct
  if (state.enclosedPct !== null) state.enclosedPct += byPct
  state.ringPct += byPct
  state.lidPct += byPct
}

/** A correction by weight may move a rung a little further. */
const rungsSchema = z.array(z.number().min(-40).max(80)).length(RUNGS)

/** A state as it is stored. */
export const storedStateSchema = z.strictObject({
  cover: placeCoverSchema,
  ring: rungsSchema,
  lid: rungsSchema.nullable(),
  enclosedPct: z.number().nullable(),
  unknownShare: z.number().min(0).max(1),
})
export type StoredState = z.infer<typeof storedStateSchema>

export const storedOf = (state: WoodState): StoredState => ({
  cover: state.cover,
  ring: [...state.ring],
  lid: state.lid === null ? null : [...state.lid],
  enclosedPct: state.enclosedPct,
  unknownShare: state.unknownShare,
})

/** A stored state brought to life. Undefined where it was stored for a piece with other parts: it is made anew then. */
export function stateOfStored(filter: PieceFilter, stored: StoredState): WoodState | undefined {
  if ((stored.lid === null) !== (filter.lid === null)) return undefined
  const ring = Float64Array.from(stored.ring)
  const lid = stored.lid === null ? null : Float64Array.from(stored.lid)
  const ringPct = meanPct(filter.ring.weights[stored.cover], ring)
  return {
    ...stored,
    ring,
    lid,
    ringPct,
    lidPct: filter.lid === null || lid === null ? ringPct : meanPct(filter.lid.weights[stored.cover], lid),
  }
}
