import { assertFinite, assertFiniteAbove, assertInRange } from '@/lib/assert'
import { weighingForecast } from './forecast'
import { ovenDryG, weightAtMoistureG } from './oven-dry'
import {
  readyDoubtPctMax,
  readyOverMs,
  readyWithinPct,
  restAfterNearFinalMs,
  restAfterRoughingMs,
} from './policy'
import { readySpan, waitingSpan, type ReadySpan } from './ready-span'
import type { ReadyQuestion } from './ready-question'
import { missingWords, readyWords, type Missing, type MissingCode } from './ready-words'
import { curveWeights } from './resting-curve'
import { sameWeightToleranceG, steadinessOf, type Steadiness } from './same-weight'

export type ReadyAnswer = {
  readonly ready: boolean
  /** Ready only because the maker lets the weights alone decide: something that is asked for is missing, and marked. */
  readonly byWeightAlone: boolean
  /** What is missing. Under "by weight alone" what was let pass is not in it. */
  readonly missing: readonly Missing[]
  /**
   * When it is likely to be ready as far as weights and rests go, while it is not; what the maker has to find out first
   * stands in `missing`. Undefined: no forecast may be made, or it does not get there by itself.
   */
  readonly span: ReadySpan | undefined
  readonly words: string
}

/** What the weights alone may stand in for: everything about the MC, and the correction for the room's drift. */
const LET_PASS: readonly MissingCode[] = [
  'weights-not-corrected',
  'mc-unknown',
  'target-unknown',
  'mc-off',
  'doubt-too-wide',
]

/**
 * Whether a roughed blank is ready, and what is missing. All of: three weights over eight weeks, corrected for the
 * room's drift, equal within the larger of one step and 0.3 % of the mass; MC within 0.7 points of the home's middle
 * (else the keep room's) with a doubt no wider than ±1; 60 days since roughing and 14 since near-final turning.
 * @throws RangeError for an input out of range or NaN
 */
export function readiness(question: ReadyQuestion): ReadyAnswer {
  assertQuestion(question)
  const all = missingFrom(question)
  const missing = question.readyByWeight ? all.filter(({ code }) => !LET_PASS.includes(code)) : all
  const ready = missing.length === 0
  const byWeightAlone = ready && all.length > 0
  const span = ready ? undefined : spanOf(question)
  return { ready, byWeightAlone, missing, span, words: readyWords(ready, byWeightAlone, missing) }
}

function assertQuestion({ now, weights, stepG, mc, target, roughedAt, nearFinalAt }: ReadyQuestion): void {
  assertFinite('now', now)
  assertFiniteAbove('stepG', stepG, 0)
  for (const weight of weights) {
    assertFinite('at', weight.at)
    assertFiniteAbove('grams', weight.grams, 0)
    if (weight.correctedG !== undefined) assertFiniteAbove('correctedG', weight.correctedG, 0)
  }
  if (mc !== undefined) {
    assertInRange('mcPct', mc.pct, 0, 300)
    assertInRange('doubtPct', mc.doubtPct, 0, 300)
  }
  if (target !== undefined) assertInRange('targetPct', target.pct, 0, 30)
  if (roughedAt !== undefined) assertFinite('roughedAt', roughedAt)
  if (nearFinalAt !== undefined) assertFinite('nearFinalAt', nearFinalAt)
}

/** The weights that are compared: corrected ones; as weighed only where the maker lets weights decide by themselves. */
function compared(question: ReadyQuestion): { at: number; grams: number }[] {
  const corrected = question.weights.flatMap(({ at, correctedG }) =>
    correctedG === undefined ? [] : [{ at, grams: correctedG }],
  )
  if (!question.readyByWeight || corrected.length === question.weights.length) return corrected
  return question.weights.map(({ at, grams }) => ({ at, grams }))
}

function missingFrom(question: ReadyQuestion): Missing[] {
  const { now, roughedAt, nearFinalAt } = question
  const steadiness = steadinessOf(compared(question), question.stepG)
  const sinceMs = (at: number): number => now - at
  const codes: MissingCode[] = [
    ...missingWeights(question, steadiness),
    ...missingMatch(question),
    ...(roughedAt === undefined ? ['roughed-unknown' as const] : []),
    ...(roughedAt !== undefined && sinceMs(roughedAt) < restAfterRoughingMs
      ? ['rest-after-roughing' as const]
      : []),
    ...(nearFinalAt !== undefined && sinceMs(nearFinalAt) < restAfterNearFinalMs
      ? ['rest-after-near-final' as const]
      : []),
  ]
  return codes.map((code) => ({ code, words: missingWords(code, question, steadiness) }))
}

function missingWeights(question: ReadyQuestion, steadiness: Steadiness): MissingCode[] {
  const uncorrected = question.weights.some((weight) => weight.correctedG === undefined)
  if (steadiness.isLongEnough) {
    const newest = question.weights.at(-1)
    const codes: MissingCode[] = steadiness.isSame ? [] : ['weights-differ']
    return newest?.correctedG === undefined ? [...codes, 'weights-not-corrected'] : codes
  }
  const asWeighed = steadinessOf(question.weights, question.stepG)
  if (uncorrected && asWeighed.isLongEnough) return ['weights-not-corrected']
  return ['too-few-weights']
}

function missingMatch({ mc, target }: ReadyQuestion): MissingCode[] {
  if (mc === undefined) return ['mc-unknown']
  const codes: MissingCode[] = []
  if (target === undefined) codes.push('target-unknown')
  else if (!isMatched(mc.pct, target.pct)) codes.push('mc-off')
  // As it is told, to a tenth: a good meter on a piece that the scale weighs well is just within it.
  if (Math.round(mc.doubtPct * 10) / 10 > readyDoubtPctMax) codes.push('doubt-too-wide')
  return codes
}

/** Figures of one decimal are not exact in binary: 9.3 is within 0.7 of 8.6. */
const ROUNDING_PCT = 1e-9

const isMatched = (mcPct: number, targetPct: number): boolean =>
  Math.abs(mcPct - targetPct) <= readyWithinPct + ROUNDING_PCT

function spanOf(question: ReadyQuestion): ReadySpan | undefined {
  const { now, roughedAt, nearFinalAt, stepG, weights, mc, target } = question
  const last = weights.at(-1)
  if (last === undefined) return undefined
  const notBeforeAt = Math.max(
    now,
    (roughedAt ?? -Infinity) + restAfterRoughingMs,
    (nearFinalAt ?? -Infinity) + restAfterNearFinalMs,
  )
  const fitted = curveWeights(weights)
  const forecast = weighingForecast(fitted, stepG)
  const byWeight = question.readyByWeight || mc === undefined || target === undefined
  if (forecast.ok) {
    const dryG = mc === undefined ? undefined : ovenDryG(last.grams, mc.pct)
    return readySpan(forecast.value, {
      now,
      notBeforeAt,
      toleranceG: sameWeightToleranceG(last.grams, stepG),
      target:
        byWeight || dryG === undefined
          ? undefined
          : { weightG: weightAtMoistureG(dryG, target.pct), ovenDryG: dryG },
    })
  }
  const steadiness = steadinessOf(fitted, stepG)
  const isLevel = forecast.error.code === 'no-change' || forecast.error.code === 'not-one-way'
  const ends = byWeight || isMatched(mc.pct, target.pct)
  if (!isLevel || !steadiness.isSame || !ends) return undefined
  return waitingSpan(now, Math.max(notBeforeAt, last.at - steadiness.overMs + readyOverMs))
}
