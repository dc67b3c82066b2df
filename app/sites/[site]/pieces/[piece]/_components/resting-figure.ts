import { startOfDayAt, dayOfInstant, monthOf } from '@/lib/climate/days'
import { formatEmc, formatMass } from '@/lib/format/figures'
import { formatDay } from '@/lib/format/times'
import { dayMs, readyWithinPct } from '@/lib/seasoning/policy'
import { moistureByWeightPct } from '@/lib/seasoning/oven-dry'
import type { RestView } from '@/lib/seasoning/rest-view'
import type { UnitSystem } from '@/lib/sites/site'
import { ouncesFromGrams } from '@/lib/units'

export type Line = { readonly at: number; readonly value: number }[]
export type Band = { readonly at: number; readonly low: number; readonly high: number }[]

/** What the resting curve draws, on the one scale that it can be drawn on. */
export type RestingFigure = {
  /** MC where the oven-dry mass is known by oven or meter, or where there is no weight at all; else the weight. */
  readonly scale: 'mc' | 'mass'
  readonly unit: string
  readonly weighed: Line
  readonly fit: Line
  readonly forecast: Line
  readonly doubt: Band
  readonly model: Line
  readonly ribbon: { readonly low: number; readonly high: number } | null
  readonly span: { readonly fromAt: number; readonly toAt: number } | null
  readonly now: number
  readonly fromAt: number
  readonly toAt: number
  readonly low: number
  readonly high: number
  /** Whether the weights shown are without the rooms' drift. */
  readonly isCorrected: boolean
}

/** How far the time to come may reach beyond the time gone, and how far at least. A guess: what a reader looks for. */
const AHEAD_OF_PAST = 0.8
const LEAST_AHEAD_MS = 30 * dayMs
/** Beyond the end of the ready range. */
const AFTER_SPAN_MS = 14 * dayMs

/**
 * @returns undefined where there is nothing to draw: no weight, and no air on record either
 */
export function restingFigure(rest: RestView, units: UnitSystem, now: number): RestingFigure | undefined {
  const { dryMass, model, weighings } = rest
  const count = weighings.at.length
  if (count === 0 && model === null) return undefined
  const isMeasured = dryMass !== null && dryMass.from !== 'model'
  const scale = isMeasured || count === 0 ? 'mc' : 'mass'
  const dryG = dryMass?.grams
  const shown = (grams: number): number => (units === 'metric' ? grams : ouncesFromGrams(grams))
  const ofGrams = (grams: number): number =>
    scale === 'mc' && dryG !== undefined ? 100 * (grams / dryG - 1) : shown(grams)
  const ofMc = (mcPct: number): number | undefined =>
    scale === 'mc' ? mcPct : dryG === undefined ? undefined : shown(dryG * (1 + mcPct / 100))
  const known = weighings.correctedG.filter((grams) => grams !== null).length
  // The fit goes through corrected weights where there are enough of them, so those are what is drawn with it.
  const isCorrected = known >= 3
  const weighed = weighings.at.flatMap((at, n) => {
    const grams = isCorrected ? weighings.correctedG[n] : weighings.grams[n]
    return grams === null || grams === undefined ? [] : [{ at: Date.parse(at), value: ofGrams(grams) }]
  })
  const spanToAt = rest.readyToAt === null ? null : Date.parse(rest.readyToAt)
  const firstAt = Math.min(weighed[0]?.at ?? now, Date.parse(model?.at[0] ?? new Date(now).toISOString()))
  const toAt = Math.max(
    now + LEAST_AHEAD_MS,
    rest.forecastCurve === null ? 0 : now + AHEAD_OF_PAST * (now - firstAt),
    spanToAt === null ? 0 : spanToAt + AFTER_SPAN_MS,
  )
  const columns = (at: readonly string[], values: readonly number[]): Line =>
    at.map((instant, n) => ({ at: Date.parse(instant), value: values[n] ?? NaN }))
  const grams = (line: Line): Line => line.map(({ at, value }) => ({ at, value: ofGrams(value) }))
  const ahead = rest.forecastCurve
  const forecast = ahead === null ? [] : cutAt(grams(columns(ahead.at, ahead.grams)), toAt)
  const doubt =
    ahead === null
      ? []
      : zipped(
          cutAt(grams(columns(ahead.at, ahead.lowG)), toAt),
          cutAt(grams(columns(ahead.at, ahead.highG)), toAt),
        )
  const modelled =
    model === null
      ? []
      : columns(model.at, model.mcPct).flatMap(({ at, value }) => {
          const drawn = ofMc(value)
          return drawn === undefined ? [] : [{ at, value: drawn }]
        })
  const fit = rest.fit === null ? [] : grams(columns(rest.fit.at, rest.fit.grams))
  const ribbon = ribbonOf(rest, ofMc)
  const values = [
    ...[...weighed, ...fit, ...forecast, ...modelled].map(({ value }) => value),
    ...doubt.flatMap(({ low, high }) => [low, high]),
    ...(ribbon === null ? [] : [ribbon.low, ribbon.high]),
  ]
  const low = Math.min(...values)
  const high = Math.max(...values)
  const room = Math.max(0.08 * (high - low), scale === 'mc' ? 0.4 : 0.004 * high)
  return {
    scale,
    unit: scale === 'mc' ? '% MC' : units === 'metric' ? 'g' : 'oz',
    weighed,
    fit,
    forecast,
    doubt,
    model: modelled,
    ribbon,
    span:
      rest.readyFromAt === null || spanToAt === null
        ? null
        : { fromAt: Date.parse(rest.readyFromAt), toAt: spanToAt },
    now,
    fromAt: firstAt,
    toAt,
    low: low - room,
    high: high + room,
    isCorrected,
  }
}

function ribbonOf(rest: RestView, ofMc: (mcPct: number) => number | undefined) {
  if (rest.target === null) return null
  const low = ofMc(rest.target.pct - readyWithinPct)
  const high = ofMc(rest.target.pct + readyWithinPct)
  return low === undefined || high === undefined ? null : { low, high }
}

/** A line up to an instant, its last stretch cut there. */
function cutAt(line: Line, toAt: number): Line {
  const next = line.findIndex(({ at }) => at > toAt)
  const before = line[next - 1]
  const after = line[next]
  if (before === undefined || after === undefined) return line
  const share = (toAt - before.at) / (after.at - before.at)
  return [...line.slice(0, next), { at: toAt, value: before.value + share * (after.value - before.value) }]
}

const zipped = (low: Line, high: Line): Band =>
  low.map(({ at, value }, n) => ({ at, low: value, high: high[n]?.value ?? value }))

const STEPS = [0.1, 0.2, 0.5, 1, 2, 4, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000]

/** Round figures up the side of the figure, six at most. */
export function sideTicks({ low, high }: Pick<RestingFigure, 'low' | 'high'>): number[] {
  const step = STEPS.find((candidate) => (high - low) / candidate <= 6) ?? high - low
  const first = Math.ceil(low / step)
  return Array.from({ length: Math.max(0, Math.floor(high / step) - first + 1) }, (_, n) =>
    Number(((first + n) * step).toFixed(2)),
  )
}

/** The firsts of months along the foot, every so many of them; the year where it begins or changes. */
export function monthTicks(
  { fromAt, toAt }: Pick<RestingFigure, 'fromAt' | 'toAt'>,
  timeZone: string,
  most: number,
): { at: number; text: string }[] {
  const firsts: { at: number; on: string }[] = []
  let on = monthOf(dayOfInstant(new Date(fromAt), timeZone)).nextFirstOn
  for (let at = startOfDayAt(on, timeZone).getTime(); at <= toAt; at = startOfDayAt(on, timeZone).getTime()) {
    firsts.push({ at, on })
    on = monthOf(on).nextFirstOn
  }
  const every = Math.max(1, Math.ceil(firsts.length / most))
  return firsts
    .filter((_, n) => n % every === 0)
    .map(({ at, on: day }, n, kept) => {
      const month = MONTHS[Number(day.slice(5, 7)) - 1] ?? ''
      const year = day.slice(0, 4)
      return { at, text: n === 0 || kept[n - 1]?.on.slice(0, 4) !== year ? `${month} ${year}` : month }
    })
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** The figure in a sentence, for those who hear it. */
export function restingSentence(rest: RestView, units: UnitSystem, timeZone: string, now: Date): string {
  const { weighings, mc, target } = rest
  const first = weighings.grams[0]
  const last = weighings.grams.at(-1)
  const lastAt = weighings.at.at(-1)
  const stands = mc === null ? '' : ` It stands at about ${formatEmc(mc.pct)}.`
  const home = target === null ? '' : ` The middle of ${target.room}’s year is ${formatEmc(target.pct)}.`
  if (first === undefined || last === undefined || lastAt === undefined)
    return `Resting curve: not weighed yet, modelled from the rooms alone.${stands}${home}`
  const weights =
    weighings.at.length === 1
      ? `one weighing, ${formatMass(last, units)}`
      : `${String(weighings.at.length)} weighings, from ${formatMass(first, units)} to ${formatMass(last, units)}`
  return `Resting curve: ${weights}, the last on ${formatDay(lastAt, timeZone, now)}.${stands}${home} ${rest.words}`
}

/** MC of a weight where the oven-dry mass is known by more than the model. */
export function weighedMcPct(grams: number, rest: RestView): number | undefined {
  if (rest.dryMass === null || rest.dryMass.from === 'model') return undefined
  const mc = moistureByWeightPct(grams, rest.dryMass.grams)
  return mc.ok ? mc.value : undefined
}
