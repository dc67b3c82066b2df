import { z } from 'zod'
import { err, ok, type Result } from '@/lib/result'
import { emcDoubtPct, emcFlags, emcPct, emcSlope, humidityForEmcPct, type EmcFlag } from '@/lib/wood/emc'
import { humidityPct, mcPct, temperatureC } from './query'

export const emcQuerySchema = z.strictObject({ temperatureC, humidityPct })

/** The moisture content that wood in this air ends up at, how steep that is, and how far a usual sensor leaves it open. */
export function emcAnswer(query: z.output<typeof emcQuerySchema>): {
  emcPct: number
  slope: number
  doubtPct: number
  flags: EmcFlag[]
} {
  return {
    emcPct: emcPct(query.temperatureC, query.humidityPct),
    slope: emcSlope(query.temperatureC, query.humidityPct),
    doubtPct: emcDoubtPct(query.temperatureC, query.humidityPct),
    flags: emcFlags(query.temperatureC, query.humidityPct),
  }
}

export const humidityQuerySchema = z.strictObject({ temperatureC, emcPct: mcPct })

export type HumidityAnswer = { humidityPct: number; flags: EmcFlag[] }

/** The relative humidity that holds wood at a moisture content; none where even saturated air holds less. */
export function humidityAnswer(
  query: z.output<typeof humidityQuerySchema>,
): Result<HumidityAnswer, { code: 'not-possible'; path: string; message: string }> {
  const found = humidityForEmcPct(query.temperatureC, query.emcPct)
  if (!found.ok) {
    const most = found.error.emcMaxPct.toFixed(1)
    return err({
      code: 'not-possible',
      path: 'emcPct',
      message: `Above saturation: air of that temperature holds wood at ${most} % MC at most.`,
    })
  }
  return ok({ humidityPct: found.value, flags: emcFlags(query.temperatureC, found.value) })
}
