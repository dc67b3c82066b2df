import { assumedGapS } from '@/lib/notices/policy'
import { silentAfterOf, type RuleBook } from '@/lib/notices/rule-settings'
import type { SensorStateWord } from './sensor'

const hourMs = 3_600_000
/** A sensor is late after three of its usual gaps, 10 min at least: long enough for one lost message. A guess. */
const lateAfterGaps = 3
const lateAfterMsMin = 600_000
/** A room with typed readings only is looked at once a day or so. A guess. */
const typedLateAfterMs = 24 * hourMs

export interface SensorSigns {
  kind: 'device' | 'typed'
  heardAt: Date | null
  usualGapS: number | null
  archivedAt: Date | null
}

/**
 * Whether a sensor is alive. What counts is when it was last heard, not the time that its reading bears.
 * @param rules how patient the site is; as it comes where left out
 */
export function sensorState(sensor: SensorSigns, now: Date, rules?: RuleBook): SensorStateWord {
  if (sensor.archivedAt !== null) return 'retired'
  if (sensor.heardAt === null) return 'never-heard'
  const ageMs = now.getTime() - sensor.heardAt.getTime()
  // Nobody is expected to stand there typing, so such a row is late at the most.
  if (sensor.kind === 'typed') return ageMs > typedLateAfterMs ? 'late' : 'alive'
  if (ageMs > silentAfterOf(rules, sensor.usualGapS)) return 'silent'
  const lateAfterMs = Math.max(lateAfterMsMin, lateAfterGaps * (sensor.usualGapS ?? assumedGapS) * 1000)
  return ageMs > lateAfterMs ? 'late' : 'alive'
}

/** Whether a sensor's clock was seen to be wrong lately. */
export function sensorClock(
  signs: { clockNotSetAt: Date | null; clockAheadAt: Date | null },
  now: Date,
): 'right' | 'not-set' | 'ahead' {
  const lately = (at: Date | null): number =>
    at !== null && now.getTime() - at.getTime() < 24 * hourMs ? at.getTime() : 0
  const notSet = lately(signs.clockNotSetAt)
  const ahead = lately(signs.clockAheadAt)
  if (notSet === 0 && ahead === 0) return 'right'
  return notSet >= ahead ? 'not-set' : 'ahead'
}
