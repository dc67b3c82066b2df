import { chanceOf } from './chance'
import type { TrueRoom, TruthAir } from './truth-air'

/** What hangs in a true room and reads it: off within what a data sheet states, noisy, and silent now and then. */
export interface YearSensor {
  /** Undefined while it is silent. */
  readonly read: (atMs: number) => { temperatureC: number; humidityPct: number } | undefined
}

export const READING_GAP_MS = 600_000
const HOUR_MS = 3_600_000
/** Between two silences, and for how long. */
const BETWEEN_H = 45 * 24
const SILENT_MOST_H = 10
const LOST_SHARE = 0.01

export function yearSensor(seed: number, room: TrueRoom, air: TruthAir, fromMs: number): YearSensor {
  const chance = chanceOf(seed, `sensor ${room}`)
  // ± 3 % RH and ± 0.3 K are two standard deviations; a year adds half a point.
  const offsetPct = Math.min(3, Math.max(-3, 1.5 * chance.normal()))
  const offsetC = Math.min(0.3, Math.max(-0.3, 0.15 * chance.normal()))
  let silentFromMs = fromMs - BETWEEN_H * HOUR_MS * Math.log(1 - chance.even())
  let silentUntilMs = silentFromMs + chance.between(0.5, SILENT_MOST_H) * HOUR_MS
  return {
    read: (atMs) => {
      const noise = chance.normal()
      const isLost = chance.happens(LOST_SHARE)
      if (atMs >= silentUntilMs) {
        silentFromMs = atMs - BETWEEN_H * HOUR_MS * Math.log(1 - chance.even())
        silentUntilMs = silentFromMs + chance.between(0.5, SILENT_MOST_H) * HOUR_MS
      }
      if (isLost || (atMs >= silentFromMs && atMs < silentUntilMs)) return undefined
      const { temperatureC, humidityPct } = air.at(room, atMs)
      const driftPct = (0.5 * (atMs - fromMs)) / (8766 * HOUR_MS)
      const pct = humidityPct + offsetPct + driftPct + 0.3 * noise
      return {
        temperatureC: Math.round((temperatureC + offsetC + 0.05 * noise) * 100) / 100,
        humidityPct: Math.round(Math.min(99.5, Math.max(2, pct)) * 10) / 10,
      }
    },
  }
}
