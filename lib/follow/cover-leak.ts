import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { absoluteHumidityGM3, vapourPressurePa } from '@/lib/air/humidity'
import { emcPct } from '@/lib/wood/emc'

/** A closed cover as a small room of its own, whose air follows the wood in it. */
export type ClosedCover =
  | {
      readonly kind: 'tub'
      readonly volumeL: number
      readonly openingsPerHour: number
      readonly massG: number
    }
  | { readonly kind: 'bag'; readonly areaM2: number; readonly massG: number }

/** Air changes an hour of a lidded tub at rest. Status: guess, generous. */
export const TUB_CHANGES_PER_H = 0.5
/** Water through thin polyethylene across the difference of house and shop, g/(m² day). Status: guess. */
export const BAG_G_PER_M2_DAY = 3
/** That difference, as vapour pressure: 3 g/m³ at 10 °C. Status: derived. */
const BAG_REFERENCE_PA = 392

/** A tub with some pieces in it, opened now and then, and a bag round a small box. Status: guess. */
export const USUAL_TUB: ClosedCover = { kind: 'tub', volumeL: 20, openingsPerHour: 1, massG: 300 }
export const USUAL_BAG: ClosedCover = { kind: 'bag', areaM2: 0.05, massG: 80 }

/**
 * Water that leaks into a closed cover.
 * @param inside moisture of the air inside: absolute humidity g/m³ and vapour pressure Pa, with `outside` likewise
 * @returns g/h, negative when it leaks out
 *
 * Source: derived; air changes for a tub (one more at each opening), permeance for a bag.
 */
export function leakGPerH(
  cover: ClosedCover,
  outside: { absoluteHumidityGM3: number; vapourPressurePa: number },
  inside: { absoluteHumidityGM3: number; vapourPressurePa: number },
): number {
  if (cover.kind === 'bag') {
    const difference = outside.vapourPressurePa - inside.vapourPressurePa
    return ((BAG_G_PER_M2_DAY / 24) * cover.areaM2 * difference) / BAG_REFERENCE_PA
  }
  const changesPerH = TUB_CHANGES_PER_H + cover.openingsPerHour
  return (changesPerH * cover.volumeL * (outside.absoluteHumidityGM3 - inside.absoluteHumidityGM3)) / 1000
}

/** RH of the air that the drift is taken at: between a house and a shop. */
const MIDDLE_HUMIDITY_PCT = 65

/**
 * How fast the moisture in a closed cover drifts towards the room's, as a share of the difference each hour.
 * @param cover tub or bag: litres, m², openings an hour (0 to 60), grams of dry wood in it (above 0)
 * @param temperatureC °C, -10 to 50
 * @returns 1/h
 * @throws RangeError for an input out of range or NaN
 *
 * The wood holds the air at its own moisture content, as air stores next to nothing. The isotherm is taken as straight
 * round 65 % RH. Source: derived; 0.03 g an hour and 0.06 g an opening for 20 L across 3 g/m³, 0.15 g a day for a bag.
 */
export function coverDriftPerH(cover: ClosedCover, temperatureC: number): number {
  assertFiniteAbove('massG', cover.massG, 0)
  assertInRange('temperatureC', temperatureC, -10, 50)
  if (cover.kind === 'tub') assertInRange('openingsPerHour', cover.openingsPerHour, 0, 60)
  const airAt = (humidityPct: number) => {
    const vapourPa = vapourPressurePa(temperatureC, humidityPct)
    return {
      absoluteHumidityGM3: absoluteHumidityGM3(temperatureC, vapourPa),
      vapourPressurePa: vapourPa,
    }
  }
  const points = emcPct(temperatureC, MIDDLE_HUMIDITY_PCT + 5) - emcPct(temperatureC, MIDDLE_HUMIDITY_PCT - 5)
  const leak = leakGPerH(cover, airAt(MIDDLE_HUMIDITY_PCT + 5), airAt(MIDDLE_HUMIDITY_PCT - 5))
  return (100 * leak) / cover.massG / points
}
