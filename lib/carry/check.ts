import { mcDoubtPct } from '@/lib/follow/doubt'
import type { CarryCheckInput, FullCheck, PieceCheck, PieceFacts, VerdictCheck } from './carry-check'
import { jointOfPiece, type ResolvedJoint } from './joint-defaults'
import { edgeOf, type Reckoned, reckoned, TOLD_WITHIN_HOURS } from './reckon'
import type { StayRun } from './stay-run'
import { type UsedSpread, valueAt } from './used-doubt'
import { verdictOf } from './verdict'
import { blankAirWords, PIECE_WORDS, reasonWords, secondWords, UNKNOWN_WORDS, VERDICT_WORDS } from './words'

const HOUR_MS = 3_600_000
const CURVE_POINTS = 25

type WordsCheck = Extract<PieceCheck, { kind: 'words' }>
type UnknownCheck = Extract<PieceCheck, { kind: 'unknown' }>

/** Why a piece is told of in words alone; undefined for one that can be judged. */
export function wordsReason(piece: PieceFacts): WordsCheck['reason'] | undefined {
  if (piece.stage !== 'box') return 'blank'
  if (piece.woodKind === 'wild') return 'wild-grain'
  if (piece.woodKind === 'stabilised' || piece.woodKind === 'hybrid') return 'stabilised'
  if (piece.fitGrade === 'threaded') return 'threaded'
  return piece.jointDiameterMm === null ? 'no-joint' : undefined
}

function wordsCheck(reason: WordsCheck['reason'], there: CarryCheckInput['there']): WordsCheck {
  const { words, second } = PIECE_WORDS[reason]
  const isKnown = there.kind === 'fresh' || there.kind === 'told'
  return {
    kind: 'words',
    reason,
    words,
    second: reason === 'blank' && isKnown ? blankAirWords(there.emcPct) : second,
  }
}

const instant = (at: number): string => new Date(at).toISOString()
const unknown = (reason: UnknownCheck['reason'], sinceAt: number | null): UnknownCheck => ({
  kind: 'unknown',
  reason,
  words: UNKNOWN_WORDS[reason],
  since: sinceAt === null ? null : instant(sinceAt),
})

/**
 * Whether a piece may go to another air, how long its fit keeps there, and why.
 * @param input the piece, its wood when it goes, the air there and to come, the planned stay in minutes and the cover
 * @returns a verdict with its times; or words for a piece that can't be judged; or why there is no verdict (no fresh
 *   reading there, nothing known of the air before)
 * @throws RangeError for an input that is NaN or out of range. Inputs come from checked rows, so it is a bug.
 *
 * Counts from the moisture content at which the joint was cut, either way: a lid fitted in damp air goes loose indoors
 * just as surely. Ring and lid are followed apart. The same for a piece that is out: judged from the moment it went.
 * Times told are the early edge: by then 1 in 10 would have used up its allowance.
 * Source: derived from Wood Handbook (FPL-GTR-190, 2010), Eq. 13-2 and Crank, The Mathematics of Diffusion (1975); the
 * doubt by `usedSpread`.
 */
export function carryCheck(input: CarryCheckInput): FullCheck {
  const one = prepared(input)
  return isReckoned(one) ? verdictCheck(one) : one
}

/** A carry run through, or what is said where there is nothing to run. */
export function prepared(input: CarryCheckInput): Exclude<PieceCheck, { kind: 'verdict' }> | Reckoned {
  const reason = wordsReason(input.piece)
  if (reason !== undefined) return wordsCheck(reason, input.there)
  const joint = jointOfPiece(input.piece)
  if (joint === undefined) return wordsCheck('no-joint', input.there)
  if (input.there.kind === 'never') return unknown('never-read', null)
  if (input.there.kind === 'stale') return unknown('no-reading', input.there.at)
  if (input.start === null) return unknown('no-history', null)
  return reckoned(input, joint, input.start, input.there)
}

export const isReckoned = (one: FullCheck | Reckoned): one is Reckoned => 'run' in one

/** What is said of a carry that has been run through. */
export function verdictCheck(one: Reckoned): VerdictCheck {
  const { input, joint, start, there, run, usedAfter, middleHours, spread, cut } = one
  const { startsAt } = input
  const { allowanceMm, clearanceMm } = joint.allowance
  const stayHours = input.stayMinutes / 60
  const ringAt = (hours: number): number => valueAt(run.middle.ring, run.hours, hours)
  const nowHours = Math.max(0, (input.now - startsAt) / HOUR_MS)

  const { usedAtStart, earlyHours: early } = edgeOf(one)
  const usedAtEnd = usedAfter(stayHours)
  const isPast = usedAtStart >= 1
  const middle = middleHours(1)
  const late = middle === undefined ? undefined : spread.late(1)
  const toldAt = (hours: number | undefined): string | null =>
    hours === undefined ? null : instant(startsAt + Math.round(hours * HOUR_MS))

  const verdict = verdictOf(
    usedAtStart,
    early === undefined ? undefined : early * HOUR_MS,
    stayHours * HOUR_MS,
  )
  const changePct = ringAt(stayHours) - start.ringPct
  const usedLossMm = (isPast ? usedAtStart : usedAtEnd) * allowanceMm
  const allRoundMm = allRound(joint, run, cut, stayHours)
  const binds =
    clearanceMm !== undefined && clearanceMm > allowanceMm
      ? spread.early(clearanceMm / allowanceMm)
      : undefined
  return {
    kind: 'verdict',
    verdict,
    words: VERDICT_WORDS[verdict],
    reason: reasonWords({
      thereEmcPct: there.emcPct,
      cutMcPct: cut.ring,
      changePct,
      stayMinutes: input.stayMinutes,
      lossMm: usedLossMm,
      allowanceMm,
      isPast,
      allRoundMm,
    }),
    second: secondWords({
      isPast,
      fitGrade: input.piece.fitGrade,
      allowedMcPct: joint.allowedMcPct,
      mayBindAfterMinutes: binds === undefined ? undefined : binds * 60,
      isWithinDoubt: middle === undefined && early !== undefined,
      allRoundMm,
    }),
    earlyAt: toldAt(early),
    middleAt: toldAt(middle),
    lateAt: toldAt(late === undefined || middle === undefined ? undefined : Math.max(late, middle)),
    ringMcPct: ringAt(nowHours),
    lidMcPct: valueAt(run.middle.lid, run.hours, nowHours),
    mcDoubtPct: mcDoubtPct(start),
    cutMcPct: cut.ring,
    thereEmcPct: there.emcPct,
    changePct,
    allowedMcPct: joint.allowedMcPct,
    lossMm: usedLossMm,
    allowanceMm,
    usedAtStart,
    usedAtEnd,
    curve: curveOf(usedAfter, spread, startsAt, curveHours(stayHours, nowHours, late)),
    assumed: [...joint.assumed],
  }
}

/** What the joint loses all round by the end of a stay, because its parts are not in step, mm. */
function allRound(
  { loss }: ResolvedJoint,
  run: StayRun,
  cut: { ring: number; lid: number },
  hours: number,
): number {
  const ring = valueAt(run.middle.ring, run.hours, hours) - cut.ring
  const lid = valueAt(run.middle.lid, run.hours, hours) - cut.lid
  return loss.swellMmPerPct * (loss.isRingInside ? ring - lid : lid - ring)
}

/** Past the stay, far enough to see the late edge if that is near, and past the present for a piece that is out. */
function curveHours(stayHours: number, goneHours: number, lateHours: number | undefined): number {
  const pastStay = Math.max(1.25 * stayHours, 0.5)
  return Math.min(
    TOLD_WITHIN_HOURS,
    Math.max(pastStay, 1.1 * goneHours, Math.min(lateHours ?? 0, 3 * stayHours)),
  )
}

function curveOf(
  usedAfter: (hours: number) => number,
  spread: UsedSpread,
  startsAt: number,
  spanHours: number,
): VerdictCheck['curve'] {
  const elapsed = Array.from({ length: CURVE_POINTS }, (_, n) => (spanHours * n) / (CURVE_POINTS - 1))
  const bands = elapsed.map((hours) => spread.at(hours))
  return {
    at: elapsed.map((hours) => instant(startsAt + Math.round(hours * HOUR_MS))),
    usedEarly: bands.map((band) => band.high),
    used: elapsed.map(usedAfter),
    usedLate: bands.map((band) => band.low),
  }
}
