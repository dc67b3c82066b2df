import { plainWeather } from '../climates/outdoor'
import type { Scenario } from './scenario'

const MINUTE_MS = 60_000
const HERE_MS = 2 * MINUTE_MS
const AWAY_MS = 4 * MINUTE_MS

/** Everything but the silent sensor is away four minutes of every six, keeps its readings, and sends them together. */
export const dropOutCatchUp: Scenario = {
  name: 'drop-out-catch-up',
  weatherFrom: () => plainWeather,
  isAway: ({ habit }, startedAtMs, atMs) =>
    habit === 'silent' || (atMs - startedAtMs) % (HERE_MS + AWAY_MS) >= HERE_MS,
}
