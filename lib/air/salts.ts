import { assertInRange } from '@/lib/assert'

export type Salt = 'LiCl' | 'MgCl2' | 'Mg(NO3)2' | 'NaCl' | 'KCl' | 'K2SO4'

export type SaltFixedPoint = { readonly salt: Salt; readonly humidityPct: number; readonly doubtPct: number }

/** Range in which the salts are listed here, °C. */
export const SALTS_MIN_C = 5
export const SALTS_MAX_C = 35

export type SaltRow = {
  readonly salt: Salt
  /** % RH, and per °C, °C² and °C³. */
  readonly polynomial: readonly [number, number, number, number]
  /** Uncertainty at 5, 10 … 35 °C, % RH. Status: from memory. */
  readonly doubtsPct: readonly number[]
}

/**
 * Source: Greenspan, J. Res. NBS 81A (1977), 89-96, Table 1; Mg(NO3)2 and K2SO4 from memory. The linear term of LiCl is
 * positive, or its own table of values is not met.
 */
export const SALTS: readonly SaltRow[] = [
  {
    salt: 'LiCl',
    polynomial: [11.2323, 0.00824245, -0.00021489, 0],
    doubtsPct: [0.47, 0.41, 0.35, 0.31, 0.27, 0.24, 0.22],
  },
  {
    salt: 'MgCl2',
    polynomial: [33.6686, -0.00797397, -0.00108988, 0],
    doubtsPct: [0.28, 0.24, 0.21, 0.18, 0.16, 0.14, 0.13],
  },
  {
    salt: 'Mg(NO3)2',
    polynomial: [60.3514, -0.29864, 0, 0],
    doubtsPct: [0.43, 0.33, 0.27, 0.23, 0.22, 0.24, 0.29],
  },
  {
    salt: 'NaCl',
    polynomial: [75.5164, 0.0398321, -0.00265459, 2.848e-5],
    doubtsPct: [0.27, 0.22, 0.18, 0.14, 0.12, 0.11, 0.12],
  },
  {
    salt: 'KCl',
    polynomial: [88.619, -0.19334, 0.000899706, 0],
    doubtsPct: [0.45, 0.39, 0.33, 0.29, 0.26, 0.25, 0.25],
  },
  {
    salt: 'K2SO4',
    polynomial: [98.7792, -0.0591502, 0, 0],
    doubtsPct: [0.91, 0.76, 0.63, 0.53, 0.45, 0.4, 0.38],
  },
]

const STEP_C = 5

/**
 * The relative humidity over saturated salt solutions, for checking sensors.
 * @param temperatureC °C, 5 to 35
 * @returns for each salt, driest first: % RH and its uncertainty, ± % RH
 * @throws RangeError for an input out of range or NaN
 *
 * Within 0.1 % RH of the printed values. Uncertainties between the listed temperatures are on a straight line.
 * Source: Greenspan, J. Res. NBS 81A (1977), 89-96; uncertainties from memory.
 */
export function saltFixedPoints(temperatureC: number): SaltFixedPoint[] {
  assertInRange('temperatureC', temperatureC, SALTS_MIN_C, SALTS_MAX_C)
  const place = (temperatureC - SALTS_MIN_C) / STEP_C
  const below = Math.floor(place)
  return SALTS.map(({ salt, polynomial: [a0, a1, a2, a3], doubtsPct }) => {
    const low = doubtsPct[below] ?? 0
    const high = doubtsPct[below + 1] ?? low
    return {
      salt,
      humidityPct: a0 + temperatureC * (a1 + temperatureC * (a2 + temperatureC * a3)),
      doubtPct: low + (high - low) * (place - below),
    }
  })
}
