import { assertFinite, assertInRange } from '@/lib/assert'
import { mcDoubtPct, startDoubtPct } from '@/lib/follow/doubt'
import type { Cover } from '@/lib/pieces/piece'
import type { CarryCheckInput, PieceCheck, PieceFacts, Verdict } from './carry-check'
import { jointOfPiece, type ResolvedJoint } from './joint-defaults'
import { lossMm } from './joint-loss'
import { spreadsOfJoint } from './joint-spread'
import { stayRun, type StayRun } from './stay-run'
import { firstReachedHours, usedInTheMiddle, type UsedSpread, usedSpread, valueAt } from './used-doubt'
import { verdictOf } from './verdict'
import { blankAirWords, PIECE_WORDS, reasonWords, secondWords, UNKNOWN_WORDS, VERDICT_WORDS } from './words'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
/** Times further off than this are not told: 30 days, and the half hour that "fine" asks for after the longest stay. */
const TOLD_WITHIN_HOURS = 30 * 24 + 1
const CURVE_POINTS = 25

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
export function carryCheck(input: CarryCheckInput): PieceCheck {
  const reason = wordsReason(input.piece)
  if (reason !== undefined) return wordsCheck(reason, input.there)
  const joint = jointOfPiece(input.piece)
  if (joint === undefined) return wordsCheck('no-joint', input.there)
  if (input.there.kind === 'never') return unknown('never-read', null)
  if (input.there.kind === 'stale') return unknown('no-reading', input.there.at)
  if (input.start === null) return unknown('no-history', null)
  assertFinite('start.ringPct', input.start.ringPct)
  assertFinite('there.temperatureC', input.there.temperatureC)
  assertInRange('there.emcPct', input.there.emcPct, 0, 30)
  assertInRange('stayMinutes', input.stayMinutes, 0, 60 * TOLD_WITHIN_HOURS)
  assertFinite('startsAt', input.startsAt)
  assertFinite('now', input.now)
  return judged(input, joint, input.start, input.there)
}

type Start = NonNullable<CarryCheckInput['start']>
type FreshAir = Extract<CarryCheckInput['there'], { kind: 'fresh' }>

interface Reckoned {
  run: StayRun
  /** Allowance used in the middle after some hours. */
  usedAfter: (hours: number) => number
  /** Hours until the middle has used so much of it. */
  middleHours: (level: number) => number | undefined
  spread: UsedSpread
  cut: { ring: number; lid: number }
  atStartMm: number
}

function reckoned(input: CarryCheckInput, joint: ResolvedJoint, start: Start, there: FreshAir): Reckoned {
  const airs =
    input.airs.length > 0 ? input.airs : [{ ...there, at: input.startsAt, cover: input.cover, isKnown: true }]
  const run = stayRun(joint.filter, start, airs, input.startsAt, TOLD_WITHIN_HOURS, input.pace)
  const cut =
    input.cut === null
      ? { ring: start.ringPct, lid: start.lidPct }
      : { ring: input.cut.ringMcPct, lid: input.cut.lidMcPct }
  const spreads = spreadsOfJoint(joint, {
    // A joint that counts from what it is now has lost nothing yet, whatever that is.
    cutPct: input.cut?.doubtPct ?? 0,
    startPct: input.cut === null ? 0 : startDoubtPct(start),
    airPct: input.airDoubtPct,
  })
  const question = { run, loss: joint.loss, allowanceMm: joint.allowance.allowanceMm, cut, spreads }
  const used = usedInTheMiddle(question)
  return {
    run,
    usedAfter: (hours) => valueAt(used, run.hours, hours),
    middleHours: (level) => firstReachedHours(used, run.hours, level),
    spread: usedSpread(question),
    cut,
    atStartMm: lossMm(joint.loss, start.ringPct - cut.ring, start.lidPct - cut.lid),
  }
}

function judged(input: CarryCheckInput, joint: ResolvedJoint, start: Start, there: FreshAir): VerdictCheck {
  const { startsAt } = input
  const { allowanceMm, clearanceMm } = joint.allowance
  const stayHours = input.stayMinutes / 60
  const { run, usedAfter, middleHours, spread, cut, atStartMm } = reckoned(input, joint, start, there)
  const ringAt = (hours: number): number => valueAt(run.middle.ring, run.hours, hours)
  const nowHours = Math.max(0, (input.now - startsAt) / HOUR_MS)

  const usedAtStart = Math.max(0, atStartMm / allowanceMm)
  const usedAtEnd = usedAfter(stayHours)
  const isPast = usedAtStart >= 1
  const middle = middleHours(1)
  const early = isPast ? 0 : earlier(spread.early(1), middle)
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

const earlier = (one: number | undefined, other: number | undefined): number | undefined =>
  one === undefined || other === undefined ? (one ?? other) : Math.min(one, other)

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
  // What was recorded stays as it was; only what is still to come can be covered.
  const fromMs = Math.max(input.now, input.startsAt)
  const airs = input.airs.map((air) => (air.at < fromMs ? air : { ...air, cover: 'bagged' as const }))
  const closed = carryCheck({ ...input, airs, cover: 'bagged' })
  if (closed.kind !== 'verdict' || RANK[closed.verdict] >= RANK[check.verdict]) return undefined
  return { cover: 'bagged', verdict: closed.verdict, earlyAt: closed.earlyAt }
}
