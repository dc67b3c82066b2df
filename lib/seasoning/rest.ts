import { eventKindSchema } from '@/lib/pieces/event'
import type { Stage } from '@/lib/pieces/piece'
import type { UnitSystem } from '@/lib/sites/site'
import { correctedForDrift } from './drift'
import { dryMass, type DryMass, moistureOfWeight } from './dry-mass'
import { weighingDue } from './due'
import { weighingForecast } from './forecast'
import { ovenDryG } from './oven-dry'
import { assumedStepG, dayMs, restAfterRoughingMs, yearDaysMin } from './policy'
import { readiness } from './ready'
import { curveWeights, restingCurve } from './resting-curve'
import type { RestView } from './rest-view'
import { metWords, missingHere, restWords, weighNextWords } from './rest-words'
import { currentSeries } from './series'
import type { WoodCourse } from './wood-course'

export type RestEvent = {
  readonly kind: string
  readonly at: number
  readonly mcPct?: number | undefined
  readonly ovenDryG?: number | undefined
}

export type RestQuestion = {
  readonly now: number
  readonly timeZone: string
  readonly units: UnitSystem
  readonly stage: Stage
  /** Undone ones left out. */
  readonly weighings: readonly { at: number; grams: number; stepG: number | null }[]
  readonly events: readonly RestEvent[]
  /** Step of the site's scale, g; null until told. */
  readonly scaleStepG: number | null
  /** When the day of the facts began on which it was roughed out; an event of that kind counts where it is later. */
  readonly roughedAt: number | undefined
  readonly readyByWeight: boolean
  /** When it came into the record: a weighing is due from then on. */
  readonly createdAt: number
  /** The piece as followed, with its doubt. */
  readonly followed: { readonly pct: number; readonly doubtPct: number } | undefined
  /** The keep room's middle, over so many days of its last twelve months. */
  readonly target: { readonly pct: number; readonly room: string; readonly days: number } | undefined
  /** The course of the wood by its rooms, led through what is known of it at a moment. */
  readonly courseThrough: (
    known: { readonly at: number; readonly mcPct: number } | undefined,
  ) => WoodCourse | undefined
}

/**
 * Where a resting piece stands: its current series of weights without the rooms' drift, where they lead, its moisture,
 * whether it is ready and what is missing, and when to weigh it next.
 * @throws RangeError for an input out of range or NaN
 */
export function restOf(question: RestQuestion): RestView {
  const { now, events, units } = question
  const past = events.filter((event) => event.at <= now)
  const { weighings, openedBy, earlierCount } = currentSeries([...question.weighings], past, now)
  const since = openedBy?.at ?? -Infinity
  const inSeries = past.filter((event) => event.at >= since)
  const stepG = stepOf(weighings, question.scaleStepG)
  const measured = dryMass(weighings, metersOf(inSeries), toldOf(inSeries), stepG)
  const [first] = weighings
  const last = weighings.at(-1)
  const course = question.courseThrough(
    first === undefined || measured === undefined
      ? undefined
      : { at: first.at, mcPct: Math.min(30, moistureOfWeight(first.grams, measured).pct) },
  )
  const corrected = correctedForDrift(weighings, course?.driftAt ?? (() => undefined), {
    ovenDryG: measured?.grams,
    mcAt: course?.mcAt,
  })
  const mc = moistureNow(last, measured, question.followed)
  const target = question.target
  const answer = readiness({
    now,
    weights: corrected,
    stepG,
    mc,
    target: target && target.days >= yearDaysMin ? { pct: target.pct, of: 'keep-room' } : undefined,
    roughedAt: latest([question.roughedAt, ...timesOf(past, 'roughed')]),
    nearFinalAt: latest(timesOf(past, 'near-final')),
    readyByWeight: question.readyByWeight,
    units,
  })
  const missing = answer.missing.map((one) => missingHere(one, question.stage))
  const due = weighingDue(
    last === undefined ? undefined : { at: last.at, grams: last.grams, stepG },
    openedBy?.at ?? question.createdAt,
    now,
  )
  const clock = { now, timeZone: question.timeZone }
  const curve = restingCurve(corrected, stepG, answer.span, units)
  const forecast = weighingForecast(curveWeights(corrected), stepG, units)
  return {
    words: restWords({ ...answer, missing }, clock),
    next: weighNextWords(due, last !== undefined, clock),
    state: answer.ready ? (answer.byWeightAlone ? 'ready-by-weight' : 'ready') : 'not-ready',
    missing,
    met: metWords({
      codes: answer.missing.map(({ code }) => code),
      isMatched: mc !== undefined && target !== undefined && target.days >= yearDaysMin,
      restedOn: restedAt(question, past),
      ...clock,
    }),
    readyFromAt: textOf(answer.span?.fromAt),
    readyToAt: textOf(answer.span?.toAt),
    series: {
      openedBy:
        openedBy === undefined
          ? null
          : { kind: eventKindSchema.parse(openedBy.kind), at: instantOf(openedBy.at) },
      weights: weighings.length,
      earlierWeights: earlierCount,
    },
    stepG,
    isStepAssumed: question.scaleStepG === null && weighings.every((weighing) => weighing.stepG === null),
    forecast: forecast.ok
      ? {
          direction: forecast.value.direction,
          finalG: forecast.value.finalG,
          finalLowG: forecast.value.finalLowG,
          finalHighG: forecast.value.finalHighG,
          timeConstantDays: forecast.value.tauMs / dayMs,
          timeConstantDaysLow: forecast.value.tauLowMs / dayMs,
          timeConstantDaysHigh: forecast.value.tauHighMs / dayMs,
        }
      : null,
    noForecast: forecast.ok ? null : forecast.error,
    mc: mc ?? null,
    dryMass: measured ?? modelledDryMass(last, mc) ?? null,
    target: target ?? null,
    nextWeighing: { at: instantOf(due.dueAt), isDue: due.isDue },
    weighings: {
      at: curve.weighings.at.map(instantOf),
      grams: curve.weighings.grams,
      correctedG: curve.weighings.correctedG.map((grams) => grams ?? null),
    },
    fit: curve.fit === undefined ? null : { at: curve.fit.at.map(instantOf), grams: curve.fit.grams },
    forecastCurve:
      curve.forecast === undefined ? null : { ...curve.forecast, at: curve.forecast.at.map(instantOf) },
    model: course === undefined ? null : modelColumns(course, first?.at, now),
  }
}

const instantOf = (at: number): string => new Date(at).toISOString()
const textOf = (at: number | undefined): string | null => (at === undefined ? null : instantOf(at))

/** Weights of one series may come from two scales: the coarser one decides. */
const stepOf = (weighings: readonly { stepG: number | null }[], scaleStepG: number | null): number =>
  weighings.length === 0
    ? (scaleStepG ?? assumedStepG)
    : Math.max(...weighings.map(({ stepG }) => stepG ?? scaleStepG ?? assumedStepG))

const metersOf = (events: readonly RestEvent[]) =>
  events.flatMap(({ kind, at, mcPct }) => (kind === 'meter' && mcPct !== undefined ? [{ at, mcPct }] : []))

const toldOf = (events: readonly RestEvent[]) =>
  events.flatMap(({ kind, at, ovenDryG: grams }) =>
    kind === 'oven-dry' && grams !== undefined ? [{ at, grams }] : [],
  )

const timesOf = (events: readonly RestEvent[], kind: string): number[] =>
  events.filter((event) => event.kind === kind).map((event) => event.at)

const latest = (times: readonly (number | undefined)[]): number | undefined => {
  const known = times.filter((at) => at !== undefined)
  return known.length === 0 ? undefined : Math.max(...known)
}

function restedAt(question: RestQuestion, past: readonly RestEvent[]): number | undefined {
  const roughedAt = latest([question.roughedAt, ...timesOf(past, 'roughed')])
  return roughedAt === undefined ? undefined : roughedAt + restAfterRoughingMs
}

type Moisture = { pct: number; doubtPct: number; from: 'oven-dry' | 'meter' | 'model' }

/** By weight or as followed, whichever is known the better. */
function moistureNow(
  last: { grams: number } | undefined,
  dry: DryMass | undefined,
  followed: RestQuestion['followed'],
): Moisture | undefined {
  const weighed: Moisture | undefined =
    last === undefined || dry === undefined
      ? undefined
      : { ...moistureOfWeight(last.grams, dry), from: dry.from }
  const reckoned: Moisture | undefined = followed && { ...followed, from: 'model' }
  if (weighed === undefined || reckoned === undefined) return weighed ?? reckoned
  return weighed.doubtPct <= reckoned.doubtPct ? weighed : reckoned
}

function modelledDryMass(last: { grams: number } | undefined, mc: Moisture | undefined) {
  if (last === undefined || mc === undefined) return undefined
  const grams = ovenDryG(last.grams, mc.pct)
  return { grams, doubtG: (grams * mc.doubtPct) / (100 + mc.pct), from: 'model' as const }
}

/** A month of it before the first weight, or half a year where there is none; thinned for drawing. */
const MODEL_BEFORE_MS = 30 * dayMs
const MODEL_ALONE_MS = 182 * dayMs
const MODEL_POINTS = 80

function modelColumns(course: WoodCourse, firstAt: number | undefined, now: number) {
  const from =
    firstAt === undefined ? now - MODEL_ALONE_MS : Math.min(firstAt - MODEL_BEFORE_MS, now - MODEL_BEFORE_MS)
  const shown = course.at.map((at, n) => ({ at, pct: course.mcPct[n] ?? 0 })).filter(({ at }) => at >= from)
  const every = Math.max(1, Math.ceil(shown.length / MODEL_POINTS))
  const kept = shown.filter((_, n) => n % every === 0 || n === shown.length - 1)
  return { at: kept.map(({ at }) => instantOf(at)), mcPct: kept.map(({ pct }) => pct) }
}
