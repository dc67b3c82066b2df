import { formatPoints } from '@/lib/format/figures'
import { noTellingDifferencePct } from '@/lib/notices/policy'
import type { FitGrade } from '@/lib/pieces/piece'
import { GRADE_FIGURES } from './grades'
import { quarterTurnLossMmPerPct } from './lid-fit'
import type { InPlaneMovement } from './ovality'

/** Beyond this no air takes wood, % MC either way: from oven-dry to fibre saturation. */
const NO_AIR_PCT = 30

export const GRADES: readonly FitGrade[] = ['suction', 'snap', 'snug', 'easy', 'loose', 'threaded']

/** How far a joint's moisture content may go either way before its grade is gone, and before it binds. */
export type GradeCourse = {
  readonly grade: FitGrade
  readonly clearanceMm: number
  readonly allowanceMm?: number
  /** % MC either way at a quarter turn; absent where the wood makes no oval or no figure is given for the grade. */
  readonly goneAtPct?: number
  /** % MC either way at a quarter turn; absent likewise, and for a snap lid, which is tight from the start. */
  readonly bindsAtPct?: number
  /** The grade goes within less than any sensor could call. */
  readonly isBeyondSensors: boolean
  readonly words: string
}

/**
 * What change of moisture content each grade of fit stands, tried at any angle.
 * @param diameterMm joint diameter, mm, above 0 to 1000
 * @param movement in the plane of the joint, fractions per % MC, 0 to 0.01
 * @param grade the fit, judged by hand
 * @param clearanceMm as measured, mm; the grade's own figure where it wasn't
 * @returns both moments as a change either way: swelling and drying take the same, to first order
 * @throws RangeError for an input out of range or NaN
 *
 * The sigh of a suction lid goes long before the lid binds: each has its own moment.
 * Source: derived (`quarterTurnLossMmPerPct`) from `GRADE_FIGURES`, status guess, spread ± half.
 */
export function gradeCourse(
  diameterMm: number,
  movement: InPlaneMovement,
  grade: FitGrade,
  clearanceMm: number = GRADE_FIGURES[grade].clearanceMm,
): GradeCourse {
  const lossMmPerPct = quarterTurnLossMmPerPct(diameterMm, movement)
  const { allowanceMm } = GRADE_FIGURES[grade]
  const figures = { grade, clearanceMm, ...(allowanceMm === undefined ? {} : { allowanceMm }) }
  if (grade === 'threaded' || allowanceMm === undefined) {
    return {
      ...figures,
      isBeyondSensors: false,
      words: "Threads aren't worked out: try it, and log how it went.",
    }
  }
  if (lossMmPerPct * NO_AIR_PCT < allowanceMm) {
    return { ...figures, isBeyondSensors: false, words: 'No air takes so much from this joint.' }
  }
  const goneAtPct = allowanceMm / lossMmPerPct
  const bindsAtPct = clearanceMm > 0 ? Math.max(goneAtPct, clearanceMm / lossMmPerPct) : undefined
  return {
    ...figures,
    goneAtPct,
    ...(bindsAtPct === undefined ? {} : { bindsAtPct }),
    isBeyondSensors: goneAtPct < noTellingDifferencePct,
    words: courseWords(grade, goneAtPct, bindsAtPct),
  }
}

/** Grade by grade: the whole table for one joint. */
export const gradeCourses = (diameterMm: number, movement: InPlaneMovement): readonly GradeCourse[] =>
  GRADES.map((grade) => gradeCourse(diameterMm, movement, grade))

const whatGoes: Readonly<Record<FitGrade, string>> = {
  suction: 'Its sigh goes',
  snap: 'Its snap goes',
  snug: 'It stops being snug',
  easy: 'It stops being easy',
  loose: 'It stops being loose',
  threaded: '',
}

function courseWords(grade: FitGrade, goneAtPct: number, bindsAtPct: number | undefined): string {
  const gone = `${whatGoes[grade]} at a quarter turn about ${formatPoints(goneAtPct)} of % MC from where it was cut`
  const binds = bindsAtPct === undefined ? '' : `; it may bind at about ${formatPoints(bindsAtPct)}`
  const unseen = goneAtPct < noTellingDifferencePct ? ' No sensor can call so little.' : ''
  return `${gone}${binds}.${unseen}`
}
