import { absoluteHumidityGM3, humidityRatio, vapourPressurePa } from '@/lib/air/humidity'
import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import type { ShopAir } from './warm-to'

const GRAMS_PER_KG = 1000

/** Density of air as a round figure, kg/m³ (20 °C, 101325 Pa). Source: ASHRAE Handbook, Fundamentals (2017), ch. 1. */
export const AIR_DENSITY_KG_M3 = 1.2

/** Humidity ratio of a room's air by its sensor, kg per kg of dry air. */
export const humidityRatioOf = (air: ShopAir): number =>
  humidityRatio(vapourPressurePa(air.temperatureC, air.humidityPct, 'water'))

/**
 * Water to take out of a room's air once, to bring it from one humidity to another at the same temperature.
 * @param volumeM3 room, m³, above 0
 * @param temperatureC -10 to 50 °C
 * @param fromHumidityPct before, % RH
 * @param toHumidityPct after, % RH
 * @returns kg; negative where water has to be added
 * @throws RangeError for an input out of range or NaN
 *
 * Wood and walls hold far more than the air, and give it up for weeks: see `waterInWoodKg`.
 * Source: ideal gas law for water vapour.
 */
export function waterInAirKg(
  volumeM3: number,
  temperatureC: number,
  fromHumidityPct: number,
  toHumidityPct: number,
): number {
  assertFiniteAbove('volumeM3', volumeM3, 0)
  const gramsPerM3 = (humidityPct: number): number =>
    absoluteHumidityGM3(temperatureC, vapourPressurePa(temperatureC, humidityPct, 'water'))
  return (volumeM3 * (gramsPerM3(fromHumidityPct) - gramsPerM3(toHumidityPct))) / GRAMS_PER_KG
}

/**
 * Water that the wood in a room gives up on its way from one EMC to another.
 * @param woodKg dry mass of stock, benches, shelves and boards, kg, 0 or more
 * @param fromEmcPct EMC before, % MC, 0 to 30
 * @param toEmcPct EMC after, % MC, 0 to 30
 * @returns kg; negative where it takes water up
 * @throws RangeError for an input out of range or NaN
 *
 * Source: definition of moisture content.
 */
export function waterInWoodKg(woodKg: number, fromEmcPct: number, toEmcPct: number): number {
  assertInRange('woodKg', woodKg, 0, 1_000_000)
  assertInRange('fromEmcPct', fromEmcPct, 0, 30)
  assertInRange('toEmcPct', toEmcPct, 0, 30)
  return (woodKg * (fromEmcPct - toEmcPct)) / 100
}

/**
 * Water that air from outside brings in, beyond what leaves with the room's air.
 * @param volumeM3 room, m³, above 0
 * @param airChangesPerH how often an hour the room's air is replaced, 0 to 50
 * @param outdoorRatio humidity ratio outside, kg/kg
 * @param roomRatio humidity ratio that the room is held at, kg/kg
 * @returns kg an hour; negative where airing takes water away
 * @throws RangeError for an input out of range or NaN
 *
 * Source: derived; mass balance with air at 1.2 kg/m³.
 */
export function waterByAirChangesKgPerH(
  volumeM3: number,
  airChangesPerH: number,
  outdoorRatio: number,
  roomRatio: number,
): number {
  assertFiniteAbove('volumeM3', volumeM3, 0)
  assertInRange('airChangesPerH', airChangesPerH, 0, 50)
  assertInRange('outdoorRatio', outdoorRatio, 0, 1)
  assertInRange('roomRatio', roomRatio, 0, 1)
  return airChangesPerH * volumeM3 * AIR_DENSITY_KG_M3 * (outdoorRatio - roomRatio)
}
