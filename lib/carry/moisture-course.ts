import type { PlaceCover } from '@/lib/pieces/piece'
import { diffusionMcPct } from './diffusion'
import { EXPOSURE_OF_COVER, ringFractionChanged, type FractionChanged, type RingSize } from './joint'
import { tabulated } from './tabulated'

/** The air from one moment on, until the next step. */
export type StepOfAir = {
  /** Epoch ms. */
  readonly at: number
  readonly emcPct: number
  readonly temperatureC: number
  readonly cover: PlaceCover
  /** False where a gap is bridged by the last value known. */
  readonly isKnown: boolean
  /** True where a carry starts: the wood is taken as evenly moist there, and its diffusion is taken afresh. */
  readonly isCarryStart: boolean
}

export type CourseInput = {
  readonly size: RingSize
  readonly densityKgM3: number
  /** Mean moisture content at the first step, % MC. */
  readonly startMcPct: number
  /** Epoch ms: what comes after it is a forecast. */
  readonly now: number
  /** Oldest first, at least one. */
  readonly steps: readonly StepOfAir[]
}

export type MoistureAt = {
  readonly mcPct: number
  /** How much of that figure comes from hours without a reading and from the time before the record, 0 to 1. */
  readonly unknownShare: number
}

type Stretch = {
  readonly steps: readonly StepOfAir[]
  readonly start: MoistureAt
  readonly fractionChanged: FractionChanged
}

const HOUR_MS = 3_600_000
/** How much of a stretch that has no end yet counts for its diffusion, at least. Status: guess, a day. */
const OPEN_STRETCH_MS = 24 * HOUR_MS

/** The mean air of a stretch up to a moment, each step by how long it lasted. */
function meanAir(steps: readonly StepOfAir[], until: number): { emcPct: number; temperatureC: number } {
  let lastedMs = 0
  let emcPct = 0
  let temperatureC = 0
  for (let n = 0; n < steps.length; n += 1) {
    const step = steps[n]
    if (step === undefined || (n > 0 && step.at >= until)) break
    // Two changes in the same instant leave a step that lasted no time; counting a millisecond keeps a mean of it.
    const ms = Math.max(1, Math.min(until, steps[n + 1]?.at ?? until) - step.at)
    lastedMs += ms
    emcPct += ms * step.emcPct
    temperatureC += ms * step.temperatureC
  }
  return { emcPct: emcPct / lastedMs, temperatureC: temperatureC / lastedMs }
}

function stretchesOf(steps: readonly StepOfAir[]): StepOfAir[][] {
  const stretches: StepOfAir[][] = []
  let current: StepOfAir[] = []
  for (const step of steps) {
    const before = current.at(-1)
    if (before === undefined || before.cover !== step.cover || step.isCarryStart) {
      current = []
      stretches.push(current)
    }
    current.push(step)
  }
  return stretches
}

/**
 * Mean moisture at a moment within a stretch. Each hour of air counts with the part of its effect that falls between
 * its begin and its end, so that the figure is a mean of the start and of the airs, weighted; newest first, until the
 * oldest no longer shows.
 */
function moistureInStretch({ steps, start, fractionChanged }: Stretch, at: number): MoistureAt {
  let mcPct = 0
  let unknownShare = 0
  let leftAtEnd = 1
  for (let n = steps.length - 1; n >= 0; n -= 1) {
    const step = steps[n]
    if (step === undefined || step.at >= at) continue
    const leftAtBegin = 1 - fractionChanged((at - step.at) / 1000)
    const weight = leftAtEnd - leftAtBegin
    mcPct += weight * step.emcPct
    if (!step.isKnown) unknownShare += weight
    leftAtEnd = leftAtBegin
    if (leftAtEnd === 0) break
  }
  return {
    mcPct: mcPct + leftAtEnd * start.mcPct,
    unknownShare: unknownShare + leftAtEnd * start.unknownShare,
  }
}

/**
 * The mean moisture content of a joint's ring over time, from the air that it was and will be in.
 * @param input sizes in mm, density in kg/m³, moisture content at the first step in % MC, and the air, step by step
 * @returns a function of the moment (epoch ms, not before the first step) to % MC
 *
 * Steps of the air are superposed. Where the cover changes, or a carry starts, a new stretch begins with evenly moist
 * wood at the mean reached; within it the diffusion coefficient is constant, at the stretch's mean temperature and six
 * tenths of the way to its mean EMC.
 * Source: Crank, The Mathematics of Diffusion (1975), ch. 4, with Duhamel's superposition.
 */
export function moistureCourse(input: CourseInput): (at: number) => MoistureAt {
  const made: Stretch[] = []
  let start: MoistureAt = { mcPct: input.startMcPct, unknownShare: 1 }
  const parts = stretchesOf(input.steps)
  parts.forEach((steps, n) => {
    const nextAt = parts[n + 1]?.[0]?.at
    const air = meanAir(steps, nextAt ?? Math.max(input.now, (steps[0]?.at ?? 0) + OPEN_STRETCH_MS))
    const stretch: Stretch = {
      steps,
      start,
      fractionChanged: tabulated(
        ringFractionChanged(input.size, EXPOSURE_OF_COVER[steps[0]?.cover ?? 'closed'], {
          densityKgM3: input.densityKgM3,
          temperatureC: air.temperatureC,
          mcPct: diffusionMcPct(start.mcPct, air.emcPct),
        }),
      ),
    }
    made.push(stretch)
    if (nextAt !== undefined) start = moistureInStretch(stretch, nextAt)
  })
  return (at) => {
    const stretch = made.findLast((one) => (one.steps[0]?.at ?? Infinity) <= at) ?? made[0]
    if (stretch === undefined) throw new RangeError('steps must not be empty')
    return moistureInStretch(stretch, at)
  }
}
