import { assertFinite, assertFiniteAbove, assertInRange } from '@/lib/assert'
import { ovenDryG } from './oven-dry'
import { dayMs, driftMissingShareMax } from './policy'
import type { Weight } from './weighing'

/*
 * What "corrected for what the room's drift should have done" means, derived.
 *
 * As long as diffusion is taken as constant, wood answers its air linearly. Its moisture content is then the sum of
 * two courses: M(t) = H(t) + D(t). H is what it would have done in a room held at the reference EMC: the drying
 * proper, from wherever the wood stood. D is the answer to how the room strayed from that reference, beginning from
 * nothing: D(t) = integral of E(t - s) d(u - u_ref)(s), with E the step response. D does not depend on how wet the
 * wood was, so it can be worked out without knowing its MC.
 *
 * The scale shows W = m (1 + (H + D)/100), with m the oven-dry mass. Taking the drift away, and nothing else, leaves
 * m (1 + H/100) = W - m D/100. That is the corrected weight: a blank that is done stays level in it through a damp
 * autumn, and one that is still drying goes on falling.
 *
 * D comes from two modelled courses where there is a model of the piece (`driftBetween`), else from the room's days
 * through a single lag (`driftOfRoom`).
 */

/** Points of % MC that the room's drift has added by an instant (negative: taken); undefined where not known. */
export type DriftAt = (atMs: number) => number | undefined
/** A modelled moisture content at an instant, % MC; undefined where the room had no record. */
export type McAt = (atMs: number) => number | undefined

/**
 * Drift as the difference of two courses of the same model from the same start: in the room as it was, and in the same
 * room held at the reference EMC.
 */
export const driftBetween =
  (asItWas: McAt, heldStill: McAt): DriftAt =>
  (atMs) => {
    const was = asItWas(atMs)
    const held = heldStill(atMs)
    return was === undefined || held === undefined ? undefined : was - held
  }

/** Mean EMC of one day of the room, beginning at `at`; undefined for a day without a record. */
export type RoomDay = { readonly at: number; readonly emcPct: number | undefined }

/**
 * Drift from a room's daily means, with the wood as a single lag: dD/dt = (u - u_ref - D)/tau.
 * @param days in order of time. Drift counts from the first of them: what the room did before stays in the weights.
 * @param tauMs time constant of the piece, ms, above 0: from its fit or its model
 * @param referenceEmcPct EMC that weights are corrected to, % MC, 0 to 30: as a rule the middle of the room's record
 * @returns the drift at an instant; undefined before the first day, after the end of the last, and where days without a
 *   record make up more than a quarter of what the wood remembers. Short of that such a day counts as the reference.
 * @throws RangeError for days out of order, or an input out of range or NaN
 *
 * Exact for a single lag and an EMC that holds through the day. A slab answers faster at first than a single lag.
 * Source: derived.
 */
export function driftOfRoom(days: readonly RoomDay[], tauMs: number, referenceEmcPct: number): DriftAt {
  assertFiniteAbove('tauMs', tauMs, 0)
  assertInRange('referenceEmcPct', referenceEmcPct, 0, 30)
  const steps: Step[] = []
  for (const day of days) {
    assertFinite('at', day.at)
    if (day.emcPct !== undefined) assertInRange('emcPct', day.emcPct, 0, 30)
    const before = steps.at(-1)
    if (before !== undefined && before.at >= day.at) throw new RangeError('days must be in order of time')
    const { drift, missing } = before === undefined ? { drift: 0, missing: 0 } : after(before, day.at, tauMs)
    const strayPct = day.emcPct === undefined ? undefined : day.emcPct - referenceEmcPct
    steps.push({ at: day.at, drift, missing, strayPct })
  }
  return (atMs) => {
    const step = steps.findLast((candidate) => candidate.at <= atMs)
    if (step === undefined || (step === steps.at(-1) && atMs > step.at + dayMs)) return undefined
    const { drift, missing } = after(step, atMs, tauMs)
    return missing > driftMissingShareMax ? undefined : drift
  }
}

/** The state at the start of a day: drift so far, the share of it that has no record, and the air of that day. */
type Step = { at: number; drift: number; missing: number; strayPct: number | undefined }

/** The state some time after the start of a day; what lies past its end has no record. */
function after(step: Step, atMs: number, tauMs: number): { drift: number; missing: number } {
  const dayPartMs = Math.min(atMs - step.at, dayMs)
  const holeMs = atMs - step.at - dayPartMs
  const isMissing = step.strayPct === undefined
  return {
    drift: lagged(lagged(step.drift, step.strayPct ?? 0, dayPartMs, tauMs), 0, holeMs, tauMs),
    missing: lagged(lagged(step.missing, isMissing ? 1 : 0, dayPartMs, tauMs), 1, holeMs, tauMs),
  }
}

const lagged = (from: number, towards: number, forMs: number, tauMs: number): number =>
  towards + (from - towards) * Math.exp(-forMs / tauMs)

export type CorrectedWeight<W> = W & {
  /** The weight without the room's drift, g; undefined where the drift is not known. */
  readonly correctedG: number | undefined
}

/** MC taken for a piece of which nothing is known, % MC: a tenth off in the oven-dry mass is a tenth of a correction. */
export const ASSUMED_MC_PCT = 12

/**
 * Weights with the room's drift taken away: W - m D/100.
 * @param weights instants in ms, grams above 0
 * @param driftAt from `driftBetween` or `driftOfRoom`
 * @param wood the oven-dry mass m in g where known; else the modelled MC, from which it is estimated weight by weight
 * @throws RangeError for an input out of range or NaN
 */
export function correctedForDrift<W extends Weight>(
  weights: readonly W[],
  driftAt: DriftAt,
  wood: { readonly ovenDryG?: number | undefined; readonly mcAt?: McAt | undefined } = {},
): CorrectedWeight<W>[] {
  if (wood.ovenDryG !== undefined) assertFiniteAbove('ovenDryG', wood.ovenDryG, 0)
  return weights.map((weight) => {
    assertFiniteAbove('grams', weight.grams, 0)
    const drift = driftAt(weight.at)
    if (drift === undefined) return { ...weight, correctedG: undefined }
    assertFinite('drift', drift)
    const dryG = wood.ovenDryG ?? ovenDryG(weight.grams, wood.mcAt?.(weight.at) ?? ASSUMED_MC_PCT)
    return { ...weight, correctedG: weight.grams - (dryG * drift) / 100 }
  })
}
