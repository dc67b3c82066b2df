import { z } from 'zod'
import { BINDS_FROM, FELT_FROM } from '@/lib/follow/learned-pace'
import type { AirFrom } from '@/lib/follow/wood-state'
import { formatUsed } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import type { CarryCheckInput } from './carry-check'
import { wordsReason } from './check'
import { jointOfPiece } from './joint-defaults'
import { type KnownAir, type Reckoned, reckoned } from './reckon'

const instant = z.iso.datetime()
const band = z.object({ low: z.number(), middle: z.number(), high: z.number() })

/** "I forgot it": how bad it is, what to do tonight, and when to try the lid. */
export const forgottenSchema = z.object({
  pieceId: z.string(),
  number: z.string(),
  isOut: z.boolean(),
  /** Allowance used, fractions: now, and at the worst from now on if it comes in now; null where it can't be worked out. */
  usedNow: band.nullable(),
  usedMost: band.extend({ at: instant }).nullable(),
  /** When ring and lid are back within the allowance, in the middle and for nine in ten; null: not known, or not in ten days. */
  tryAt: instant.nullable(),
  tryAtLate: instant.nullable(),
  howBad: z.string(),
  tonight: z.array(z.string()),
  tryIt: z.string(),
})
export type Forgotten = z.infer<typeof forgottenSchema>
export type ForgottenFigures = Pick<Forgotten, 'usedNow' | 'usedMost' | 'tryAt' | 'tryAtLate'>

const HOUR_MS = 3_600_000
/** A wait that is longer is told as such. Status: guess. */
const LOOKED_AHEAD_HOURS = 10 * 24
/** Longer ago, what it went through is no longer one story. Status: guess. */
export const FORGOTTEN_WITHIN_HOURS = 20 * 24
const MOMENTS = 40

/**
 * How a piece that stayed out too long stands, and how it goes on at home if it comes in now.
 * @param input the carry as checked from the moment it went; `start` its wood then
 * @param recorded the air that it met since then, out there and, once it is in, at home; at least one
 * @param home the air at home from now on
 * @returns undefined for a piece that is told of in words alone, or where an air is not known
 *
 * Source: the carry check's own run and doubt (`reckoned`), with the house in place of the shop from now on.
 */
export function forgottenFigures(
  input: CarryCheckInput,
  recorded: readonly AirFrom[],
  home: readonly AirFrom[],
): ForgottenFigures | undefined {
  const joint = wordsReason(input.piece) === undefined ? jointOfPiece(input.piece) : undefined
  const goneHours = (input.now - input.startsAt) / HOUR_MS
  const coming = fromNow(home, input.now)
  const [first] = coming
  if (joint === undefined || input.start === null || first === undefined || recorded.length === 0)
    return undefined
  if (goneHours < 0 || goneHours > FORGOTTEN_WITHIN_HOURS) return undefined
  const there: KnownAir = {
    kind: 'told',
    emcPct: first.emcPct,
    temperatureC: first.temperatureC,
    humidityPct: 50,
  }
  const airs = [...recorded.filter((air) => air.at < input.now), ...coming]
  const whole = { ...input, airs, stayMinutes: Math.max(1, goneHours * 60) }
  return figuresOf(reckoned(whole, joint, input.start, there, goneHours + LOOKED_AHEAD_HOURS), goneHours)
}

/** What holds at a moment, and all that comes after it. */
function fromNow(airs: readonly AirFrom[], now: number): AirFrom[] {
  const holds = airs.findLast((air) => air.at <= now)
  const later = airs.filter((air) => air.at > now)
  return holds === undefined ? later : [{ ...holds, at: now }, ...later]
}

function figuresOf(one: Reckoned, goneHours: number): ForgottenFigures {
  const moments = Array.from({ length: MOMENTS }, (_, n) => {
    // Closer together at first, when both parts still move.
    const hours = goneHours + LOOKED_AHEAD_HOURS * (n / (MOMENTS - 1)) ** 2
    const { low, high } = one.spread.at(hours)
    return { hours, low, middle: one.usedAfter(hours), high }
  })
  const [now] = moments
  const most = moments.reduce(
    (worst, moment) => (moment.middle > worst.middle ? moment : worst),
    moments[0] ?? nothing,
  )
  const at = (hours: number): string =>
    new Date(one.input.startsAt + Math.round(hours * HOUR_MS)).toISOString()
  const backWithin = (of: 'middle' | 'high'): string | null => {
    const last = moments.findLastIndex((moment) => moment[of] > 1)
    const after = moments[last + 1]
    return after === undefined ? null : at(after.hours)
  }
  return {
    usedNow: now === undefined ? null : bandOf(now),
    usedMost: { ...bandOf(most), at: at(most.hours) },
    tryAt: backWithin('middle'),
    tryAtLate: backWithin('high'),
  }
}

const nothing = { hours: 0, low: 0, middle: 0, high: 0 }
/** A joint that has gained clearance has used nothing. */
const bandOf = ({ low, middle, high }: { low: number; middle: number; high: number }) => ({
  low: Math.max(0, low),
  middle,
  high: Math.max(0, high),
})

/** "about 1.4 times what it may lose" */
function timesWords(used: number): string {
  if (used > 1.02) return `about ${used.toFixed(1)} times what it may lose`
  const words = formatUsed(used).replace(/ used$/, '')
  return words === 'hardly any' ? 'hardly any of what it may lose' : `about ${words} of what it may lose`
}

function expectWords(used: number): string {
  if (used < FELT_FROM) return 'you may feel nothing'
  return used < BINDS_FROM ? 'expect it tight a quarter turn on' : 'it may bind a quarter turn on'
}

/** A worse moment at home is told from this much more on. Status: guess. */
const TOLD_RISE = 0.05

/** How bad it is, in words: what is used, the doubt, and what is still to come. */
export function howBadWords(
  figures: ForgottenFigures | undefined,
  clock: { timeZone: string; now: Date },
): string {
  if (figures === undefined || figures.usedNow === null || figures.usedMost === null)
    return 'How much of its fit is gone can’t be worked out. Go by the lid, once it has rested.'
  const { usedNow, usedMost } = figures
  const doubt =
    Math.abs(usedNow.high - usedNow.low) < 0.1
      ? ''
      : ` (8 in 10 lie between ${usedNow.low.toFixed(1)} and ${usedNow.high.toFixed(1)} times)`
  const isRising = usedMost.middle > usedNow.middle + TOLD_RISE
  const sentence = `It has lost ${timesWords(usedNow.middle)}${doubt}: ${expectWords(usedMost.middle)}.`
  if (!isRising) return sentence
  const moment = formatMoment(usedMost.at, clock.timeZone, clock.now)
  return `${sentence} It goes on to ${timesWords(usedMost.middle)} after it has come in, about ${moment}.`
}

/** What to do tonight; common practice, no source. */
export function tonightWords(isOut: boolean): string[] {
  return [
    ...(isOut ? ['Bring it in now. If the lathe is running, wait where you can be seen.'] : []),
    'If the lid comes off freely, take it off and lay it beside the box. If it does not, line the grain up and leave it.',
    'Keep the parts side by side on the shelf where the box is kept, so that both go back alike.',
    'No heat: not near the stove, a radiator or the sun. Never force a tight lid, lever it or warm it.',
  ]
}

const HOW_TO_TRY = 'Try it cold, at each of four quarters, with no force.'

/** When to try the quarter turn. */
export function tryWords(
  figures: ForgottenFigures | undefined,
  clock: { timeZone: string; now: Date },
): string {
  const usual = `Leave it for about two days. ${HOW_TO_TRY} It usually comes back, not always.`
  if (figures === undefined || figures.usedNow === null || figures.usedMost === null) return usual
  const moment = (at: string) => formatMoment(at, clock.timeZone, clock.now)
  const { tryAt, tryAtLate } = figures
  if (tryAt === null)
    return `In the house as it is it will not be back within what it may lose for more than ten days. ${HOW_TO_TRY} It usually comes back, not always.`
  const isSoon = new Date(tryAt).getTime() <= clock.now.getTime() + HOUR_MS
  const from = isSoon
    ? 'It can be tried tonight, once it has come to the warmth of the room.'
    : `Leave it until about ${moment(tryAt)}.`
  const late =
    tryAtLate === null
      ? ' One in ten takes more than ten days.'
      : tryAtLate === tryAt
        ? ''
        : ` Nine in ten are back within what they may lose by about ${moment(tryAtLate)}.`
  return `${from}${late} ${HOW_TO_TRY} It usually comes back, not always.`
}
