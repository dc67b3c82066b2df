import type { HourlyRecord, Measure } from './record'
import { MEASURES } from './record'

/** One warming by hand on record: from the hour in which it was lit until the room was as cold as before. */
export interface Warming {
  /** Index of the first hour that was warmed, and of the first that was not any more. */
  readonly from: number
  readonly until: number
  readonly riseC: number
  /** Still warm at the end of the record. */
  readonly isOpen: boolean
}

/** Nobody lights a stove in a room that is this warm already, °C. Status: guess. */
export const LIT_BELOW_C = 17
/** A stove lifts a room by this much within two hours, and the day hardly does. Status: guess. */
const RISE_C = 1.2
const RISE_WITHIN_H = 2
/** It has to stand this far above what the room does in those hours on the least warm fifth of its days. */
const ABOVE_USUAL_C = 0.8
const USUAL_SHARE = 0.2
/** Warm no more once this little of the rise is left. */
const GONE_SHARE = 0.15
/** Nobody keeps a fire longer, with the hours that the room takes to cool. */
const LONGEST_H = 20
const PEAK_WITHIN_H = 12

const value = (values: Float64Array, n: number): number => values[n] ?? NaN

/** For each hour of the day, the rise over two hours that a fifth of the days stay below. */
function usualRises(record: HourlyRecord, hourOfDay: (n: number) => number): number[] {
  const byHour: number[][] = Array.from({ length: 24 }, () => [])
  for (let n = 0; n + RISE_WITHIN_H < record.length; n += 1) {
    const rise = value(record.temperatureC, n + RISE_WITHIN_H) - value(record.temperatureC, n)
    if (!Number.isNaN(rise)) byHour[Math.floor(hourOfDay(n))]?.push(rise)
  }
  return byHour.map((rises) => {
    rises.sort((one, other) => one - other)
    return rises[Math.floor(USUAL_SHARE * rises.length)] ?? 0
  })
}

/**
 * The times a room was warmed by hand: its temperature rose clearly above what it does by itself in those hours.
 * @param hourOfDay of an index of the record, in the site's zone
 * @returns oldest first, never overlapping
 */
export function warmingsOf(record: HourlyRecord, hourOfDay: (n: number) => number): Warming[] {
  const usual = usualRises(record, hourOfDay)
  const warmth = record.temperatureC
  const warmings: Warming[] = []
  let n = 0
  while (n + RISE_WITHIN_H < record.length) {
    const rise = value(warmth, n + RISE_WITHIN_H) - value(warmth, n)
    const usualRise = usual[Math.floor(hourOfDay(n))] ?? 0
    if (value(warmth, n) < LIT_BELOW_C && rise >= RISE_C && rise >= usualRise + ABOVE_USUAL_C) {
      const warming = followWarming(warmth, n)
      warmings.push(warming)
      n = warming.until
    } else n += 1
  }
  return warmings
}

function followWarming(warmth: Float64Array, before: number): Warming {
  const startC = value(warmth, before)
  let peak = before
  for (let n = before + 1; n <= before + PEAK_WITHIN_H && n < warmth.length; n += 1)
    if (value(warmth, n) > value(warmth, peak)) peak = n
  const riseC = value(warmth, peak) - startC
  // The hour in which it was lit is warmed for a part of it only: it is the first that stands above the one before.
  const from = value(warmth, before + 1) - startC > 0.1 * riseC ? before + 1 : before + 2
  let until = peak + 1
  while (
    until < warmth.length &&
    until < before + LONGEST_H &&
    value(warmth, until) - startC > GONE_SHARE * riseC
  )
    until += 1
  return { from, until, riseC, isOpen: until >= warmth.length }
}

/** How far the hours of a warming stood from what the room would have been, each measure hour by hour from the lighting. */
export interface WarmedCourse {
  readonly warming: Warming
  readonly effects: { readonly [measure in Measure]: Float64Array }
}

/**
 * A room as it would have been unwarmed: a straight line from the hour before each warming to the hours after it.
 * A warming that is not over is taken off by what such warmth did before.
 * @returns the record without them, which hours that are, and what each warming that is over did
 */
export function unwarmed(
  record: HourlyRecord,
  warmings: readonly Warming[],
): { record: HourlyRecord; isWarmed: Uint8Array; courses: WarmedCourse[] } {
  const isWarmed = new Uint8Array(record.length)
  const calm = { ...record }
  for (const measure of MEASURES) calm[measure] = Float64Array.from(record[measure])
  const courses: WarmedCourse[] = []
  for (const warming of warmings) {
    isWarmed.fill(1, warming.from, warming.until)
    const effects = {} as { [measure in Measure]: Float64Array }
    for (const measure of MEASURES) effects[measure] = lineUnder(record[measure], calm[measure], warming)
    if (!warming.isOpen) courses.push({ warming, effects })
  }
  const last = warmings.at(-1)
  if (last?.isOpen === true) takeOff(record, calm, last, courses)
  return { record: calm, isWarmed, courses }
}

function lineUnder(values: Float64Array, calm: Float64Array, { from, until, isOpen }: Warming): Float64Array {
  const before = value(values, from - 1)
  const after = isOpen ? before : value(values, until)
  const hours = until - from
  const effect = new Float64Array(hours)
  for (let n = 0; n < hours; n += 1) {
    const line = before + ((after - before) * (n + 1)) / (hours + 1)
    effect[n] = value(values, from + n) - line
    calm[from + n] = line
  }
  return effect
}

/** What one kelvin of warmth did to a measure on record; 0 where nothing is known of it. */
function perKelvin(courses: readonly WarmedCourse[], measure: Measure): number {
  let products = 0
  let squares = 0
  for (const { effects } of courses)
    effects.temperatureC.forEach((warmthC, n) => {
      const effect = value(effects[measure], n)
      if (Number.isNaN(warmthC * effect)) return
      products += warmthC * effect
      squares += warmthC * warmthC
    })
  return squares === 0 ? 0 : products / squares
}

function takeOff(
  record: HourlyRecord,
  calm: { [measure in Measure]: Float64Array },
  { from, until }: Warming,
  courses: readonly WarmedCourse[],
): void {
  for (const measure of MEASURES) {
    if (measure === 'temperatureC') continue
    const each = perKelvin(courses, measure)
    for (let n = from; n < until; n += 1) {
      const warmthC = value(record.temperatureC, n) - value(calm.temperatureC, n)
      calm[measure][n] = value(record[measure], n) - each * warmthC
    }
  }
}
