import { HOUR_MS, plainWeather } from '../climates/outdoor'
import type { Scenario } from './scenario'

const MINUTE_MS = 60_000
/** The sensor with the bad network loses it for so long in every stretch of so long. */
const AWAY_MS = 35 * MINUTE_MS
const STRETCH_MS = 5 * HOUR_MS

/** The weather as it comes, one silent sensor, and one that goes away now and then and catches up. */
export const normalDay: Scenario = {
  name: 'normal-day',
  weatherFrom: () => plainWeather,
  isAway: ({ habit }, startedAtMs, atMs) => {
    if (habit === 'silent') return true
    // Counted from the start, so that whoever opens the demo first sees every sensor report.
    return habit === 'drops-out' && (atMs - startedAtMs) % STRETCH_MS > STRETCH_MS - AWAY_MS
  },
}
