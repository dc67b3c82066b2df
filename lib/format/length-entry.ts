import type { UnitSystem } from '@/lib/sites/site'
import { inchesFromMm, mmFromInches } from '@/lib/units'

/**
 * What was typed as a length.
 * @param text as typed; a comma counts as a point, blanks and a unit at the end are passed over
 * @returns millimetres; null for an empty field, NaN for anything that is no number
 */
export function parseLengthMm(text: string, units: UnitSystem): number | null {
  const bare = text
    .trim()
    .replace(/\s*(mm|in|inch|inches|")$/i, '')
    .replace(',', '.')
  if (bare === '') return null
  if (!/^\d{1,5}(\.\d{0,4})?$|^\.\d{1,4}$/.test(bare)) return Number.NaN
  return units === 'metric' ? Number(bare) : mmFromInches(Number(bare))
}

/** The figure to begin a field with, without its unit: to 0.01 mm or 0.001 in. Empty for null. */
export function formatLengthFigure(valueMm: number | null, units: UnitSystem): string {
  if (valueMm === null || Number.isNaN(valueMm)) return ''
  return units === 'metric'
    ? String(Math.round(valueMm * 100) / 100)
    : String(Math.round(inchesFromMm(valueMm) * 1000) / 1000)
}
