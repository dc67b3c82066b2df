import { assertInRange } from '@/lib/assert'

export type MeterKind = 'resistance' | 'dielectric'

/** Where each kind can be trusted, % MC. Source: Wood Handbook (FPL-GTR-190, 2010), p. 13-3. */
const TRUSTED_FROM_PCT: Record<MeterKind, number> = { resistance: 6, dielectric: 4 }
const TRUSTED_TO_PCT = 30

/** 0.5 % MC for each 5.6 K (10 °F) away from calibration. Source: Wood Handbook (FPL-GTR-190, 2010), p. 13-3. */
export const TEMPERATURE_CORRECTION_PCT_PER_K = 0.5 / 5.6

/** What meters are calibrated at unless their paper says otherwise, °C (70 °F). Status: from memory. */
export const METER_CALIBRATION_C = 21

/** Well used, the average of several readings is within this, % MC. Source: Wood Handbook, p. 13-3. */
export const METER_DOUBT_PCT = 1

export type MeterReading = {
  readingPct: number
  kind: MeterKind
  woodC: number
  calibrationC?: number
  /** What the meter's own table adds for this wood, points of % MC. */
  speciesCorrectionPct?: number
}

export type MeterAnswer = {
  mcPct: number
  doubtPct: number
  /** Outside what that kind can tell: above it a reading is only a hint. */
  flags: ('below-range' | 'above-range')[]
}

/**
 * Moisture content from a meter, corrected for the wood's temperature and species.
 * @param reading readingPct 0 to 100 % MC; woodC and calibrationC -10 to 50 °C; speciesCorrectionPct -15 to 15 points
 * @returns % MC, not under 0; ± points of doubt; and whether the reading lies outside what the kind can tell
 * @throws RangeError for an input out of range or NaN
 *
 * Wood colder than the calibration reads low, so the correction is added; warmer, it is taken off.
 * Source: Wood Handbook (FPL-GTR-190, 2010), p. 13-3.
 */
export function meterMoisture(reading: MeterReading): MeterAnswer {
  const { readingPct, kind, woodC, calibrationC = METER_CALIBRATION_C, speciesCorrectionPct = 0 } = reading
  assertInRange('readingPct', readingPct, 0, 100)
  assertInRange('woodC', woodC, -10, 50)
  assertInRange('calibrationC', calibrationC, -10, 50)
  assertInRange('speciesCorrectionPct', speciesCorrectionPct, -15, 15)
  const forTemperature = TEMPERATURE_CORRECTION_PCT_PER_K * (calibrationC - woodC)
  const flags: MeterAnswer['flags'] = []
  if (readingPct < TRUSTED_FROM_PCT[kind]) flags.push('below-range')
  if (readingPct > TRUSTED_TO_PCT) flags.push('above-range')
  return {
    mcPct: Math.max(0, readingPct + forTemperature + speciesCorrectionPct),
    doubtPct: METER_DOUBT_PCT,
    flags,
  }
}
