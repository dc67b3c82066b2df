import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import { formatDuration } from '@/lib/format/times'
import { type AirFrom, type AirStep, copyState, stepWood, type WoodState } from '@/lib/follow/wood-state'
import type { BackHome } from './carry-answer'
import { lossMm } from './joint-loss'
import { airsOfInput, type Reckoned } from './reckon'
import { stepsBetween } from './stay-run'

const HOUR_MS = 3_600_000

/** A difference that neither a hand nor a feeler gauge tells at a lid. Status: guess. */
export const HOME_TOLERANCE_MM = 0.02
/** For a wide fit this share of its allowance. Status: guess. */
export const HOME_TOLERANCE_OF_ALLOWANCE = 0.1
/** A longer wait is not told. Status: guess. */
export const HOME_TOLD_WITHIN_HOURS = 10 * 24
/** Most are settled within a day: what comes later is looked at only where it has to be. */
const LOOKED_AT_HOURS = [
  [0, 24],
  [24, HOME_TOLD_WITHIN_HOURS],
] as const
/** So long it has to stay within the tolerance, for a house has its own days. */
const STEADY_HOURS = 12
/** A peak after coming in is worth a word when it is this much higher than when it came in. */
const TOLD_PEAK_MM = 0.005

/**
 * How long a piece waits at home before its lid tells anything, after a carry.
 * @returns undefined where nothing is known of the air that it comes home to
 *
 * The rule: its parts kept side by side, until the clearance at a quarter turn is within 0.02 mm, or a tenth of the
 * allowance where that is more, of what it would be had the piece never gone, and stays so
 * for half a day. Reckoned for slow wood: quick wood took up more and gives it off sooner, which comes to about the same (tested). Meanwhile it may lose more than it did out there, for
 * its two parts come back each at its own pace.
 * Status: rule guess, run derived.
 */
export function backHome(one: Reckoned): BackHome | undefined {
  const { input, joint, there } = one
  const home = input.home ?? []
  if (home.length === 0) return undefined
  const out = airsOfInput(input, there)
  const toleranceMm = Math.max(HOME_TOLERANCE_MM, HOME_TOLERANCE_OF_ALLOWANCE * joint.allowance.allowanceMm)
  const slowly = input.pace.factor * Math.exp(-EDGE_OF_EIGHT_IN_TEN * one.paceLogSpread)
  const slow = homecoming(one, out, home, slowly, toleranceMm)
  const stayHours = input.stayMinutes / 60
  const isAfter = slow.greatestHours > stayHours && slow.greatestMm - slow.greatestOutMm >= TOLD_PEAK_MM
  const outPeak = greatestOut(one, stayHours)
  const greatestHours = isAfter ? slow.greatestHours : outPeak.hours
  const told = {
    waitMinutes: slow.waitHours === undefined ? null : roundedUp(slow.waitHours * 60),
    greatestMm: Math.max(0, outPeak.mm, isAfter ? slow.greatestMm : 0),
    isGreatestAfter: isAfter,
  }
  return {
    ...told,
    greatestAt: new Date(input.startsAt + Math.round(greatestHours * HOUR_MS)).toISOString(),
    words: backHomeWords({ ...told, greatestAfterMinutes: (greatestHours - stayHours) * 60 }),
  }
}

/** The most that the middle loses while it is out. */
function greatestOut({ run, usedAfter, joint }: Reckoned, stayHours: number): { hours: number; mm: number } {
  let best = { hours: stayHours, used: usedAfter(stayHours) }
  for (const hours of run.hours) {
    if (hours >= stayHours) break
    const used = usedAfter(hours)
    if (used > best.used) best = { hours, used }
  }
  return { hours: best.hours, mm: best.used * joint.allowance.allowanceMm }
}

/** The moments looked at, some hours from and to: closer together at first. */
function momentsBetween(from: number, to: number): Float64Array {
  const moments = [from]
  let hour = from
  while (hour < to) {
    const step = hour < 3 ? 0.25 : hour < 12 ? 0.5 : hour < 48 ? 2 : 6
    hour = Math.min(to, hour + step)
    moments.push(hour)
  }
  return Float64Array.from(moments)
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

  const stayMoments = momentsBetween(0, stayHours)
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
  const greatestOutMm = greatestMm

  let within: number | undefined = Math.abs(lossOf(went) - lossOf(stayed)) <= toleranceMm ? 0 : undefined
  for (const [from, to] of LOOKED_AT_HOURS) {
    const moments = momentsBetween(from, to)
    const homeSteps = stepsBetween(home, endsAt, moments)
    for (let n = 0; n < homeSteps.length; n += 1) {
      const hours = moments[n + 1] ?? to
      const steps = homeSteps[n] ?? []
      bring(went, steps)
      bring(stayed, steps)
      lookAt(stayHours + hours)
      if (Math.abs(lossOf(went) - lossOf(stayed)) > toleranceMm) within = undefined
      else within ??= hours
      if (within !== undefined && hours - within >= STEADY_HOURS)
        return { waitHours: within, greatestHours, greatestMm, greatestOutMm }
    }
  }
  return { waitHours: within, greatestHours, greatestMm, greatestOutMm }
}

type WordsOf = Omit<BackHome, 'words' | 'greatestAt'> & { greatestAfterMinutes: number }

/** "Wait about 6 h at home before you judge the lid", and when it is at its tightest. */
function backHomeWords({ waitMinutes, greatestMm, isGreatestAfter, greatestAfterMinutes }: WordsOf): string {
  const wait =
    waitMinutes === null
      ? 'Its lid tells nothing for more than ten days at home.'
      : waitMinutes === 0
        ? 'Its lid can be judged as soon as it is home.'
        : `Wait about ${formatDuration(waitMinutes)} at home, its parts side by side, before you judge the lid.`
  if (!isGreatestAfter || greatestMm === null) return wait
  return `${wait} It is tightest about ${formatDuration(Math.max(10, greatestAfterMinutes))} after it comes in, not out there.`
}
