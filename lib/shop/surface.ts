import { assertInRange } from '@/lib/assert'
import { saturationPressurePa } from '@/lib/air/saturation'
import { vapourPressurePa } from '@/lib/air/humidity'
import { dewPointOf } from './outdoor-air'
import { mouldSurfaceHumidityPct, nearDewPointK } from './policy'
import type { ShopAir } from './warm-to'

/** Share of the way from outside to inside that a cold inner surface has come, without a sensor on it. From memory. */
export const SURFACE_FACTOR = 0.75

/** A surface in the room: measured, or taken from the outdoor temperature. */
export type Surface = { readonly temperatureC: number; readonly from: 'measured' | 'assumed' }

/**
 * A cold inner surface of a room in which none is measured: three quarters of the way from outside to inside. It covers
 * walls; a lathe bed that has stood in the cold is colder for hours after the room has been warmed, so measure that.
 * @param roomC air in the room, °C, -10 to 50
 * @param outdoorC air outside, °C, -40 to 50
 * @throws RangeError for an input out of range or NaN
 *
 * Source: temperature factor as in ISO 13788, with 0.75 as a cautious figure (from memory).
 */
export function assumedSurface(roomC: number, outdoorC: number): Surface {
  assertInRange('roomC', roomC, -10, 50)
  assertInRange('outdoorC', outdoorC, -40, 50)
  return { temperatureC: roomC - (1 - SURFACE_FACTOR) * (roomC - outdoorC), from: 'assumed' }
}

export type SurfaceAnswer = {
  readonly surfaceC: number
  readonly from: Surface['from']
  /** % RH right at the surface; over 100 means that it is wet. Not clipped. */
  readonly surfaceHumidityPct: number
  readonly dewPointC: number | undefined
  readonly state: 'wet' | 'near-wet' | 'mould-likely' | 'dry'
}

/**
 * Humidity at a surface and whether water condenses on it: cold iron rusts, cold walls grow mould.
 * @param air air in the room, -10 to 50 °C and 0 to 100 % RH
 * @param surface measured or assumed, -40 to 60 °C
 * @throws RangeError for an input out of range or NaN
 *
 * Source: definition of relative humidity, ASHRAE Handbook, Fundamentals (2017), ch. 1, eq. 12; 80 % as in ASHRAE
 * 160-2009.
 */
export function surfaceAnswer(air: ShopAir, surface: Surface): SurfaceAnswer {
  assertInRange('surfaceC', surface.temperatureC, -40, 60)
  const vapourPa = vapourPressurePa(air.temperatureC, air.humidityPct, 'water')
  const surfaceHumidityPct = (100 * vapourPa) / saturationPressurePa(surface.temperatureC, 'water')
  const dewPointC = dewPointOf(air)
  return {
    surfaceC: surface.temperatureC,
    from: surface.from,
    surfaceHumidityPct,
    dewPointC,
    state: stateOf(surface.temperatureC, dewPointC, surfaceHumidityPct),
  }
}

function stateOf(
  surfaceC: number,
  dewPointC: number | undefined,
  humidityPct: number,
): SurfaceAnswer['state'] {
  if (dewPointC !== undefined && surfaceC <= dewPointC) return 'wet'
  if (dewPointC !== undefined && surfaceC <= dewPointC + nearDewPointK) return 'near-wet'
  return humidityPct > mouldSurfaceHumidityPct ? 'mould-likely' : 'dry'
}
