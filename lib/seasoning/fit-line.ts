import { wetShare, type DryingShape } from './drying-shape'

const GOLDEN = (Math.sqrt(5) - 1) / 2

/** Mean and slope of weights over a shape: finalG + amplitudeG s(t). */
export type Line = {
  readonly finalG: number
  readonly amplitudeG: number
  /** Sum of the squared residuals, g². */
  readonly squaresG2: number
  /** Sum of the squared deviations of the shape from its mean. */
  readonly leverage: number
  readonly meanShape: number
}

export type Series = { readonly times: readonly number[]; readonly grams: readonly number[] }

/**
 * The straight regression of weights on a shape with that time constant. Plain loops: a fit asks for it a thousand
 * times.
 */
export function lineAt({ times, grams }: Series, tauMs: number, shape: DryingShape | undefined): Line {
  const shares = times.map((time) => wetShare(time, tauMs, shape))
  let meanShape = 0
  let meanG = 0
  for (let n = 0; n < shares.length; n++) {
    meanShape += (shares[n] ?? 0) / shares.length
    meanG += (grams[n] ?? 0) / shares.length
  }
  let leverage = 0
  let together = 0
  for (let n = 0; n < shares.length; n++) {
    const apart = (shares[n] ?? 0) - meanShape
    leverage += apart ** 2
    together += apart * ((grams[n] ?? 0) - meanG)
  }
  const amplitudeG = together / leverage
  const finalG = meanG - amplitudeG * meanShape
  let squaresG2 = 0
  for (let n = 0; n < shares.length; n++)
    squaresG2 += ((grams[n] ?? 0) - finalG - amplitudeG * (shares[n] ?? 0)) ** 2
  return { finalG, amplitudeG, squaresG2, leverage, meanShape }
}

/** Time constants evenly spread on a logarithmic scale. */
export const tausBetween = (from: number, to: number, count: number): number[] =>
  Array.from({ length: count }, (_, n) => from * (to / from) ** (n / (count - 1)))

/** The time constant with the least squares, and whether it is the longest that was tried: no end in sight. */
export function bestTau(
  series: Series,
  shape: DryingShape | undefined,
  taus: readonly number[],
  tolerance: number,
) {
  const squares = taus.map((tauMs) => lineAt(series, tauMs, shape).squaresG2)
  const at = squares.indexOf(Math.min(...squares))
  const isLongest = at === taus.length - 1
  const [low = 0, middle = 0] = [taus[at - 1] ?? taus[at], taus[at]]
  return {
    isLongest,
    tauMs: isLongest ? middle : refined(series, shape, [low, taus[at + 1] ?? middle], tolerance),
  }
}

/** Golden section on the logarithm of tau, which is where the squares look like a bowl. */
function refined(
  series: Series,
  shape: DryingShape | undefined,
  [from, to]: readonly [number, number],
  tolerance: number,
): number {
  const squares = (log: number): number => lineAt(series, Math.exp(log), shape).squaresG2
  let low = Math.log(from)
  let high = Math.log(to)
  while (high - low > tolerance) {
    const width = GOLDEN * (high - low)
    if (squares(high - width) < squares(low + width)) high = low + width
    else low = high - width
  }
  return Math.exp((low + high) / 2)
}
