import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import { formatDuration } from '@/lib/format/times'
import { type AirFrom, type AirStep, copyState, stepWood, type WoodState } from '@/lib/follow/wood-state'
import type { BackHome } from './carry-answer'
import { lossMm } from './joint-loss'
import { airsOfInput, type Reckoned } from './reckon'
import { momentsOf, stepsBetween } from './stay-run'

const HOUR_MS = 3_600_000

/** A difference that neither a hand nor a feeler gauge tells at a lid. Status: guess. */
export const HOME_TOLERANCE_MM = 0.02
/** For a wide fit this share of its allowance. Status: guess. */
export const HOME_TOLERANCE_OF_ALLOWANCE = 0.1
/** A longer wait is not told. Status: guess. */
export const HOME_TOLD_WITHIN_HOURS = 10 * 24
/** So long it has to stay within the tolerance, for a house has its own days. */
const STEADY_HOURS = 12
/** A peak after coming in is worth a word when it is this much higher than when it came in. */
const TOLD_PEAK_MM = 0.005

/**
 * How long a piece waits at home before its lid tells anything, after a carry.
 * @returns undefined where nothing is known of the air that it comes home to
 *
 * The rule: until the clearance at a quarter turn is within 0.02 mm, or a tenth of the allowance where that is more, of
 * what it would be had the piece never gone, and stays so for half a day; nine in ten pieces are there by then (slow
 * wood, which takes up less and holds it longer). Meanwhile the lid may tighten more than it did out there, for its two
 * parts come back at their own pace: `greatest` is the most that the middle loses, out or home.
 * Status: rule guess, run derived.
 */
export function backHome(one: Reckoned): BackHome | undefined {
  const { input, joint, there } = one
  const home = input.home ?? []
  if (home.length === 0) return undefined
  const out = airsOfInput(input, there)
  const toleranceMm = Math.max(HOME_TOLERANCE_MM, HOME_TOLERANCE_OF_ALLOWANCE * joint.allowance.allowanceMm)
  const slowly = input.pace.factor * Math.exp(-EDGE_OF_EIGHT_IN_TEN * one.paceLogSpread)
  const middle = homecoming(one, out, home, input.pace.factor, toleranceMm)
  const slow = homecoming(one, out, home, slowly, toleranceMm)
  const waitHours =
    middle.waitHours === undefined || slow.waitHours === undefined
      ? undefined
      : Math.max(middle.waitHours, slow.waitHours)
  const stayHours = input.stayMinutes / 60
  const isAfter = middle.greatestHours > stayHours && middle.greatestMm - middle.cameInMm >= TOLD_PEAK_MM
  const greatestHours = isAfter ? middle.greatestHours : Math.min(middle.greatestHours, stayHours)
  const told = {
    waitMinutes: waitHours === undefined ? null : roundedUp(waitHours * 60),
    greatestMm: Math.max(0, isAfter ? middle.greatestMm : middle.greatestOutMm),
    isGreatestAfter: isAfter,
  }
  return {
    ...told,
    greatestAt: new Date(input.startsAt + Math.round(greatestHours * HOUR_MS)).toISOString(),
    words: backHomeWords({ ...told, greatestAfterMinutes: (greatestHours - stayHours) * 60 }),
  }
}

/** Never told more exactly than it is known: to ten minutes, half hours, and whole hours from half a day on. */
function roundedUp(minutes: number): number {
  const step = minutes <= 60 ? 10 : minutes <= 720 ? 30 : 60
  return Math.ceil(minutes / step) * step
}

interface Homecoming {
  waitHours: number | undefined
  greatestHours: number
  greatestMm: number
  greatestOutMm: number
  /** Clearance lost as it comes in, mm. */
  cameInMm: number
}

/** The piece that went and the same piece had it stayed, side by side. */
function homecoming(
  one: Reckoned,
  out: readonly AirFrom[],
  home: readonly AirFrom[],
  pace: number,
  toleranceMm: number,
): Homecoming {
  const { input, joint, start, cut } = one
  const stayHours = input.stayMinutes / 60
  const endsAt = input.startsAt + stayHours * HOUR_MS
  const went = copyState(start)
  const stayed = copyState(start)
  const bring = (state: WoodState, steps: readonly AirStep[]) => {
    for (const step of steps) stepWood(joint.filter, state, step, pace)
  }
  const lossOf = (state: WoodState) => lossMm(joint.loss, state.ringPct - cut.ring, state.lidPct - cut.lid)

  const stayMoments = momentsOf(stayHours)
  const outSteps = stepsBetween(out, input.startsAt, stayMoments)
  for (const steps of stepsBetween(home, input.startsAt, stayMoments)) bring(stayed, steps)
  let greatestMm = lossOf(went)
  let greatestHours = 0
  const lookAt = (hours: number) => {
    const mm = lossOf(went)
    if (mm <= greatestMm) return
    greatestMm = mm
    greatestHours = hours
  }
  outSteps.forEach((steps, n) => {
    bring(went, steps)
    lookAt(stayMoments[n + 1] ?? stayHours)
  })
  const cameInMm = lossOf(went)
  const greatestOutMm = greatestMm

  const moments = momentsOf(HOME_TOLD_WITHIN_HOURS)
  let within: number | undefined = Math.abs(cameInMm - lossOf(stayed)) <= toleranceMm ? 0 : undefined
  const homeSteps = stepsBetween(home, endsAt, moments)
  for (let n = 0; n < homeSteps.length; n += 1) {
    const hours = moments[n + 1] ?? 0
    const steps = homeSteps[n] ?? []
    bring(went, steps)
    bring(stayed, steps)
    lookAt(stayHours + hours)
    if (Math.abs(lossOf(went) - lossOf(stayed)) > toleranceMm) within = undefined
    else within ??= hours
    if (within !== undefined && hours - within >= STEADY_HOURS) break
  }
  return { waitHours: within, greatestHours, greatestMm, greatestOutMm, cameInMm }
}

type WordsOf = Omit<BackHome, 'words' | 'greatestAt'> & { greatestAfterMinutes: number }

/** "Wait about 6 h at home before you judge the lid", and when it is at its tightest. */
function backHomeWords({ waitMinutes, greatestMm, isGreatestAfter, greatestAfterMinutes }: WordsOf): string {
  const wait =
    waitMinutes === null
      ? 'Its lid tells nothing for more than ten days at home.'
      : waitMinutes === 0
        ? 'Its lid can be judged as soon as it is home.'
        : `Wait about ${formatDuration(waitMinutes)} at home before you judge the lid.`
  if (!isGreatestAfter || greatestMm === null) return wait
  return `${wait} It is tightest about ${formatDuration(Math.max(10, greatestAfterMinutes))} after it comes in, not out there.`
}
