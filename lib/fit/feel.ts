import { assertFinite } from '@/lib/assert'
import { formatFineLength } from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'
import { GRADE_FIGURES } from './grades'

/** How a lid feels when it is tried, from the tightest on. */
export type Feel = 'binds' | 'tight' | 'snug' | 'easy' | 'loose'

const between = (tighter: 'suction' | 'snug' | 'easy', looser: 'snug' | 'easy' | 'loose'): number =>
  (GRADE_FIGURES[tighter].clearanceMm + GRADE_FIGURES[looser].clearanceMm) / 2

/**
 * Clearance below which a lid feels so, mm: halfway between one grade's clearance and the next one's.
 * Status: derived from `GRADE_FIGURES`, which are a guess.
 */
export const TIGHT_BELOW_MM = between('suction', 'snug')
export const SNUG_BELOW_MM = between('snug', 'easy')
export const EASY_BELOW_MM = between('easy', 'loose')

export const feelWords: Readonly<Record<Feel, string>> = {
  binds: 'may bind',
  tight: 'tight',
  snug: 'snug',
  easy: 'easy',
  loose: 'loose',
}

/**
 * How a lid with that clearance feels.
 * @param clearanceMm least diametral clearance as it is now, mm; below 0 it may bind
 * @throws RangeError for NaN or infinity
 *
 * Status: derived from `GRADE_FIGURES`, which are a guess.
 */
export function feelOf(clearanceMm: number): Feel {
  assertFinite('clearanceMm', clearanceMm)
  if (clearanceMm < 0) return 'binds'
  if (clearanceMm < TIGHT_BELOW_MM) return 'tight'
  if (clearanceMm < SNUG_BELOW_MM) return 'snug'
  return clearanceMm < EASY_BELOW_MM ? 'easy' : 'loose'
}

/**
 * How a lid feels that was cut with that clearance.
 * @param clearanceMm least diametral clearance as it is now, mm
 * @param cutMm clearance as it was cut, mm; below 0 it snaps: then it is tight until it has lost what a snap may lose
 * @throws RangeError for NaN or infinity
 */
export function feelOfCut(clearanceMm: number, cutMm: number): Feel {
  assertFinite('cutMm', cutMm)
  const felt = feelOf(clearanceMm)
  const snapMm = GRADE_FIGURES.snap.allowanceMm ?? 0
  return felt === 'binds' && cutMm < 0 && clearanceMm >= cutMm - snapMm ? 'tight' : felt
}

/** Less than this is nothing that a maker could measure, mm: half of the 0.05 mm that a lid is known to. */
const NOTHING_MM = 0.025

/** "about 0.15 mm to spare", "about 0.05 mm too tight", "nothing to spare". */
export function spareWords(clearanceMm: number, units: UnitSystem = 'metric'): string {
  assertFinite('clearanceMm', clearanceMm)
  if (Math.abs(clearanceMm) < NOTHING_MM) return 'nothing to spare'
  const size = formatFineLength(Math.abs(clearanceMm), units)
  return clearanceMm > 0 ? `about ${size} to spare` : `about ${size} too tight`
}

/**
 * A lid as the trade tells it: tried with the grain lined up and at each quarter turn on, then in mm.
 * @param linedUpMm clearance with the grain lined up, mm; half a turn is the same
 * @param quarterMm clearance a quarter turn on, mm
 * @param units the reader's
 * @param cutMm clearance as it was cut, mm; counts only below 0, for a lid that snaps
 * @returns "easy, tight, easy, tight: about 0.25 mm to spare with the grain lined up, about 0.05 mm to spare a quarter
 *   turn on"
 * @throws RangeError for NaN or infinity
 */
export function quarterTurnWords(
  linedUpMm: number,
  quarterMm: number,
  units: UnitSystem = 'metric',
  cutMm = 0,
): string {
  const one = feelWords[feelOfCut(linedUpMm, cutMm)]
  const other = feelWords[feelOfCut(quarterMm, cutMm)]
  const felt = [one, other, one, other].join(', ')
  const linedUp = spareWords(linedUpMm, units)
  const quarter = spareWords(quarterMm, units)
  if (linedUp === quarter) return `${felt}: ${linedUp} all the way round`
  return `${felt}: ${linedUp} with the grain lined up, ${quarter} a quarter turn on`
}
