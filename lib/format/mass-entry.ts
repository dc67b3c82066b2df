import type { UnitSystem } from '@/lib/sites/site'
import { gramsFromOunces, ouncesFromGrams } from '@/lib/units'

/**
 * What was typed as a mass.
 * @param text as typed; a comma counts as a point, blanks and a unit at the end are passed over
 * @returns grams; null for an empty field, NaN for anything that is no number
 */
export function parseMassG(text: string, units: UnitSystem): number | null {
  const bare = text
    .trim()
    .replace(/\s*(g|gram|grams|oz|ounce|ounces)$/i, '')
    .replace(',', '.')
  if (bare === '') return null
  if (!/^\d{1,6}(\.\d{0,4})?$|^\.\d{1,4}$/.test(bare)) return Number.NaN
  return units === 'metric' ? Number(bare) : gramsFromOunces(Number(bare))
}

/** The figure to begin a field with, without its unit: to 0.01 g or 0.001 oz. Empty for null. */
export function formatMassFigure(massG: number | null, units: UnitSystem): string {
  if (massG === null || Number.isNaN(massG)) return ''
  return units === 'metric'
    ? String(Math.round(massG * 100) / 100)
    : String(Math.round(ouncesFromGrams(massG) * 1000) / 1000)
}
