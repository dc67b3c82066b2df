import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { FILM_M_PER_S } from '@/lib/follow/finish'
import { EFFECTIVENESS_DAYS, EFFECTIVENESS_TABLE } from './published/effectiveness-table'

/** Diffusion across the grain that the films' figures were worked out with, m²/s: pine at 27 °C. Status: derived. */
export const FILM_WOOD_M2_PER_S = 1e-10

const DAY_S = 86_400
const SERIES_TO = 2
const TERMS = 60

/** exp(z²) erfc(z). Source: series of the error function, and beyond 2 its continued fraction (textbook). */
function scaledErfc(z: number): number {
  if (z < SERIES_TO) {
    let term = z
    let sum = z
    for (let n = 1; n < TERMS; n += 1) {
      term *= (-z * z) / n
      sum += term / (2 * n + 1)
    }
    return Math.exp(z * z) * (1 - (2 * sum) / Math.sqrt(Math.PI))
  }
  let fraction = z
  for (let n = TERMS; n > 0; n -= 1) fraction = z + n / 2 / fraction
  return 1 / (fraction * Math.sqrt(Math.PI))
}

/**
 * Share of the water that bare wood would have taken up which a film keeps out, on thick wood after a step of the air.
 * @param filmMPerS what the film lets through, m/s on moisture content, above 0
 * @param days since the step, above 0 to 3650
 * @returns 0 to 1
 * @throws RangeError for an input out of range or NaN
 *
 * A film that stays as it was. Real ones let more through with time, so it promises too much after weeks.
 * Source: derived; half space with a surface resistance, Crank, The Mathematics of Diffusion (1975), ch. 3.
 */
export function filmEffectiveness(filmMPerS: number, days: number): number {
  assertFiniteAbove('filmMPerS', filmMPerS, 0)
  assertFiniteAbove('days', days, 0)
  assertInRange('days', days, 0, 3650)
  const z = filmMPerS * Math.sqrt((days * DAY_S) / FILM_WOOD_M2_PER_S)
  return ((1 - scaledErfc(z)) * Math.sqrt(Math.PI)) / (2 * z)
}

/**
 * The most that a film which stays as it was promises too much, over the finishes of the table.
 * @param days 1, 7 or 14, as the table has them
 * @returns percentage points
 */
export function mostOverPromisedPct(days: (typeof EFFECTIVENESS_DAYS)[number]): number {
  const column = EFFECTIVENESS_DAYS.indexOf(days)
  return Math.max(
    ...EFFECTIVENESS_TABLE.flatMap(({ film, afterDaysPct }) =>
      film === undefined
        ? []
        : [100 * filmEffectiveness(FILM_M_PER_S[film], days) - (afterDaysPct[column] ?? Number.NaN)],
    ),
  )
}
