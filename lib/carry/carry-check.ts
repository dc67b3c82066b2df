import { z } from 'zod'
import type { AirFrom, WoodState } from '@/lib/follow/wood-state'
import { type Cover, type FitGrade, type Grain, type Stage, type WoodKind } from '@/lib/pieces/piece'
import type { WoodFigures } from '@/lib/wood/movement-class'

/**
 * What goes into a carry check and what comes out. The inputs are loaded by `db/queries/carry-inputs.ts`, judged by
 * `carryCheck` in `check.ts`; page, API and worker only join the two.
 */

/** What is known of a piece; what is null is defaulted by the check, which says so. */
export interface PieceFacts {
  number: string
  stage: Stage
  wood: string | null
  /** The site's own figures for that wood, where it has some: they go before the table's. */
  ownFigures?: WoodFigures | undefined
  woodKind: WoodKind
  grain: Grain
  spigotOn: 'base' | 'lid'
  lidForm: 'plug' | 'hollow'
  jointDiameterMm: number | null
  wallMm: number | null
  spigotMm: number | null
  lidMm: number | null
  lidWallMm: number | null
  bodyWallMm: number | null
  blankDiameterMm: number | null
  endsSealed: boolean
  finish: string
  fitGrade: FitGrade | null
  clearanceMm: number | null
  allowanceMm: number | null
}

/** The air that the piece goes to, as last read. Without a fresh reading there is no verdict. */
export type AirThere =
  | { kind: 'fresh'; at: number; emcPct: number; temperatureC: number; humidityPct: number }
  | { kind: 'stale'; at: number; emcPct: number; temperatureC: number; humidityPct: number }
  | { kind: 'never' }
  /** Air as somebody tells it, of a place that nothing reads: never a fresh reading, but something to judge by. */
  | { kind: 'told'; emcPct: number; temperatureC: number; humidityPct: number }

/** The moisture content at which a joint was cut, and how well that is known: ± % MC, 8 in 10. */
export interface CutMc {
  ringMcPct: number
  lidMcPct: number
  doubtPct: number
}

export interface CarryCheckInput {
  now: number
  piece: PieceFacts
  /** Its wood when it goes, or when it went; null where nothing is known of the air that it comes from. */
  start: WoodState | null
  /** MC at which the joint was cut; null: its MC at the start. */
  cut: CutMc | null
  there: AirThere
  /** The air from `startsAt` on: what was recorded of it, then what is to come. Empty: `there` is held. */
  airs: readonly AirFrom[]
  /** How far the air there may be out against the air that the piece was followed by, ± % MC, 8 in 10. */
  airDoubtPct: number
  /** What the site has learned of how quickly its wood follows: a factor on diffusion, and the spread of its logarithm. */
  pace: { factor: number; logSpread: number }
  /** When it goes, or went, out; epoch ms. */
  startsAt: number
  stayMinutes: number
  cover: Cover
  /** The air at home from `startsAt` on, where it comes back to; left out or empty: not known. */
  home?: readonly AirFrom[]
  /** A tub that is read by a sensor of its own: its air rules instead of the reckoned one. */
  tub?: { name: string; emcPct: number; temperatureC: number } | undefined
}

export const verdictSchema = z.enum(['fine', 'keep-short', 'leave'])
export type Verdict = z.infer<typeof verdictSchema>

const instant = z.iso.datetime()

const figureOrHidden = z.number().nullable()

const curveSchema = z.object({
  at: z.array(instant),
  usedEarly: z.array(z.number()),
  used: z.array(z.number()),
  usedLate: z.array(z.number()),
})

/** What is said of a piece that can be judged. */
export const verdictCheckSchema = z.object({
  kind: z.literal('verdict'),
  verdict: verdictSchema,
  /** "Keep it short: back by 16:10" without the clock time: the page adds it in the site's zone. */
  words: z.string(),
  /** Why: in points of % MC, in the quarter turn, and in mm. */
  reason: z.string(),
  /** The second line: when it may bind, a suction lid's sigh, or a grade no sensor can call. Empty when nothing to add. */
  second: z.string(),
  /** Moments by which the allowance is used up; null: not within 30 days in that air. */
  earlyAt: instant.nullable(),
  middleAt: instant.nullable(),
  lateAt: instant.nullable(),
  /** Where the two parts of the joint stand now, % MC, and how far that may be out (± % MC, 8 in 10). */
  ringMcPct: z.number(),
  lidMcPct: z.number(),
  mcDoubtPct: z.number(),
  cutMcPct: z.number(),
  thereEmcPct: z.number(),
  /** Points of % MC that the ring changes over the stay. */
  changePct: z.number(),
  /** Points either side of the cut MC at which the allowance is gone at a quarter turn. */
  allowedMcPct: z.number(),
  lossMm: z.number(),
  allowanceMm: z.number(),
  usedAtStart: z.number(),
  usedAtEnd: z.number(),
  /** Allowance used against time, from the start to past the stay: fractions, may pass 1. */
  curve: curveSchema,
  assumed: z.array(z.string()),
})
export type VerdictCheck = z.infer<typeof verdictCheckSchema>

/** The same as a member sees it: of a piece that is private to another, nothing of its sizes and its wood. */
const shownVerdictSchema = verdictCheckSchema.extend({
  ringMcPct: figureOrHidden,
  lidMcPct: figureOrHidden,
  mcDoubtPct: figureOrHidden,
  cutMcPct: figureOrHidden,
  changePct: figureOrHidden,
  allowedMcPct: figureOrHidden,
  lossMm: figureOrHidden,
  allowanceMm: figureOrHidden,
  curve: curveSchema.nullable(),
})

export const pieceCheckSchema = z.discriminatedUnion('kind', [
  shownVerdictSchema,
  z.object({
    kind: z.literal('words'),
    reason: z.enum(['blank', 'threaded', 'wild-grain', 'stabilised', 'no-joint']),
    words: z.string(),
    /** For a hybrid or stabilised piece the plain parts still move; empty otherwise. */
    second: z.string(),
  }),
  z.object({
    kind: z.literal('unknown'),
    /** No fresh reading there, or nothing known of the air that the piece comes from. */
    reason: z.enum(['no-reading', 'never-read', 'no-history']),
    words: z.string(),
    since: instant.nullable(),
  }),
])
export type PieceCheck = z.infer<typeof pieceCheckSchema>
/** As it leaves the check, with every figure. */
export type FullCheck = VerdictCheck | Exclude<PieceCheck, { kind: 'verdict' }>
