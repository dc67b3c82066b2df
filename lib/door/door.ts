import { z } from 'zod'
import { hourStripSchema } from '@/lib/forecast/strip-view'

const instant = z.iso.datetime()

/** The secret in a door's address: 32 random bytes as base64url. */
export const doorTokenSchema = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'not a door')

export const newDoorSchema = z.strictObject({
  name: z.string().trim().min(1, 'say where the screen hangs').max(60, '60 letters at most'),
  /** The room whose hours it shows. */
  roomId: z.string(),
})
export type NewDoor = z.infer<typeof newDoorSchema>

export const doorSchema = z.object({
  id: z.string(),
  name: z.string(),
  room: z.object({ id: z.string(), name: z.string(), mark: z.int() }),
  createdAt: instant,
  by: z.string().nullable(),
  /** When a screen last asked by this link; null: never. */
  lastSeenAt: instant.nullable(),
})
export type Door = z.infer<typeof doorSchema>

/** With its link, which is told this once. */
export type MadeDoor = Door & { link: string }

export const doorPieceSchema = z.object({
  number: z.string(),
  outline: z.enum(['low', 'tall', 'round', 'pair']),
  state: z.enum(['overdue', 'soon', 'fine', 'unknown', 'words']),
  /** "bring in by 13:35": what follows the number, with its clock time apart. */
  words: z.string(),
  clock: z.string(),
  /** "in work since 11:58". */
  since: z.string(),
  /** Minutes until it has to be in, 0 when that is past; null where no moment is known. */
  minutesLeft: z.number().nullable(),
})
export type DoorPiece = z.infer<typeof doorPieceSchema>

export const doorViewSchema = z.object({
  at: instant,
  timeZone: z.string(),
  room: z.object({ name: z.string(), mark: z.int() }),
  /** When the room was last read, and whether that still counts as its air now. */
  heard: z.object({ at: instant, isFresh: z.boolean() }).nullable(),
  out: z.array(doorPieceSchema),
  strip: hourStripSchema,
  /** "Landing cupboard 8.5, Shop 13.6 % MC: 5.1 points apart"; empty where one of them is not known. */
  gap: z.string(),
  /** The next thing that is planned; empty when nothing is. */
  next: z.string(),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type DoorView = z.infer<typeof doorViewSchema>
