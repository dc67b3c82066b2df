import { saturationPressurePa } from '@/lib/air/saturation'
import { STANDARD_PRESSURE_PA, WATER_TO_AIR_MASS_RATIO } from '@/lib/air/humidity'
import { assertFiniteAbove, assertInRange } from '@/lib/assert'
import { AIR_DENSITY_KG_M3 } from './water'

/** What warms the shop. Flued: what it burns goes up a chimney. Unflued: into the room, water and carbon monoxide too. */
export const heaterKinds = ['electric', 'flued', 'unflued'] as const
export type HeaterKind = (typeof heaterKinds)[number]

/**
 * Water from burning a kilogram of propane, kg. Source: C3H8 + 5 O2 -> 3 CO2 + 4 H2O by molar masses (44.10 and
 * 18.015 g/mol), which gives 1.634; 1.64 as usually printed. Status: derived.
 */
export const PROPANE_WATER_KG_PER_KG = 1.64
/** Heat from a kilogram of propane whose water stays vapour (lower heating value), kWh. Status: from memory. */
export const PROPANE_HEAT_KWH_PER_KG = 12.9

/**
 * Water that a heater puts into the room for the heat it gives.
 * @returns kg for each kWh: 0.127 for an unflued propane heater, 0 for an electric or flued one
 *
 * Paraffin gives a little less for its heat, wood and town gas differ too; an unflued one is taken as propane.
 */
export const heaterWaterKgPerKwh = (kind: HeaterKind): number =>
  kind === 'unflued' ? PROPANE_WATER_KG_PER_KG / PROPANE_HEAT_KWH_PER_KG : 0

/**
 * Humidity of a room in the long run, held warm by a heater while air from outside comes in.
 * @param room volumeM3 above 0; airChangesPerH above 0 to 50; temperatureC held, -10 to 50 °C
 * @param incomingRatio humidity ratio of the air that comes in, kg/kg
 * @param waterKgPerH water that the heater adds, kg an hour, 0 to 1000000
 * @returns % RH; over 100 means that water condenses in the room. Not clipped.
 * @throws RangeError for an input out of range or NaN
 *
 * Leaves out what wood and walls take up or give, so it is where the air is heading, not where it is tonight.
 * Source: derived; mass balance with air at 1.2 kg/m³.
 */
export function heatedHumidityPct(
  room: { readonly volumeM3: number; readonly airChangesPerH: number; readonly temperatureC: number },
  incomingRatio: number,
  waterKgPerH: number,
): number {
  assertFiniteAbove('volumeM3', room.volumeM3, 0)
  assertFiniteAbove('airChangesPerH', room.airChangesPerH, 0)
  assertInRange('airChangesPerH', room.airChangesPerH, 0, 50)
  assertInRange('temperatureC', room.temperatureC, -10, 50)
  assertInRange('incomingRatio', incomingRatio, 0, 1)
  assertInRange('waterKgPerH', waterKgPerH, 0, 1_000_000)
  const ratio = incomingRatio + waterKgPerH / (room.airChangesPerH * room.volumeM3 * AIR_DENSITY_KG_M3)
  const vapourPa = (STANDARD_PRESSURE_PA * ratio) / (WATER_TO_AIR_MASS_RATIO + ratio)
  return (100 * vapourPa) / saturationPressurePa(room.temperatureC, 'water')
}
