import { z } from 'zod'
import { carrySchema } from '@/lib/carry/carry'
import { hourStripSchema } from '@/lib/forecast/strip-view'
import { markSchema } from '@/lib/notices/notice'
import { roomAirSchema, roomKindSchema } from '@/lib/rooms/room'

const instant = z.iso.datetime()

/** A room hung on the moisture rule. */
export const ruleRoomSchema = z.object({
  id: z.string(),
  name: z.string(),
  kind: roomKindSchema,
  mark: z.int(),
  air: roomAirSchema,
  /** Drawn in heart, with its own year behind it: the keep room in focus. */
  isFocus: z.boolean(),
  year: z.object({ emcPctLow: z.number(), emcPctHigh: z.number(), days: z.int() }).nullable(),
})
export type RuleRoom = z.infer<typeof ruleRoomSchema>

/** A bracket for a piece that is out or about to go: how far its joint may move from where it was cut. */
export const ruleBracketSchema = z.object({
  id: z.string(),
  number: z.string(),
  cutMcPct: z.number(),
  mcPct: z.number(),
  lowMcPct: z.number(),
  highMcPct: z.number(),
  isOut: z.boolean(),
  earlyAt: instant.nullable(),
  leftPct: z.number(),
})

/** Pieces standing on the bottom edge, grouped where they would overlap. */
export const ruleShelfSchema = z.object({
  mcPct: z.number(),
  label: z.string(),
  sub: z.string(),
  outline: z.enum(['low', 'tall', 'round', 'pair']),
  isOut: z.boolean(),
  count: z.int(),
})

export const needSchema = z.object({
  id: z.string(),
  mark: markSchema,
  title: z.string(),
  body: z.string(),
  link: z.string(),
  linkWords: z.string(),
})

export const nowViewSchema = z.object({
  at: instant,
  /** The most urgent thing first. Parts in bold are marked, never by markup in the text. */
  headline: z.array(z.object({ text: z.string(), strong: z.boolean() })),
  /** Carries with pieces out, the most urgent first; due within 60 min before the rest. */
  out: z.array(carrySchema),
  planned: z.array(carrySchema),
  rule: z.object({
    rooms: z.array(ruleRoomSchema),
    brackets: z.array(ruleBracketSchema),
    shelf: z.array(ruleShelfSchema),
  }),
  /** The shop's next 48 hours; null where there is no shop, or for those who see whole days only. */
  strip: z
    .object({ room: z.object({ id: z.string(), name: z.string() }), hours: hourStripSchema })
    .nullable(),
  /** Pieces just brought back, for the undo line. */
  justBack: z.array(
    z.object({
      carryId: z.string(),
      pieceId: z.string(),
      number: z.string(),
      roomName: z.string(),
      at: instant,
      /** A box, of which it can be told how its lid turned. */
      hasLid: z.boolean(),
      /** That question was passed over. */
      isAskSkipped: z.boolean(),
    }),
  ),
  needs: z.array(needSchema),
  /** It is time to lock up, and the day is not closed yet. */
  isLockUp: z.boolean(),
  silent: z.array(
    z.object({
      id: z.string(),
      name: z.string(),
      roomName: z.string().nullable(),
      since: instant.nullable(),
    }),
  ),
  counts: z.object({ rooms: z.int(), sensors: z.int(), pieces: z.int() }),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type NowView = z.infer<typeof nowViewSchema>
