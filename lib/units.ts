/** Exact by definition: the kelvin and degree Celsius scales (SI Brochure, 9th edition, 2019). */
export const KELVIN_AT_ZERO_C = 273.15
/** Exact by definition: international yard and pound agreement, 1959. */
export const MM_PER_INCH = 25.4
/** Exact by definition: international avoirdupois ounce, 1959. */
export const GRAMS_PER_OUNCE = 28.349523125

export const kelvinFromCelsius = (temperatureC: number): number => temperatureC + KELVIN_AT_ZERO_C

export const fahrenheitFromCelsius = (temperatureC: number): number => (temperatureC * 9) / 5 + 32
export const celsiusFromFahrenheit = (temperatureF: number): number => ((temperatureF - 32) * 5) / 9

export const inchesFromMm = (lengthMm: number): number => lengthMm / MM_PER_INCH
export const mmFromInches = (lengthIn: number): number => lengthIn * MM_PER_INCH

export const ouncesFromGrams = (massG: number): number => massG / GRAMS_PER_OUNCE
export const gramsFromOunces = (massOz: number): number => massOz * GRAMS_PER_OUNCE
