import type { PlaceCover } from '@/lib/pieces/piece'
import type { HourOfAir } from './carry-check'
import type { Ring } from './joint-defaults'
import { moistureCourse, type MoistureAt, type StepOfAir } from './moisture-course'

const HOUR_MS = 3_600_000

/** Air of unknown temperature: between a house and a shop. Status: guess. */
const UNKNOWN_TEMPERATURE_C = 15
/** Beyond these the diffusion formula is not used, °C. */
const TEMPERATURE_MIN_C = -10
const TEMPERATURE_MAX_C = 50

/** Doubt of the EMC that a sensor gives, ± % MC. Status: derived (±3 % RH near 50 % RH). */
const SENSOR_DOUBT_PCT = 0.5
/** Doubt of a month's mean standing in for hours, ± % MC. Status: guess, as for an imported box. */
const STAND_IN_DOUBT_PCT = 1.5

export type HistoryInput = {
  /** Oldest first, up to 60 days. */
  readonly history: readonly HourOfAir[]
  /** Mean EMC of the keep room, % MC, for the time before the history; null: the first hour known. */
  readonly baselineEmcPct: number | null
}

/** Temperatures beyond what the diffusion formula takes count as its nearer end. */
export const usableC = (temperatureC: number): number =>
  Math.min(TEMPERATURE_MAX_C, Math.max(TEMPERATURE_MIN_C, temperatureC))

const stepOf = (
  at: number,
  emcPct: number,
  temperatureC: number,
  cover: PlaceCover,
  isKnown: boolean,
): StepOfAir => ({ at, emcPct, temperatureC: usableC(temperatureC), cover, isKnown, isCarryStart: false })

/**
 * The record as steps of air. A gap, marked by null or by hours that are not there at all, holds the last value known
 * and is marked unknown.
 * @returns undefined where nothing is known of the air, before or within the record
 */
export function stepsOfHistory(
  { history, baselineEmcPct }: HistoryInput,
  until: number,
): { startMcPct: number; steps: StepOfAir[] } | undefined {
  const startMcPct = baselineEmcPct ?? history.find((hour) => hour.emcPct !== null)?.emcPct
  if (startMcPct === undefined || startMcPct === null) return undefined
  const steps: StepOfAir[] = []
  let heldEmcPct = startMcPct
  let heldC = history.find((hour) => hour.temperatureC !== null)?.temperatureC ?? UNKNOWN_TEMPERATURE_C
  const hours = history.filter((hour) => hour.at < until)
  hours.forEach((hour, n) => {
    heldEmcPct = hour.emcPct ?? heldEmcPct
    heldC = hour.temperatureC ?? heldC
    const isKnown = hour.emcPct !== null
    steps.push(stepOf(hour.at, heldEmcPct, heldC, hour.cover, isKnown))
    const nextAt = hours[n + 1]?.at ?? until
    if (nextAt > hour.at + HOUR_MS) {
      steps.push(stepOf(hour.at + HOUR_MS, heldEmcPct, heldC, hour.cover, false))
    }
  })
  return { startMcPct, steps }
}

export type RingMoisture = MoistureAt & {
  /** ± % MC: the sensor's, and more the more hours had no reading. */
  readonly doubtPct: number
  /** Hours of the record without a reading. */
  readonly gapHours: number
}

/**
 * The moisture content of a joint's ring now, from the air of the rooms that it was in.
 * @param ring sizes and density, by `ringOfPiece`
 * @param input hourly EMC (% MC) and temperature (°C) with the cover of each hour; null for a gap
 * @param now epoch ms
 * @returns % MC with its doubt; undefined where nothing is known of the air it was in
 *
 * Gaps hold the last value known; how much of the figure rests on them is told.
 * Source: as `moistureCourse`.
 */
export function ringMoisture(ring: Ring, input: HistoryInput, now: number): RingMoisture | undefined {
  const record = stepsOfHistory(input, now)
  if (record === undefined) return undefined
  const moisture =
    record.steps.length === 0
      ? { mcPct: record.startMcPct, unknownShare: 1 }
      : moistureCourse({ size: ring.size, densityKgM3: ring.densityKgM3, now, ...record })(now)
  const gapHours = record.steps.reduce((sum, step, n) => {
    const endAt = record.steps[n + 1]?.at ?? now
    return step.isKnown ? sum : sum + (endAt - step.at) / HOUR_MS
  }, 0)
  return {
    ...moisture,
    doubtPct: Math.hypot(SENSOR_DOUBT_PCT, STAND_IN_DOUBT_PCT * moisture.unknownShare),
    gapHours,
  }
}
