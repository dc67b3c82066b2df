import type { Field } from '@/lib/bench/fields'
import { formatCount, formatEmc, formatMass } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { formatDay } from '@/lib/format/times'
import { dryMass, moistureOfWeight, type DryMass } from '@/lib/seasoning/dry-mass'
import { weightAtMoistureG } from '@/lib/seasoning/oven-dry'
import { dayMs, readyWithinPct, weekMs } from '@/lib/seasoning/policy'
import { readiness, type ReadyAnswer } from '@/lib/seasoning/ready'
import type { MissingCode } from '@/lib/seasoning/ready-words'
import type { ReadySpan } from '@/lib/seasoning/ready-span'
import { restingCurve, type RestingCurve } from '@/lib/seasoning/resting-curve'
import type { Weight } from '@/lib/seasoning/weighing'
import { weighingForecast } from '@/lib/seasoning/forecast'
import type { UnitSystem } from '@/lib/sites/site'
import type { Twin } from '../../_components/api-twin'
import type { Fact } from '../../_components/facts'

export const readyFields = {
  everyDays: { label: 'Time between weighings', kind: 'days', min: 0.01, max: 366, start: '28' },
  stepG: { label: 'Step of the scale', kind: 'mass', min: 0.001, max: 100, start: '1' },
  roughedDays: {
    label: 'Roughed out before the first weighing',
    kind: 'days',
    min: 0,
    max: 3650,
    start: '0',
  },
  ovenDryG: { label: 'Oven-dry weight', kind: 'mass', min: 0.001, max: 200_000, start: '376' },
  meterPct: { label: 'Meter reading', kind: 'moisture', min: 4, max: 30, start: '10' },
  targetPct: { label: 'Where its home holds wood', kind: 'moisture', min: 0, max: 30, start: '9' },
} as const satisfies Record<string, Field>

export type ReadyField = keyof typeof readyFields

/** What is known of its moisture besides the weights. */
export const knowns = ['oven', 'meter', 'none'] as const
export type Known = (typeof knowns)[number]

export const knownWords: Readonly<Record<Known, string>> = {
  meter: 'a meter now reads',
  oven: 'oven-dry it would weigh',
  none: 'its moisture is not known',
}

export type BenchReady = {
  weights: readonly Weight[]
  answer: ReadyAnswer
  curve: RestingCurve
  end: { grams: number; lowG: number; highG: number; tauDays: number } | undefined
  mc: { pct: number; doubtPct: number } | undefined
  /** Weights at the home's middle, with what counts as matched. */
  target: { pct: number; lowG: number; highG: number } | undefined
  /** Weights an equal time apart have no calendar. */
  isByDate: boolean
}

/**
 * Readiness as of the last weighing, taking the room's air to have held still.
 * @param weights in order of time, at least one
 */
export function benchReady(
  weights: readonly Weight[],
  values: Readonly<Record<ReadyField, number>>,
  { known, isByDate }: { known: Known; isByDate: boolean },
  units: UnitSystem,
): BenchReady {
  const first = weights[0] ?? { at: 0, grams: 0 }
  const last = weights.at(-1) ?? first
  const dry = dryOf(weights, values, known)
  const mc = dry === undefined ? undefined : moistureOfWeight(last.grams, dry)
  const resting = weights.map((weight) => ({ ...weight, correctedG: weight.grams }))
  const answer = readiness({
    now: last.at,
    weights: resting,
    stepG: values.stepG,
    mc,
    target: { pct: values.targetPct, of: 'home' },
    roughedAt: first.at - values.roughedDays * dayMs,
    readyByWeight: false,
    units,
  })
  const forecast = weighingForecast(weights, values.stepG, units)
  return {
    weights,
    answer,
    curve: restingCurve(resting, values.stepG, answer.span, units),
    end: forecast.ok
      ? {
          grams: forecast.value.finalG,
          lowG: forecast.value.finalLowG,
          highG: forecast.value.finalHighG,
          tauDays: forecast.value.tauMs / dayMs,
        }
      : undefined,
    mc,
    target: dry === undefined ? undefined : targetOf(dry, values.targetPct),
    isByDate,
  }
}

function dryOf(
  weights: readonly Weight[],
  values: Readonly<Record<ReadyField, number>>,
  known: Known,
): DryMass | undefined {
  const last = weights.at(-1)
  if (last === undefined || known === 'none') return undefined
  return known === 'oven'
    ? dryMass(weights, [], [{ at: last.at, grams: values.ovenDryG }], values.stepG)
    : dryMass(weights, [{ at: last.at, mcPct: values.meterPct }], [], values.stepG)
}

const targetOf = (dry: DryMass, pct: number) => ({
  pct,
  lowG: weightAtMoistureG(dry.grams, Math.max(0, pct - readyWithinPct)),
  highG: weightAtMoistureG(dry.grams, pct + readyWithinPct),
})

/** "between 10 May and 14 June", or in weeks from the last weighing. */
export function spanWords(span: ReadySpan, lastAt: number, isByDate: boolean): string {
  if (isByDate) {
    const day = (at: number) => formatDay(new Date(at), 'UTC', new Date(lastAt))
    return `between ${day(span.fromAt)} and ${day(span.toAt)}`
  }
  const from = Math.floor((span.fromAt - lastAt) / weekMs)
  const to = Math.ceil((span.toAt - lastAt) / weekMs)
  return from === 0
    ? `within ${formatCount(to, 'week')} of the last weighing`
    : `between ${String(from)} and ${formatCount(to, 'week')} after the last weighing`
}

/** What lacks is not time but knowledge. */
const TO_FIND_OUT: ReadonlySet<MissingCode> = new Set(['mc-unknown', 'doubt-too-wide'])

export function readySentence({ answer, curve, weights, isByDate }: BenchReady): TextPart[] {
  if (answer.ready) return say`${strong('Ready')}: it weighs the same, its MC matches, and it has rested.`
  const toFindOut = answer.missing.filter(({ code }) => TO_FIND_OUT.has(code))
  if (toFindOut.length === answer.missing.length)
    return say`By weight and rest it is ${strong('ready')}, but its moisture is to be found out. ${toFindOut.map(({ words }) => words).join(' ')}`
  if (answer.span !== undefined)
    return say`Leave it resting: it should be ready ${strong(spanWords(answer.span, weights.at(-1)?.at ?? 0, isByDate))}.`
  if (curve.noForecast !== undefined)
    return say`Leave it resting; no forecast can be made yet. ${curve.noForecast.words}`
  return say`Leave it resting. It does not get there by itself: where it is heading is not where its home holds wood.`
}

export function readyFacts({ end, curve, mc, target }: BenchReady, units: UnitSystem): Fact[] {
  return [
    end === undefined
      ? { name: 'Where its weight ends', figure: 'no forecast', words: curve.noForecast?.words }
      : {
          name: 'Where its weight ends',
          figure: `about ${formatMass(end.grams, units)}`,
          words: `8 in 10: ${formatMass(end.lowG, units)} to ${formatMass(end.highG, units)}.`,
        },
    ...(end === undefined
      ? []
      : [
          {
            name: 'Time constant',
            figure: `about ${formatCount(Math.round(end.tauDays), 'day')}`,
            words: 'In each such time it loses about two thirds of what it has left to lose.',
          },
        ]),
    mc === undefined
      ? { name: 'Its moisture now', figure: 'not known', words: 'A meter or an oven-dry weight would tell.' }
      : { name: 'Its moisture now', figure: formatEmc(mc.pct), words: `±${formatEmc(mc.doubtPct)}.` },
    ...(target === undefined
      ? []
      : [
          {
            name: 'What it is to weigh',
            figure: `${formatMass(target.lowG, units)} to ${formatMass(target.highG, units)}`,
            words: `At ${formatEmc(target.pct)}, where its home holds wood, and ${String(readyWithinPct)} % MC either side.`,
          },
        ]),
  ]
}

/** The API takes weights an equal time apart, three at least. */
export function readyTwins({ weights, isByDate }: BenchReady, everyDays: number, stepG: number): Twin[] {
  if (isByDate || weights.length < 3) return []
  const grams = weights.map((weight) => String(weight.grams)).join(',')
  return [{ path: '/bench/weighing', query: { grams, everyDays, stepG } }]
}
