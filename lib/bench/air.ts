import { z } from 'zod'
import { dewPointC } from '@/lib/air/dew-point'
import { enthalpyKjKg } from '@/lib/air/enthalpy'
import {
  absoluteHumidityGM3,
  humidityAfterTemperatureChangePct,
  humidityRatio,
  vapourPressurePa,
} from '@/lib/air/humidity'
import { saturationPressurePa, TRIPLE_POINT_C } from '@/lib/air/saturation'
import { wetBulbC } from '@/lib/air/wet-bulb'
import { emcFlags, emcPct, type EmcFlag } from '@/lib/wood/emc'
import { humidityPct, temperatureC } from './query'

export const airQuerySchema = z.strictObject({ temperatureC, humidityPct })

/**
 * Everything about one air at 101325 Pa. Below the triple point its humidity counts over ice, as in printed tables, and
 * the answer says so; a sensor's figure there would count over water.
 */
export function airAnswer(query: z.output<typeof airQuerySchema>) {
  const vapourPa = vapourPressurePa(query.temperatureC, query.humidityPct)
  const ratio = humidityRatio(vapourPa)
  const dewPoint = dewPointC(vapourPa)
  return {
    saturationPressurePa: saturationPressurePa(query.temperatureC),
    vapourPressurePa: vapourPa,
    hasDewPoint: dewPoint.ok,
    ...(dewPoint.ok ? { dewPointC: dewPoint.value } : {}),
    humidityRatio: ratio,
    absoluteHumidityGM3: absoluteHumidityGM3(query.temperatureC, vapourPa),
    wetBulbC: wetBulbC(query.temperatureC, query.humidityPct),
    enthalpyKjKg: enthalpyKjKg(query.temperatureC, ratio),
    saturatedOver: query.temperatureC > TRIPLE_POINT_C ? 'water' : 'ice',
    flags: emcFlags(query.temperatureC, query.humidityPct),
  }
}

export const warmingQuerySchema = z.strictObject({
  fromC: temperatureC,
  fromHumidityPct: humidityPct,
  toC: temperatureC,
})

export type WarmingAnswer = {
  humidityPct: number
  condenses: boolean
  emcPct?: number
  flags: EmcFlag[]
}

/** More than rounding over saturation: water would fall out. */
const CONDENSES_ABOVE_PCT = 100 + 1e-9

/**
 * The same air after warming or cooling. Cooled below its dew point it would be over 100 % RH: told as it is, with
 * `condenses`, and without an EMC, for no such air exists.
 */
export function warmingAnswer(query: z.output<typeof warmingQuerySchema>): WarmingAnswer {
  const after = humidityAfterTemperatureChangePct(query.fromHumidityPct, query.fromC, query.toC)
  if (after > CONDENSES_ABOVE_PCT)
    return { humidityPct: after, condenses: true, flags: emcFlags(query.toC, 100) }
  const humidity = Math.min(100, after)
  return {
    humidityPct: humidity,
    condenses: false,
    emcPct: emcPct(query.toC, humidity),
    flags: emcFlags(query.toC, humidity),
  }
}
