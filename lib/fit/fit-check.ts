import { assertInRange } from '@/lib/assert'
import type { FitGrade, WoodKind } from '@/lib/pieces/piece'
import { fitStretches, type FitStretch } from './fit-stretches'
import { GRADE_FIGURES } from './grades'
import { quarterTurnLossMmPerPct } from './lid-fit'
import type { InPlaneMovement } from './ovality'

/** A year of the air that a piece is to live in, as wood follows it, % MC. */
export type TargetYear = {
  /** The home it is for; else the room it is kept in. */
  readonly basis: 'home' | 'keep-room'
  readonly middleMcPct: number
  readonly lowMcPct: number
  readonly highMcPct: number
  /** How many months of it are known, 1 to 12. */
  readonly months: number
}

export type FitCheckInput = {
  /** Of the wood at the joint, now, % MC, with its ± for 8 in 10. */
  readonly mcPct: number
  readonly mcDoubtPct: number
  readonly target: TargetYear
  readonly diameterMm: number
  /** In the plane of the joint (`jointMovement`), fractions per % MC, and its ± as a fraction. */
  readonly movement: InPlaneMovement
  readonly movementDoubt: number
  /** The fit that is wanted. */
  readonly grade: FitGrade
  readonly woodKind: WoodKind
}

export type FitVerdict = 'cut' | 'cut-easy' | 'rest'

export type FitCheck =
  | { readonly kind: 'words'; readonly reason: 'wild-grain' | 'stabilised' | 'threaded' }
  | {
      readonly kind: 'verdict'
      readonly verdict: FitVerdict
      /** Why: what the year takes is allowed; it is still too far from it; too little is known; the year is too wide. */
      readonly reason: 'within' | 'far' | 'doubt' | 'year'
      /** To leave more than the grade's own clearance, mm, in steps of 0.05; 0 where none is called for. */
      readonly extraMm: number
      /** What the year takes at a quarter turn, cut now, mm: the middle, and what 1 in 10 would exceed. */
      readonly lossMm: number
      readonly lossHighMm: number
      /** What the grade may lose, mm. */
      readonly allowanceMm: number
      /** From its home's (or keep room's) middle; above 0 it is damper, points of % MC. */
      readonly fromMiddlePct: number
      /** From dry to damp, without gaps. */
      readonly stretches: readonly FitStretch[]
      /** Where to let it go before it is cut: as wanted, else with more left; absent where no such place is. */
      readonly cutBetween?: FitStretch
      /** Grades that the year leaves alone, cut now. */
      readonly gradesThatHold: readonly FitGrade[]
    }

/** Wood known no better than this isn't judged, ± % MC. Status: derived: it takes as much as a snug lid may lose. */
export const WIDEST_DOUBT_PCT = 1

/** A joint is cut no finer than this, mm. Common practice, no source. */
export const STEP_MM = 0.05

/** Most that may be left beyond the next looser grade's own clearance: none; and at all, mm. Status: guess. */
export const MOST_EXTRA_MM = 0.2

const LOOSER: Readonly<Partial<Record<FitGrade, FitGrade>>> = {
  suction: 'snug',
  snap: 'snug',
  snug: 'easy',
  easy: 'loose',
}

/** Most that can be left more before the lid is another, looser one still, mm. Status: derived from `GRADE_FIGURES`. */
export function mostExtraMm(grade: FitGrade): number {
  const looser = LOOSER[grade]
  if (looser === undefined) return MOST_EXTRA_MM
  const stepMm = GRADE_FIGURES[looser].clearanceMm - GRADE_FIGURES[grade].clearanceMm
  return Math.min(MOST_EXTRA_MM, Math.round(stepMm / STEP_MM) * STEP_MM)
}

function assertInput({ mcPct, mcDoubtPct, target, movementDoubt }: FitCheckInput): void {
  assertInRange('mcPct', mcPct, 0, 30)
  assertInRange('mcDoubtPct', mcDoubtPct, 0, 30)
  assertInRange('movementDoubt', movementDoubt, 0, 1)
  assertInRange('lowMcPct', target.lowMcPct, 0, 30)
  assertInRange('highMcPct', target.highMcPct, target.lowMcPct, 30)
  assertInRange('middleMcPct', target.middleMcPct, target.lowMcPct, target.highMcPct)
  assertInRange('months', target.months, 1, 12)
}

function wordsOnly(input: FitCheckInput): FitCheck | undefined {
  if (input.woodKind === 'wild') return { kind: 'words', reason: 'wild-grain' }
  if (input.woodKind === 'stabilised') return { kind: 'words', reason: 'stabilised' }
  return input.grade === 'threaded' ? { kind: 'words', reason: 'threaded' } : undefined
}

/** Above a step by no more than rounding is still that step. */
const upToStep = (lengthMm: number): number => Math.ceil(lengthMm / STEP_MM - 1e-9) * STEP_MM

/**
 * May the final fit be cut now?
 * @param input moisture content now, the year it will live through, the joint and the fit wanted; % MC and mm
 * @returns cut it, cut it easy (and how much more to leave) or let it rest; or only words where that can't be worked out
 * @throws RangeError for an input out of range or NaN, naming it
 *
 * A joint cut at m later goes from the low to the high of the year. What it loses at a quarter turn is the joint's loss
 * for each % MC times the larger of |high - m| and |low - m|: swelling and drying take the same. Cut it while the grade
 * allows that. What goes beyond can be left more, millimetre for millimetre, up to the clearance of the next looser grade
 * and 0.2 mm at most: cut it easy. Beyond, or where its moisture content is known to no better than 1 point: let it rest.
 * Verdicts are the middle's; `lossHighMm` is what 1 in 10 would exceed, from the doubt of the moisture content and of the
 * wood's movement, as a root of the sum of squares. Status: derived; the grades' figures are a guess.
 */
export function fitCheck(input: FitCheckInput): FitCheck {
  assertInput(input)
  const lossMmPerPct = quarterTurnLossMmPerPct(input.diameterMm, input.movement)
  const words = wordsOnly(input)
  if (words) return words
  const { mcPct, mcDoubtPct, target, grade } = input
  const allowanceMm = GRADE_FIGURES[grade].allowanceMm ?? 0
  const extraMaxMm = mostExtraMm(grade)
  const furthestPct = Math.max(Math.abs(target.highMcPct - mcPct), Math.abs(target.lowMcPct - mcPct))
  const lossMm = lossMmPerPct * furthestPct
  const stretches = fitStretches(target, lossMmPerPct, grade, extraMaxMm)
  const cutBetween =
    stretches.find((stretch) => stretch.kind === 'cut') ??
    stretches.find((stretch) => stretch.kind === 'cut-easy')
  const missingMm = Math.max(0, lossMm - allowanceMm)
  const isDoubted = mcDoubtPct > WIDEST_DOUBT_PCT
  const isOut = missingMm > extraMaxMm + 1e-9
  const verdict: FitVerdict = isDoubted || isOut ? 'rest' : missingMm > 1e-9 ? 'cut-easy' : 'cut'
  const reason = isDoubted ? 'doubt' : !isOut ? 'within' : cutBetween === undefined ? 'year' : 'far'
  return {
    kind: 'verdict',
    verdict,
    reason,
    extraMm: verdict === 'cut-easy' ? upToStep(missingMm) : 0,
    lossMm,
    lossHighMm: lossMm + Math.hypot(lossMmPerPct * mcDoubtPct, lossMm * input.movementDoubt),
    allowanceMm,
    fromMiddlePct: mcPct - target.middleMcPct,
    stretches,
    ...(cutBetween === undefined ? {} : { cutBetween: wholeOf(stretches, cutBetween) }),
    gradesThatHold: (['suction', 'snap', 'snug', 'easy', 'loose'] as const).filter(
      (held) => lossMm <= (GRADE_FIGURES[held].allowanceMm ?? 0) + 1e-9,
    ),
  }
}

/** A stretch lies on both sides of a better one: from the driest to the dampest of it. */
function wholeOf(stretches: readonly FitStretch[], { kind }: FitStretch): FitStretch {
  const alike = stretches.filter((stretch) => stretch.kind === kind)
  return {
    kind,
    fromMcPct: Math.min(...alike.map((stretch) => stretch.fromMcPct)),
    toMcPct: Math.max(...alike.map((stretch) => stretch.toMcPct)),
  }
}
