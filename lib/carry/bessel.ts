import { assertInRange } from '@/lib/assert'

/** Points of the trapezium rule over a half period: exact to rounding while they outnumber the argument. */
const POINTS = 200
const ARGUMENT_MAX = 300

function besselIntegral(order: 0 | 1, x: number): number {
  assertInRange('x', x, 0, ARGUMENT_MAX)
  let sum = (Math.cos(0) + Math.cos(order * Math.PI)) / 2
  for (let n = 1; n < POINTS; n += 1) {
    const angle = (n * Math.PI) / POINTS
    sum += Math.cos(order * angle - x * Math.sin(angle))
  }
  return sum / POINTS
}

/**
 * Bessel functions of the first kind, orders 0 and 1.
 * @param x 0 to 300
 * @throws RangeError for an argument out of range or NaN
 *
 * Source: Bessel's integral (Abramowitz and Stegun, 1964, 9.1.21), by the trapezium rule, which is exact for periodic
 * functions up to rounding.
 */
export const besselJ0 = (x: number): number => besselIntegral(0, x)
export const besselJ1 = (x: number): number => besselIntegral(1, x)

function bisect(f: (x: number) => number, low: number, high: number): number {
  const risesAtLow = f(low) > 0
  let from = low
  let to = high
  for (let n = 0; n < 50; n += 1) {
    const middle = (from + to) / 2
    if (f(middle) > 0 === risesAtLow) from = middle
    else to = middle
  }
  return (from + to) / 2
}

/** Half width of the bracket round McMahon's estimate of a zero; the estimate is within 0.02 of it. */
const ZERO_BRACKET = 0.1

function zeroNear(f: (x: number) => number, estimate: number): number {
  return bisect(f, estimate - ZERO_BRACKET, estimate + ZERO_BRACKET)
}

/** Zeros found so far, in order: the same for every Biot number. */
const zerosOfJ0: number[] = []
const zerosOfJ1: number[] = [0]

function zeroOfJ0(n: number): number {
  const near = (n + 0.75) * Math.PI
  return (zerosOfJ0[n] ??= zeroNear(besselJ0, near + 1 / (8 * near)))
}

function zeroOfJ1(n: number): number {
  const near = (n + 0.25) * Math.PI
  return (zerosOfJ1[n] ??= zeroNear(besselJ1, near - 3 / (8 * near)))
}

/**
 * The first roots of b J1(b) = Bi J0(b): one between each zero of J1 (with 0) and the next zero of J0.
 * @param biot Biot number, above 0; Infinity gives the zeros of J0
 * @param count how many, 1 to 90
 *
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 5; brackets from McMahon's expansion (Abramowitz and Stegun,
 * 1964, 9.5.12).
 */
export function cylinderRoots(biot: number, count: number): number[] {
  return Array.from({ length: count }, (_, n) =>
    biot === Infinity
      ? zeroOfJ0(n)
      : bisect((b) => b * besselJ1(b) - biot * besselJ0(b), zeroOfJ1(n), zeroOfJ0(n)),
  )
}
