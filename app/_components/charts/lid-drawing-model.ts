import type { Clearance } from '@/lib/fit/clearance-curve'
import { drawnShare, type Outline } from '@/lib/fit/lid-outline'

/** The drawing's own frame, px: a recess of this radius, its wall, the protractor round it. */
export const FRAME = { width: 360, height: 330, x: 166, y: 176 } as const
export const RECESS_RADIUS = 104
export const WALL = 22
export const HANDLE_RADIUS = 126
export const PROTRACTOR_RADIUS = 142

type Point = { readonly x: number; readonly y: number }

/** Engines differ in the last digit of a sine; to 0.01 px, what the server drew is what the browser draws. */
export const px = (length: number): number => Math.round(length * 100) / 100

const radians = (degrees: number): number => (degrees * Math.PI) / 180

/** A point off the middle; directions run from the right hand downwards, the way the lid is turned. */
export const pointAt = (directionDeg: number, radius: number): Point => ({
  x: px(FRAME.x + radius * Math.cos(radians(directionDeg))),
  y: px(FRAME.y + radius * Math.sin(radians(directionDeg))),
})

/** Where the handle stands: 0 degrees at the top, a quarter turn at the right. */
export const handleAt = (angleDeg: number, radius: number): Point => pointAt(angleDeg - 90, radius)

/** The turn that a pointer at that place means, whole degrees, 0 to 90. */
export function angleOfPoint({ x, y }: Point): number {
  const degrees = (Math.atan2(x - FRAME.x, FRAME.y - y) * 180) / Math.PI
  // Beyond a quarter turn the nearer end counts: under the middle, on the left, is nearer to no turn at all.
  const within = degrees < -135 ? 90 : Math.min(90, Math.max(0, degrees))
  return Math.round(within)
}

const place = ({ x, y }: Point): string => `${x.toFixed(1)} ${y.toFixed(1)}`

const STEP_DEG = 3

/**
 * An outline as a closed path.
 * @param turnedDeg how far this part is turned, degrees
 * @param beyond px further out all round, for a wall
 */
export function outlinePath(
  outline: Outline,
  radiusMm: number,
  factor: number,
  turnedDeg: number,
  beyond = 0,
): string {
  const points = Array.from({ length: 360 / STEP_DEG }, (_, n) => {
    const directionDeg = n * STEP_DEG
    const share = drawnShare(outline, radiusMm, factor, directionDeg - turnedDeg)
    return place(pointAt(directionDeg, RECESS_RADIUS * share + beyond))
  })
  return `M${points.join('L')}Z`
}

/** Growth rings of the spigot: arcs along its tangential direction, bent a little, before it is turned. */
export function ringPaths(): readonly string[] {
  const reach = RECESS_RADIUS * 1.2
  return [-3, -2, -1, 0, 1, 2, 3].map((ring) => {
    const y = FRAME.y + ring * 27 + 6
    return `M${place({ x: FRAME.x - reach, y })}Q${place({ x: FRAME.x, y: y - 40 })} ${place({ x: FRAME.x + reach, y })}`
  })
}

export type ProtractorTick = { readonly angleDeg: number; readonly length: number; readonly label?: string }

export const PROTRACTOR: readonly ProtractorTick[] = Array.from({ length: 19 }, (_, n) => {
  const angleDeg = n * 5
  if (angleDeg % 45 === 0) return { angleDeg, length: 13, label: `${String(angleDeg)}°` }
  return { angleDeg, length: angleDeg % 15 === 0 ? 9 : 5 }
})

/** Steps of a scale that read well, in mm or in. */
const STEPS = [0.001, 0.002, 0.005, 0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5] as const
const MOST_LINES = 7

export type ClearanceScale = {
  readonly low: number
  readonly high: number
  readonly ticks: readonly { readonly value: number; readonly label: string }[]
}

/**
 * The scale of clearances, from a little above what is there down to where it binds.
 * @param values all that is drawn, in the reader's unit
 * @returns always with 0 and some room below it; doubt that reaches deeper than there is slack is cut off at the edge
 */
export function clearanceScale(values: readonly Clearance[], perUnitMm: number): ClearanceScale {
  const most = Math.max(0.02, ...values.map((value) => value.highMm)) / perUnitMm
  const least = Math.min(0, ...values.map((value) => value.lowMm)) / perUnitMm
  const deepest = Math.min(0, ...values.map((value) => value.middleMm)) / perUnitMm
  const high = most * 1.08
  const low = -Math.max(high * 0.35, Math.min(-least * 1.05, Math.max(high * 1.1, -deepest * 1.08)))
  const step = STEPS.find((candidate) => (high - low) / candidate <= MOST_LINES) ?? 10
  const first = Math.ceil(low / step)
  const digits = step < 0.01 ? 3 : 2
  const ticks = Array.from({ length: Math.floor(high / step) - first + 1 }, (_, n) => (first + n) * step)
    .map((value) => (value === 0 ? 0 : value))
    .map((value) => ({ value, label: value === 0 ? '0' : value.toFixed(digits).replace('-', '−') }))
  return { low, high, ticks }
}
