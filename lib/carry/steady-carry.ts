import { emcPct } from '@/lib/wood/emc'
import { diffusionMcPct } from './diffusion'
import { EXPOSURE_OF_COVER, ringFractionChanged } from './joint'
import { jointOfPiece, type JointFacts, type ResolvedJoint } from './joint-defaults'
import { firstReachedMs, timeOutInSteadyAir, type TimeOut } from './time-out'

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

const MINUTE_MS = 60_000
/** Beyond a month "given time" is the better answer. */
const HORIZON_MS = 30 * 24 * 60 * MINUTE_MS

/**
 * A box that was fitted in one air and is carried, open in work, into another that does not change: what the landing
 * page draws from four figures typed in.
 * @param house air in which the joint was cut; °C (-10 to 50) and % RH
 * @param shop  air that it goes to
 * @param facts the piece; it must have a joint that can be worked out
 * @returns undefined for a piece without such a joint
 *
 * Source: `emcPct`, `ringFractionChanged` and `timeOutInSteadyAir`, each with its own.
 */
export function steadyCarry(house: SteadyAir, shop: SteadyAir, facts: JointFacts): SteadyCarry | undefined {
  const joint = jointOfPiece(facts)
  return joint === undefined ? undefined : carryOfJoint(house, shop, joint)
}

function carryOfJoint(house: SteadyAir, shop: SteadyAir, joint: ResolvedJoint): SteadyCarry {
  const houseEmcPct = emcPct(house.temperatureC, house.humidityPct)
  const shopEmcPct = emcPct(shop.temperatureC, shop.humidityPct)
  const apart = shopEmcPct - houseEmcPct
  const fractionChanged = ringFractionChanged(joint.size, EXPOSURE_OF_COVER.open, {
    densityKgM3: joint.densityKgM3,
    temperatureC: shop.temperatureC,
    mcPct: diffusionMcPct(houseEmcPct, shopEmcPct),
  })
  return {
    houseEmcPct,
    shopEmcPct,
    lowMcPct: houseEmcPct - joint.allowedMcPct,
    highMcPct: houseEmcPct + joint.allowedMcPct,
    timeOut: timeOutInSteadyAir({
      size: joint.size,
      densityKgM3: joint.densityKgM3,
      cover: 'open',
      lossMmPerPct: joint.lossMmPerPct,
      allowanceMm: joint.allowance.allowanceMm,
      fromMcPct: houseEmcPct,
      toEmcPct: shopEmcPct,
      temperatureC: shop.temperatureC,
    }),
    minutesTo: (mcPct) => {
      const share = apart === 0 ? 0 : (mcPct - houseEmcPct) / apart
      if (share <= 0) return 0
      const reachedMs = firstReachedMs((elapsedMs) => fractionChanged(elapsedMs / 1000), share, HORIZON_MS)
      return reachedMs === undefined ? undefined : reachedMs / MINUTE_MS
    },
    mcAfterPct: (minutes) => houseEmcPct + apart * fractionChanged(minutes * 60),
  }
}
