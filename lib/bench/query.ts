import { z } from 'zod'
import { findSpecies } from '@/lib/wood/species'

/** A minus sign as printed, not a hyphen. */
const printed = (value: number): string => String(value).replace('-', '−')

const DECIMAL = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,3})?$/i

/**
 * A number as it stands in a query: text in, number out. Empty, NaN, Infinity, hexadecimal, a decimal comma or a value
 * outside the range is refused with the range and its unit; nothing is clipped.
 */
export function numberIn(min: number, max: number, unit: string) {
  const message = `a number from ${printed(min)} to ${printed(max)}${unit === '' ? '' : ` ${unit}`}`
  return z
    .string({ error: message })
    .max(40, message)
    .regex(DECIMAL, message)
    .transform(Number)
    .pipe(z.number({ error: message }).min(min, message).max(max, message))
}

export const temperatureC = numberIn(-10, 50, '°C')
export const humidityPct = numberIn(0, 100, '% RH')
export const mcPct = numberIn(0, 30, '% MC')
export const densityKgM3 = numberIn(200, 1400, 'kg/m³')
export const perPct = numberIn(0, 0.01, 'per % MC, as a fraction')
export const diameterMm = numberIn(1, 1000, 'mm')
export const wallMm = numberIn(0.5, 60, 'mm')

/** Stands for a wood that nobody can name: one of medium movement, with the wider doubt of it. */
export const UNKNOWN_SPECIES = 'unknown'

export const species = z
  .string()
  .max(60)
  .refine((slug) => slug === UNKNOWN_SPECIES || findSpecies(slug) !== undefined, {
    error: 'a Latin name in lower case with hyphens, of a wood that is known here; or unknown',
  })

/** A wood is told either by its name or by its figures: both at once could disagree. */
export function refineWood(
  query: Readonly<Record<string, unknown>>,
  figures: readonly string[],
  refuse: (path: string, message: string) => void,
): void {
  if (query.species !== undefined) {
    for (const figure of figures) {
      if (query[figure] !== undefined)
        refuse(figure, 'give either species or the figures of a wood, not both')
    }
    return
  }
  for (const figure of figures) {
    if (query[figure] === undefined) refuse(figure, `needed where no species is given`)
  }
}
