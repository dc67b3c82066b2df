import type { CarryCheckInput } from './carry-check'
import type { ResolvedJoint } from './joint-defaults'
import { moistureCourse, type MoistureAt, type StepOfAir } from './moisture-course'
import { stepsOfHistory, usableC } from './ring-moisture'

const HOUR_MS = 3_600_000

type FreshAir = Extract<CarryCheckInput['there'], { kind: 'fresh' }>

/** The air from now (or from the start, if that is later) on; the last hour known is held for what comes after. */
function comingSteps(input: CarryCheckInput, there: FreshAir): StepOfAir[] {
  const fromAt = Math.max(input.now, input.startsAt)
  const hours = input.forecast.filter((hour) => hour.at + HOUR_MS > fromAt)
  const airs =
    hours.length > 0 ? hours : [{ at: fromAt, emcPct: there.emcPct, temperatureC: there.temperatureC }]
  return airs.map((hour, n) => ({
    at: n === 0 ? fromAt : hour.at,
    emcPct: hour.emcPct,
    temperatureC: usableC(hour.temperatureC),
    cover: input.cover,
    isKnown: true,
    isCarryStart: false,
  }))
}

/** The hours already out, with a step at the very start: the record is kept by whole hours. */
function stepsSinceStart(
  recorded: readonly StepOfAir[],
  coming: readonly StepOfAir[],
  startsAt: number,
): StepOfAir[] {
  const out = [...recorded.filter((step) => step.at >= startsAt), ...coming]
  const [first, ...rest] = out
  if (first === undefined) return []
  if (first.at > startsAt) return [{ ...first, at: startsAt, isCarryStart: true }, ...out]
  return [{ ...first, isCarryStart: true }, ...rest]
}

/**
 * The moisture of the joint's ring before, during and after a carry.
 * @param input the carry; the air there must be fresh
 * @param joint by `jointOfPiece`
 * @param there the air there, as last read
 * @returns a function of the moment (epoch ms, from the first hour of the record on), and all airs that it still meets
 *   from the start on; undefined where nothing is known of the air that the piece comes from
 */
export function courseOfCarry(
  input: CarryCheckInput,
  joint: ResolvedJoint,
  there: FreshAir,
): { moistureAt: (at: number) => MoistureAt; steps: readonly StepOfAir[] } | undefined {
  const isKnownBefore =
    input.baselineEmcPct !== null ||
    input.history.some((hour) => hour.emcPct !== null && hour.at < input.startsAt)
  const record = isKnownBefore ? stepsOfHistory(input, input.now) : undefined
  if (record === undefined) return undefined
  const before = record.steps.filter((step) => step.at < input.startsAt)
  const steps = stepsSinceStart(record.steps, comingSteps(input, there), input.startsAt)
  const moistureAt = moistureCourse({
    size: joint.size,
    densityKgM3: joint.densityKgM3,
    now: input.now,
    startMcPct: record.startMcPct,
    steps: [...before, ...steps],
  })
  return { moistureAt, steps }
}
