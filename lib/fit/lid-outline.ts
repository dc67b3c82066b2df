import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import type { Oval } from './ovality'

/** What is drawn of one part: half of its two diameters, mm. */
export type Outline = { readonly alongRingsMm: number; readonly acrossRingsMm: number }

export const outlineOf = (oval: Oval): Outline => ({
  alongRingsMm: oval.tangentialDiameterMm / 2,
  acrossRingsMm: oval.radialDiameterMm / 2,
})

/** Round numbers, so that the factor can be told. */
const FACTORS = [1, 2, 5, 10, 15, 20, 30, 40, 50, 75, 100, 150, 200, 300, 400, 500] as const

/** An oval drawn further out than this share of its radius would no longer be convex (that is at 1 in 5). Derived. */
const MOST_SHARE = 0.14

/** The radius that both outlines are drawn round, mm: the middle of all four half diameters. */
export const meanRadiusMm = (one: Outline, other: Outline): number =>
  (one.alongRingsMm + one.acrossRingsMm + other.alongRingsMm + other.acrossRingsMm) / 4

/**
 * How many times too large the ovals and the clearance are drawn, so that they can be seen.
 * @returns a round number, 1 to 500: the largest at which no outline stands out by more than a seventh of its radius
 */
export function exaggerationOf(one: Outline, other: Outline): number {
  const radiusMm = meanRadiusMm(one, other)
  assertFiniteAbove('radiusMm', radiusMm, 0)
  const sizes = [one.alongRingsMm, one.acrossRingsMm, other.alongRingsMm, other.acrossRingsMm]
  const share = Math.max(...sizes.map((size) => Math.abs(size - radiusMm))) / radiusMm
  return FACTORS.findLast((factor) => factor * share <= MOST_SHARE) ?? 1
}

/**
 * Where an outline is drawn, as a share of the drawing's own radius.
 * @param outline half diameters, mm
 * @param radiusMm the radius that both outlines are drawn round, mm, above 0
 * @param factor how many times too large whatever differs from that radius is drawn
 * @param directionDeg from the direction along the rings, degrees, -720 to 720
 * @returns 1 on the radius; half the caliper width is drawn, so the gap between two outlines is `factor` times the true
 *   one in every direction
 * @throws RangeError for an input out of range or NaN
 */
export function drawnShare(outline: Outline, radiusMm: number, factor: number, directionDeg: number): number {
  assertFiniteAbove('radiusMm', radiusMm, 0)
  assertInRange('directionDeg', directionDeg, -720, 720)
  const direction = (directionDeg * Math.PI) / 180
  const along = outline.alongRingsMm * Math.cos(direction)
  const across = outline.acrossRingsMm * Math.sin(direction)
  return 1 + (factor * (Math.sqrt(along * along + across * across) - radiusMm)) / radiusMm
}
