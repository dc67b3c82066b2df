/** The fraction of a change that a piece has followed, against the Fourier number D t / L². */
export type StepResponse = (fourier: number) => number

/** Terms smaller than exp(-40) add nothing to a figure near 1. */
const NEGLIGIBLE_EXPONENT = 40

/**
 * A step response from the first terms of its series, closed by one more that stands for all the rest.
 * @param rates squared roots, rising
 * @param weights of the same terms
 * @param meanFourier the integral of what is left over the Fourier number: 1/3 + 1/Bi for a slab, 1/8 + 1/(2 Bi) for
 *   a cylinder
 * @returns a response that starts at 0, rises and ends at 1
 *
 * The closing term keeps both the sum of the weights and that integral exact.
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 4 and 5; the closing term is derived.
 */
export function stepResponseOfTerms(
  rates: readonly number[],
  weights: readonly number[],
  meanFourier: number,
): StepResponse {
  let restWeight = 1
  let restFourier = meanFourier
  rates.forEach((rate, n) => {
    const weight = weights[n] ?? 0
    restWeight -= weight
    restFourier -= weight / rate
  })
  const restRate = restWeight > 0 && restFourier > 0 ? restWeight / restFourier : Infinity
  return (fourier) => {
    if (!(fourier >= 0)) throw new RangeError(`fourier must be 0 or more, got ${String(fourier)}`)
    if (fourier === 0) return 0
    let left = Math.max(0, restWeight) * Math.exp(-restRate * fourier)
    for (let n = 0; n < rates.length; n += 1) {
      const exponent = (rates[n] ?? Infinity) * fourier
      if (exponent > NEGLIGIBLE_EXPONENT) break
      left += (weights[n] ?? 0) * Math.exp(-exponent)
    }
    return Math.max(0, 1 - left) // rounding alone can leave a hair more than everything
  }
}

/** Keeps the responses made so far: roots cost more than a thousand fractions. Emptied before it grows large. */
export function cachedByBiot(make: (biot: number) => StepResponse): (biot: number) => StepResponse {
  const made = new Map<number, StepResponse>()
  return (biot) => {
    const before = made.get(biot)
    if (before !== undefined) return before
    if (made.size >= 1000) made.clear()
    const response = make(biot)
    made.set(biot, response)
    return response
  }
}
