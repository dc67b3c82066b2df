import { z } from 'zod'
import { hourStripSchema } from '@/lib/forecast/strip-view'
import { coverSchema } from '@/lib/pieces/piece'
import { pieceCheckSchema, verdictSchema } from './carry-check'
import { toldAirSchema } from './told-air'

/** What is asked before a carry, and what is answered: the check of each piece, and what to do about it. */

const instant = z.iso.datetime()

export const carryCheckRequestSchema = z
  .strictObject({
    pieceIds: z.array(z.string()).min(1, 'choose at least one piece').max(60),
    /** Either a room of the site … */
    toRoomId: z.string().optional(),
    /** … or the air of another place, as told. */
    toAir: toldAirSchema.optional(),
    startsAt: instant.optional(),
    stayMinutes: z.int().min(1).max(43_200),
    cover: coverSchema,
  })
  .refine((asked) => (asked.toRoomId === undefined) !== (asked.toAir === undefined), {
    path: ['toRoomId'],
    message: 'name either a room or the air of another place',
  })
export type CarryCheckRequest = z.infer<typeof carryCheckRequestSchema>

/** How long the fit keeps in one cover. */
export const coverEdgeSchema = z.object({
  cover: coverSchema,
  verdict: verdictSchema,
  earlyAt: instant.nullable(),
})
export type CoverEdge = z.infer<typeof coverEdgeSchema>

export const bestCoverSchema = coverEdgeSchema.extend({
  /** The tub whose own sensor was gone by; null where the cover's air is reckoned. */
  readIn: z.string().nullable(),
})
export type BestCover = z.infer<typeof bestCoverSchema>

/** What a stated time hangs on: pace of the wood, its movement, the allowance, the air there, cut, time before, sizes. */
export const causeSchema = z.enum(['allowance', 'sizes', 'cut', 'before', 'air', 'movement', 'pace'])
export type Cause = z.infer<typeof causeSchema>
export const hangsOnSchema = z.object({
  cause: causeSchema,
  /** What to tell us, as a sentence. */
  ask: z.string(),
})
export type HangsOn = z.infer<typeof hangsOnSchema>

export const backHomeSchema = z.object({
  /** How long to wait before the lid is judged, minutes, for nine in ten; null: longer than ten days. */
  waitMinutes: z.int().nullable(),
  /** When the middle of the reckoning loses most clearance, out or home, and how much; null: hidden. */
  greatestAt: instant,
  greatestMm: z.number().nullable(),
  /** It loses more after it has come in than it did out there. */
  isGreatestAfter: z.boolean(),
  words: z.string(),
})
export type BackHome = z.infer<typeof backHomeSchema>

export const sessionSchema = z.object({
  /** What is worked, the least forgiving first. */
  order: z.array(z.object({ id: z.string(), number: z.string(), backBy: instant })),
  /** Those that half an hour each leaves no time for. */
  leftOver: z.array(z.string()),
  /** When the session ends for all of them if they stay out together. */
  stopAt: instant,
  /** When it ends if each is taken back by its own time. */
  endsAt: instant,
  isByLockUp: z.boolean(),
  words: z.string(),
})
export type Session = z.infer<typeof sessionSchema>

/** The same pieces at another hour. */
export const betterHourSchema = z.object({
  startsAt: instant,
  /** Only worth it if the room is lit then; null: as the room is by itself. */
  ifLitAt: instant.nullable(),
  emcPct: z.number(),
  pieces: z.array(z.object({ id: z.string(), verdict: verdictSchema, earlyAt: instant.nullable() })),
})
export type BetterHourShown = z.infer<typeof betterHourSchema>

/** How long the least forgiving piece keeps its fit, by the hour it goes. */
export const keepsHourSchema = z.object({
  at: instant,
  ifLitAt: instant.nullable(),
  /** Until its early edge, minutes; null: past the planned stay and half an hour more. */
  keepsMinutes: z.number().nullable(),
  verdict: verdictSchema,
})
export type KeepsHour = z.infer<typeof keepsHourSchema>

export const checkedPieceSchema = z.object({
  id: z.string(),
  number: z.string(),
  title: z.string(),
  check: pieceCheckSchema,
  /** Each cover that closes it better than the one asked about; empty where it is fine as asked. */
  covers: z.array(coverEdgeSchema),
  /** The cover that it does best in; null where none betters it. */
  bestCover: bestCoverSchema.nullable(),
  hangsOn: hangsOnSchema.nullable(),
  backHome: backHomeSchema.nullable(),
})
export type CheckedPiece = z.infer<typeof checkedPieceSchema>

export const carryCheckAnswerSchema = z.object({
  at: instant,
  startsAt: instant,
  stayMinutes: z.int(),
  cover: coverSchema,
  room: z.object({
    /** Null for air as told, which is no room of the site. */
    id: z.string().nullable(),
    name: z.string(),
    mark: z.int(),
    emcPct: z.number().nullable(),
    isTold: z.boolean(),
  }),
  /** The most pressing first, one sentence. */
  headline: z.string(),
  pieces: z.array(checkedPieceSchema),
  worst: z.enum(['leave', 'unknown', 'keep-short', 'words', 'fine']),
  /** What to do first and when to stop; null where fewer than two pieces may go. */
  session: sessionSchema.nullable(),
  betterHour: betterHourSchema.nullable(),
  /** Of the least forgiving piece; null without a forecast, or where nothing is short. */
  keepsByHour: z.object({ number: z.string(), hours: z.array(keepsHourSchema) }).nullable(),
  /** The coming hours of the room, by the least forgiving piece, for the stay and cover asked about; null: air as told. */
  strip: hourStripSchema.nullable(),
  /** The best hours of the week in a sentence: by the forecast, then what is usual; null where the strip says it all. */
  bestHours: z.string().nullable(),
  /** What the coming hours are taken from. */
  forecastNote: z.string(),
  cautions: z.array(z.string()),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type CarryCheckAnswer = z.infer<typeof carryCheckAnswerSchema>
