import type { Salt } from '@/lib/air/salts'

/** Columns of the table below, °C. */
export const SALT_TABLE_TEMPERATURES_C = [5, 10, 15, 20, 25, 30, 35] as const

export type SaltTableRow = {
  readonly salt: Salt
  /** % RH, one for each column. */
  readonly humidityPct: readonly number[]
  /** `from memory`: recalled, and confirmed by nothing that was seen. */
  readonly status: 'confirmed' | 'from memory'
}

/**
 * Relative humidity over saturated salt solutions, as printed: recalled, then confirmed by the paper's own polynomials or
 * by a published extract where the status says so.
 * Source: Greenspan, Journal of Research of the National Bureau of Standards 81A (1977), 89-96, Table 2.
 */
export const SALT_TABLE: readonly SaltTableRow[] = [
  { salt: 'LiCl', humidityPct: [11.26, 11.29, 11.3, 11.31, 11.3, 11.28, 11.25], status: 'confirmed' },
  { salt: 'MgCl2', humidityPct: [33.6, 33.47, 33.3, 33.07, 32.78, 32.44, 32.05], status: 'confirmed' },
  { salt: 'Mg(NO3)2', humidityPct: [58.86, 57.36, 55.87, 54.38, 52.89, 51.4, 49.91], status: 'from memory' },
  { salt: 'NaCl', humidityPct: [75.65, 75.67, 75.61, 75.47, 75.29, 75.09, 74.87], status: 'confirmed' },
  { salt: 'KCl', humidityPct: [87.67, 86.77, 85.92, 85.11, 84.34, 83.62, 82.95], status: 'confirmed' },
  { salt: 'K2SO4', humidityPct: [98.48, 98.18, 97.89, 97.59, 97.3, 97.0, 96.71], status: 'confirmed' },
]
