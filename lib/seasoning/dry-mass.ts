import { METER_DOUBT_PCT } from './meter'
import { ovenDryG } from './oven-dry'
import { meterBesideWeightMs } from './policy'
import type { Weight } from './weighing'

/** Mass of the piece without any water, g, how far out that may be (±, middle 8 in 10), and what it was found from. */
export type DryMass = { readonly grams: number; readonly doubtG: number; readonly from: 'oven-dry' | 'meter' }

export type MeterAt = { readonly at: number; readonly mcPct: number; readonly doubtPct?: number | undefined }

/**
 * The oven-dry mass of a piece, from what was told in its current series: a cut or a coat of oil ends the older ones.
 * @param weights the current series
 * @param meters meter readings of the current series, corrected for temperature and species
 * @param told oven-dry masses put in by the maker in the current series, from a sample or a calculation
 * @param stepG step of the scale, g
 * @returns the latest mass told; else the mean of what the meter readings give, each with the nearest weight within
 *   three days; undefined where there is neither
 *
 * Readings of one meter share its error, so that more of them narrow nothing.
 */
export function dryMass(
  weights: readonly Weight[],
  meters: readonly MeterAt[],
  told: readonly Weight[],
  stepG: number,
): DryMass | undefined {
  const latest = told.reduce<Weight | undefined>(
    (last, mass) => (last === undefined || mass.at > last.at ? mass : last),
    undefined,
  )
  if (latest !== undefined) return { grams: latest.grams, doubtG: stepG, from: 'oven-dry' }
  const found = meters.flatMap((meter) => {
    const weight = nearest(weights, meter.at)
    if (weight === undefined) return []
    const grams = ovenDryG(weight.grams, meter.mcPct)
    return [{ grams, doubtG: (grams * (meter.doubtPct ?? METER_DOUBT_PCT)) / (100 + meter.mcPct) }]
  })
  if (found.length === 0) return undefined
  const meanOf = (values: number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length
  return {
    grams: meanOf(found.map((one) => one.grams)),
    doubtG: Math.hypot(meanOf(found.map((one) => one.doubtG)), stepG),
    from: 'meter',
  }
}

function nearest(weights: readonly Weight[], at: number): Weight | undefined {
  return weights
    .filter((weight) => Math.abs(weight.at - at) <= meterBesideWeightMs)
    .sort((a, b) => Math.abs(a.at - at) - Math.abs(b.at - at))[0]
}

/**
 * Moisture content of a weight by that mass, with its doubt in points.
 * @returns % MC, not under 0
 */
export function moistureOfWeight(
  grams: number,
  dry: DryMass,
): { readonly pct: number; readonly doubtPct: number } {
  return {
    pct: Math.max(0, 100 * (grams / dry.grams - 1)),
    doubtPct: (100 * grams * dry.doubtG) / dry.grams ** 2,
  }
}
