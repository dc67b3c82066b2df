import { wetShare, type DryingShape } from './drying-shape'

/** One weight: the instant, as milliseconds since 1970 in UTC, and the mass in grams. */
export type Weight = { readonly at: number; readonly grams: number }

/** Drying is the usual case; a piece carried to damper air takes up water, and everything is mirrored. */
export type Direction = 'drying' | 'gaining'

/**
 * A curve of weight over time: grams(t) = finalG + amplitudeG s(t), t since `fromAt`, with s falling from 1 to 0. As a
 * rule s = exp(-t / tauMs).
 */
export type WeightCurve = {
  readonly fromAt: number
  readonly finalG: number
  /** Above zero while drying, below while gaining. */
  readonly amplitudeG: number
  /** Time constant of the last, exponential part. */
  readonly tauMs: number
  /** For the curve of a slab; left out for the plain exponential. */
  readonly shape?: DryingShape | undefined
}

/** The curve's weight at an instant, g. */
export const curveG = (curve: WeightCurve, at: number): number =>
  curve.finalG + curve.amplitudeG * wetShare(at - curve.fromAt, curve.tauMs, curve.shape)
