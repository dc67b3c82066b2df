import { z } from 'zod'
import { coverSchema } from '@/lib/pieces/piece'
import { pieceCheckSchema } from './carry-check'

const instant = z.iso.datetime()

export const carryStateSchema = z.enum(['planned', 'out', 'back', 'called-off'])
export type CarryState = z.infer<typeof carryStateSchema>

/** Going now needs no plan: `startsNow` makes it and starts it in one. */
export const newCarrySchema = z
  .strictObject({
    pieceIds: z.array(z.string()).max(60).default([]),
    /** A plan without named pieces: what is really taken is chosen when it goes. */
    takesWhatever: z.boolean().default(false),
    toRoomId: z.string(),
    cover: coverSchema,
    stayMinutes: z.int().min(1).max(43_200),
    /** When it is to go. Left out: now, and it starts at once. */
    plannedAt: instant.optional(),
    startsNow: z.boolean().default(false),
    /** Given when the maker was told to leave it and goes all the same. */
    againstAdvice: z.boolean().default(false),
    note: z.string().trim().max(500).default(''),
  })
  .refine(({ takesWhatever, pieceIds }) => takesWhatever !== pieceIds.length > 0, {
    path: ['pieceIds'],
    message: 'choose at least one piece',
  })
  .refine(
    ({ takesWhatever, startsNow, plannedAt }) => !takesWhatever || (!startsNow && plannedAt !== undefined),
    {
      path: ['takesWhatever'],
      message: 'is for plans: what goes now has to be named',
    },
  )
export type NewCarry = z.infer<typeof newCarrySchema>

export const carryStartSchema = z.strictObject({
  againstAdvice: z.boolean().default(false),
  /** What is really taken: needed for a plan of whatever is taken, refused for any other. */
  pieceIds: z.array(z.string()).min(1).max(60).optional(),
})

/** `from`: the hour that whoever presses has on the screen, so that a second press puts off once. */
export const carryPutOffSchema = z.strictObject({
  from: instant,
  /** Left out: to the best hour that the forecast knows of. */
  to: instant.optional(),
})
export type CarryPutOff = z.infer<typeof carryPutOffSchema>

/** Without `pieceIds` every piece still out comes in; without `roomId` each goes back where it came from. */
export const bringBackSchema = z.strictObject({
  pieceIds: z.array(z.string()).max(60).optional(),
  roomId: z.string().optional(),
})
export const carryCoverSchema = z.strictObject({
  pieceIds: z.array(z.string()).max(60).optional(),
  cover: coverSchema,
})
export const carryChangeSchema = z.strictObject({
  plannedAt: instant.optional(),
  stayMinutes: z.int().min(1).max(43_200).optional(),
  cover: coverSchema.optional(),
  pieceIds: z.array(z.string()).min(1).max(60).optional(),
  note: z.string().trim().max(500).optional(),
})

export const carryPieceSchema = z.object({
  id: z.string(),
  number: z.string(),
  title: z.string(),
  outline: z.enum(['low', 'tall', 'round', 'pair']),
  cover: coverSchema,
  fromRoom: z.object({ id: z.string(), name: z.string() }).nullable(),
  outAt: instant.nullable(),
  backAt: instant.nullable(),
  /** For a piece that is out: judged from the moment it went. For a planned one: as planned. Null once back. */
  check: pieceCheckSchema.nullable(),
  isOverdue: z.boolean(),
  /** Passed over when it was asked how its lid turned. */
  isAskSkipped: z.boolean(),
})
export type CarryPiece = z.infer<typeof carryPieceSchema>

/** Whether it can be told how its lid turned: blanks, pairs and what is private to others are drawn otherwise. */
export const hasLid = ({ outline }: Pick<CarryPiece, 'outline'>): boolean =>
  outline === 'low' || outline === 'tall'

export const carrySchema = z.object({
  id: z.string(),
  state: carryStateSchema,
  toRoom: z.object({ id: z.string(), name: z.string(), mark: z.int() }),
  cover: coverSchema,
  plannedAt: instant,
  stayMinutes: z.int(),
  startedAt: instant.nullable(),
  endedAt: instant.nullable(),
  againstAdvice: z.boolean(),
  note: z.string(),
  by: z.string().nullable(),
  /** Of a plan for whatever is taken: the boxes that it is judged by. */
  pieces: z.array(carryPieceSchema),
  /** A plan without named pieces, until it goes. */
  takesWhatever: z.boolean(),
  /** What is said of such a plan, once it is near enough to be judged. */
  whatever: z.string().nullable(),
  /** The plan that comes again which it is one of: "every Tuesday at 09:00". */
  repeat: z.object({ id: z.string(), words: z.string() }).nullable(),
  /** The hour that it was put off from; it can be put back for 10 minutes. */
  /** The better hour that one press puts a plan off to; null where none is known or none is needed. */
  betterAt: instant.nullable(),
  putOffFrom: instant.nullable(),
  canPutBack: z.boolean(),
  /** The most pressing thing about it. */
  headline: z.string(),
  worst: z.enum(['leave', 'unknown', 'keep-short', 'words', 'fine']),
  version: z.int(),
  /** A bring-back can be taken back for 10 minutes. */
  canUndo: z.boolean(),
})
export type Carry = z.infer<typeof carrySchema>

export const carryListQuerySchema = z.strictObject({
  state: z.enum(['planned', 'out', 'open', 'ended']).optional(),
  sort: z.enum(['planned', '-planned']).default('-planned'),
})
