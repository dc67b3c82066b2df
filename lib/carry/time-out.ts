import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { PACE_LOG_SPREAD } from '@/lib/doubt/causes'
import { evenState, type PieceFilter } from '@/lib/follow/wood-state'
import type { PlaceCover } from '@/lib/pieces/piece'
import { type JointLoss, lossMm } from './joint-loss'
import { stayRun } from './stay-run'
import { firstReachedHours, type Spreads, usedInTheMiddle, usedSpread } from './used-doubt'

export type SteadyAirInput = {
  /** Ring and lid; without a lid it is taken to keep step with the ring. */
  readonly filter: PieceFilter
  readonly loss: JointLoss
  readonly cover: PlaceCover
  readonly allowanceMm: number
  readonly fromMcPct: number
  readonly toEmcPct: number
  readonly temperatureC: number
  readonly spreads: Spreads
}

type Ends = {
  /** Used in the end, as a fraction. */
  readonly usedInTheEnd: number
  /** Allowance used in the middle against hours: what a graph shows. */
  readonly curve: {
    readonly hours: readonly number[]
    readonly used: readonly number[]
    readonly usedEarly: readonly number[]
    readonly usedLate: readonly number[]
  }
  /** Moisture content of the ring at those hours, % MC. */
  readonly ringMcPct: readonly number[]
}

export type TimeOut = Ends &
  (
    | {
        readonly binds: false
        /** 1 in 10 would use it up all the same by then. */ readonly minutesEarly?: number
      }
    | {
        readonly binds: true
        readonly minutesEarly: number
        readonly minutes: number
        /** Undefined where 1 in 10 never use it up. */
        readonly minutesLate?: number
      }
  )

/** Ten years, beyond which no figure here means anything. */
const HORIZON_HOURS = 3650 * 24

/**
 * How long until a joint has used up its allowance in air that does not change.
 * @param input allowance in mm above 0, moisture contents in % MC (0 to 30), temperature in °C (-10 to 50)
 * @returns minutes: the early edge, by when 1 in 10 would have used it up, the middle and the late edge; or that it never
 *   uses it up there
 * @throws RangeError for an input out of range or NaN
 *
 * Swelling and drying count alike. A ring ahead of its lid on the way to damp binds sooner, at every angle; on the way to
 * dry it eases first.
 * Source: derived from Crank, The Mathematics of Diffusion (1975), ch. 4; the doubt by `usedSpread`.
 */
export function timeOutInSteadyAir(input: SteadyAirInput): TimeOut {
  assertFiniteAbove('allowanceMm', input.allowanceMm, 0)
  assertInRange('fromMcPct', input.fromMcPct, 0, 30)
  assertInRange('toEmcPct', input.toEmcPct, 0, 30)
  assertInRange('temperatureC', input.temperatureC, -10, 50)
  const { filter, loss, allowanceMm, fromMcPct, toEmcPct, spreads } = input
  const air = { at: 0, emcPct: toEmcPct, temperatureC: input.temperatureC, cover: input.cover, isKnown: true }
  const pace = { factor: 1, logSpread: PACE_LOG_SPREAD }
  const run = stayRun(filter, evenState(filter, fromMcPct, input.cover), [air], 0, HORIZON_HOURS, pace)
  const question = { run, loss, allowanceMm, cut: { ring: fromMcPct, lid: fromMcPct }, spreads }
  const used = usedInTheMiddle(question)
  const spread = usedSpread(question)
  const middle = firstReachedHours(used, run.hours, 1)
  const early = spread.early(1)
  const change = toEmcPct - fromMcPct
  const bands = [...run.hours].map((hours) => spread.at(hours))
  const ends: Ends = {
    usedInTheEnd: lossMm(loss, change, change) / allowanceMm,
    curve: {
      hours: [...run.hours],
      used: [...used],
      usedEarly: bands.map((band) => band.high),
      usedLate: bands.map((band) => band.low),
    },
    ringMcPct: [...run.middle.ring],
  }
  if (middle === undefined)
    return { ...ends, binds: false, ...(early === undefined ? {} : { minutesEarly: early * 60 }) }
  const late = spread.late(1)
  return {
    ...ends,
    binds: true,
    minutesEarly: Math.min(early ?? middle, middle) * 60,
    minutes: middle * 60,
    ...(late === undefined ? {} : { minutesLate: Math.max(late, middle) * 60 }),
  }
}
