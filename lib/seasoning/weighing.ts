/** One weight: the instant, as milliseconds since 1970 in UTC, and the mass in grams. */
export type Weight = { readonly at: number; readonly grams: number }

/** Drying is the usual case; a piece carried to damper air takes up water, and everything is mirrored. */
export type Direction = 'drying' | 'gaining'

/** A curve of weight over time: grams(t) = finalG + amplitudeG exp(-t / tauMs), t since `fromAt`. */
export type WeightCurve = {
  readonly fromAt: number
  readonly finalG: number
  /** Above zero while drying, below while gaining. */
  readonly amplitudeG: number
  readonly tauMs: number
}

/** The curve's weight at an instant, g. */
export const curveG = (curve: WeightCurve, at: number): number =>
  curve.finalG + curve.amplitudeG * Math.exp(-(at - curve.fromAt) / curve.tauMs)
