import type { Cover } from '@/lib/pieces/piece'
import type { CarryCheckInput, PieceCheck, PieceFacts, Verdict } from './carry-check'
import { courseOfCarry } from './carry-course'
import { jointOfPiece, type ResolvedJoint } from './joint-defaults'
import type { MoistureAt, StepOfAir } from './moisture-course'
import { EARLY_OF_MIDDLE, firstReachedMs, LATE_OF_MIDDLE, USED_EARLY_OVER_MIDDLE } from './time-out'
import { verdictOf } from './verdict'
import { blankAirWords, PIECE_WORDS, reasonWords, secondWords, UNKNOWN_WORDS, VERDICT_WORDS } from './words'

const MINUTE_MS = 60_000
/** Times further off than this are not told: 30 days. */
const TOLD_WITHIN_MS = 30 * 24 * 60 * MINUTE_MS
/** The middle is looked for this far, so that its early edge is found wherever that may be told. */
const HORIZON_MS = TOLD_WITHIN_MS / EARLY_OF_MIDDLE
const CURVE_POINTS = 33

type WordsCheck = Extract<PieceCheck, { kind: 'words' }>
type VerdictCheck = Extract<PieceCheck, { kind: 'verdict' }>

function wordsReason(piece: PieceFacts): WordsCheck['reason'] | undefined {
  if (piece.stage !== 'box') return 'blank'
  if (piece.woodKind === 'wild') return 'wild-grain'
  if (piece.woodKind === 'stabilised' || piece.woodKind === 'hybrid') return 'stabilised'
  if (piece.fitGrade === 'threaded') return 'threaded'
  return piece.jointDiameterMm === null ? 'no-joint' : undefined
}

function wordsCheck(reason: WordsCheck['reason'], there: CarryCheckInput['there']): WordsCheck {
  const { words, second } = PIECE_WORDS[reason]
  const isToldAir = reason === 'blank' && there.kind === 'fresh'
  return { kind: 'words', reason, words, second: isToldAir ? blankAirWords(there.emcPct) : second }
}

const instant = (at: number): string => new Date(at).toISOString()
const unknown = (reason: keyof typeof UNKNOWN_WORDS, sinceAt: number | null): PieceCheck => ({
  kind: 'unknown',
  reason,
  words: UNKNOWN_WORDS[reason],
  since: sinceAt === null ? null : instant(sinceAt),
})

/**
 * Whether a piece may go to another air, how long its fit keeps there, and why.
 * @param input the piece, the air it was in hour by hour (epoch ms, % MC, °C), the air there and to come, the planned
 *   stay in minutes and the cover
 * @returns a verdict with its times; or words for a piece that can't be judged; or why there is no verdict (no fresh
 *   reading there, nothing known of the air before)
 * @throws RangeError for an input that is NaN or out of range. Inputs come from checked rows, so it is a bug.
 *
 * Counts from the moisture content at which the joint was cut, either way: a lid fitted in damp air goes loose indoors
 * just as surely. The same for a piece that is out: judged from the moment it went.
 * Times told are the early edge, `EARLY_OF_MIDDLE` of the middle. Where the middle never uses up the allowance but 1 in
 * 10 would, that moment is the early edge. The ring alone is followed; a lid that lags it is not.
 * Source: derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2 and Crank, The Mathematics of Diffusion (1975).
 */
export function carryCheck(input: CarryCheckInput): PieceCheck {
  const reason = wordsReason(input.piece)
  if (reason !== undefined) return wordsCheck(reason, input.there)
  const joint = jointOfPiece(input.piece)
  if (joint === undefined) return wordsCheck('no-joint', input.there)
  if (input.there.kind === 'never') return unknown('never-read', null)
  if (input.there.kind === 'stale') return unknown('no-reading', input.there.at)
  const course = courseOfCarry(input, joint, input.there)
  if (course === undefined) return unknown('no-history', null)
  return judged(input, joint, input.there.emcPct, course)
}

/** Allowance used against time since the start, and the most that it could come to in the airs still to be met. */
function allowanceUsed(
  { startsAt }: CarryCheckInput,
  joint: ResolvedJoint,
  cutMcPct: number,
  course: { moistureAt: (at: number) => MoistureAt; steps: readonly StepOfAir[] },
) {
  const usedPerPct = joint.lossMmPerPct / joint.allowance.allowanceMm
  const used = (mcPct: number): number => usedPerPct * Math.abs(mcPct - cutMcPct)
  const usedAfter = (elapsedMs: number): number => used(course.moistureAt(startsAt + elapsedMs).mcPct)
  // Moisture is a weighted mean of where it starts and the airs it meets, so it can't pass the furthest of them.
  const mostUsed = course.steps.reduce((most, step) => Math.max(most, used(step.emcPct)), usedAfter(0))
  const reachedMs = (level: number, withinMs: number): number | undefined =>
    mostUsed < level ? undefined : firstReachedMs(usedAfter, level, withinMs)
  return { usedAfter, reachedMs }
}

function judged(
  input: CarryCheckInput,
  joint: ResolvedJoint,
  thereEmcPct: number,
  course: { moistureAt: (at: number) => MoistureAt; steps: readonly StepOfAir[] },
): VerdictCheck {
  const { startsAt } = input
  const stayMs = input.stayMinutes * MINUTE_MS
  const startMcPct = course.moistureAt(startsAt).mcPct
  const endMcPct = course.moistureAt(startsAt + stayMs).mcPct
  const cutMcPct = input.cutMcPct ?? startMcPct
  const { usedAfter, reachedMs } = allowanceUsed(input, joint, cutMcPct, course)
  const usedAtStart = usedAfter(0)
  const usedAtEnd = usedAfter(stayMs)

  const middleMs = reachedMs(1, HORIZON_MS)
  const earlyMs =
    middleMs === undefined
      ? reachedMs(1 / USED_EARLY_OVER_MIDDLE, TOLD_WITHIN_MS)
      : EARLY_OF_MIDDLE * middleMs
  const lateMs = middleMs === undefined ? undefined : LATE_OF_MIDDLE * middleMs
  const toldAt = (elapsedMs: number | undefined): string | null =>
    elapsedMs === undefined || elapsedMs > TOLD_WITHIN_MS ? null : instant(startsAt + elapsedMs)

  const verdict = verdictOf(usedAtStart, earlyMs, stayMs)
  const { allowanceMm, clearanceMm } = joint.allowance
  const isPast = usedAtStart >= 1
  const lossMm = (isPast ? usedAtStart : usedAtEnd) * allowanceMm
  const changePct = endMcPct - startMcPct
  const bindsMs =
    clearanceMm !== undefined && clearanceMm > allowanceMm
      ? reachedMs(clearanceMm / allowanceMm, HORIZON_MS)
      : undefined
  return {
    kind: 'verdict',
    verdict,
    words: VERDICT_WORDS[verdict],
    reason: reasonWords({
      thereEmcPct,
      cutMcPct,
      changePct,
      stayMinutes: input.stayMinutes,
      lossMm,
      allowanceMm,
      isPast,
    }),
    second: secondWords({
      isPast,
      fitGrade: input.piece.fitGrade,
      allowedMcPct: joint.allowedMcPct,
      mayBindAfterMinutes: bindsMs === undefined ? undefined : (EARLY_OF_MIDDLE * bindsMs) / MINUTE_MS,
      isWithinDoubt: middleMs === undefined && earlyMs !== undefined,
    }),
    earlyAt: toldAt(earlyMs),
    middleAt: toldAt(middleMs),
    lateAt: toldAt(lateMs),
    ringMcPct: course.moistureAt(Math.max(startsAt, input.now)).mcPct,
    cutMcPct,
    thereEmcPct,
    changePct,
    allowedMcPct: joint.allowedMcPct,
    lossMm,
    allowanceMm,
    usedAtStart,
    usedAtEnd,
    curve: curveOf(usedAfter, startsAt, curveSpanMs(input, stayMs, lateMs)),
    assumed: [...joint.assumed],
  }
}

/** Past the stay, far enough to see the late edge if that is near, and past the present for a piece that is out. */
function curveSpanMs(input: CarryCheckInput, stayMs: number, lateMs: number | undefined): number {
  const pastStayMs = Math.max(1.25 * stayMs, 30 * MINUTE_MS)
  const goneMs = Math.max(0, input.now - input.startsAt)
  return Math.max(pastStayMs, 1.1 * goneMs, Math.min(lateMs ?? 0, 3 * stayMs))
}

/** The doubt widens time: what the middle has used after so long, the early edge has used after 0.45 of it. */
function curveOf(
  usedAfter: (elapsedMs: number) => number,
  startsAt: number,
  spanMs: number,
): VerdictCheck['curve'] {
  const elapsed = Array.from({ length: CURVE_POINTS }, (_, n) => (spanMs * n) / (CURVE_POINTS - 1))
  return {
    at: elapsed.map((ms) => instant(startsAt + ms)),
    usedEarly: elapsed.map((ms) => usedAfter(ms / EARLY_OF_MIDDLE)),
    used: elapsed.map(usedAfter),
    usedLate: elapsed.map((ms) => usedAfter(ms / LATE_OF_MIDDLE)),
  }
}

const RANK: Readonly<Record<Verdict, number>> = { fine: 0, 'keep-short': 1, leave: 2 }

/**
 * The same carry in the cover that closes it best.
 * @returns undefined where there is no verdict to better, or closing it betters nothing
 */
export function carryCheckClosed(
  input: CarryCheckInput,
  check: PieceCheck,
): { cover: Cover; verdict: Verdict; earlyAt: string | null } | undefined {
  if (check.kind !== 'verdict' || check.verdict === 'fine') return undefined
  const closed = carryCheck({ ...input, cover: 'bagged' })
  if (closed.kind !== 'verdict' || RANK[closed.verdict] >= RANK[check.verdict]) return undefined
  return { cover: 'bagged', verdict: closed.verdict, earlyAt: closed.earlyAt }
}
