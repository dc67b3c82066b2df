import { wetShare } from './drying-shape'
import { dayMs, furthestReadyMs, leastReadySpanMs, readyOverMs, readyWithinPct } from './policy'
import { weightedQuantile } from './weighted-quantile'
import type { WeightCurve } from './weighing'
import type { WeighingFit } from './weighing-fit'

/** From the earliest instant to the latest, epoch ms: middle 8 in 10, and never narrower than a week. */
export type ReadySpan = { readonly fromAt: number; readonly toAt: number }

export type ReadySpanQuestion = {
  readonly now: number
  /** Not before this, whatever the weights do: the rests after roughing and turning. Epoch ms. */
  readonly notBeforeAt: number
  /** How far weights may lie apart and still be the same, g. */
  readonly toleranceG: number
  /** What it would weigh at the middle of its home, and its oven-dry mass; left out where weight alone decides. */
  readonly target?: { readonly weightG: number; readonly ovenDryG: number } | undefined
}

/**
 * When a blank is likely to be ready, from every curve that its weights allow.
 * @param fit from `weighingForecast`, so that a forecast may be made at all
 * @returns a range; undefined where more than 1 curve in 10 never gets there, or only after years
 */
export function readySpan(fit: WeighingFit, question: ReadySpanQuestion): ReadySpan | undefined {
  const times = fit.draws.map((draw) => ({ value: readyAt(draw, question), weight: draw.weight }))
  const latest = weightedQuantile(times, 0.9)
  const earliest = weightedQuantile(times, 0.1)
  if (!(latest <= question.now + furthestReadyMs)) return undefined
  return atLeastAWeek(Math.max(question.now, earliest), Math.max(question.now, latest))
}

/** The range of a piece whose weight is level already and that lacks only time. */
export const waitingSpan = (now: number, notBeforeAt: number): ReadySpan =>
  atLeastAWeek(Math.max(now, notBeforeAt), Math.max(now, notBeforeAt))

const atLeastAWeek = (fromAt: number, toAt: number): ReadySpan => ({
  fromAt,
  toAt: Math.max(toAt, fromAt + leastReadySpanMs),
})

/** When one curve has been level for eight weeks and its MC lies within 0.7 points of the target; Infinity for never. */
function readyAt(curve: WeightCurve, question: ReadySpanQuestion): number {
  const share = question.toleranceG / Math.abs(curve.amplitudeG)
  const { tauMs, shape } = curve
  const stillWet = (sinceMs: number): number => wetShare(sinceMs, tauMs, shape)
  const levelMs = timeTo((sinceMs) => stillWet(sinceMs) - stillWet(sinceMs + readyOverMs), share, tauMs)
  return Math.max(question.notBeforeAt, curve.fromAt + levelMs + readyOverMs, matchedAt(curve, question))
}

function matchedAt(curve: WeightCurve, { target }: ReadySpanQuestion): number {
  if (target === undefined) return -Infinity
  const withinG = (readyWithinPct / 100) * target.ovenDryG
  const endsOffG = curve.finalG - target.weightG
  if (Math.abs(endsOffG) > withinG) return Infinity
  // Above the target while drying, below it while gaining: what is left to go on that side.
  const leftG = withinG - Math.sign(curve.amplitudeG) * endsOffG
  const { tauMs, shape } = curve
  const share = leftG / Math.abs(curve.amplitudeG)
  return curve.fromAt + timeTo((sinceMs) => wetShare(sinceMs, tauMs, shape), share, tauMs)
}

/** No curve is followed beyond this many time constants: what is left by then no scale shows. */
const LONGEST_IN_TAUS = 30
const TOLERANCE_MS = dayMs / 24

/** How long until something that dies away has come down to a share; 0 where it is smaller from the start. */
function timeTo(shareAfter: (sinceMs: number) => number, share: number, tauMs: number): number {
  if (shareAfter(0) <= share) return 0
  let low = 0
  let high = LONGEST_IN_TAUS * tauMs
  if (shareAfter(high) > share) return Infinity
  while (high - low > TOLERANCE_MS) {
    const middle = (low + high) / 2
    if (shareAfter(middle) > share) low = middle
    else high = middle
  }
  return high
}
