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

/** Exact by definition: the cube of the foot of 1959. */
export const CUBIC_METRES_PER_CUBIC_FOOT = 0.028316846592
/** Exact by definition: international avoirdupois pound, 1959. */
export const KILOGRAMS_PER_POUND = 0.45359237

export const cubicFeetFromCubicMetres = (volumeM3: number): number => volumeM3 / CUBIC_METRES_PER_CUBIC_FOOT
export const cubicMetresFromCubicFeet = (volumeFt3: number): number => volumeFt3 * CUBIC_METRES_PER_CUBIC_FOOT

export const poundsFromKilograms = (massKg: number): number => massKg / KILOGRAMS_PER_POUND
export const kilogramsFromPounds = (massLb: number): number => massLb * KILOGRAMS_PER_POUND
