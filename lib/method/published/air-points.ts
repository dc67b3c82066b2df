export type AirQuantity = 'saturation-pressure' | 'humidity-ratio' | 'enthalpy' | 'dry-enthalpy'

export type AirPoint = {
  readonly quantity: AirQuantity
  readonly temperatureC: number
  /** Pa, kg per kg of dry air, or J per kg of dry air. */
  readonly value: number
}

/**
 * Saturated air, and dry air, as printed.
 * Source: ASHRAE Handbook, Fundamentals (2017), ch. 1, Tables 2 and 3, as quoted in the published tests of psychrolib.
 */
export const AIR_POINTS: readonly AirPoint[] = [
  { quantity: 'saturation-pressure', temperatureC: -20, value: 103.24 },
  { quantity: 'saturation-pressure', temperatureC: -5, value: 401.74 },
  { quantity: 'saturation-pressure', temperatureC: 5, value: 872.6 },
  { quantity: 'saturation-pressure', temperatureC: 25, value: 3169.7 },
  { quantity: 'saturation-pressure', temperatureC: 50, value: 12351.3 },
  { quantity: 'humidity-ratio', temperatureC: -5, value: 0.0024863 },
  { quantity: 'humidity-ratio', temperatureC: 5, value: 0.005425 },
  { quantity: 'humidity-ratio', temperatureC: 25, value: 0.020173 },
  { quantity: 'humidity-ratio', temperatureC: 50, value: 0.086863 },
  { quantity: 'enthalpy', temperatureC: 5, value: 18639 },
  { quantity: 'enthalpy', temperatureC: 25, value: 76504 },
  { quantity: 'dry-enthalpy', temperatureC: 25, value: 25148 },
]
