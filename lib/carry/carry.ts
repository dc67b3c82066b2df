import { z } from 'zod'
import { coverSchema } from '@/lib/pieces/piece'
import { pieceCheckSchema } from './carry-check'

const instant = z.iso.datetime()

export const carryStateSchema = z.enum(['planned', 'out', 'back', 'called-off'])
export type CarryState = z.infer<typeof carryStateSchema>

/** Going now needs no plan: `startsNow` makes it and starts it in one. */
export const newCarrySchema = z.strictObject({
  pieceIds: z.array(z.string()).min(1, 'choose at least one piece').max(60),
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
export type NewCarry = z.infer<typeof newCarrySchema>

export const carryStartSchema = z.strictObject({ againstAdvice: z.boolean().default(false) })

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
  pieces: z.array(carryPieceSchema),
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
