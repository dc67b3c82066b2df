import { assertInRange } from '@/lib/assert'
import { humidityAfterTemperatureChangePct } from '@/lib/air/humidity'
import { err, ok, type Result } from '@/lib/result'
import { emcPct, humidityForEmcPct } from '@/lib/wood/emc'
import { warmestShopC } from './policy'

/** A room's air as its sensor gives it: °C and % RH, over water also below freezing. */
export type ShopAir = { readonly temperatureC: number; readonly humidityPct: number }

/** `dry-enough`: wood there ends at the wanted MC or under it already, and neither warming nor drying is needed. */
export type NotNeeded = { readonly code: 'dry-enough'; readonly emcPct: number }
/** `not-by-warming`: even the warmest shop that is asked of anybody leaves wood damper than wanted. */
export type NotByWarming = { readonly code: 'not-by-warming'; readonly emcAtWarmestPct: number }

const TOLERANCE_C = 1e-7

/**
 * How warm a shop has to be, with no water added or taken away, for wood in it to settle at a moisture content.
 * @param air temperature -10 to 50 °C, humidity 0 to 100 % RH
 * @param targetEmcPct EMC wanted, % MC, 0 to 30
 * @returns the temperature in °C, and the humidity it then has; or `dry-enough`, or `not-by-warming` up to 35 °C
 * @throws RangeError for an input out of range or NaN
 *
 * The EMC falls all the way as air is warmed, so halving finds the one answer. Walls and wood give up water as the room
 * warms, so in practice the air ends damper than this until they have dried; wood follows in days.
 * Source: Wood Handbook (FPL-GTR-190, 2010), Eq. 4-5, with the vapour pressure held.
 */
export function warmToForEmc(air: ShopAir, targetEmcPct: number): Result<ShopAir, NotNeeded | NotByWarming> {
  assertInRange('targetEmcPct', targetEmcPct, 0, 30)
  const now = emcPct(air.temperatureC, air.humidityPct)
  if (now <= targetEmcPct) return err({ code: 'dry-enough', emcPct: now })
  const humidityAtPct = (toC: number): number => Math.min(100, warmedHumidityPct(air, toC))
  const emcAtPct = (toC: number): number => emcPct(toC, humidityAtPct(toC))
  if (air.temperatureC >= warmestShopC) return err({ code: 'not-by-warming', emcAtWarmestPct: now })
  const emcAtWarmestPct = emcAtPct(warmestShopC)
  if (emcAtWarmestPct > targetEmcPct) return err({ code: 'not-by-warming', emcAtWarmestPct })
  let low = air.temperatureC
  let high = warmestShopC
  while (high - low > TOLERANCE_C) {
    const middle = (low + high) / 2
    if (emcAtPct(middle) > targetEmcPct) low = middle
    else high = middle
  }
  return ok({ temperatureC: high, humidityPct: humidityAtPct(high) })
}

/** Humidity of the same air at another temperature, over water as sensors count it, % RH; over 100 means condensation. */
export const warmedHumidityPct = (air: ShopAir, toC: number): number =>
  humidityAfterTemperatureChangePct(air.humidityPct, air.temperatureC, toC, 'water')

/**
 * How dry the air has to be at the temperature it has, for wood in it to settle at a moisture content.
 * @param air temperature -10 to 50 °C, humidity 0 to 100 % RH
 * @param targetEmcPct EMC wanted, % MC, 0 to 30
 * @returns % RH, below that of the air; or `dry-enough`
 * @throws RangeError for an input out of range or NaN
 *
 * Source: inverse of Wood Handbook (FPL-GTR-190, 2010), Eq. 4-5.
 */
export function dryToForEmc(air: ShopAir, targetEmcPct: number): Result<number, NotNeeded> {
  assertInRange('targetEmcPct', targetEmcPct, 0, 30)
  const now = emcPct(air.temperatureC, air.humidityPct)
  if (now <= targetEmcPct) return err({ code: 'dry-enough', emcPct: now })
  const found = humidityForEmcPct(air.temperatureC, targetEmcPct)
  // Saturated air holds wood damper still than this air does, so it is never beyond saturation.
  return found.ok ? found : err({ code: 'dry-enough', emcPct: now })
}
