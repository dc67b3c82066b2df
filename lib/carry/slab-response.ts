import { assertFiniteAbove } from '@/lib/assert'
import { cachedByBiot, stepResponseOfTerms, type StepResponse } from './step-response'

const TERMS = 60
const ROOT_TOLERANCE = 1e-13
const NEWTON_STEPS = 50

/**
 * The first roots of b tan b = Bi.
 * @param biot Biot number S L / D, above 0; Infinity for a surface that is at once in step with the air
 * @param count how many, 1 or more
 * @throws RangeError for a Biot number that is 0, negative or NaN
 *
 * Solved as b = n π + atan(Bi / b), which has no poles and bends one way, so that Newton's steps cannot stray.
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 4; the roots for Bi 1 and 10 agree with its Table 4.1.
 */
export function slabRoots(biot: number, count: number): number[] {
  if (biot === Infinity) return Array.from({ length: count }, (_, n) => (n + 0.5) * Math.PI)
  assertFiniteAbove('biot', biot, 0)
  return Array.from({ length: count }, (_, n) => {
    let b = n === 0 ? Math.min(Math.sqrt(biot), Math.PI / 2) : n * Math.PI
    for (let step = 0; step < NEWTON_STEPS; step += 1) {
      const miss = b - n * Math.PI - Math.atan(biot / b)
      const next = b - miss / (1 + biot / (b * b + biot * biot))
      const moved = Math.abs(next - b)
      b = next > 0 ? next : b / 2
      if (moved < ROOT_TOLERANCE * b) break
    }
    return b
  })
}

/**
 * How a wall of wood follows a step of the air on its open faces.
 * @param biot Biot number S L / D, above 0 to Infinity; L is half the thickness with both faces open, all of it with one
 * @returns the fraction changed against D t / L², for the mean over the thickness
 * @throws RangeError for a Biot number that is 0, negative or NaN
 *
 * Within 1e-4 of the full series. A hollow cylinder's wall counts as a slab (error under 0.002).
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 4.
 */
export const slabResponse: (biot: number) => StepResponse = cachedByBiot((biot) => {
  const roots = slabRoots(biot, TERMS)
  const rates = roots.map((b) => b * b)
  const weights = rates.map((rate) =>
    biot === Infinity ? 2 / rate : (2 * biot * biot) / (rate * (rate + biot * biot + biot)),
  )
  return stepResponseOfTerms(rates, weights, 1 / 3 + 1 / biot)
})
