import type { FitGrade } from '@/lib/pieces/piece'

export type GradeFigures = {
  /** Diametral clearance as fitted; below 0 the spigot is larger than its socket. */
  readonly clearanceMm: number
  /** How much of it may go before the grade is gone; absent where no figure is given for a grade. */
  readonly allowanceMm?: number
}

/**
 * What each grade of fit, judged by hand, is taken to mean. Status: guess, from memory, spread ± half; to be learned
 * from how lids turned out.
 */
export const GRADE_FIGURES: Readonly<Record<FitGrade, GradeFigures>> = {
  suction: { clearanceMm: 0.05, allowanceMm: 0.03 },
  snap: { clearanceMm: -0.05, allowanceMm: 0.05 },
  snug: { clearanceMm: 0.1, allowanceMm: 0.08 },
  easy: { clearanceMm: 0.25, allowanceMm: 0.2 },
  loose: { clearanceMm: 0.5, allowanceMm: 0.4 },
  threaded: { clearanceMm: 0.3 },
}

/** Where nobody has said how the lid fits. Status: guess; middle and the spread of 8 in 10. */
export const UNKNOWN_ALLOWANCE_MM = 0.15
export const UNKNOWN_ALLOWANCE_LOW_MM = 0.08
export const UNKNOWN_ALLOWANCE_HIGH_MM = 0.27

/** Half the figure either way. Status: guess. */
export const GRADE_SPREAD = 0.5
/** Doubt of an allowance that the maker gave, fraction. Status: derived with the early edge (±30 %). */
export const TOLD_SPREAD = 0.3

/** Share of a measured clearance that may go. Status: guess, the ratio of snug, easy and loose above. */
export const ALLOWANCE_OF_CLEARANCE = 0.8
/** A suction lid loses its sigh sooner. Status: guess, the ratio of the grade above. */
export const SUCTION_ALLOWANCE_OF_CLEARANCE = 0.6
/** Below this nothing is left to share out, mm: the tightest grade's allowance. Status: guess. */
export const LEAST_ALLOWANCE_MM = 0.03

export type FitAsTold = {
  readonly fitGrade: FitGrade | null
  readonly clearanceMm: number | null
  readonly allowanceMm: number | null
}

export type Allowance = {
  readonly allowanceMm: number
  readonly lowMm: number
  readonly highMm: number
  /** Whole clearance of the joint: gone, the lid binds. Undefined where it isn't known. */
  readonly clearanceMm?: number
  readonly basis: 'told' | 'measured' | 'grade' | 'unknown'
}

/**
 * How much clearance a joint may lose before its fit is no longer what the maker made it.
 * @param fit what the maker told: an allowance, a measured clearance, a grade, or nothing; mm
 * @returns mm, with a spread; the most particular answer counts. Undefined for a threaded lid, which has none.
 *
 * Never the whole clearance. Source: `GRADE_FIGURES`, status guess.
 */
export function allowanceOfFit(fit: FitAsTold): Allowance | undefined {
  if (fit.fitGrade === 'threaded') return undefined
  const grade = fit.fitGrade === null ? undefined : GRADE_FIGURES[fit.fitGrade]
  const clearanceMm = fit.clearanceMm ?? grade?.clearanceMm
  const whole = clearanceMm === undefined ? {} : { clearanceMm }
  if (fit.allowanceMm !== null) {
    return { ...spread(fit.allowanceMm, TOLD_SPREAD), ...whole, basis: 'told' }
  }
  if (fit.clearanceMm !== null && fit.fitGrade !== 'snap') {
    const share = fit.fitGrade === 'suction' ? SUCTION_ALLOWANCE_OF_CLEARANCE : ALLOWANCE_OF_CLEARANCE
    const allowanceMm = Math.max(LEAST_ALLOWANCE_MM, share * fit.clearanceMm)
    return { ...spread(allowanceMm, TOLD_SPREAD), ...whole, basis: 'measured' }
  }
  if (grade?.allowanceMm !== undefined) {
    return { ...spread(grade.allowanceMm, GRADE_SPREAD), ...whole, basis: 'grade' }
  }
  return {
    allowanceMm: UNKNOWN_ALLOWANCE_MM,
    lowMm: UNKNOWN_ALLOWANCE_LOW_MM,
    highMm: UNKNOWN_ALLOWANCE_HIGH_MM,
    basis: 'unknown',
  }
}

function spread(allowanceMm: number, share: number): Pick<Allowance, 'allowanceMm' | 'lowMm' | 'highMm'> {
  return { allowanceMm, lowMm: allowanceMm * (1 - share), highMm: allowanceMm * (1 + share) }
}
