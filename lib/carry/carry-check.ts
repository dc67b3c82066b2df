import { z } from 'zod'
import {
  type Cover,
  coverSchema,
  type FitGrade,
  type Grain,
  type PlaceCover,
  type Stage,
  type WoodKind,
} from '@/lib/pieces/piece'

/**
 * What goes into a carry check and what comes out. The inputs are loaded by `db/queries/carry-inputs.ts`, judged by
 * `carryCheck` in `check.ts`; page, API and worker only join the two.
 */

/** What is known of a piece; what is null is defaulted by the check, which says so. */
export interface PieceFacts {
  number: string
  stage: Stage
  wood: string | null
  woodKind: WoodKind
  grain: Grain
  spigotOn: 'base' | 'lid'
  lidForm: 'plug' | 'hollow'
  jointDiameterMm: number | null
  wallMm: number | null
  spigotMm: number | null
  lidMm: number | null
  bodyWallMm: number | null
  fitGrade: FitGrade | null
  clearanceMm: number | null
  allowanceMm: number | null
}

/** One hour of the air that the piece was in. A gap is a null EMC, never a repeated old one. */
export interface HourOfAir {
  /** Start of the hour, epoch ms. */
  at: number
  emcPct: number | null
  temperatureC: number | null
  cover: PlaceCover
}

/** The air that the piece goes to, as last read. Without a fresh reading there is no verdict. */
export type AirThere =
  | { kind: 'fresh'; at: number; emcPct: number; temperatureC: number; humidityPct: number }
  | { kind: 'stale'; at: number; emcPct: number; temperatureC: number; humidityPct: number }
  | { kind: 'never' }

export interface CarryCheckInput {
  now: number
  piece: PieceFacts
  /** Oldest first, up to 60 days, ending at `now`; includes any time already out. */
  history: HourOfAir[]
  /** Mean EMC of the keep room, taken for the time before the history. Null: take the first hour known. */
  baselineEmcPct: number | null
  /** MC at which the joint was cut; null: its present MC. */
  cutMcPct: number | null
  there: AirThere
  /** EMC and temperature there, hour by hour from `startsAt`, for at least 48 h. Empty: `there` is held. */
  forecast: { at: number; emcPct: number; temperatureC: number }[]
  /** When it goes, or went, out; epoch ms. In the past for a piece that is out (its hours out are in `history`). */
  startsAt: number
  stayMinutes: number
  cover: Cover
}

export const verdictSchema = z.enum(['fine', 'keep-short', 'leave'])
export type Verdict = z.infer<typeof verdictSchema>

const instant = z.iso.datetime()

export const pieceCheckSchema = z.discriminatedUnion('kind', [
  z.object({
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
    ringMcPct: z.number(),
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
    curve: z.object({
      at: z.array(instant),
      usedEarly: z.array(z.number()),
      used: z.array(z.number()),
      usedLate: z.array(z.number()),
    }),
    assumed: z.array(z.string()),
  }),
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

export const carryCheckRequestSchema = z.strictObject({
  pieceIds: z.array(z.string()).min(1, 'choose at least one piece').max(60),
  toRoomId: z.string(),
  startsAt: instant.optional(),
  stayMinutes: z.int().min(1).max(43_200),
  cover: coverSchema,
})
export type CarryCheckRequest = z.infer<typeof carryCheckRequestSchema>

export const carryCheckAnswerSchema = z.object({
  at: instant,
  startsAt: instant,
  stayMinutes: z.int(),
  cover: coverSchema,
  room: z.object({ id: z.string(), name: z.string(), mark: z.int(), emcPct: z.number().nullable() }),
  /** The most pressing piece first, one sentence. */
  headline: z.string(),
  pieces: z.array(
    z.object({
      id: z.string(),
      number: z.string(),
      title: z.string(),
      check: pieceCheckSchema,
      /** The same carry in the best other cover; null when it changes nothing. */
      bagged: z.object({ verdict: verdictSchema, earlyAt: instant.nullable() }).nullable(),
    }),
  ),
  worst: z.enum(['leave', 'unknown', 'keep-short', 'words', 'fine']),
  /** "No forecast yet: …" while the coming hours are only carried over from yesterday. */
  forecastNote: z.string(),
  cautions: z.array(z.string()),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type CarryCheckAnswer = z.infer<typeof carryCheckAnswerSchema>
