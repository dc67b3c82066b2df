/**
 * What a reading may hold. Wider than any room: colder or warmer values are a fault of the sensor, not air.
 * The lower end itself is left out, because −40 °C is what several sensors answer when they have nothing to say.
 */
export const TEMPERATURE_ABOVE_C = -40
export const TEMPERATURE_MAX_C = 80
export const HUMIDITY_MIN_PCT = 0
export const HUMIDITY_MAX_PCT = 100

/**
 * Temperatures that common sensors give out when they are broken, unplugged or just switched on:
 * 85 (switched on, nothing measured yet), 125 and −40 (an end of the scale), −127 (no answer on the wire).
 * Status: common practice, no source.
 */
export const FAULT_TEMPERATURES_C: readonly number[] = [85, 125, -127, -40]

/** Sensors' clocks may run ahead of ours by this much, ms. Status: guess; covers a clock set once a day. */
export const CLOCK_AHEAD_MAX_MS = 5 * 60_000
/** Nothing was measured before this: an older time is a clock that was never set. Also the oldest month of readings. */
export const OLDEST_READING_MS = Date.UTC(2020, 0, 1)

export type Implausible = 'sensor-fault' | 'out-of-range' | 'negative-zero'

/** Why a temperature can't be used, or `undefined` when it can. */
export function implausibleTemperature(temperatureC: number): Implausible | undefined {
  if (FAULT_TEMPERATURES_C.includes(temperatureC)) return 'sensor-fault'
  if (!(temperatureC > TEMPERATURE_ABOVE_C && temperatureC <= TEMPERATURE_MAX_C)) return 'out-of-range'
  return Object.is(temperatureC, -0) ? 'negative-zero' : undefined
}

/** Why a relative humidity can't be used, or `undefined` when it can. */
export function implausibleHumidity(humidityPct: number): Implausible | undefined {
  if (!(humidityPct >= HUMIDITY_MIN_PCT && humidityPct <= HUMIDITY_MAX_PCT)) return 'out-of-range'
  return Object.is(humidityPct, -0) ? 'negative-zero' : undefined
}

/** Why a time can't be used, or `undefined` when it can. */
export function implausibleTime(at: Date, arrivedAt: Date): 'clock-ahead' | 'clock-not-set' | undefined {
  if (at.getTime() > arrivedAt.getTime() + CLOCK_AHEAD_MAX_MS) return 'clock-ahead'
  return at.getTime() < OLDEST_READING_MS ? 'clock-not-set' : undefined
}

/**
 * A value in whole thousandths, as it is stored: finer than any sensor, and a number that single precision gives
 * back letter for letter, so that figures made on arrival equal figures made again from the table.
 */
export const inThousandths = (value: number): number => Math.round(value * 1000) + 0
export const toStored = (value: number): number => inThousandths(value) / 1000
