import { severities, type Severity, type VerdictHold } from './inputs'
import { betterAfterMs, worsenAfterMs, worsenAfterReadings } from './policy'

export interface SeenVerdict {
  severity: Severity
  now: number
  /** When the air was read that the verdict rests on. */
  airAt: number | null
}

/**
 * Keeps a verdict from flickering with the noise of a sensor: a worse one counts once two readings over at least
 * 5 min say so, a better one after it has held for 30 min. The first one seen counts at once.
 */
export function nextVerdictHold(before: VerdictHold | undefined, seen: SeenVerdict): VerdictHold {
  const none = { other: null, otherSince: 0, otherReadings: 0, otherAirAt: null }
  if (before === undefined) return { held: seen.severity, told: 'fine', ...none }
  if (seen.severity === before.held) return { ...before, ...none }

  const worsens = severities[seen.severity] > severities[before.held]
  const sameDirection =
    before.other !== null && severities[before.other] > severities[before.held] === worsens
  const waiting: VerdictHold = sameDirection
    ? {
        ...before,
        other: seen.severity,
        otherReadings: before.otherReadings + (seen.airAt === before.otherAirAt ? 0 : 1),
        otherAirAt: seen.airAt,
      }
    : { ...before, other: seen.severity, otherSince: seen.now, otherReadings: 1, otherAirAt: seen.airAt }

  const lasted = seen.now - waiting.otherSince
  // Air that is no longer read at all brings no second reading: then the time alone counts.
  const enoughReadings = waiting.otherReadings >= worsenAfterReadings || seen.severity === 'unknown'
  const counts = worsens ? enoughReadings && lasted >= worsenAfterMs : lasted >= betterAfterMs
  return counts ? { ...waiting, held: seen.severity, ...none } : waiting
}
