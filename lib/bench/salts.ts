import { z } from 'zod'
import { saltFixedPoints, SALTS_MAX_C, SALTS_MIN_C, type SaltFixedPoint } from '@/lib/air/salts'
import { numberIn } from './query'

export const saltsQuerySchema = z.strictObject({ temperatureC: numberIn(SALTS_MIN_C, SALTS_MAX_C, '°C') })

/** The humidities that saturated salts hold, for checking a sensor. */
export function saltsAnswer(query: z.output<typeof saltsQuerySchema>): { items: SaltFixedPoint[] } {
  return { items: saltFixedPoints(query.temperatureC) }
}
