import type { InPlaneMovement } from '@/lib/fit/ovality'

/** What a joint loses as its two parts change: per point of % MC, mm. */
export type JointLoss = {
  /** Mean growth of the diameter of a part. */
  readonly swellMmPerPct: number
  /** Half of what a part goes out of round. */
  readonly skewMmPerPct: number
  /** True where the base carries the spigot, so that the ring is the inner part. */
  readonly isRingInside: boolean
}

export const jointLoss = (
  diameterMm: number,
  movement: InPlaneMovement,
  spigotOn: 'base' | 'lid',
): JointLoss => ({
  swellMmPerPct: (diameterMm * (movement.tangentialPerPct + movement.radialPerPct)) / 2,
  skewMmPerPct: (diameterMm * Math.abs(movement.tangentialPerPct - movement.radialPerPct)) / 2,
  isRingInside: spigotOn === 'base',
})

/**
 * Clearance lost where the joint is tightest, whichever way the lid is turned.
 * @param ringChangePct points of % MC that the ring is away from its cut; likewise the lid
 * @returns mm; below 0 the lid sits looser than it was made, because the outer part is ahead of the inner
 *
 * Parts in step lose diameter × |C_T - C_R| × |change|, a quarter turn on. An inner part ahead on the way to damp binds at
 * every angle; a lid ahead of its base sits loose first, and on the way to dry it grips.
 * Source: derived from the ovals of both parts, to first order.
 */
export function lossMm(loss: JointLoss, ringChangePct: number, lidChangePct: number): number {
  const ahead = loss.isRingInside ? ringChangePct - lidChangePct : lidChangePct - ringChangePct
  return loss.swellMmPerPct * ahead + loss.skewMmPerPct * (Math.abs(ringChangePct) + Math.abs(lidChangePct))
}
