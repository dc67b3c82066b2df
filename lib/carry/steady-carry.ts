import { movementLogSpread, allowanceLogSpread } from './joint-spread'
import { emcPct } from '@/lib/wood/emc'
import { jointOfPiece, type JointFacts, type ResolvedJoint } from './joint-defaults'
import { timeOutInSteadyAir, type TimeOut } from './time-out'
import { valueAt } from './used-doubt'

export type SteadyAir = { readonly temperatureC: number; readonly humidityPct: number }

export type SteadyCarry = {
  /** Where wood left in either would end, % MC. */
  readonly houseEmcPct: number
  readonly shopEmcPct: number
  /** Between these the joint keeps its fit at a quarter turn, % MC. */
  readonly lowMcPct: number
  readonly highMcPct: number
  readonly timeOut: TimeOut
  /** Minutes out there until the joint's ring stands at a moisture content; undefined where it never gets there. */
  readonly minutesTo: (mcPct: number) => number | undefined
  /** Where the ring stands after some minutes out there, % MC. */
  readonly mcAfterPct: (minutes: number) => number
}

/** Beyond a month "given time" is the better answer. */
const HORIZON_HOURS = 30 * 24

/**
 * A box that was fitted in one air and is carried, open in work, into another that does not change: what the landing
 * page draws from four figures typed in.
 * @param house air in which the joint was cut; °C (-10 to 50) and % RH
 * @param shop  air that it goes to
 * @param facts the piece; it must have a joint that can be worked out
 * @returns undefined for a piece without such a joint
 *
 * Source: `emcPct` and `timeOutInSteadyAir`, each with its own.
 */
export function steadyCarry(house: SteadyAir, shop: SteadyAir, facts: JointFacts): SteadyCarry | undefined {
  const joint = jointOfPiece(facts)
  return joint === undefined ? undefined : carryOfJoint(house, shop, joint)
}

function carryOfJoint(house: SteadyAir, shop: SteadyAir, joint: ResolvedJoint): SteadyCarry {
  const houseEmcPct = emcPct(house.temperatureC, house.humidityPct)
  const shopEmcPct = emcPct(shop.temperatureC, shop.humidityPct)
  const timeOut = timeOutInSteadyAir({
    filter: joint.filter,
    loss: joint.loss,
    cover: 'open',
    allowanceMm: joint.allowance.allowanceMm,
    fromMcPct: houseEmcPct,
    toEmcPct: shopEmcPct,
    temperatureC: shop.temperatureC,
    spreads: {
      movementLog: movementLogSpread(joint.movement),
      allowanceLog: allowanceLogSpread(joint.allowance),
      airPct: 0,
      startPct: 0,
    },
  })
  const hours = Float64Array.from(timeOut.curve.hours)
  const ring = Float64Array.from(timeOut.ringMcPct)
  return {
    houseEmcPct,
    shopEmcPct,
    lowMcPct: houseEmcPct - joint.allowedMcPct,
    highMcPct: houseEmcPct + joint.allowedMcPct,
    timeOut,
    minutesTo: (mcPct) => minutesTo(ring, hours, mcPct),
    mcAfterPct: (minutes) => valueAt(ring, hours, minutes / 60),
  }
}

/** The ring goes one way in air that holds still, so there is one moment at most. */
function minutesTo(ring: Float64Array, hours: Float64Array, mcPct: number): number | undefined {
  const from = ring[0] ?? 0
  const isRising = (ring.at(-1) ?? from) >= from
  if (isRising ? mcPct <= from : mcPct >= from) return 0
  for (let n = 1; n < ring.length; n += 1) {
    const after = ring[n] ?? 0
    if (isRising ? after < mcPct : after > mcPct) continue
    const before = ring[n - 1] ?? 0
    const at = hours[n - 1] ?? 0
    const hour = at + (((hours[n] ?? at) - at) * (mcPct - before)) / (after - before)
    return hour > HORIZON_HOURS ? undefined : hour * 60
  }
  return undefined
}
