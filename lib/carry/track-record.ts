import { z } from 'zod'
import { EDGE_OF_EIGHT_IN_TEN } from '@/lib/doubt/spread'
import { BINDS_FROM, FELT_FROM, type Pace } from '@/lib/follow/learned-pace'
import { formatCount, formatUsed } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import { learnedWords } from '@/lib/pieces/learned-words'
import { type Turned, turnedSchema } from '@/lib/pieces/outcome'
import type { MovementClass } from '@/lib/wood/species'

const instant = z.iso.datetime()

/** One lid that was tried after a carry, beside what had been told. */
export const trackPointSchema = z.object({
  number: z.string(),
  pieceId: z.string(),
  carryId: z.string(),
  at: instant,
  turned: turnedSchema,
  /** Allowance used at the end of the stay as the model had it: slow, middling and quick wood. */
  usedSlow: z.number(),
  usedMiddle: z.number(),
  usedFast: z.number(),
  /** It was told to be left where it is. */
  isAgainstAdvice: z.boolean(),
})
export type TrackPoint = z.infer<typeof trackPointSchema>

const countsSchema = z.object({
  'as-before': z.int(),
  tighter: z.int(),
  binds: z.int(),
  looser: z.int(),
  all: z.int(),
})
export type TurnedCounts = z.infer<typeof countsSchema>

export const trackRecordSchema = z.object({
  /** Was told it may go, and came in before quick wood would have used its allowance. */
  kept: countsSchema,
  /** Was told it may go, and stayed longer than that. */
  late: countsSchema,
  /** Was told to be left, and went all the same. */
  against: countsSchema,
  /** What the model would have had the hand feel, against what it felt: the same, one step off, further off. */
  agreement: z.object({ same: z.int(), oneOff: z.int(), further: z.int() }),
  points: z.array(trackPointSchema),
  paces: z.array(z.object({ movementClass: z.string(), words: z.string() })),
  /** Outcomes that were told at rest, or of which the model had no answer: they are no test of a verdict. */
  untested: z.int(),
})
export type TrackRecord = z.infer<typeof trackRecordSchema>

/** What a hand would feel at so much of the allowance; the same levels as the learning goes by. */
export const expectedTurn = (used: number): Exclude<Turned, 'looser'> =>
  used < FELT_FROM ? 'as-before' : used < BINDS_FROM ? 'tighter' : 'binds'

/** "about half used", "about 1.8 times all of it": what the model had used of an allowance, in words. */
export function usedInWords(used: number): string {
  if (used > 1.02) return `about ${used.toFixed(1)} times all of it`
  const words = formatUsed(used)
  return words.startsWith('hardly') ? words : `about ${words}`
}

const STEPS: readonly Turned[] = ['looser', 'as-before', 'tighter', 'binds']

const countsOf = (points: readonly TrackPoint[]): TurnedCounts => {
  const of = (turned: Turned): number => points.filter((point) => point.turned === turned).length
  return {
    'as-before': of('as-before'),
    tighter: of('tighter'),
    binds: of('binds'),
    looser: of('looser'),
    all: points.length,
  }
}

/**
 * How good the verdicts were, from lids that were tried after their carries.
 * @param points outcomes with a stored answer of the model, in any order; those that were undone left out
 * @param paces what the site has learned for each class of movement
 * @param untested how many outcomes there are besides
 *
 * A looser lid counts as one step from "as before". Only what was promised counts as kept or broken: that a piece which
 * comes in before its early edge still turns. A piece that was told to stay and held shows the caution, not an error.
 */
export function trackRecord(
  points: readonly TrackPoint[],
  paces: ReadonlyMap<MovementClass, Pace>,
  untested: number,
): TrackRecord {
  const told = points.filter((point) => !point.isAgainstAdvice)
  const off = points.map(({ turned, usedMiddle }) =>
    Math.abs(STEPS.indexOf(turned) - STEPS.indexOf(expectedTurn(usedMiddle))),
  )
  return {
    kept: countsOf(told.filter(({ usedFast }) => usedFast < 1)),
    late: countsOf(told.filter(({ usedFast }) => usedFast >= 1)),
    against: countsOf(points.filter((point) => point.isAgainstAdvice)),
    agreement: {
      same: off.filter((steps) => steps === 0).length,
      oneOff: off.filter((steps) => steps === 1).length,
      further: off.filter((steps) => steps > 1).length,
    },
    points: points.toSorted((a, b) => b.at.localeCompare(a.at)),
    paces: [...paces].map(([movementClass, pace]) => ({
      movementClass,
      words: paceWords(movementClass, pace),
    })),
    untested,
  }
}

/** "Wood of medium movement follows about 1.2 × as quickly …, and 8 in 10 chances lie between 0.8 and 1.8 ×." */
export function paceWords(movementClass: MovementClass, { factor, logSpread, outcomes }: Pace): string {
  const times = (by: number): string => (factor * Math.exp(by * EDGE_OF_EIGHT_IN_TEN * logSpread)).toFixed(1)
  return `${learnedWords({ movementClass, factor, outcomes })} For one piece, 8 chances in 10 lie between ${times(-1)} and ${times(1)} ×.`
}

/** The sentence over the page. */
export function trackHeadline(record: Pick<TrackRecord, 'kept' | 'against' | 'points'>): TextPart[] {
  if (record.points.length === 0)
    return say`${strong('Nothing to judge by yet.')} Tell how the lid turned when a box comes back, and this page will say how good the verdicts were.`
  const { kept } = record
  if (kept.all === 0)
    return say`${strong(formatCount(record.points.length, 'lid'))} tried so far, none of them after a stay within its time.`
  const bound = kept.binds
  const held = kept.all - bound
  return say`Of ${strong(formatCount(kept.all, 'box', 'boxes'))} that came in within the time told, ${strong(`${String(held)} still turned`)}${bound === 0 ? '' : ` and ${String(bound)} bound a quarter turn on`}.`
}
