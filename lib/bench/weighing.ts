import { z } from 'zod'
import { formatMass } from '@/lib/format/figures'
import { err, ok, type Result } from '@/lib/result'
import {
  hasSlowedToHalf,
  isEndKnown,
  noCurveWords,
  notHalfYetWords,
  weeklyRates,
} from '@/lib/seasoning/forecast'
import { dayMs } from '@/lib/seasoning/policy'
import { endOfThree } from '@/lib/seasoning/three-weighings'
import type { Direction } from '@/lib/seasoning/weighing'
import { weighingFit, type WeighingFit } from '@/lib/seasoning/weighing-fit'
import { numberIn } from './query'

const LEAST_WEIGHTS = 3
const MOST_WEIGHTS = 60
const gramsOfOne = numberIn(0.001, 200_000, 'g')
const gramsMessage = `${String(LEAST_WEIGHTS)} to ${String(MOST_WEIGHTS)} weights in the order of weighing, with commas between them, each from 0.001 to 200000 g`

const areWeights = (parts: readonly string[]): boolean =>
  parts.length >= LEAST_WEIGHTS &&
  parts.length <= MOST_WEIGHTS &&
  parts.every((part) => gramsOfOne.safeParse(part).success)

const grams = z
  .string({ error: gramsMessage })
  .max(1000, gramsMessage)
  .transform((text) => text.split(',').map((part) => part.trim()))
  .refine(areWeights, { error: gramsMessage })
  .transform((parts) => ({ weightsG: parts.map(Number), writtenStepG: stepAsWritten(parts) }))

export const weighingQuerySchema = z.strictObject({
  grams,
  everyDays: numberIn(0.01, 366, 'days'),
  /** Step of the scale; left out, the last decimal written. */
  stepG: numberIn(0.001, 100, 'g').optional(),
})

export type WeighingQuery = z.output<typeof weighingQuerySchema>

export type WeighingFlag = 'not-half-yet' | 'wide-doubt'

export type WeighingAnswer = {
  direction: Direction
  finalGrams: number
  /** Middle 8 in 10, where the scale and the scatter allow one. */
  finalGramsLow?: number
  finalGramsHigh?: number
  timeConstantDays: number
  timeConstantDaysLow?: number
  timeConstantDaysHigh?: number
  gramsPerWeekFirst?: number
  gramsPerWeekNow?: number
  mayForecast: boolean
  flags: WeighingFlag[]
  words: string
}

type Refusal = { code: 'not-possible'; path: string; message: string }

/**
 * Where weights an equal time apart are heading: through three of them exactly, through more by least squares. The end
 * is given as soon as there is one; `mayForecast` says whether it is worth believing yet.
 */
export function weighingAnswer(query: WeighingQuery): Result<WeighingAnswer, Refusal> {
  const { weightsG, writtenStepG } = query.grams
  const stepG = query.stepG ?? writtenStepG
  const everyMs = query.everyDays * dayMs
  const weights = weightsG.map((weight, n) => ({ at: n * everyMs, grams: weight }))
  const [first, second, third] = weightsG
  const fit = weighingFit(weights, stepG)
  if (
    weightsG.length === LEAST_WEIGHTS &&
    first !== undefined &&
    second !== undefined &&
    third !== undefined
  ) {
    const three = endOfThree([first, second, third], everyMs, stepG)
    if (!three.ok) return refusal(noCurveWords(three.error.code, weightsG.length))
    return ok(answerOf(three.value, fit.ok ? fit.value : undefined, weights))
  }
  if (!fit.ok) return refusal(noCurveWords(fit.error.code, weightsG.length))
  return ok(answerOf(fit.value, fit.value, weights))
}

const refusal = (words: string) =>
  err({
    code: 'not-possible' as const,
    path: 'grams',
    message: `${words} They are to fall (or rise) each time by less than the time before, by more than the scale’s error.`,
  })

function answerOf(
  end: { finalG: number; tauMs: number; direction: Direction },
  fit: WeighingFit | undefined,
  weights: readonly { at: number; grams: number }[],
): WeighingAnswer {
  const rates = fit === undefined ? undefined : weeklyRates(fit, weights)
  const isHalf = rates !== undefined && hasSlowedToHalf(rates)
  const isWide = fit === undefined || !isEndKnown(fit)
  const flags: WeighingFlag[] = []
  if (!isHalf) flags.push('not-half-yet')
  if (isWide) flags.push('wide-doubt')
  return {
    direction: end.direction,
    finalGrams: end.finalG,
    timeConstantDays: end.tauMs / dayMs,
    ...(fit === undefined || rates === undefined
      ? {}
      : {
          finalGramsLow: Math.min(fit.finalLowG, end.finalG),
          finalGramsHigh: Math.max(fit.finalHighG, end.finalG),
          timeConstantDaysLow: Math.min(fit.tauLowMs, end.tauMs) / dayMs,
          timeConstantDaysHigh: Math.max(fit.tauHighMs, end.tauMs) / dayMs,
          gramsPerWeekFirst: rates.firstG,
          gramsPerWeekNow: rates.nowG,
        }),
    mayForecast: flags.length === 0,
    flags,
    words: [
      `It is heading for about ${formatMass(end.finalG)}${rangeWords(fit)}.`,
      ...(fit === undefined || rates === undefined || isHalf ? [] : [notHalfYetWords(fit, rates)]),
      ...(isWide ? ['That end is not well known yet: weigh again.'] : []),
    ].join(' '),
  }
}

const rangeWords = (fit: WeighingFit | undefined): string =>
  fit === undefined ? '' : ` (8 in 10: ${formatMass(fit.finalLowG)} to ${formatMass(fit.finalHighG)})`

/** The step of the last decimal that was written, of the weight with the most of them: 0.1 for "182.0, 167.9, 160". */
function stepAsWritten(parts: readonly string[]): number {
  const decimals = parts.map((part) => (/\.(\d*)/.exec(part)?.[1] ?? '').length)
  return Math.max(0.001, 10 ** -Math.max(...decimals))
}
