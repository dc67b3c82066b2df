/** Rates (squared roots) and shares of the first terms of a slab's response; the rest is over at once. */
type Terms = readonly (readonly [rate: number, share: number])[]

/** How a slab dries whose surface does not hold it up. Source: Crank, The Mathematics of Diffusion (1975), ch. 4. */
const FIRST_RATE = (Math.PI / 2) ** 2
const BARE: Terms = [1, 9, 25].map((times) => [times * FIRST_RATE, 2 / (times * FIRST_RATE)] as const)

/**
 * And one whose surface does, at a Biot number of 10: roots of b tan b = 10, shares 200/[b² (b² + 110)].
 * Source: Crank (1975), ch. 4 and its table of roots.
 */
const HELD_UP: Terms = [1.4289, 4.3058, 7.2281, 10.2003].map((root) => {
  const rate = root ** 2
  return [rate, 200 / (rate * (rate + 110))] as const
})

/** The slab whose surface does not hold it up follows the square root of time until then; within 0.0001. */
const ROOT_UNTIL_FO = 0.1

export type DryingShape = {
  readonly surface: 'bare' | 'held-up'
  /** How far the slab had come when the first weight was taken, as a Fourier number. */
  readonly startFo: number
}

function slabStillWet({ surface }: DryingShape, fo: number): number {
  if (surface === 'bare' && fo < ROOT_UNTIL_FO) return 1 - 2 * Math.sqrt(fo / Math.PI)
  const terms = surface === 'bare' ? BARE : HELD_UP
  return terms.reduce((sum, [rate, share]) => sum + share * Math.exp(-rate * fo), 0)
}

/**
 * Share of the change that is still to come, 1 at the start of a series.
 * @param sinceMs time since the start, ms, 0 or more
 * @param tauMs time constant of the exponential part, ms
 * @param shape left out: the plain exponential
 *
 * Wood starts faster than an exponential, the more so the fresher it is; from half way on the two are the same.
 */
export function wetShare(sinceMs: number, tauMs: number, shape?: DryingShape): number {
  if (shape === undefined) return Math.exp(-sinceMs / tauMs)
  const [first] = shape.surface === 'bare' ? BARE : HELD_UP
  const fo = shape.startFo + sinceMs / (tauMs * (first?.[0] ?? FIRST_RATE))
  return slabStillWet(shape, fo) / slabStillWet(shape, shape.startFo)
}

/**
 * How far wood may have come when its first weight was taken: just cut, with a surface that holds it up or not; 0.16,
 * 0.25, 0.36 and half of the change; or far enough for the plain exponential. Nobody knows which, so each counts alike.
 * Status: derived.
 */
export const START_SHAPES: readonly (DryingShape | undefined)[] = [
  { surface: 'held-up', startFo: 0 },
  ...[0, 0.02, 0.05, 0.1, 0.2].map((startFo) => ({ surface: 'bare' as const, startFo })),
  undefined,
]
