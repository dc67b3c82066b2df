import { assertFinite, assertInRange } from '@/lib/assert'
import { ASSUMED_SPIGOT_FACTOR, ASSUMED_WALL_FACTOR } from '@/lib/doubt/causes'
import { logSpreadNineInTen, together } from '@/lib/doubt/spread'
import { sinceCutDoubtPct, startDoubtPct } from '@/lib/follow/doubt'
import type { AirFrom } from '@/lib/follow/wood-state'
import type { AirThere, CarryCheckInput, PieceFacts } from './carry-check'
import type { ResolvedJoint } from './joint-defaults'
import { lossMm } from './joint-loss'
import { type MoistureDoubt, spreadsOfJoint } from './joint-spread'
import { stayRun, type StayRun } from './stay-run'
import {
  firstReachedHours,
  usedInTheMiddle,
  type UsedQuestion,
  type UsedSpread,
  usedSpread,
  valueAt,
} from './used-doubt'

/** Times further off than this are not told: 30 days, and the half hour that "fine" asks for after the longest stay. */
export const TOLD_WITHIN_HOURS = 30 * 24 + 1

export type Start = NonNullable<CarryCheckInput['start']>
/** Air that a carry can be judged on. */
export type KnownAir = Extract<AirThere, { kind: 'fresh' | 'told' }>

/** A carry whose wood has been run through its stay, in the middle and in doubt. */
export interface Reckoned {
  input: CarryCheckInput
  joint: ResolvedJoint
  start: Start
  there: KnownAir
  run: StayRun
  question: UsedQuestion
  doubt: MoistureDoubt
  /** What of the pace's spread comes from sizes that were not told, as the standard deviation of its logarithm. */
  sizesLogSpread: number
  paceLogSpread: number
  /** Allowance used in the middle after some hours. */
  usedAfter: (hours: number) => number
  /** Hours until the middle has used so much of it. */
  middleHours: (level: number) => number | undefined
  spread: UsedSpread
  cut: { ring: number; lid: number }
  atStartMm: number
}

/** The air of a carry from its start on; where none was given, the air there holds. */
export const airsOfInput = (input: CarryCheckInput, there: KnownAir): readonly AirFrom[] =>
  input.airs.length > 0
    ? input.airs
    : [
        {
          at: input.startsAt,
          emcPct: there.emcPct,
          temperatureC: there.temperatureC,
          cover: input.cover,
          isKnown: true,
        },
      ]

/** How much less sure the pace is for a wall and a spigot that nobody measured. */
export const sizesLogSpread = ({ wallMm, spigotMm }: Pick<PieceFacts, 'wallMm' | 'spigotMm'>): number =>
  together(
    wallMm === null ? logSpreadNineInTen(ASSUMED_WALL_FACTOR) : 0,
    spigotMm === null ? logSpreadNineInTen(ASSUMED_SPIGOT_FACTOR) : 0,
  )

/**
 * Runs a piece's wood through a carry.
 * @param withinHours how far it is looked ahead; less where only the stay itself matters
 * @throws RangeError for an input that is NaN or out of range. Inputs come from checked rows, so it is a bug.
 */
export function reckoned(
  input: CarryCheckInput,
  joint: ResolvedJoint,
  start: Start,
  there: KnownAir,
  withinHours: number = TOLD_WITHIN_HOURS,
): Reckoned {
  assertFinite('start.ringPct', start.ringPct)
  assertFinite('there.temperatureC', there.temperatureC)
  assertInRange('there.emcPct', there.emcPct, 0, 30)
  assertInRange('stayMinutes', input.stayMinutes, 0, 60 * TOLD_WITHIN_HOURS)
  assertFinite('startsAt', input.startsAt)
  assertFinite('now', input.now)
  const sizes = sizesLogSpread(input.piece)
  const pace = { factor: input.pace.factor, logSpread: together(input.pace.logSpread, sizes) }
  const airs = airsOfInput(input, there)
  const run = stayRun(joint.filter, start, airs, input.startsAt, withinHours, pace)
  const cut =
    input.cut === null
      ? { ring: start.ringPct, lid: start.lidPct }
      : { ring: input.cut.ringMcPct, lid: input.cut.lidMcPct }
  const doubt = {
    // A joint that counts from what it is now has lost nothing yet, whatever that is.
    cutPct: sinceCutDoubtPct(input.cut?.doubtPct ?? 0),
    startPct: input.cut === null ? 0 : startDoubtPct(start),
    airPct: input.airDoubtPct,
  }
  const question: UsedQuestion = {
    run,
    loss: joint.loss,
    allowanceMm: joint.allowance.allowanceMm,
    cut,
    spreads: spreadsOfJoint(joint, doubt),
  }
  const used = usedInTheMiddle(question)
  return {
    input,
    joint,
    start,
    there,
    run,
    question,
    doubt,
    sizesLogSpread: sizes,
    paceLogSpread: pace.logSpread,
    usedAfter: (hours) => valueAt(used, run.hours, hours),
    middleHours: (level) => firstReachedHours(used, run.hours, level),
    spread: usedSpread(question),
    cut,
    atStartMm: lossMm(joint.loss, start.ringPct - cut.ring, start.lidPct - cut.lid),
  }
}

/** Allowance used when it goes, and the hours to its early edge; undefined where that never comes. */
export function edgeOf(one: Pick<Reckoned, 'atStartMm' | 'joint' | 'middleHours' | 'spread'>): {
  usedAtStart: number
  earlyHours: number | undefined
} {
  const usedAtStart = Math.max(0, one.atStartMm / one.joint.allowance.allowanceMm)
  const early = one.spread.early(1)
  const middle = one.middleHours(1)
  const sooner = early === undefined || middle === undefined ? (early ?? middle) : Math.min(early, middle)
  return { usedAtStart, earlyHours: usedAtStart >= 1 ? 0 : sooner }
}
